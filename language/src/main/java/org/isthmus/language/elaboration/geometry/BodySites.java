package org.isthmus.language.elaboration.geometry;

import java.util.Arrays;
import java.util.OptionalInt;
import java.util.concurrent.CancellationException;
import java.util.function.BooleanSupplier;

/**
 * The sites of a lattice inside a body, in the order of their cells (first number fastest, then second, third) and
 * within a cell of the basis, found again by their numbers.
 */
public final class BodySites {
    /** Rows of cells that are looked at for one body, and borders of its shape in all of them. */
    private static final int ROW_LIMIT = 4_000_000;

    private static final long BORDER_LIMIT = 100_000_000;

    /** Cells in the box around a body, wherever they are taken or not: counting goes on in whole numbers. */
    private static final long CELL_LIMIT = 1L << 40;

    private final LatticeFrame frame;
    private final CellRows rows;
    private int count;
    private int[] firstOfRow;
    private int[] row = new int[1024];
    private int[] first = new int[1024];
    private int[] basis = new int[1024];
    private double[] positions = new double[3 * 1024];

    private BodySites(LatticeFrame frame, CellRows rows) {
        this.frame = frame;
        this.rows = rows;
    }

    /** A body's shape, and a choice among the sites inside it. */
    @FunctionalInterface
    public interface Chooser {
        /** True inside the shape and on its border. */
        boolean inside(double x, double y, double z);

        /**
         * True for a site that the body has; asked for sites inside the shape only, in the order of the table.
         *
         * @param rank number of the sites inside the shape before this one, taken or not
         */
        default boolean takes(double x, double y, double z, long rank) {
            return true;
        }

        /**
         * Tells where a row of sites (x, y, z) + n·(dx, dy, dz) comes near the shape's border. Unless overridden every
         * place counts as near.
         */
        default void borders(double x, double y, double z, double dx, double dy, double dz, Borders borders) {
            borders.near(Double.NEGATIVE_INFINITY, Double.POSITIVE_INFINITY);
        }

        /** Number of borders that one row may have. */
        default int complexity() {
            return 1;
        }
    }

    /** What a search for sites gives. */
    public sealed interface Search permits Found, TooMany, Unbounded {}

    /** The sites. */
    public record Found(BodySites sites) implements Search {}

    /**
     * More sites than wanted.
     *
     * @param estimate of the sites in the box around the body
     */
    public record TooMany(double estimate) implements Search {}

    /** The lattice goes on for ever along an axis inside the box around the body. */
    public record Unbounded(int axis) implements Search {}

    /**
     * Looks for the sites of a body.
     *
     * @param box around the body
     * @param limit largest number of sites
     * @param rankLimit largest number of sites inside the shape, taken or not
     * @param cancelled asked often; once true the search ends
     * @throws CancellationException when cancelled
     */
    public static Search search(
            LatticeFrame frame, Extent box, Chooser chooser, int limit, long rankLimit, BooleanSupplier cancelled) {
        OptionalInt open = CellRows.unboundedAxis(frame, box);
        if (open.isPresent()) {
            return new Unbounded(open.getAsInt());
        }
        CellRows rows = CellRows.of(frame, box, CELL_LIMIT, ROW_LIMIT);
        double estimate = rows.cells() * frame.basisCount();
        if (!rows.complete() || (long) rows.count() * frame.basisCount() * chooser.complexity() > BORDER_LIMIT) {
            return new TooMany(estimate);
        }
        BodySites sites = new BodySites(frame, rows);
        return sites.collect(chooser, limit, rankLimit, cancelled) ? new Found(sites) : new TooMany(estimate);
    }

