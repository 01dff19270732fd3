package org.isthmus.runtime.catalogue;

/**
 * A coordinate of a site, or of a pair of sites; a length.
 *
 * @param index 0, 1, 2 for x, y, z of a site; 0 … 5 for x1 … z2 of a pair, 6 for their distance
 */
public record CoordinateEntry(String name, boolean pair, int index, String documentation) implements Entry {}
