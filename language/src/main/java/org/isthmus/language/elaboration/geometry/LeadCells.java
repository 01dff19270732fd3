package org.isthmus.language.elaboration.geometry;

import java.util.Arrays;
import java.util.Optional;
import java.util.function.IntPredicate;
import org.isthmus.runtime.device.Side;

/**
 * A lead from a side of a body: its period, the body's edge there, and the bonds of cells made of the edge moved outward
 * by 1, 2, … periods.
 */
public final class LeadCells {
    /** Largest number of lattice vectors in a period, for two and for three vectors. */
    private static final int[] SEARCH = {1, 200, 60};

    private final BodySites body;
    private final Side side;
    private final int[] period;
    private final double length;
    private final int[] edge;

    private LeadCells(BodySites body, Side side, int[] period, double length, int[] edge) {
        this.body = body;
        this.side = side;
        this.period = period;
        this.length = length;
        this.edge = edge;
    }

    /**
     * The shortest lattice vector outward from a side, in numbers of lattice vectors; none where no vector up to some
     * hundred cells points that way within the border tolerance.
     */
    public static Optional<int[]> shortestPeriod(LatticeFrame frame, Side side) {
        int dimension = frame.dimension();
        int bound = SEARCH[dimension - 1];
        int b2 = dimension > 1 ? bound : 0;
        int b3 = dimension > 2 ? bound : 0;
        double[] first = frame.translation(new int[] {1, 0, 0});
        first[side.axis()] = 0;
        double square = Vectors.dot(first, first);
        boolean straight = square <= frame.tolerance() * frame.tolerance();
        int[] best = null;
        double shortest = Double.POSITIVE_INFINITY;
        for (int n3 = -b3; n3 <= b3; n3++) {
            for (int n2 = -b2; n2 <= b2; n2++) {
                double[] rest = frame.translation(new int[] {0, n2, n3});
                double along = rest[side.axis()];
                rest[side.axis()] = 0;
                int[] cells;
                if (straight) {
                    // then the first vector itself is the period, or the only one there is
                    if (n2 != 0 || n3 != 0) {
                        continue;
                    }
                    cells = new int[] {frame.vector(0, side.axis()) * side.sign() > 0 ? 1 : -1, 0, 0};
                } else {
                    long n1 = Math.round(-Vectors.dot(rest, first) / square);
                    if (Math.abs(n1) > 4L * bound) {
                        continue;
                    }
                    cells = new int[] {(int) n1, n2, n3};
                }
                double[] vector = frame.translation(cells);
                double outward = vector[side.axis()] * side.sign();
                vector[side.axis()] = 0;
                if (outward > frame.tolerance()
                        && outward < shortest - frame.tolerance()
                        && Vectors.length(vector) <= frame.tolerance()) {
                    shortest = outward;
                    best = cells;
                }
            }
        }
        return Optional.ofNullable(best);
    }

    /**
     * The period of a lead: the shortest one, or as many of it as the farthest bond needs so as not to reach beyond the
     * next cell.
     *
     * @param lists hoppings and overlaps
     */
    public static Optional<int[]> period(LatticeFrame frame, Side side, BondList... lists) {
        return shortestPeriod(frame, side).map(shortest -> {
            double length = Math.abs(frame.translation(shortest)[side.axis()]);
            double reach = 0;
            for (BondList list : lists) {
                for (int bond = 0; bond < list.count(); bond++) {
                    reach = Math.max(reach, Math.abs(frame.displacement(list, bond)[side.axis()]));
                }
            }
            int multiple = Math.max(1, (int) Math.ceil(reach / length - LatticeFrame.BORDER));
            return Arrays.stream(shortest).map(n -> n * multiple).toArray();
        });
    }

    /** Outermost coordinate of a body towards a side, nm. */
    public static double outermost(BodySites body, Side side) {
        double most = Double.NEGATIVE_INFINITY;
        for (int site = 0; site < body.count(); site++) {
            most = Math.max(most, side.sign() * body.coordinate(site, side.axis()));
        }
        return side.sign() * most;
    }

