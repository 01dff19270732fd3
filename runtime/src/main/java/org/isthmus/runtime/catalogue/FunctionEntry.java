package org.isthmus.runtime.catalogue;

import java.util.List;
import java.util.function.Function;
import org.isthmus.runtime.units.Dimension;

/**
 * A function of real numbers.
 *
 * @param fewest fewest arguments
 * @param most most arguments
 * @param rule dimension of the value from those of the arguments
 * @param code the value in internal units from arguments in internal units
 */
public record FunctionEntry(String name, int fewest, int most, DimensionRule rule, Code code, String documentation)
        implements Entry {

    /** Dimension of a value from the dimensions of its arguments. */
    @FunctionalInterface
    public interface DimensionRule {
        /**
         * Applies the rule.
         *
         * @throws DimensionProblem where the arguments do not fit
         */
        Dimension of(List<Dimension> arguments);
    }

    /** The value of a function. */
    @FunctionalInterface
    public interface Code {
        double at(double[] arguments);
    }

    /** Arguments whose dimensions do not fit; the message is the end of a sentence about the call. */
    public static final class DimensionProblem extends RuntimeException {
        private static final long serialVersionUID = 1;

        public DimensionProblem(String message) {
            super(message);
        }
    }

    static DimensionRule numbers() {
        return arguments -> {
            for (Dimension argument : arguments) {
                if (!argument.isNumber()) {
                    throw new DimensionProblem("takes a plain number, but this is " + argument.withArticle());
                }
            }
            return Dimension.NUMBER;
        };
    }

    static DimensionRule same(Function<Dimension, Dimension> result) {
        return arguments -> {
            Dimension first = arguments.get(0);
            for (Dimension argument : arguments) {
                if (!argument.equals(first)) {
                    throw new DimensionProblem("takes quantities of one kind, but these are " + first.withArticle()
                            + " and " + argument.withArticle());
                }
            }
            return result.apply(first);
        };
    }
}
