package org.isthmus.language.evaluation;

import java.util.HashMap;
import java.util.LinkedHashSet;
import java.util.Map;
import java.util.Set;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.Declaration;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.structure.WrittenValue;
import org.isthmus.language.typing.Inference;

/**
 * What names stand for: given values first, then expressions that replace those in the text, then the text. Not safe for
 * several threads; make one per elaboration.
 */
public final class Environment {
    private final Map<Declaration, Value> values;
    private final Map<Declaration, Expression> replacements;
    private final Map<Declaration, Code> compiled = new HashMap<>();
    private final Set<Declaration> open = new LinkedHashSet<>();
    private final Inference inference = new Inference();
    private final double lengthTolerance;

    /**
     * Makes an environment.
     *
     * @param values fixed values of parameters
     * @param replacements expressions of overridden parameters
     * @param lengthTolerance two positions closer than this count as one in comparisons, nm
     */
    public Environment(
            Map<? extends Declaration, Value> values,
            Map<? extends Declaration, Expression> replacements,
            double lengthTolerance) {
        this.values = Map.copyOf(values);
        this.replacements = Map.copyOf(replacements);
        this.lengthTolerance = lengthTolerance;
    }

    /** An environment in which names mean what the text says. */
    public static Environment ofText() {
        return new Environment(Map.of(), Map.of(), 0);
    }

    /** The same names with another tolerance. */
    public Environment withTolerance(double newTolerance) {
        return new Environment(values, replacements, newTolerance);
    }

    double lengthTolerance() {
        return lengthTolerance;
    }

    Inference inference() {
        return inference;
    }

    Code codeOf(Declaration declaration) {
        Value fixed = values.get(declaration);
        if (fixed != null) {
            return new Code.Fixed(fixed);
        }
        Code known = compiled.get(declaration);
        if (known != null) {
            return known;
        }
        if (!open.add(declaration)) {
            throw new EvaluationFailure(
                    declaration, IssueCode.CYCLE, "'" + declaration.getName() + "' needs its own value.");
        }
        try {
            Expression expression = replacements.getOrDefault(declaration, WrittenValue.of(declaration));
            if (expression == null) {
                throw new EvaluationFailure(
                        declaration, IssueCode.KIND_MISMATCH, "'" + declaration.getName() + "' has no value.");
            }
            Code code = new Evaluator(this).compile(expression);
            compiled.put(declaration, code);
            return code;
        } finally {
            open.remove(declaration);
        }
    }
}
