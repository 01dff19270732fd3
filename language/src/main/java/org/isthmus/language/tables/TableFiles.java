package org.isthmus.language.tables;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.eclipse.emf.common.util.URI;
import org.eclipse.emf.ecore.resource.Resource;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.runtime.units.Unit;
import org.isthmus.runtime.units.UnitText;

/** Finds and reads tables; a file that has not changed is read once. */
public final class TableFiles {
    /** Load option of a resource set: the folder that the user gave as the project, a {@code Path}. */
    public static final String PROJECT_FOLDER = "org.isthmus.project";

    private static final long LARGEST = 64L << 20;
    private static final int REMEMBERED = 32;

    private static final Map<Key, Table> READ = new LinkedHashMap<>() {
        private static final long serialVersionUID = 1;

        @Override
        protected boolean removeEldestEntry(Map.Entry<Key, Table> eldest) {
            return size() > REMEMBERED;
        }
    };

    private record Key(Path file, long size, long modified) {}

    private TableFiles() {}

    /**
     * The table that a path in a file means.
     *
     * @param resource the device file
     * @param written the path as written, relative to the device file
     */
    public static Table read(Resource resource, String written) throws TableFailure {
        Path file = resolve(resource, written);
        try {
            if (!Files.isRegularFile(file)) {
                throw new TableFailure(
                        IssueCode.TABLE_PROBLEM,
                        "Table " + written + " does not exist: looked for it as " + file + ".");
            }
            long size = Files.size(file);
            if (size > LARGEST) {
                throw new TableFailure(
                        IssueCode.TABLE_PROBLEM,
                        "Table " + written + " has " + (size >> 20) + " MiB; the largest that is read has "
                                + (LARGEST >> 20) + " MiB.");
            }
            Key key = new Key(file, size, Files.getLastModifiedTime(file).toMillis());
            synchronized (READ) {
                Table known = READ.get(key);
                if (known != null && known.path().equals(written)) {
                    return known;
                }
            }
            Table table = parse(written, new String(Files.readAllBytes(file), StandardCharsets.UTF_8));
            synchronized (READ) {
                READ.put(key, table);
            }
            return table;
        } catch (IOException e) {
            throw new TableFailure(
                    IssueCode.TABLE_PROBLEM, "Table " + written + " cannot be read: " + e.getMessage() + ".");
        }
    }

    /** The file that a path means; it lies inside the project folder, links followed. */
    public static Path resolve(Resource resource, String written) throws TableFailure {
        Path source = path(resource)
                .orElseThrow(() -> new TableFailure(
                        IssueCode.TABLE_PROBLEM,
                        "Table " + written + " cannot be found: the device file is not saved on a disk."));
        Path project = projectFolder(resource).orElse(source.getParent());
        try {
            Path file = source.resolveSibling(written).normalize();
            Path real = Files.exists(file) ? file.toRealPath() : file;
            Path realProject = Files.exists(project) ? project.toRealPath() : project;
            if (!file.startsWith(project) || Files.exists(file) && !real.startsWith(realProject)) {
                throw new TableFailure(
                        IssueCode.TABLE_OUTSIDE_PROJECT,
                        "Table " + written + " leaves the project folder " + project + "; copy it into the project.");
            }
            return file;
        } catch (InvalidPathException | IOException e) {
            throw new TableFailure(IssueCode.TABLE_PROBLEM, "'" + written + "' is not a path of a table.");
        }
    }

    /** The folder given by the user, or the nearest above the file that is marked as a project, or the file's own. */
    public static Optional<Path> projectFolder(Resource resource) {
        Optional<Path> file = path(resource);
        if (resource.getResourceSet() != null
                && resource.getResourceSet().getLoadOptions().get(PROJECT_FOLDER) instanceof Path given
                && file.isPresent()
                && file.get().startsWith(given.toAbsolutePath().normalize())) {
            return Optional.of(given.toAbsolutePath().normalize());
        }
        if (file.isEmpty()) {
            return Optional.empty();
        }
        for (Path folder = file.get().getParent(); folder != null; folder = folder.getParent()) {
            if (Files.exists(folder.resolve(".git")) || Files.exists(folder.resolve("isthmus.project"))) {
                return Optional.of(folder);
            }
        }
        return Optional.ofNullable(file.get().getParent());
    }

    private static Optional<Path> path(Resource resource) {
        URI uri = resource.getURI();
        return uri != null && uri.isFile()
                ? Optional.of(Path.of(uri.toFileString()).toAbsolutePath().normalize())
                : Optional.empty();
    }

