package org.isthmus.runtime.measure;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import org.isthmus.runtime.catalogue.Catalogue;
import org.isthmus.runtime.catalogue.FunctionEntry;
import org.isthmus.runtime.device.AxisPosition;
import org.isthmus.runtime.device.ExpectedValue;
import org.isthmus.runtime.device.Measurement;
import org.isthmus.runtime.device.Measurement.BiasAxis;
import org.isthmus.runtime.device.Measurement.EnergyPoints;
import org.isthmus.runtime.device.Measurement.Expectation;
import org.isthmus.runtime.device.Measurement.NoEnergies;
import org.isthmus.runtime.result.CsvText;
import org.isthmus.runtime.result.Verdict;

/** Judges expectations from the samples that were taken for them. */
final class ExpectationCheck {
    /** Equality without a tolerance means equal but for rounding. */
    private static final double ROUNDING = 1e-12;

    private final Measurement measurement;
    private final Grid grid;
    private final Map<ExpectedValue.Observed, Request> requests;
    private final int[] sizes;
    private final boolean energyAxis;

    ExpectationCheck(Measurement measurement, Grid grid, Map<ExpectedValue.Observed, Request> requests) {
        this.measurement = measurement;
        this.grid = grid;
        this.requests = requests;
        sizes = new int[grid.axes()];
        for (int k = 0; k < sizes.length; k++) {
            sizes[k] = grid.size(k);
        }
        energyAxis = !(measurement.energy() instanceof NoEnergies);
    }

    Verdict judge(Expectation expectation) {
        Field left = evaluate(expectation.left());
        Field right = evaluate(expectation.right());
        Field excess = left.with(right, (l, r) -> excess(expectation, l, r));
        Field lefts = left.with(right, (l, r) -> l);
        Field rights = left.with(right, (l, r) -> r);
        int worstPoint = 0;
        int worstInner = 0;
        double worst = Double.NEGATIVE_INFINITY;
        int count = 0;
        for (int p = 0; p < excess.points(); p++) {
            for (int i = 0; i < excess.values()[p].length; i++) {
                count++;
                double value = excess.values()[p][i];
                if (Double.isNaN(value) ? worst < Double.POSITIVE_INFINITY : value > worst) {
                    worst = Double.isNaN(value) ? Double.POSITIVE_INFINITY : value;
                    worstPoint = p;
                    worstInner = i;
                }
            }
        }
        double measured = lefts.values()[worstPoint][worstInner] / expectation.unitFactor();
        double expected = rights.values()[worstPoint][worstInner] / expectation.unitFactor();
        return new Verdict(
                expectation.text(),
                worst <= 0,
                measured,
                expected,
                measured - expected,
                count > 1 ? place(excess, worstPoint, worstInner) : "",
                expectation.unit(),
                expectation.source());
    }

    /** How far a comparison is from holding; zero or less where it holds. */
    private static double excess(Expectation expectation, double left, double right) {
        double tolerance = expectation.relative() ? expectation.tolerance() * Math.abs(right) : expectation.tolerance();
        double rounding = ROUNDING * Math.max(Math.abs(left), Math.abs(right));
        return switch (expectation.comparator()) {
            case EQUAL -> Math.abs(left - right) - Math.max(tolerance, rounding);
            case NOT_EQUAL -> Math.max(tolerance, rounding) - Math.abs(left - right) + Double.MIN_VALUE;
            case AT_MOST -> left - right - tolerance;
            case AT_LEAST -> right - left - tolerance;
            case LESS ->
                left - right < tolerance
                        ? Math.min(0, left - right - tolerance)
                        : left - right - tolerance + Double.MIN_VALUE;
            case GREATER ->
                right - left < tolerance
                        ? Math.min(0, right - left - tolerance)
                        : right - left - tolerance + Double.MIN_VALUE;
        };
    }

    private String place(Field field, int point, int inner) {
        List<String> parts = new ArrayList<>();
        int[] index = field.index(field.free(), point);
        for (int k = 0; k < sizes.length; k++) {
            if (field.free()[k]) {
                parts.add(grid.header(k) + " = "
                        + CsvText.number(grid.told(k, grid.axis(k).values().get(index[k]))));
            }
        }
        if (field.energies() != null) {
            double[] energies = field.energies()[point];
            int perEnergy = Math.max(1, field.values()[point].length / energies.length);
            parts.add("energy (eV) = " + CsvText.number(energies[Math.min(inner / perEnergy, energies.length - 1)]));
        }
        return String.join(", ", parts);
    }

    private Field evaluate(ExpectedValue value) {
        if (value instanceof ExpectedValue.Number number) {
            return Field.constant(number.value(), sizes);
        }
        if (value instanceof ExpectedValue.AxisValue axis) {
            return axis(axis.axis());
        }
        if (value instanceof ExpectedValue.Observed observed) {
            return observed(requests.get(observed));
        }
        if (value instanceof ExpectedValue.Negated negated) {
            return evaluate(negated.operand()).map(v -> -v);
        }
        if (value instanceof ExpectedValue.Arithmetic arithmetic) {
            return evaluate(arithmetic.left())
                    .with(evaluate(arithmetic.right()), (a, b) -> switch (arithmetic.operator()) {
                        case '+' -> a + b;
                        case '-' -> a - b;
                        case '*' -> a * b;
                        case '/' -> a / b;
                        default -> Math.pow(a, b);
                    });
        }
        if (value instanceof ExpectedValue.Applied applied) {
            return applied(applied);
        }
        ExpectedValue.Reduced reduced = (ExpectedValue.Reduced) value;
        return Field.constant(reduce(reduced.reduction(), evaluate(reduced.operand())), sizes);
    }

