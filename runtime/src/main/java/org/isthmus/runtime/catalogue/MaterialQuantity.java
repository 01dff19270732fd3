package org.isthmus.runtime.catalogue;

import org.isthmus.runtime.units.Dimension;

/** A quantity of a material whose dimension is fixed. */
public record MaterialQuantity(String name, Dimension dimension, String documentation) implements Entry {}