    /** Reads the text of a table with a header of {@code name (unit)} cells. */
    static Table parse(String path, String text) throws TableFailure {
        String[] lines = text.split("\r\n|\n|\r", -1);
        List<Unit> units = new ArrayList<>();
        List<String> names = new ArrayList<>();
        header(path, lines[0], names, units);
        double[][] values = new double[names.size()][lines.length];
        int rows = 0;
        for (int i = 1; i < lines.length; i++) {
            if (lines[i].isBlank()) {
                continue;
            }
            String[] cells = lines[i].split(",", -1);
            if (cells.length != names.size()) {
                throw new TableFailure(
                        path, i + 1, 1, "has " + cells.length + " cells, but the header has " + names.size() + ".");
            }
            int column = 1;
            for (int k = 0; k < cells.length; k++) {
                values[k][rows] = units.get(k).toInternal(number(path, i + 1, column, cells[k]));
                column += cells[k].length() + 1;
            }
            rows++;
        }
        if (rows < 2) {
            throw new TableFailure(path, lines.length, 1, "a table needs at least two rows to draw a line between.");
        }
        List<Table.Column> columns = new ArrayList<>();
        for (int k = 0; k < names.size(); k++) {
            columns.add(new Table.Column(names.get(k), units.get(k).dimension(), Arrays.copyOf(values[k], rows)));
        }
        return new Table(path, columns, rows);
    }

    private static void header(String path, String line, List<String> names, List<Unit> units) throws TableFailure {
        int column = 1;
        for (String cell : (line.startsWith("\uFEFF") ? line.substring(1) : line).split(",", -1)) {
            String name = cell.strip();
            int open = name.indexOf('(');
            String unit = "";
            if (open > 0 && name.endsWith(")")) {
                unit = name.substring(open + 1, name.length() - 1);
                name = name.substring(0, open).strip();
            }
            try {
                units.add(UnitText.parse(unit));
            } catch (IllegalArgumentException e) {
                throw new TableFailure(path, 1, column, e.getMessage() + "; a header cell reads 'name (unit)'.");
            }
            if (name.isEmpty() || isNumber(name)) {
                throw new TableFailure(
                        path, 1, column, "'" + cell.strip() + "' is no header cell; it reads 'name (unit)'.");
            }
            names.add(name);
            column += cell.length() + 1;
        }
    }

    private static boolean isNumber(String text) {
        try {
            Double.parseDouble(text);
            return true;
        } catch (NumberFormatException e) {
            return false;
        }
    }

    private static double number(String path, int line, int column, String cell) throws TableFailure {
        try {
            double value = Double.parseDouble(cell.strip());
            if (Double.isFinite(value)) {
                return value;
            }
        } catch (NumberFormatException e) {
            throw new TableFailure(path, line, column, "'" + cell.strip() + "' is not a number.");
        }
        throw new TableFailure(path, line, column, "'" + cell.strip() + "' is not a finite number.");
    }

    /** Checks that a table can serve as a function of its first one or two columns. */
    public static Table function(Table table, int arguments) throws TableFailure {
        if (table.columns().size() != arguments + 1) {
            throw new TableFailure(
                    table.path(),
                    1,
                    1,
                    "has " + table.columns().size() + " columns, but a function of " + arguments
                            + (arguments == 1 ? " quantity" : " quantities") + " needs " + (arguments + 1) + ".");
        }
        if (arguments == 1) {
            ascending(table);
            return table;
        }
        double[] xs = Table.distinct(table.columns().get(0).values());
        double[] ys = Table.distinct(table.columns().get(1).values());
        if (xs.length < 2 || ys.length < 2 || (long) xs.length * ys.length != table.rows()) {
            throw new TableFailure(
                    table.path(),
                    2,
                    1,
                    "is not a full grid: " + xs.length + " × " + ys.length + " points make "
                            + (long) xs.length * ys.length + " rows, but there are " + table.rows() + ".");
        }
        return sortedGrid(table, xs, ys);
    }

    private static Table sortedGrid(Table table, double[] xs, double[] ys) throws TableFailure {
        double[] grid = new double[table.rows()];
        boolean[] seen = new boolean[table.rows()];
        for (int row = 0; row < table.rows(); row++) {
            int i = Arrays.binarySearch(xs, table.columns().get(0).values()[row]);
            int j = Arrays.binarySearch(ys, table.columns().get(1).values()[row]);
            int cell = i * ys.length + j;
            if (seen[cell]) {
                throw new TableFailure(table.path(), row + 2, 1, "gives one point of the grid a second time.");
            }
            seen[cell] = true;
            grid[cell] = table.columns().get(2).values()[row];
        }
        List<Table.Column> columns = new ArrayList<>(table.columns());
        columns.set(2, new Table.Column(columns.get(2).name(), columns.get(2).dimension(), grid));
        return new Table(table.path(), columns, table.rows());
    }

    /** Checks that the first column ascends. */
    public static void ascending(Table table) throws TableFailure {
        double[] xs = table.columns().get(0).values();
        for (int i = 1; i < xs.length; i++) {
            if (!(xs[i] > xs[i - 1])) {
                throw new TableFailure(
                        table.path(), i + 2, 1, "'" + table.columns().get(0).name() + "' must ascend from row to row.");
            }
        }
    }
}
