package org.isthmus.language.evaluation;

import java.util.ArrayList;
import java.util.List;
import org.apache.commons.math3.complex.Complex;
import org.eclipse.emf.ecore.EObject;
import org.isthmus.language.evaluation.Code.ComplexCode;
import org.isthmus.language.evaluation.Code.Fixed;
import org.isthmus.language.evaluation.Code.MatrixCode;
import org.isthmus.language.evaluation.Code.RealCode;
import org.isthmus.language.evaluation.Code.RealNode;
import org.isthmus.language.evaluation.Code.TruthCode;
import org.isthmus.language.evaluation.Code.TruthNode;
import org.isthmus.language.evaluation.Value.ListValue;
import org.isthmus.language.evaluation.Value.MatrixValue;
import org.isthmus.language.evaluation.Value.PointValue;
import org.isthmus.language.evaluation.Value.RangeValue;
import org.isthmus.language.evaluation.Value.Real;
import org.isthmus.language.evaluation.Value.TextValue;
import org.isthmus.language.evaluation.Value.TruthValue;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.BinaryExpression;
import org.isthmus.language.isthmus.ComparisonExpression;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.ListLiteral;
import org.isthmus.language.isthmus.PointLiteral;
import org.isthmus.language.isthmus.QuantityLiteral;
import org.isthmus.language.isthmus.RangeExpression;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.language.isthmus.TextLiteral;
import org.isthmus.language.isthmus.UnaryExpression;
import org.isthmus.language.typing.TextLiterals;
import org.isthmus.language.typing.Type.Scalar;
import org.isthmus.runtime.units.Dimension;
import org.isthmus.runtime.units.Units;

/** Compiles expressions; what depends on no site is computed on the spot. */
public final class Evaluator {
    private final Environment environment;
    private final CallCompiler calls;

    public Evaluator(Environment environment) {
        this.environment = environment;
        calls = new CallCompiler(this, environment);
    }

    /** The value of an expression that depends on no site. */
    public Value evaluate(Expression expression) {
        if (compile(expression) instanceof Fixed fixed) {
            return fixed.value();
        }
        throw new EvaluationFailure(
                expression,
                IssueCode.MISPLACED,
                "This depends on the position, but there is no site to evaluate it at.");
    }

    /** The real value of an expression that depends on no site; finite. */
    public double real(Expression expression) {
        Value value = evaluate(expression);
        if (value instanceof Real real) {
            if (!Double.isFinite(real.value())) {
                throw new EvaluationFailure(
                        expression, IssueCode.NOT_FINITE, "This is " + real.value() + ", not a finite number.");
            }
            return real.value();
        }
        throw new EvaluationFailure(expression, IssueCode.NOT_REAL, "This must be a real number.");
    }

    /** Compiles a real quantity. */
    public RealNode field(Expression expression) {
        return realNode(compile(expression), expression);
    }

    /** Compiles a condition; null holds everywhere. */
    public TruthNode condition(Expression expression) {
        return expression == null ? site -> true : truthNode(compile(expression), expression);
    }

    /** Compiles an expression. */
    public Code compile(Expression expression) {
        if (expression instanceof QuantityLiteral literal) {
            return new Fixed(literal(literal));
        }
        if (expression instanceof Reference reference) {
            return calls.compile(reference);
        }
        if (expression instanceof BinaryExpression binary) {
            return binary(binary);
        }
        if (expression instanceof UnaryExpression unary) {
            return unary(unary);
        }
        if (expression instanceof ComparisonExpression comparison) {
            return comparison(comparison);
        }
        if (expression instanceof PointLiteral point) {
            return new Fixed(new PointValue(reals(point.getCoordinates())));
        }
        if (expression instanceof RangeExpression range) {
            return new Fixed(new RangeValue(real(range.getLower()), real(range.getUpper())));
        }
        if (expression instanceof ListLiteral list) {
            return list(list);
        }
        if (expression instanceof TextLiteral text) {
            return new Fixed(new TextValue(TextLiterals.text(text)));
        }
        throw new EvaluationFailure(expression, IssueCode.SYNTAX, "This expression is not complete.");
    }

    private List<Double> reals(List<Expression> expressions) {
        List<Double> values = new ArrayList<>();
        for (Expression expression : expressions) {
            values.add(real(expression));
        }
        return values;
    }

    private static Value literal(QuantityLiteral literal) {
        double number = Double.parseDouble(literal.getValue());
        if (literal.getUnit() == null) {
            return new Real(number);
        }
        if (literal.getUnit().equals("i")) {
            return new Value.ComplexNumber(new Complex(0, number));
        }
        var unit = Units.bySymbol(literal.getUnit())
                .orElseThrow(() -> new EvaluationFailure(
                        literal, IssueCode.UNKNOWN_UNIT, "'" + literal.getUnit() + "' is not a unit symbol."));
        if (literal.getPower() == null) {
            return new Real(unit.toInternal(number));
        }
        double power = Double.parseDouble(literal.getPower());
        return new Real(number * Math.pow(unit.factor(), power));
    }

    // ---- operators

    private Code unary(UnaryExpression unary) {
        Code operand = compile(unary.getOperand());
        return switch (unary.getOperator()) {
            case "not" -> {
                TruthNode node = truthNode(operand, unary.getOperand());
                yield fold(operand, new TruthCode(site -> !node.at(site)));
            }
            case "+" -> operand;
            default -> Arithmetic.negate(operand, unary);
        };
    }