    /**
     * Cuts a lead out of the lattice.
     *
     * @param period outward, in numbers of lattice vectors
     * @param across picks among the edge's sites; called in the order of the body
     */
    public static LeadCells of(BodySites body, Side side, int[] period, IntPredicate across) {
        LatticeFrame frame = body.frame();
        double length = Math.abs(frame.translation(period)[side.axis()]);
        double outermost = side.sign() * outermost(body, side);
        int[] edge = new int[16];
        int count = 0;
        for (int site = 0; site < body.count(); site++) {
            double depth = outermost - side.sign() * body.coordinate(site, side.axis());
            if (depth < length - frame.tolerance() && across.test(site)) {
                if (count == edge.length) {
                    edge = Arrays.copyOf(edge, 2 * count);
                }
                edge[count++] = site;
            }
        }
        return new LeadCells(body, side, period.clone(), length, Arrays.copyOf(edge, count));
    }

    public Side side() {
        return side;
    }

    /** Length of the period, nm. */
    public double periodLength() {
        return length;
    }

    /** Number of sites in a cell. */
    public int count() {
        return edge.length;
    }

    /** The body's site that a site of the lead continues. */
    public int edge(int site) {
        return edge[site];
    }

    /** Coordinate of a site in cell 1, 2, … (cell 0 is the edge itself), nm. */
    public double coordinate(int site, int cell, int axis) {
        int at = edge[site];
        return body.frame()
                .coordinate(
                        body.n1(at) + cell * period[0],
                        body.n2(at) + cell * period[1],
                        body.n3(at) + cell * period[2],
                        body.basis(at),
                        axis);
    }

    /** The lead's site that these numbers mean in a cell, or −1. */
    private int find(int n1, int n2, int n3, int basis, int cell) {
        int at = body.find(n1 - cell * period[0], n2 - cell * period[1], n3 - cell * period[2], basis);
        return at < 0 ? -1 : Math.max(-1, Arrays.binarySearch(edge, at));
    }

    /** Takes a bond of a lead. */
    @FunctionalInterface
    public interface BondTaker {
        /**
         * Takes a bond.
         *
         * @param reversed true where the lattice has the bond from {@code to} to {@code from}
         */
        void take(int bond, int from, int to, boolean reversed);
    }

    /** Bonds between sites of one cell. */
    public void eachWithin(BondList bonds, BondTaker taker) {
        each(bonds, true, (bond, from, n1, n2, n3) -> {
            int to = find(n1, n2, n3, bonds.to(bond), 1);
            if (to >= 0) {
                taker.take(bond, from, to, false);
            }
        });
    }

    /** Bonds from a cell to the next one outward: {@code from} in cell n, {@code to} in cell n + 1. */
    public void eachOutward(BondList bonds, BondTaker taker) {
        each(bonds, true, (bond, from, n1, n2, n3) -> {
            int to = find(n1, n2, n3, bonds.to(bond), 2);
            if (to >= 0) {
                taker.take(bond, from, to, false);
            }
        });
        each(bonds, false, (bond, from, n1, n2, n3) -> {
            int to = find(n1, n2, n3, bonds.from(bond), 2);
            if (to >= 0) {
                taker.take(bond, from, to, true);
            }
        });
    }

    /** Bonds from the body ({@code from}) to cell 1 ({@code to}), also from sites that are not on the edge. */
    public void eachContact(BondList bonds, BondTaker taker) {
        each(bonds, true, (bond, to, n1, n2, n3) -> {
            int from = body.find(n1, n2, n3, bonds.to(bond));
            if (from >= 0) {
                taker.take(bond, from, to, true);
            }
        });
        each(bonds, false, (bond, to, n1, n2, n3) -> {
            int from = body.find(n1, n2, n3, bonds.from(bond));
            if (from >= 0) {
                taker.take(bond, from, to, false);
            }
        });
    }

    @FunctionalInterface
    private interface EndTaker {
        void take(int bond, int site, int n1, int n2, int n3);
    }

    /** For every site of cell 1 the bonds that leave it (or arrive), with the cell of their other end. */
    private void each(BondList bonds, boolean leaving, EndTaker taker) {
        int basisCount = body.frame().basisCount();
        int[][] lists = leaving ? bonds.leaving(basisCount) : bonds.arriving(basisCount);
        int sign = leaving ? 1 : -1;
        for (int site = 0; site < edge.length; site++) {
            int at = edge[site];
            for (int bond : lists[body.basis(at)]) {
                taker.take(
                        bond,
                        site,
                        body.n1(at) + period[0] + sign * bonds.n1(bond),
                        body.n2(at) + period[1] + sign * bonds.n2(bond),
                        body.n3(at) + period[2] + sign * bonds.n3(bond));
            }
        }
    }
}
