package org.isthmus.runtime.report;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/** Chooses how a table is best looked at: curves over its last axis, or a map of its sites. */
public final class TablePlots {
    /** Maps beyond this number of operating points tell nothing at a glance. */
    private static final int MAPS = 4;

    private TablePlots() {}

    /** Plots as complete {@code svg} elements; none for a table of a single row. */
    public static List<String> svg(CsvTable table, String title) {
        if (table.rows() < 2) {
            return List.of();
        }
        return table.place().isPresent() ? sites(table, title, table.place().get()) : curves(table, title);
    }

    private static List<String> curves(CsvTable table, String title) {
        int axis = table.keys() - 1;
        if (axis < 0) {
            return List.of();
        }
        List<LinePlot.Curve> curves = new ArrayList<>();
        List<Integer> values = table.values();
        groups(table, axis).forEach((group, rows) -> {
            for (int column : values) {
                String name = values.size() > 1 || group.isEmpty() ? table.plainName(column) : "";
                curves.add(new LinePlot.Curve(
                        (name + " " + group).strip(),
                        picked(table.columns().get(axis), rows),
                        picked(table.columns().get(column), rows),
                        error(table, column)
                                .map(e -> picked(table.columns().get(e), rows))
                                .orElse(new double[0])));
            }
        });
        return List.of(new LinePlot(title, table.header().get(axis), yLabel(table), curves).svg());
    }

    private static List<String> sites(CsvTable table, String title, int place) {
        List<String> plots = new ArrayList<>();
        boolean line = constant(table.columns().get(place + 1))
                && constant(table.columns().get(place + 2));
        if (line) {
            List<LinePlot.Curve> curves = new ArrayList<>();
            groups(table, place).forEach((group, rows) -> {
                for (int column : table.values()) {
                    curves.add(new LinePlot.Curve(
                            (table.plainName(column) + " " + group).strip(),
                            picked(table.columns().get(place), rows),
                            picked(table.columns().get(column), rows)));
                }
            });
            plots.add(new LinePlot(title, table.header().get(place), yLabel(table), curves).svg());
            return plots;
        }
        groups(table, place).forEach((group, rows) -> {
            for (int column : table.values()) {
                if (plots.size() < MAPS) {
                    plots.add(new SiteMap(
                                    (title + " " + group).strip(),
                                    table.header().get(column),
                                    picked(table.columns().get(place), rows),
                                    picked(table.columns().get(place + 1), rows),
                                    picked(table.columns().get(column), rows))
                            .svg());
                }
            }
        });
        return plots;
    }

    /** Rows that share all keys before a column, by what the keys say, in the order of the table. */
    private static Map<String, List<Integer>> groups(CsvTable table, int before) {
        Map<String, List<Integer>> groups = new LinkedHashMap<>();
        for (int row = 0; row < table.rows(); row++) {
            StringBuilder name = new StringBuilder();
            for (int c = 0; c < before; c++) {
                name.append(name.isEmpty() ? "" : ", ")
                        .append(table.plainName(c))
                        .append(" = ");
                name.append(number(table.columns().get(c)[row]));
                name.append(table.unit(c).isEmpty() ? "" : " " + table.unit(c));
            }
            groups.computeIfAbsent(name.toString(), k -> new ArrayList<>()).add(row);
        }
        return groups;
    }

    private static Optional<Integer> error(CsvTable table, int column) {
        int next = column + 1;
        return next < table.header().size() && table.header().get(next).contains(CsvTable.ERROR)
                ? Optional.of(next)
                : Optional.empty();
    }

    private static String yLabel(CsvTable table) {
        String unit = table.unit(table.values().get(0));
        return table.name() + (unit.isEmpty() ? "" : " (" + unit + ")");
    }

    private static double[] picked(double[] column, List<Integer> rows) {
        return rows.stream().mapToDouble(r -> column[r]).toArray();
    }

    private static boolean constant(double[] column) {
        for (double value : column) {
            if (Math.abs(value - column[0]) > 1e-9) {
                return false;
            }
        }
        return true;
    }

    /** Short enough for a legend. */
    private static String number(double value) {
        String text = Double.toString(value);
        String shorter = String.format(java.util.Locale.ROOT, "%.6g", value);
        double again = Double.parseDouble(shorter);
        return text.endsWith(".0") ? text.substring(0, text.length() - 2) : again == value ? text : shorter;
    }
}
