package org.isthmus.runtime.device;

import java.util.List;

/** A side of an expectation: arithmetic over observables, in internal units. */
public sealed interface ExpectedValue {
    /** A number that is known before the run; also what parameters and constants have become. */
    record Number(double value) implements ExpectedValue {}

    /** A swept parameter or an axis at the point in question. */
    record AxisValue(String axis) implements ExpectedValue {}

    /**
     * An observable.
     *
     * @param at the point where it is taken, solved at exactly these values; empty for every point
     */
    record Observed(ObservableCall call, List<AxisPosition> at) implements ExpectedValue {
        public Observed {
            at = List.copyOf(at);
        }
    }

    /** {@code + - * / ^}. */
    record Arithmetic(char operator, ExpectedValue left, ExpectedValue right) implements ExpectedValue {}

    record Negated(ExpectedValue operand) implements ExpectedValue {}

    /** A real function of the catalogue, applied point by point. */
    record Applied(String function, List<ExpectedValue> arguments) implements ExpectedValue {
        public Applied {
            arguments = List.copyOf(arguments);
        }
    }

    /** One number from all points. */
    record Reduced(Reduction reduction, ExpectedValue operand) implements ExpectedValue {}

    /** How all points become one number. */
    enum Reduction {
        MIN,
        MAX,
        MEAN,
        /** The value of the first axis where the operand is least. */
        ARGMIN,
        /** The value of the first axis where the operand is greatest. */
        ARGMAX,
        /** Slope of the straight line through the operand over the first axis, by least squares. */
        SLOPE
    }
}