    private boolean collect(Chooser chooser, int limit, long rankLimit, BooleanSupplier cancelled) {
        int basisCount = frame.basisCount();
        Borders[] borders = new Borders[basisCount];
        for (int b = 0; b < basisCount; b++) {
            borders[b] = new Borders();
        }
        long rank = 0;
        int steps = 0;
        firstOfRow = new int[rows.count() + 1];
        for (int r = 0; r < rows.count(); r++) {
            firstOfRow[r] = count;
            int n2 = rows.second(r);
            int n3 = rows.third(r);
            for (int b = 0; b < basisCount; b++) {
                borders[b].clear();
                chooser.borders(
                        frame.coordinate(0, n2, n3, b, 0),
                        frame.coordinate(0, n2, n3, b, 1),
                        frame.coordinate(0, n2, n3, b, 2),
                        frame.vector(0, 0),
                        frame.vector(0, 1),
                        frame.vector(0, 2),
                        borders[b]);
                borders[b].join();
            }
            if ((++steps & 0xff) == 0) {
                stop(cancelled);
            }
            int end = rows.end(r);
            int n1 = rows.start(r);
            while (n1 < end) {
                if ((++steps & 0xfff) == 0) {
                    stop(cancelled);
                }
                double next = Double.POSITIVE_INFINITY;
                for (int b = 0; b < basisCount; b++) {
                    Borders border = borders[b];
                    boolean compute = border.open(n1);
                    if (!compute && !border.inside()) {
                        next = Math.min(next, border.next());
                        continue;
                    }
                    double x = frame.coordinate(n1, n2, n3, b, 0);
                    double y = frame.coordinate(n1, n2, n3, b, 1);
                    double z = frame.coordinate(n1, n2, n3, b, 2);
                    if (compute) {
                        border.answer(n1, chooser.inside(x, y, z));
                    }
                    if (!border.inside()) {
                        next = Math.min(next, border.next());
                        continue;
                    }
                    next = Double.NEGATIVE_INFINITY;
                    if (rank == rankLimit) {
                        return false;
                    }
                    if (chooser.takes(x, y, z, rank++)) {
                        if (count == limit) {
                            return false;
                        }
                        add(r, n1, b, x, y, z);
                    }
                }
                n1 = next > n1 + 1 ? (int) Math.min(end, Math.ceil(next)) : n1 + 1;
            }
        }
        firstOfRow[rows.count()] = count;
        stop(cancelled);
        return true;
    }

    private static void stop(BooleanSupplier cancelled) {
        if (cancelled.getAsBoolean()) {
            throw new CancellationException("cancelled while looking for sites");
        }
    }

    private void add(int siteRow, int n1, int basisSite, double x, double y, double z) {
        if (count == row.length) {
            int room = count + (count >> 1);
            row = Arrays.copyOf(row, room);
            first = Arrays.copyOf(first, room);
            basis = Arrays.copyOf(basis, room);
            positions = Arrays.copyOf(positions, 3 * room);
        }
        row[count] = siteRow;
        first[count] = n1;
        basis[count] = basisSite;
        positions[3 * count] = x;
        positions[3 * count + 1] = y;
        positions[3 * count + 2] = z;
        count++;
    }

    public LatticeFrame frame() {
        return frame;
    }

    public int count() {
        return count;
    }

    /** Coordinate in nm. */
    public double coordinate(int site, int axis) {
        return positions[3 * site + axis];
    }

    /** Coordinate in nm. */
    public double x(int site) {
        return positions[3 * site];
    }

    /** Coordinate in nm. */
    public double y(int site) {
        return positions[3 * site + 1];
    }

    /** Coordinate in nm. */
    public double z(int site) {
        return positions[3 * site + 2];
    }

    /** Index in the basis. */
    public int basis(int site) {
        return basis[site];
    }

    /** First number of the site's cell. */
    public int n1(int site) {
        return first[site];
    }

    /** Second number of the site's cell. */
    public int n2(int site) {
        return rows.second(row[site]);
    }

    /** Third number of the site's cell. */
    public int n3(int site) {
        return rows.third(row[site]);
    }

    /** The site with these numbers, or −1 where the body has none. */
    public int find(int n1, int n2, int n3, int basisSite) {
        int r = rows.find(n2, n3);
        if (r < 0) {
            return -1;
        }
        int low = firstOfRow[r];
        int high = firstOfRow[r + 1] - 1;
        if (high < low) {
            return -1;
        }
        // in a full row the site is where counting says
        long guess = low + (long) (n1 - first[low]) * frame.basisCount() + basisSite - basis[low];
        if (guess >= low && guess <= high && first[(int) guess] == n1 && basis[(int) guess] == basisSite) {
            return (int) guess;
        }
        while (low <= high) {
            int middle = (low + high) >>> 1;
            int compare = first[middle] != n1
                    ? Integer.compare(first[middle], n1)
                    : Integer.compare(basis[middle], basisSite);
            if (compare == 0) {
                return middle;
            }
            if (compare < 0) {
                low = middle + 1;
            } else {
                high = middle - 1;
            }
        }
        return -1;
    }

    /** Takes a bond of the body. */
    @FunctionalInterface
    public interface BondTaker {
        void take(int bond, int from, int to);
    }

    /** Every bond of a list with both ends in the body, by the site it comes from, then in the order of the list. */
    public void eachBond(BondList bonds, BondTaker taker) {
        int[][] leaving = bonds.leaving(frame.basisCount());
        for (int site = 0; site < count; site++) {
            int n2 = n2(site);
            int n3 = n3(site);
            for (int bond : leaving[basis[site]]) {
                int other =
                        find(first[site] + bonds.n1(bond), n2 + bonds.n2(bond), n3 + bonds.n3(bond), bonds.to(bond));
                if (other >= 0) {
                    taker.take(bond, site, other);
                }
            }
        }
    }
}
