package org.isthmus.runtime.result;

import java.io.IOException;

/** Tables as comma-separated values: shortest numbers that read back, an empty cell where a value is not defined. */
public final class CsvText {
    private CsvText() {}

    /** Writes a table. */
    public static void write(ResultTable table, Appendable out) throws IOException {
        out.append(String.join(",", table.headers())).append('\n');
        for (double[] row : table.rows()) {
            for (int k = 0; k < row.length; k++) {
                if (k > 0) {
                    out.append(',');
                }
                out.append(number(row[k]));
            }
            out.append('\n');
        }
    }

    /** A number as a table has it. */
    public static String number(double value) {
        if (Double.isNaN(value)) {
            return "";
        }
        if (value == Math.rint(value) && Math.abs(value) < 1e15) {
            return Long.toString((long) value);
        }
        return Double.toString(value);
    }
}
