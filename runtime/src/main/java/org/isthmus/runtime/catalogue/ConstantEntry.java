package org.isthmus.runtime.catalogue;

import org.isthmus.runtime.units.Dimension;

/**
 * A physical or mathematical constant, or a unit symbol in bare position.
 *
 * @param value in internal units
 */
public record ConstantEntry(String name, Dimension dimension, double value, boolean unit, String documentation)
        implements Entry {}
