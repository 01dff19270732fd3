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
    /** Cells that are looked at for one body: beyond it, counting them would take longer than a user waits. */
    public static final int CELL_LIMIT = 40_000_000;

    /** Rows of cells that are looked at for one body. */
    private static final int ROW_LIMIT = 4_000_000;

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

    /** Decides whether a place belongs to a body. */
    @FunctionalInterface
    public interface Chooser {
        /**
         * Decides.
         *
         * @param index number of the sites taken so far
         */
        boolean takes(double x, double y, double z, int index);
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
     * @param cancelled asked often; once true the search ends
     * @throws CancellationException when cancelled
     */
    public static Search search(LatticeFrame frame, Extent box, Chooser chooser, int limit, BooleanSupplier cancelled) {
        OptionalInt open = CellRows.unboundedAxis(frame, box);
        if (open.isPresent()) {
            return new Unbounded(open.getAsInt());
        }
        CellRows rows = CellRows.of(frame, box, CELL_LIMIT / frame.basisCount(), ROW_LIMIT);
        if (!rows.complete()) {
            return new TooMany(rows.cells() * frame.basisCount());
        }
        BodySites sites = new BodySites(frame, rows);
        return sites.collect(chooser, limit, cancelled)
                ? new Found(sites)
                : new TooMany(rows.cells() * frame.basisCount());
    }

    private boolean collect(Chooser chooser, int limit, BooleanSupplier cancelled) {
        firstOfRow = new int[rows.count() + 1];
        for (int r = 0; r < rows.count(); r++) {
            firstOfRow[r] = count;
            int n2 = rows.second(r);
            int n3 = rows.third(r);
            for (int n1 = rows.start(r); n1 < rows.end(r); n1++) {
                if ((n1 & 0xfff) == 0) {
                    stop(cancelled);
                }
                for (int b = 0; b < frame.basisCount(); b++) {
                    double x = frame.coordinate(n1, n2, n3, b, 0);
                    double y = frame.coordinate(n1, n2, n3, b, 1);
                    double z = frame.coordinate(n1, n2, n3, b, 2);
                    if (!chooser.takes(x, y, z, count)) {
                        continue;
                    }
                    if (count == limit) {
                        return false;
                    }
                    add(r, n1, b, x, y, z);
                }
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
