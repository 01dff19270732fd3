package org.isthmus.language.elaboration.geometry;

import java.util.Arrays;

/**
 * Where a straight row of lattice points comes near the border of a shape: intervals of the point's number. Between them
 * nothing changes, so that one point tells for all.
 */
public final class Borders {
    private double[] from = new double[16];
    private double[] to = new double[16];
    private int count;
    private int at;
    private boolean known;
    private boolean inside;

    /** Forgets the row before. */
    void clear() {
        count = 0;
        at = 0;
        known = false;
    }

    /** The border is near from one number to another, whole or not. */
    public void near(double first, double last) {
        if (!(first <= last)) {
            return;
        }
        if (count == from.length) {
            from = Arrays.copyOf(from, 2 * count);
            to = Arrays.copyOf(to, 2 * count);
        }
        // rows have few borders: sorting while they come is cheapest
        int k = count++;
        while (k > 0 && from[k - 1] > first) {
            from[k] = from[k - 1];
            to[k] = to[k - 1];
            k--;
        }
        from[k] = first;
        to[k] = last;
    }

    /** The border is near where a quantity a + b·n lies between two values. */
    public void near(double a, double b, double lower, double upper) {
        if (b == 0) {
            if (lower <= a && a <= upper) {
                near(Double.NEGATIVE_INFINITY, Double.POSITIVE_INFINITY);
            }
        } else {
            double p = (lower - a) / b;
            double q = (upper - a) / b;
            near(Math.min(p, q), Math.max(p, q));
        }
    }

    /** Joins what overlaps. */
    void join() {
        int joined = 0;
        for (int k = 0; k < count; k++) {
            if (joined > 0 && from[k] <= to[joined - 1]) {
                to[joined - 1] = Math.max(to[joined - 1], to[k]);
            } else {
                from[joined] = from[k];
                to[joined] = to[k];
                joined++;
            }
        }
        count = joined;
    }

    /** True where the answer for a point must be computed: near a border, or the first one after it. Numbers ascend. */
    boolean open(int number) {
        while (at < count && to[at] < number) {
            at++;
            known = false;
        }
        return !known || at < count && from[at] <= number;
    }

    /** Keeps the answer for the points up to the next border. */
    void answer(int number, boolean isInside) {
        inside = isInside;
        known = at >= count || from[at] > number;
    }

    boolean inside() {
        return inside;
    }

    /** The first number at which something may change; only after an answer that holds on. */
    double next() {
        return !known ? Double.NEGATIVE_INFINITY : at < count ? from[at] : Double.POSITIVE_INFINITY;
    }
}
