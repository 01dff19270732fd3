package org.isthmus.language.evaluation;

/** Where a compiled expression is evaluated: a site, a bond's midpoint, or a pair of sites. Reused, not shared. */
public final class Site {
    private double x;
    private double y;
    private double z;
    private long number;
    private final double[] pair = new double[7];

    /** Moves to a site or to a midpoint, nm; the number makes random values its own. */
    public Site at(double newX, double newY, double newZ, long newNumber) {
        x = newX;
        y = newY;
        z = newZ;
        number = newNumber;
        return this;
    }

    /** Moves to a pair of sites, nm. */
    public Site pair(double x1, double y1, double z1, double x2, double y2, double z2) {
        pair[0] = x1;
        pair[1] = y1;
        pair[2] = z1;
        pair[3] = x2;
        pair[4] = y2;
        pair[5] = z2;
        pair[6] = Math.sqrt((x1 - x2) * (x1 - x2) + (y1 - y2) * (y1 - y2) + (z1 - z2) * (z1 - z2));
        return this;
    }

    double x() {
        return x;
    }

    double y() {
        return y;
    }

    double z() {
        return z;
    }

    long number() {
        return number;
    }

    double ofPair(int index) {
        return pair[index];
    }
}
