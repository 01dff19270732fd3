package org.isthmus.runtime.catalogue;

import java.util.List;

/**
 * A constant square matrix of plain numbers.
 *
 * @param size rows and columns
 * @param elements interleaved real and imaginary parts, row by row
 */
public record MatrixEntry(String name, int size, List<Double> elements, String documentation) implements Entry {
    public MatrixEntry {
        elements = List.copyOf(elements);
    }
}