    /** Whether an expectation can speak of an axis by its name. */
    static boolean knows(String name, Measurement measurement, Grid grid) {
        return grid.indexOf(name) >= 0
                || name.equals(AxisPosition.ENERGY) && measurement.energy() instanceof EnergyPoints;
    }

    private Field axis(String name) {
        if (name.equals(AxisPosition.ENERGY) && measurement.energy() instanceof EnergyPoints points) {
            double[] energies = points.values().stream().mapToDouble(e -> e).toArray();
            return new Field(new boolean[sizes.length], sizes, new double[][] {energies}, new double[][] {energies});
        }
        int axis = grid.indexOf(name);
        boolean[] free = new boolean[sizes.length];
        free[axis] = true;
        double[][] values =
                grid.axis(axis).values().stream().map(v -> new double[] {v}).toArray(double[][]::new);
        return new Field(free, sizes, null, values);
    }

    private Field observed(Request request) {
        boolean[] free = new boolean[sizes.length];
        for (int k = 0; k < free.length; k++) {
            free[k] = Double.isNaN(request.fixed()[k]);
        }
        List<List<Double>> points = grid.points(request.fixed());
        double[][] values = new double[points.size()][];
        boolean resolved = request.resolved(energyAxis) && Double.isNaN(request.energy());
        double[][] energies = resolved ? new double[points.size()][] : null;
        for (int p = 0; p < values.length; p++) {
            Request.Sample sample = request.at(points.get(p));
            values[p] = Arrays.stream(sample.values())
                    .flatMapToDouble(Arrays::stream)
                    .toArray();
            if (resolved) {
                energies[p] = sample.energies();
            }
        }
        Field field = new Field(free, sizes, energies, values);
        for (String averaged : measurement.averages()) {
            field = field.mean(grid.indexOf(averaged));
        }
        return field;
    }

    private Field applied(ExpectedValue.Applied applied) {
        FunctionEntry function =
                (FunctionEntry) Catalogue.expressionName(applied.function()).orElseThrow();
        List<Field> arguments = applied.arguments().stream().map(this::evaluate).toList();
        if (arguments.size() == 1) {
            return arguments.get(0).map(v -> function.code().at(new double[] {v}));
        }
        Field result = arguments.get(0);
        for (int k = 1; k < arguments.size(); k++) {
            result = result.with(arguments.get(k), (a, b) -> function.code().at(new double[] {a, b}));
        }
        return result;
    }

    private double reduce(ExpectedValue.Reduction reduction, Field field) {
        List<double[]> pairs = pairs(field);
        return switch (reduction) {
            case MIN -> pairs.stream().mapToDouble(p -> p[1]).reduce(Double.POSITIVE_INFINITY, ExpectationCheck::least);
            case MAX ->
                pairs.stream().mapToDouble(p -> p[1]).reduce(Double.NEGATIVE_INFINITY, ExpectationCheck::greatest);
            case MEAN -> pairs.stream().mapToDouble(p -> p[1]).sum() / pairs.size();
            case ARGMIN -> extreme(pairs, -1);
            case ARGMAX -> extreme(pairs, 1);
            case SLOPE -> slope(pairs);
        };
    }

    /** A value that is not defined stays so in the extreme: an expectation must not hold by overlooking it. */
    private static double least(double a, double b) {
        return Math.min(a, b);
    }

    private static double greatest(double a, double b) {
        return Math.max(a, b);
    }

    private static double extreme(List<double[]> pairs, int sign) {
        double[] best = pairs.get(0);
        for (double[] pair : pairs) {
            if (sign * pair[1] > sign * best[1]) {
                best = pair;
            }
        }
        return best[0];
    }

    /** Least squares through all points (any handbook). */
    private static double slope(List<double[]> pairs) {
        double mx = pairs.stream().mapToDouble(p -> p[0]).average().orElse(Double.NaN);
        double my = pairs.stream().mapToDouble(p -> p[1]).average().orElse(Double.NaN);
        double xy = 0;
        double xx = 0;
        for (double[] pair : pairs) {
            xy += (pair[0] - mx) * (pair[1] - my);
            xx += (pair[0] - mx) * (pair[0] - mx);
        }
        return xy / xx;
    }

    /** Every value with its place on the first axis: energy, else the first bias, else the first sweep. */
    private List<double[]> pairs(Field field) {
        int axis = firstAxis();
        List<double[]> pairs = new ArrayList<>();
        for (int p = 0; p < field.points(); p++) {
            int[] index = field.index(field.free(), p);
            double[] values = field.values()[p];
            for (int i = 0; i < values.length; i++) {
                double place = Double.NaN;
                if (field.energies() != null) {
                    double[] energies = field.energies()[p];
                    place = energies[Math.min(i / Math.max(1, values.length / energies.length), energies.length - 1)];
                } else if (axis >= 0) {
                    place = grid.axis(axis).values().get(index[axis]);
                }
                pairs.add(new double[] {place, values[i]});
            }
        }
        return pairs;
    }

    private int firstAxis() {
        for (int k = 0; k < grid.axes(); k++) {
            if (grid.axis(k) instanceof BiasAxis) {
                return k;
            }
        }
        return grid.axes() > 0 ? 0 : -1;
    }
}
