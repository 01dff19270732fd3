package org.isthmus.language.elaboration.geometry;

import java.util.Arrays;
import java.util.OptionalInt;

/**
 * The cells of a lattice that may have a site in a box, as rows along the first lattice vector. Rows come in the order
 * third number, then second; each knows its range of the first. Ranges follow from the dual vectors and are exact but
 * for a margin of a few border tolerances, so that a skewed lattice does not blow them up.
 */
final class CellRows {
    private static final double MARGIN = 4;

    private final LatticeFrame frame;
    private final double[] lower = new double[3];
    private final double[] upper = new double[3];

    private int firstPlane;
    private int[] firstRowOfPlane = {0, 0};
    private int[] firstNumberOfPlane = {0};
    private int count;
    private int[] second = new int[16];
    private int[] third = new int[16];
    private int[] start = new int[16];
    private int[] end = new int[16];
    private double cells;
    private boolean complete = true;

    private CellRows(LatticeFrame frame, Extent box) {
        this.frame = frame;
        for (int axis = 0; axis < 3; axis++) {
            double least = Double.POSITIVE_INFINITY;
            double most = Double.NEGATIVE_INFINITY;
            for (int b = 0; b < frame.basisCount(); b++) {
                least = Math.min(least, frame.basis(b, axis));
                most = Math.max(most, frame.basis(b, axis));
            }
            double margin = MARGIN * frame.tolerance();
            lower[axis] = box.lower()[axis] - frame.origin(axis) - most - margin;
            upper[axis] = box.upper()[axis] - frame.origin(axis) - least + margin;
        }
    }

    /** An axis along which the lattice goes on for ever inside the box. */
    static OptionalInt unboundedAxis(LatticeFrame frame, Extent box) {
        return new CellRows(frame, box).bindOpenAxes();
    }

    /**
     * Finds the rows.
     *
     * @param limit largest number of cells; beyond it the answer is not complete and only estimates them
     * @param rowLimit largest number of rows, alike
     */
    static CellRows of(LatticeFrame frame, Extent box, long limit, int rowLimit) {
        CellRows rows = new CellRows(frame, box);
        OptionalInt open = rows.bindOpenAxes();
        if (open.isPresent()) {
            throw new IllegalArgumentException("no bounds along axis " + open.getAsInt());
        }
        rows.fill(limit, rowLimit);
        return rows;
    }

    /** Bounds of open axes follow where the lattice's vectors tie them to bounded ones, as in a slanted chain. */
    private OptionalInt bindOpenAxes() {
        int dimension = frame.dimension();
        int[] bounded = new int[3];
        int boundedCount = 0;
        for (int axis = 0; axis < 3; axis++) {
            if (lower[axis] > Double.NEGATIVE_INFINITY && upper[axis] < Double.POSITIVE_INFINITY) {
                bounded[boundedCount++] = axis;
            }
        }
        if (boundedCount == 3) {
            return OptionalInt.empty();
        }
        int[] chosen = BoundedCoordinates.choose(frame, Arrays.copyOf(bounded, boundedCount));
        if (chosen == null) {
            for (int axis = 0; axis < 3; axis++) {
                boolean open = Arrays.binarySearch(bounded, 0, boundedCount, axis) < 0;
                if (open && BoundedCoordinates.extendsAlong(frame, axis)) {
                    return OptionalInt.of(axis);
                }
            }
            throw new IllegalStateException("dependent lattice vectors");
        }
        double[][] ties = BoundedCoordinates.ties(frame, chosen);
        for (int axis = 0; axis < 3; axis++) {
            if (Arrays.binarySearch(bounded, 0, boundedCount, axis) >= 0) {
                continue;
            }
            double least = -MARGIN * frame.tolerance();
            double most = MARGIN * frame.tolerance();
            for (int i = 0; i < dimension; i++) {
                double a = ties[axis][i] * lower[chosen[i]];
                double b = ties[axis][i] * upper[chosen[i]];
                least += Math.min(a, b);
                most += Math.max(a, b);
            }
            lower[axis] = least;
            upper[axis] = most;
        }
        return OptionalInt.empty();
    }

    private void fill(long limit, int rowLimit) {
        double low = 0;
        double high = 0;
        if (frame.dimension() == 3) {
            low = Double.POSITIVE_INFINITY;
            high = Double.NEGATIVE_INFINITY;
            for (int corner = 0; corner < 8; corner++) {
                double value = Vectors.dot(frame.dual(2), corner(corner));
                low = Math.min(low, value);
                high = Math.max(high, value);
            }
        }
        low = Math.ceil(low);
        high = Math.floor(high);
        if (high < low) {
            return;
        }
        if (high - low + 1 > rowLimit || Math.abs(low) > Integer.MAX_VALUE / 4.0 || high > Integer.MAX_VALUE / 4.0) {
            estimate();
            return;
        }
        firstPlane = (int) low;
        int planes = (int) (high - low) + 1;
        firstRowOfPlane = new int[planes + 1];
        firstNumberOfPlane = new int[planes];
        double[] range = new double[2];
        for (int plane = 0; plane < planes; plane++) {
            firstRowOfPlane[plane] = count;
            secondRange(firstPlane + plane, range);
            double from = Math.ceil(range[0]);
            double to = Math.floor(range[1]);
            firstNumberOfPlane[plane] = to < from ? 0 : (int) from;
            if (to < from) {
                continue;
            }
            if (count + to - from + 1 > rowLimit
                    || Math.abs(from) > Integer.MAX_VALUE / 4.0
                    || to > Integer.MAX_VALUE / 4.0) {
                estimate();
                return;
            }
            for (int n2 = (int) from; n2 <= (int) to; n2++) {
                row(n2, firstPlane + plane, limit);
                if (!complete) {
                    estimate();
                    return;
                }
            }
        }
        firstRowOfPlane[planes] = count;
    }

