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

    /** What the header of a column of standard errors ends with. */
    public static final String ERROR = " +-";

    /** Name of a column without its unit. */
    public String columnName(int column) {
        String header = headers.get(column);
        String suffix = header.endsWith(ERROR) ? ERROR : "";
        String plain = header.substring(0, header.length() - suffix.length());
        return (plain.endsWith(")") ? plain.substring(0, plain.lastIndexOf(" (")) : plain) + suffix;
    }

    /** Unit of a column, empty for plain numbers. */
    public String unit(int column) {
        String header = headers.get(column);
        String plain = header.endsWith(ERROR) ? header.substring(0, header.length() - ERROR.length()) : header;
        return plain.endsWith(")") ? plain.substring(plain.lastIndexOf(" (") + 2, plain.length() - 1) : "";
    }
}
