package org.isthmus.language.tables;

import java.util.Arrays;
import java.util.List;
import org.isthmus.runtime.units.Dimension;

/**
 * Rows of numbers under named columns, in internal units.
 *
 * @param path as the user wrote it
 */
public record Table(String path, List<Column> columns, int rows) {
    public Table {
        columns = List.copyOf(columns);
    }

    /** One column. */
    public record Column(String name, Dimension dimension, double[] values) {}

    /** Values that ascend, between which a straight line is drawn. */
    public double at(double x) throws TableFailure {
        double[] xs = columns.get(0).values();
        double[] values = columns.get(1).values();
        int i = interval(xs, x, columns.get(0).name());
        double part = (x - xs[i]) / (xs[i + 1] - xs[i]);
        return values[i] + part * (values[i + 1] - values[i]);
    }

    /** Bilinear between the four neighbours of a full grid. */
    public double at(double x, double y) throws TableFailure {
        double[] xs = distinct(columns.get(0).values());
        double[] ys = distinct(columns.get(1).values());
        int i = interval(xs, x, columns.get(0).name());
        int j = interval(ys, y, columns.get(1).name());
        double u = (x - xs[i]) / (xs[i + 1] - xs[i]);
        double v = (y - ys[j]) / (ys[j + 1] - ys[j]);
        return (1 - u) * ((1 - v) * cell(i, j, ys.length) + v * cell(i, j + 1, ys.length))
                + u * ((1 - v) * cell(i + 1, j, ys.length) + v * cell(i + 1, j + 1, ys.length));
    }

    private double cell(int i, int j, int columnLength) {
        return columns.get(2).values()[i * columnLength + j];
    }

    private int interval(double[] xs, double x, String name) throws TableFailure {
        if (!(x >= xs[0] && x <= xs[xs.length - 1])) {
            throw new TableFailure(
                    org.isthmus.language.findings.IssueCode.TABLE_PROBLEM,
                    "Table " + path + " holds '" + name + "' from " + xs[0] + " to " + xs[xs.length - 1]
                            + " (eV, nm, V, K), but is asked at " + x + ".");
        }
        int found = Arrays.binarySearch(xs, x);
        int i = found >= 0 ? found : -found - 2;
        return Math.min(i, xs.length - 2);
    }

    static double[] distinct(double[] values) {
        return Arrays.stream(values).distinct().sorted().toArray();
    }
}
