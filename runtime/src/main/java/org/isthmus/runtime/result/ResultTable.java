package org.isthmus.runtime.result;

import java.util.List;

/**
 * A recorded observable.
 *
 * @param name of the observable and of its file
 * @param headers name and unit of each column: sweeps, axis, place, values
 * @param keys how many of the columns say where the values were taken
 * @param rows numbers in the units of the headers; not a number where a value is not defined
 */
public record ResultTable(String name, List<String> headers, int keys, List<double[]> rows) {
    public ResultTable {
        headers = List.copyOf(headers);
        rows = List.copyOf(rows);
    }
}
