package org.isthmus.language.measurement;

import java.util.ArrayList;
import java.util.List;
import org.isthmus.language.evaluation.EvaluationFailure;
import org.isthmus.language.evaluation.Evaluator;
import org.isthmus.language.evaluation.Value;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.Points;
import org.isthmus.language.typing.Inference;
import org.isthmus.language.typing.Type;
import org.isthmus.runtime.units.Dimension;
import org.isthmus.runtime.units.Unit;
import org.isthmus.runtime.units.Units;

/** The values of an axis from its range or list. */
final class AxisValues {
    private static final int MOST = 10_000_000;

    private AxisValues() {}

    /**
     * Values in internal units.
     *
     * @throws EvaluationFailure where the range is empty, runs backwards or has no whole number of points
     */
    static List<Double> of(Points points, Evaluator evaluator) {
        Value value = evaluator.evaluate(points.getValues());
        if (value instanceof Value.ListValue list) {
            if (points.getCount() != null || points.getStep() != null) {
                throw new EvaluationFailure(
                        points,
                        IssueCode.KIND_MISMATCH,
                        "A list has its points already; leave out what stands behind it.");
            }
            List<Double> values = new ArrayList<>();
            for (Value element : list.elements()) {
                values.add(finite(((Value.Real) element).value(), points));
            }
            return values;
        }
        Value.RangeValue range = (Value.RangeValue) value;
        double lower = finite(range.lower(), points);
        double upper = finite(range.upper(), points);
        if (points.getCount() != null) {
            return counted(lower, upper, evaluator.real(points.getCount()), points);
        }
        if (upper < lower) {
            throw backwards(lower, upper, points);
        }
        if (points.getStep() != null) {
            return stepped(lower, upper, evaluator.real(points.getStep()), points);
        }
        if (points.getTolerance() != null) {
            throw new EvaluationFailure(
                    points,
                    IssueCode.KIND_MISMATCH,
                    "'adaptive to' is for the energy axis; give a number of points here.");
        }
        if (lower != Math.rint(lower) || upper != Math.rint(upper)) {
            throw new EvaluationFailure(
                    points,
                    IssueCode.EMPTY_RANGE,
                    "This range says its ends only; add 'in N points' or 'step Q', or use whole numbers.");
        }
        return stepped(lower, upper, 1, points);
    }

    private static double finite(double value, Points points) {
        if (!Double.isFinite(value)) {
            throw new EvaluationFailure(
                    points.getValues(), IssueCode.NOT_FINITE, "A value of this axis is " + value + ".");
        }
        return value;
    }

    static EvaluationFailure backwards(double lower, double upper, Points points) {
        return new EvaluationFailure(
                points.getValues(),
                IssueCode.EMPTY_RANGE,
                "This range runs backwards, from " + told(lower, points) + " to " + told(upper, points)
                        + "; exchange its ends.");
    }

    private static List<Double> counted(double lower, double upper, double count, Points points) {
        if (count != Math.rint(count) || count < 1 || count > MOST) {
            throw new EvaluationFailure(
                    points.getCount(),
                    IssueCode.EMPTY_RANGE,
                    "The number of points must be a whole number from 1 to " + MOST + ", not " + text(count) + ".");
        }
        if (upper < lower) {
            throw backwards(lower, upper, points);
        }
        int n = (int) count;
        if (n == 1 && upper > lower) {
            throw new EvaluationFailure(
                    points.getCount(),
                    IssueCode.EMPTY_RANGE,
                    "One point cannot include both ends of a range; ask for two, or give a list of one value.");
        }
        if (n > 1 && upper == lower) {
            throw new EvaluationFailure(
                    points.getValues(),
                    IssueCode.EMPTY_RANGE,
                    "This range is empty: both ends are " + told(lower, points) + ".");
        }
        List<Double> values = new ArrayList<>(n);
        for (int k = 0; k < n; k++) {
            // both ends exactly; the weights keep round numbers round
            values.add(n == 1 || k == 0 ? lower : k == n - 1 ? upper : (lower * (n - 1 - k) + upper * k) / (n - 1));
        }
        return values;
    }

    private static List<Double> stepped(double lower, double upper, double step, Points points) {
        if (!(step > 0) || !((upper - lower) / step < MOST)) {
            throw new EvaluationFailure(
                    points.getStep() == null ? points.getValues() : points.getStep(),
                    IssueCode.EMPTY_RANGE,
                    "The step must be greater than zero and make at most " + MOST + " points.");
        }
        long steps = (long) Math.floor((upper - lower) / step + 1e-9);
        List<Double> values = new ArrayList<>();
        for (long k = 0; k <= steps; k++) {
            double value = lower + k * step;
            // 0.1 + 2·0.1 is not 0.3: take the shortest decimal within rounding
            double round = Double.parseDouble(String.format(java.util.Locale.ROOT, "%.14g", value));
            values.add(Math.min(Math.abs(round - value) <= 4 * Math.ulp(value) ? round : value, upper));
        }
        return values;
    }

    private static String told(double value, Points points) {
        Dimension dimension =
                new Inference().typeOf(points.getValues()) instanceof Type.Range range ? range.dimension() : null;
        Unit unit = Units.fitting(dimension == null ? Dimension.NUMBER : dimension);
        String number = text((float) unit.fromInternal(value));
        return unit.symbol().isEmpty() ? number : number + " " + unit.symbol();
    }

    private static String text(float number) {
        return number == Math.rint(number) && Math.abs(number) < 1e9
                ? Long.toString((long) number)
                : Float.toString(number);
    }

    private static String text(double number) {
        return number == Math.rint(number) ? Long.toString((long) number) : Double.toString(number);
    }
}
