package org.isthmus.runtime.catalogue;

/** A shape that bodies and regions are cut by. */
public record ShapeEntry(String name, Kind kind, String documentation) implements Entry {
    /** What its arguments mean. */
    public enum Kind {
        /** Ranges along x, y, z; what is left out is unbounded. */
        BOX,
        /** Centre and radius. */
        DISC,
        /** Centre, inner and outer radius. */
        RING,
        /** Corners, in order. */
        POLYGON
    }
}
