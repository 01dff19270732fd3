package org.isthmus.runtime.catalogue;

import org.isthmus.runtime.units.Dimension;

/**
 * A named property of a block.
 *
 * @param dimension of its value; null where the value is a choice or an axis of its own kind
 */
public record SettingEntry(String name, Block block, Value value, Dimension dimension, String documentation)
        implements Entry {
    /** Where the setting stands. */
    public enum Block {
        SITE,
        LATTICE,
        LEAD,
        DEPHASING,
        MEASUREMENT,
        REGION,
        GATE
    }

    /** What its value is. */
    public enum Value {
        /** A real quantity. */
        QUANTITY,
        /** A real quantity, or a matrix on the orbitals. */
        QUANTITY_OR_MATRIX,
        /** A whole number. */
        COUNT,
        /** A word. */
        CHOICE,
        /** A table from a file. */
        TABLE,
        /** Points of an axis. */
        AXIS
    }
}
