package org.isthmus.runtime.report;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;

/**
 * A table of a result as it lies on the disk.
 *
 * @param name the observable
 * @param header a column each, {@code name (unit)}
 * @param columns values, a column each, all of one length
 */
public record CsvTable(String name, List<String> header, List<double[]> columns) {
    /** What the three columns of a site's place are called. */
    static final List<String> PLACE = List.of("x (nm)", "y (nm)", "z (nm)");

    /** What a column of standard errors ends with. */
    static final String ERROR = " +-";

    public CsvTable {
        header = List.copyOf(header);
        columns = List.copyOf(columns);
    }

    /**
     * Reads a table.
     *
     * @throws IllegalArgumentException for text that is no table of numbers
     */
    public static CsvTable parse(String name, String text) {
        List<String> lines = text.lines().filter(l -> !l.isBlank()).toList();
        if (lines.isEmpty()) {
            throw new IllegalArgumentException("table '" + name + "' is empty");
        }
        List<String> header = cells(lines.get(0));
        List<double[]> columns = new ArrayList<>();
        for (int c = 0; c < header.size(); c++) {
            columns.add(new double[lines.size() - 1]);
        }
        for (int row = 1; row < lines.size(); row++) {
            List<String> cells = cells(lines.get(row));
            if (cells.size() != header.size()) {
                throw new IllegalArgumentException("table '" + name + "', line " + (row + 1) + ": " + cells.size()
                        + " cells under " + header.size() + " names");
            }
            for (int c = 0; c < cells.size(); c++) {
                columns.get(c)[row - 1] = cells.get(c).isEmpty() ? Double.NaN : Double.parseDouble(cells.get(c));
            }
        }
        return new CsvTable(name, header, columns);
    }

    /** Cells of a line; one in quotes may hold commas (RFC 4180, without line breaks in cells). */
    private static List<String> cells(String line) {
        List<String> cells = new ArrayList<>();
        StringBuilder cell = new StringBuilder();
        boolean quoted = false;
        for (int i = 0; i < line.length(); i++) {
            char c = line.charAt(i);
            if (c == '"') {
                if (quoted && i + 1 < line.length() && line.charAt(i + 1) == '"') {
                    cell.append('"');
                    i++;
                } else {
                    quoted = !quoted;
                }
            } else if (c == ',' && !quoted) {
                cells.add(cell.toString().strip());
                cell.setLength(0);
            } else {
                cell.append(c);
            }
        }
        cells.add(cell.toString().strip());
        return cells;
    }

    public int rows() {
        return columns.isEmpty() ? 0 : columns.get(0).length;
    }

    /** The column where a site's place begins, for a table of sites. */
    public Optional<Integer> place() {
        int x = header.indexOf(PLACE.get(0));
        return x >= 0 && x + 3 <= header.size() && header.subList(x, x + 3).equals(PLACE)
                ? Optional.of(x)
                : Optional.empty();
    }

    /** Number of leading columns that tell the rows apart: sweeps, axis and place. */
    public int keys() {
        if (place().isPresent()) {
            return place().get() + 3;
        }
        for (int keys = 0; keys < header.size(); keys++) {
            if (unique(keys)) {
                return keys;
            }
        }
        return header.size() - 1;
    }

    private boolean unique(int keys) {
        Set<List<Double>> seen = new HashSet<>();
        for (int row = 0; row < rows(); row++) {
            if (!seen.add(key(row, 0, keys))) {
                return false;
            }
        }
        return true;
    }

    /** Values of some columns in a row. */
    List<Double> key(int row, int from, int to) {
        List<Double> key = new ArrayList<>();
        for (int c = from; c < to; c++) {
            key.add(columns.get(c)[row]);
        }
        return key;
    }

    /** Columns of values, without those of their errors. */
    List<Integer> values() {
        List<Integer> values = new ArrayList<>();
        for (int c = keys(); c < header.size(); c++) {
            if (!header.get(c).contains(ERROR)) {
                values.add(c);
            }
        }
        return values;
    }

    /** Name of a column without its unit. */
    String plainName(int column) {
        String cell = header.get(column);
        int unit = cell.lastIndexOf(" (");
        return unit < 0 ? cell : cell.substring(0, unit);
    }

    /** Unit of a column, empty for plain numbers. */
    String unit(int column) {
        String cell = header.get(column);
        int unit = cell.lastIndexOf(" (");
        return unit < 0 || !cell.endsWith(")") ? "" : cell.substring(unit + 2, cell.length() - 1);
    }
}
