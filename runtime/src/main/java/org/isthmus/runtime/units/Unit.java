package org.isthmus.runtime.units;

/**
 * A unit: a number of it is turned into internal units by multiplying and dividing, in this order. Decimal prefixes keep
 * their power of ten in {@code divisor}, so that 5 meV is the double nearest to 0.005.
 *
 * @param symbol as in device files
 * @param name for the reference
 */
public record Unit(String symbol, Dimension dimension, double multiplier, double divisor, String name) {
    /** A value in this unit, in internal units. */
    public double toInternal(double value) {
        return value * multiplier / divisor;
    }

    /** A value in internal units, in this unit. */
    public double fromInternal(double value) {
        return value * divisor / multiplier;
    }

    /** Internal units per unit. */
    public double factor() {
        return multiplier / divisor;
    }
}
