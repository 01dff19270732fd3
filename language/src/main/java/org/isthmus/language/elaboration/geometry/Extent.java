package org.isthmus.language.elaboration.geometry;

/**
 * A box along the axes, infinite where a shape has no bound, nm.
 *
 * @param lower three lower bounds
 * @param upper three upper bounds
 */
public record Extent(double[] lower, double[] upper) {
    public Extent {
        lower = lower.clone();
        upper = upper.clone();
    }

    /** A box from pairs of bounds, x then y then z; what is left out is unbounded. */
    public static Extent of(double... bounds) {
        double[] lower = new double[3];
        double[] upper = new double[3];
        for (int axis = 0; axis < 3; axis++) {
            lower[axis] = bounds.length > 2 * axis ? bounds[2 * axis] : Double.NEGATIVE_INFINITY;
            upper[axis] = bounds.length > 2 * axis + 1 ? bounds[2 * axis + 1] : Double.POSITIVE_INFINITY;
        }
        return new Extent(lower, upper);
    }

    boolean bounded(int axis) {
        return lower[axis] > Double.NEGATIVE_INFINITY && upper[axis] < Double.POSITIVE_INFINITY;
    }
}
