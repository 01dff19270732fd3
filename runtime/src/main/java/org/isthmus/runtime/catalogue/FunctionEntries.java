package org.isthmus.runtime.catalogue;

import java.util.List;
import org.isthmus.runtime.catalogue.FunctionEntry.DimensionProblem;
import org.isthmus.runtime.catalogue.FunctionEntry.DimensionRule;
import org.isthmus.runtime.units.Dimension;

/** Functions, shapes and coordinates. */
final class FunctionEntries {
    private static final int MANY = 64;

    private FunctionEntries() {}

    static List<FunctionEntry> all() {
        DimensionRule numbers = FunctionEntry.numbers();
        DimensionRule same = FunctionEntry.same(d -> d);
        DimensionRule sameToNumber = FunctionEntry.same(d -> Dimension.NUMBER);
        return List.of(
                one("abs", same, Math::abs, "Absolute value."),
                one("sqrt", FunctionEntries::root, Math::sqrt, "Square root; its unit is the root of the argument's."),
                one("exp", numbers, Math::exp, "Exponential function."),
                one("log", numbers, Math::log, "Natural logarithm."),
                one("sin", numbers, Math::sin, "Sine of an angle."),
                one("cos", numbers, Math::cos, "Cosine of an angle."),
                one("tan", numbers, Math::tan, "Tangent of an angle."),
                one("asin", numbers, Math::asin, "Arc sine, an angle."),
                one("acos", numbers, Math::acos, "Arc cosine, an angle."),
                one("atan", numbers, Math::atan, "Arc tangent, an angle."),
                new FunctionEntry(
                        "atan2",
                        2,
                        2,
                        sameToNumber,
                        a -> Math.atan2(a[0], a[1]),
                        "Angle of the point (x, y) in atan2(y, x)."),
                one("sinh", numbers, Math::sinh, "Hyperbolic sine."),
                one("cosh", numbers, Math::cosh, "Hyperbolic cosine."),
                one("tanh", numbers, Math::tanh, "Hyperbolic tangent."),
                new FunctionEntry(
                        "min",
                        2,
                        MANY,
                        same,
                        FunctionEntries::least,
                        "The least of its arguments; of one observable, the least over all points."),
                new FunctionEntry(
                        "max",
                        2,
                        MANY,
                        same,
                        FunctionEntries::greatest,
                        "The greatest of its arguments; of one observable, the greatest over all points."),
                one("floor", numbers, Math::floor, "Greatest whole number not above the argument."),
                one("ceil", numbers, Math::ceil, "Least whole number not below the argument."),
                one("round", numbers, Math::rint, "Nearest whole number."),
                one("sign", FunctionEntry.same(d -> Dimension.NUMBER), Math::signum, "−1, 0 or 1."),
                one(
                        "step",
                        FunctionEntry.same(d -> Dimension.NUMBER),
                        x -> x >= 0 ? 1 : 0,
                        "0 below zero, 1 from zero on."),
                new FunctionEntry(
                        "gauss",
                        2,
                        2,
                        sameToNumber,
                        a -> Math.exp(-a[0] * a[0] / (2 * a[1] * a[1])),
                        "exp(−x²/2w²) for gauss(x, w)."),
                new FunctionEntry(
                        "smooth",
                        2,
                        2,
                        sameToNumber,
                        a -> 0.5 * (1 + Math.tanh(a[0] / a[1])),
                        "½(1 + tanh(x/w)) for smooth(x, w)."));
    }

    private static FunctionEntry one(
            String name, DimensionRule rule, java.util.function.DoubleUnaryOperator code, String documentation) {
        return new FunctionEntry(name, 1, 1, rule, a -> code.applyAsDouble(a[0]), documentation);
    }

    private static Dimension root(List<Dimension> arguments) {
        try {
            return arguments.get(0).power(0.5);
        } catch (ArithmeticException e) {
            throw new DimensionProblem("has no square root with a unit");
        }
    }

    private static double least(double[] arguments) {
        double least = arguments[0];
        for (double argument : arguments) {
            least = Math.min(least, argument);
        }
        return least;
    }

    private static double greatest(double[] arguments) {
        double greatest = arguments[0];
        for (double argument : arguments) {
            greatest = Math.max(greatest, argument);
        }
        return greatest;
    }

    static List<SpecialEntry> special() {
        return List.of(
                new SpecialEntry(
                        "if", SpecialEntry.Kind.IF, "if(condition, a, b): a where the condition holds, else b."),
                new SpecialEntry(
                        "uniform",
                        SpecialEntry.Kind.UNIFORM,
                        "uniform(lo, hi, seed): a random number per site, evenly distributed; the same for equal seed and"
                                + " site, whatever the number of threads."),
                new SpecialEntry(
                        "normal",
                        SpecialEntry.Kind.NORMAL,
                        "normal(sigma, seed): a random number per site, normally distributed about zero with standard"
                                + " deviation sigma."),
                new SpecialEntry(
                        "table",
                        SpecialEntry.Kind.TABLE,
                        "table(\"file.csv\", x) or table(\"file.csv\", x, y): a sampled function, linear between its rows;"
                                + " the header names the units, `name (unit)`."));
    }

    static List<ShapeEntry> shapes() {
        return List.of(
                new ShapeEntry(
                        "box", ShapeEntry.Kind.BOX, "box(x range, y range, z range); ranges left out are unbounded."),
                new ShapeEntry("disc", ShapeEntry.Kind.DISC, "disc(centre, radius)."),
                new ShapeEntry("ring", ShapeEntry.Kind.RING, "ring(centre, inner radius, outer radius)."),
                new ShapeEntry("polygon", ShapeEntry.Kind.POLYGON, "polygon(p1, p2, p3, …), corners in order."));
    }

    static List<CoordinateEntry> coordinates() {
        return List.of(
                new CoordinateEntry("x", false, 0, "First coordinate of the site, or of the bond's midpoint."),
                new CoordinateEntry("y", false, 1, "Second coordinate of the site, or of the bond's midpoint."),
                new CoordinateEntry("z", false, 2, "Third coordinate of the site, or of the bond's midpoint."),
                new CoordinateEntry("x1", true, 0, "First coordinate of the first site of a pair."),
                new CoordinateEntry("y1", true, 1, "Second coordinate of the first site of a pair."),
                new CoordinateEntry("z1", true, 2, "Third coordinate of the first site of a pair."),
                new CoordinateEntry("x2", true, 3, "First coordinate of the second site of a pair."),
                new CoordinateEntry("y2", true, 4, "Second coordinate of the second site of a pair."),
                new CoordinateEntry("z2", true, 5, "Third coordinate of the second site of a pair."),
                new CoordinateEntry("distance", true, 6, "Distance of the two sites of a pair, in a straight line."));
    }
}
