package org.isthmus.language.validation;

import java.util.Optional;
import org.isthmus.language.evaluation.Evaluator;
import org.isthmus.language.evaluation.Value;
import org.isthmus.language.isthmus.Parameter;
import org.isthmus.language.typing.Inference;
import org.isthmus.language.typing.Type;
import org.isthmus.runtime.units.Dimension;
import org.isthmus.runtime.units.Unit;
import org.isthmus.runtime.units.Units;

/** The declared range of a parameter; one without a range takes every value. */
record ParameterRange(String name, double lower, double upper, Unit unit) {
    private static final double ROUNDING = 1e-12;

    static ParameterRange of(Parameter parameter, Evaluator evaluator) {
        Unit unit = unit(parameter);
        if (parameter.getRange() != null
                && evaluator.evaluate(parameter.getRange()) instanceof Value.RangeValue range) {
            return new ParameterRange(parameter.getName(), range.lower(), range.upper(), unit);
        }
        return new ParameterRange(parameter.getName(), Double.NEGATIVE_INFINITY, Double.POSITIVE_INFINITY, unit);
    }

    /** The sentence for a value outside; empty for one inside. */
    Optional<String> violation(double value) {
        double slack = ROUNDING * Math.max(Math.abs(lower), Math.abs(upper));
        if (value >= lower - (Double.isFinite(slack) ? slack : 0)
                && value <= upper + (Double.isFinite(slack) ? slack : 0)) {
            return Optional.empty();
        }
        return Optional.of("Parameter '" + name + "' must lie from " + told(lower) + " to " + told(upper) + ", but is "
                + told(value) + ".");
    }

    private static Unit unit(Parameter parameter) {
        return Units.fitting(
                new Inference().typeOf(parameter) instanceof Type.Scalar scalar
                        ? scalar.dimension()
                        : Dimension.NUMBER);
    }

    /** A value of a parameter with its unit. */
    static String told(Parameter parameter, double value) {
        return told(value, unit(parameter));
    }

    private String told(double value) {
        return told(value, unit);
    }

    private static String told(double value, Unit unit) {
        double number = unit.fromInternal(value);
        String text = number == Math.rint(number) && Math.abs(number) < 1e15
                ? Long.toString((long) number)
                : Float.toString((float) number);
        return unit.symbol().isEmpty() ? text : text + " " + unit.symbol();
    }
}
