package org.isthmus.runtime.catalogue;

/** A function that needs more than numbers: a condition, the site, or a file. */
public record SpecialEntry(String name, Kind kind, String documentation) implements Entry {
    /** Which one. */
    public enum Kind {
        /** {@code if(condition, a, b)}. */
        IF,
        /** {@code uniform(lo, hi, seed)} per site. */
        UNIFORM,
        /** {@code normal(sigma, seed)} per site. */
        NORMAL,
        /** {@code table("file.csv", x[, y])}. */
        TABLE
    }
}