    private double[] corner(int corner) {
        return new double[] {
            (corner & 1) == 0 ? lower[0] : upper[0],
            (corner & 2) == 0 ? lower[1] : upper[1],
            (corner & 4) == 0 ? lower[2] : upper[2]
        };
    }

    /** Range of the second number where the box meets the plane of the third. */
    private void secondRange(int n3, double[] range) {
        range[0] = 0;
        range[1] = 0;
        if (frame.dimension() == 1) {
            return;
        }
        range[0] = Double.POSITIVE_INFINITY;
        range[1] = Double.NEGATIVE_INFINITY;
        double[] across = frame.dual(2);
        double[] along = frame.dual(1);
        for (int one = 0; one < 8; one++) {
            double[] p = corner(one);
            double a = Vectors.dot(across, p) - n3;
            for (int bit = 1; bit < 8; bit <<= 1) {
                if ((one & bit) != 0) {
                    continue;
                }
                double[] q = corner(one | bit);
                double b = Vectors.dot(across, q) - n3;
                if (a == b || Math.min(a, b) > 0 || Math.max(a, b) < 0) {
                    continue;
                }
                double part = a / (a - b);
                double value = (1 - part) * Vectors.dot(along, p) + part * Vectors.dot(along, q);
                range[0] = Math.min(range[0], value);
                range[1] = Math.max(range[1], value);
            }
        }
    }

    /** Clips the row's line against the box; an empty row is kept, so that rows can be counted by their numbers. */
    private void row(int n2, int n3, long limit) {
        double from = Double.NEGATIVE_INFINITY;
        double to = Double.POSITIVE_INFINITY;
        for (int axis = 0; axis < 3; axis++) {
            double at = (frame.dimension() > 1 ? n2 * frame.vector(1, axis) : 0)
                    + (frame.dimension() > 2 ? n3 * frame.vector(2, axis) : 0);
            double step = frame.vector(0, axis);
            if (Math.abs(step) < 1e-12 * frame.shortestBond()) {
                if (at < lower[axis] || at > upper[axis]) {
                    to = Double.NEGATIVE_INFINITY;
                }
            } else {
                double a = (lower[axis] - at) / step;
                double b = (upper[axis] - at) / step;
                from = Math.max(from, Math.min(a, b));
                to = Math.min(to, Math.max(a, b));
            }
        }
        double first = Math.ceil(from);
        double last = Math.floor(to);
        boolean some = first <= last;
        cells += some ? last - first + 1 : 0;
        boolean fits = cells <= limit && Math.abs(first) < Integer.MAX_VALUE / 4.0 && last < Integer.MAX_VALUE / 4.0;
        if (count == second.length) {
            int room = 2 * count;
            second = Arrays.copyOf(second, room);
            third = Arrays.copyOf(third, room);
            start = Arrays.copyOf(start, room);
            end = Arrays.copyOf(end, room);
        }
        second[count] = n2;
        third[count] = n3;
        start[count] = some && fits ? (int) first : 0;
        end[count] = some && fits ? (int) last + 1 : 0;
        complete &= fits || !some;
        count++;
    }

    /** Cells by volume: the box's share in the lattice's own space. */
    private void estimate() {
        complete = false;
        double size = 1;
        for (int i = 0; i < frame.dimension(); i++) {
            double low = Double.POSITIVE_INFINITY;
            double high = Double.NEGATIVE_INFINITY;
            for (int corner = 0; corner < 8; corner++) {
                double value = Vectors.dot(frame.dual(i), corner(corner));
                low = Math.min(low, value);
                high = Math.max(high, value);
            }
            size *= high - low;
        }
        cells = Math.max(cells, size);
    }

    /** False where the limit was reached. */
    boolean complete() {
        return complete;
    }

    /** Number of cells in all rows; an estimate where the limit was reached. */
    double cells() {
        return cells;
    }

    int count() {
        return count;
    }

    int second(int row) {
        return second[row];
    }

    int third(int row) {
        return third[row];
    }

    /** First cell number of a row. */
    int start(int row) {
        return start[row];
    }

    /** One beyond the last cell number of a row. */
    int end(int row) {
        return end[row];
    }

    /** The row with these numbers, or −1. */
    int find(int n2, int n3) {
        int plane = n3 - firstPlane;
        if (plane < 0 || plane >= firstNumberOfPlane.length) {
            return -1;
        }
        int row = firstRowOfPlane[plane] + n2 - firstNumberOfPlane[plane];
        return row >= firstRowOfPlane[plane] && row < firstRowOfPlane[plane + 1] ? row : -1;
    }
}