    private Code binary(BinaryExpression binary) {
        Code left = compile(binary.getLeft());
        Code right = compile(binary.getRight());
        String operator = binary.getOperator();
        if (operator.equals("and") || operator.equals("or")) {
            TruthNode a = truthNode(left, binary.getLeft());
            TruthNode b = truthNode(right, binary.getRight());
            Code code = new TruthCode(
                    operator.equals("and") ? site -> a.at(site) && b.at(site) : site -> a.at(site) || b.at(site));
            return left instanceof Fixed && right instanceof Fixed ? fold(left, code) : code;
        }
        return Arithmetic.apply(operator, left, right, binary);
    }

    private Code comparison(ComparisonExpression comparison) {
        List<Expression> operands = comparison.getOperands();
        List<Code> codes = operands.stream().map(this::compile).toList();
        boolean positions = codes.stream().anyMatch(RealCode.class::isInstance)
                && environment.inference().typeOf(operands.get(0)) instanceof Scalar scalar
                && scalar.dimension().equals(Dimension.LENGTH);
        double tolerance = positions ? environment.lengthTolerance() : 0;
        TruthNode all = null;
        boolean fixed = true;
        for (int i = 0; i + 1 < codes.size(); i++) {
            TruthNode link = comparison(
                    comparison.getOperators().get(i),
                    realNode(codes.get(i), operands.get(i)),
                    realNode(codes.get(i + 1), operands.get(i + 1)),
                    tolerance);
            TruthNode before = all;
            all = before == null ? link : site -> before.at(site) && link.at(site);
            fixed &= codes.get(i) instanceof Fixed && codes.get(i + 1) instanceof Fixed;
        }
        Code code = new TruthCode(all);
        return fixed ? new Fixed(new TruthValue(all.at(new Site()))) : code;
    }

    private static TruthNode comparison(String operator, RealNode a, RealNode b, double tolerance) {
        return switch (operator) {
            case "<=" -> site -> a.at(site) <= b.at(site) + tolerance;
            case ">=" -> site -> a.at(site) >= b.at(site) - tolerance;
            case "<" -> site -> a.at(site) < b.at(site) - tolerance;
            case ">" -> site -> a.at(site) > b.at(site) + tolerance;
            case "==" -> site -> Math.abs(a.at(site) - b.at(site)) <= tolerance;
            default -> site -> !(Math.abs(a.at(site) - b.at(site)) <= tolerance);
        };
    }

    private Code list(ListLiteral list) {
        if (!list.getElements().isEmpty() && list.getElements().get(0) instanceof ListLiteral) {
            return matrix(list);
        }
        List<Value> values = new ArrayList<>();
        for (Expression element : list.getElements()) {
            values.add(evaluate(element));
        }
        return new Fixed(new ListValue(values));
    }

    private Code matrix(ListLiteral rows) {
        int size = rows.getElements().size();
        List<Code> codes = new ArrayList<>();
        List<Expression> places = new ArrayList<>();
        for (Expression row : rows.getElements()) {
            for (Expression element : ((ListLiteral) row).getElements()) {
                codes.add(compile(element));
                places.add(element);
            }
        }
        Code.ComplexNode[] nodes = new Code.ComplexNode[codes.size()];
        for (int k = 0; k < nodes.length; k++) {
            nodes[k] = Arithmetic.complexNode(codes.get(k), places.get(k));
        }
        Code code = new MatrixCode(site -> {
            Complex[] elements = new Complex[nodes.length];
            for (int k = 0; k < elements.length; k++) {
                elements[k] = nodes[k].at(site);
            }
            return SquareMatrix.of(size, elements);
        });
        return codes.stream().allMatch(Fixed.class::isInstance) ? fold(codes.get(0), code) : code;
    }

    // ---- conversions

    /** Computes a code on the spot where what it was made of is fixed. */
    static Code fold(Code source, Code code) {
        if (!(source instanceof Fixed)) {
            return code;
        }
        Site nowhere = new Site();
        if (code instanceof RealCode real) {
            return new Fixed(new Real(real.node().at(nowhere)));
        }
        if (code instanceof TruthCode truth) {
            return new Fixed(new TruthValue(truth.node().at(nowhere)));
        }
        if (code instanceof ComplexCode complex) {
            return new Fixed(new Value.ComplexNumber(complex.node().at(nowhere)));
        }
        return code instanceof MatrixCode matrix
                ? new Fixed(new MatrixValue(matrix.node().at(nowhere)))
                : code;
    }

    static RealNode realNode(Code code, EObject place) {
        if (code instanceof RealCode real) {
            return real.node();
        }
        if (code instanceof Fixed fixed && fixed.value() instanceof Real real) {
            double value = real.value();
            return site -> value;
        }
        throw new EvaluationFailure(place, IssueCode.NOT_REAL, "This must be a real number.");
    }

    static TruthNode truthNode(Code code, EObject place) {
        if (code instanceof TruthCode truth) {
            return truth.node();
        }
        if (code instanceof Fixed fixed && fixed.value() instanceof TruthValue truth) {
            boolean value = truth.value();
            return site -> value;
        }
        throw new EvaluationFailure(place, IssueCode.KIND_MISMATCH, "This must be a condition.");
    }
}
