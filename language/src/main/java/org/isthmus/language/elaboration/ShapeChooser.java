package org.isthmus.language.elaboration;

import org.isthmus.language.elaboration.geometry.BodySites;
import org.isthmus.language.elaboration.geometry.Borders;
import org.isthmus.language.evaluation.Code.TruthNode;
import org.isthmus.language.evaluation.Shape;
import org.isthmus.language.evaluation.Site;

/** Chooses the sites in a shape that meet a condition, and knows where rows of sites cross the shape's border. */
final class ShapeChooser implements BodySites.Chooser {
    /** Tolerances around a border within which every site is looked at. */
    private static final double NEAR = 8;

    private final Shape shape;
    private final double tolerance;
    private final double margin;
    private final TruthNode condition;
    private final Site site = new Site();

    /**
     * A chooser.
     *
     * @param condition null where the whole shape is taken
     */
    ShapeChooser(Shape shape, double tolerance, TruthNode condition) {
        this.shape = shape;
        this.tolerance = tolerance;
        this.condition = condition;
        margin = NEAR * tolerance;
    }

    @Override
    public boolean inside(double x, double y, double z) {
        return shape.contains(x, y, z, tolerance);
    }

    @Override
    public boolean takes(double x, double y, double z, long rank) {
        return condition == null || condition.at(site.at(x, y, z, rank));
    }

    @Override
    public int complexity() {
        return complexity(shape);
    }

    private static int complexity(Shape shape) {
        if (shape instanceof Shape.Union both) {
            return complexity(both.left()) + complexity(both.right());
        }
        if (shape instanceof Shape.Difference both) {
            return complexity(both.left()) + complexity(both.right());
        }
        if (shape instanceof Shape.Intersection both) {
            return complexity(both.left()) + complexity(both.right());
        }
        return shape instanceof Shape.Polygon polygon ? polygon.xs().size() : 4;
    }

    @Override
    public void borders(double x, double y, double z, double dx, double dy, double dz, Borders borders) {
        double[] start = {x, y, z};
        double[] step = {dx, dy, dz};
        borders(shape, start, step, borders);
    }

    private void borders(Shape part, double[] start, double[] step, Borders borders) {
        if (part instanceof Shape.Box box) {
            for (int end = 0; end < 6; end++) {
                double border = box.ends()[end];
                if (Double.isFinite(border)) {
                    borders.near(start[end / 2], step[end / 2], border - margin, border + margin);
                }
            }
        } else if (part instanceof Shape.Ring ring) {
            circle(ring, ring.outer(), start, step, borders);
            circle(ring, ring.inner(), start, step, borders);
        } else if (part instanceof Shape.Polygon polygon) {
            int corners = polygon.xs().size();
            for (int i = 0, j = corners - 1; i < corners; j = i++) {
                edge(
                        polygon.xs().get(j),
                        polygon.ys().get(j),
                        polygon.xs().get(i),
                        polygon.ys().get(i),
                        start,
                        step,
                        borders);
            }
        } else if (part instanceof Shape.Union both) {
            borders(both.left(), start, step, borders);
            borders(both.right(), start, step, borders);
        } else if (part instanceof Shape.Difference both) {
            borders(both.left(), start, step, borders);
            borders(both.right(), start, step, borders);
        } else if (part instanceof Shape.Intersection both) {
            borders(both.left(), start, step, borders);
            borders(both.right(), start, step, borders);
        }
    }

    /** Where the distance from the centre is within the margin of a radius: between the roots of two quadratics. */
    private void circle(Shape.Ring ring, double radius, double[] start, double[] step, Borders borders) {
        int dimension = ring.centre().size();
        double a = 0;
        double b = 0;
        double c = 0;
        for (int axis = 0; axis < dimension; axis++) {
            double from = start[axis] - ring.centre().get(axis);
            a += step[axis] * step[axis];
            b += step[axis] * from;
            c += from * from;
        }
        if (a == 0) {
            // the row runs along z: its distance from the axis is one and the same
            return;
        }
        double far = radius + margin;
        double outside = b * b - a * (c - far * far);
        if (outside < 0) {
            return;
        }
        double wide = Math.sqrt(outside);
        double close = radius - margin;
        double inside = close > 0 ? b * b - a * (c - close * close) : -1;
        if (inside <= 0) {
            borders.near((-b - wide) / a, (-b + wide) / a);
            return;
        }
        double narrow = Math.sqrt(inside);
        borders.near((-b - wide) / a, (-b - narrow) / a);
        borders.near((-b + narrow) / a, (-b + wide) / a);
    }

    /** Where the row is inside a rectangle around an edge, a margin wide on all sides. */
    private void edge(double x1, double y1, double x2, double y2, double[] start, double[] step, Borders borders) {
        double length = Math.hypot(x2 - x1, y2 - y1);
        double ux = length == 0 ? 1 : (x2 - x1) / length;
        double uy = length == 0 ? 0 : (y2 - y1) / length;
        double[] range = {Double.NEGATIVE_INFINITY, Double.POSITIVE_INFINITY};
        narrow(
                range,
                (start[0] - x1) * ux + (start[1] - y1) * uy,
                step[0] * ux + step[1] * uy,
                -margin,
                length + margin);
        narrow(range, (start[1] - y1) * ux - (start[0] - x1) * uy, step[1] * ux - step[0] * uy, -margin, margin);
        borders.near(range[0], range[1]);
    }

    /** Keeps the part of a range where a + b·n lies between two values. */
    private static void narrow(double[] range, double a, double b, double lower, double upper) {
        if (b == 0) {
            if (a < lower || a > upper) {
                range[1] = Double.NEGATIVE_INFINITY;
            }
            return;
        }
        double p = (lower - a) / b;
        double q = (upper - a) / b;
        range[0] = Math.max(range[0], Math.min(p, q));
        range[1] = Math.min(range[1], Math.max(p, q));
    }
}
