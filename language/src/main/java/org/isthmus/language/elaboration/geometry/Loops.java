package org.isthmus.language.elaboration.geometry;

import java.util.OptionalDouble;

/**
 * The smallest loop of a lattice's bonds: the shortest closed walk, in bonds, that encloses an area seen along z; among
 * equally short ones the smallest area. Bonds along one line make no loop, and neither do loops that stand upright.
 */
public final class Loops {
    /** Longest loops that are looked for, in bonds; kagome and dice lattices need 6, a square–octagon lattice 8. */
    private static final int LONGEST = 12;

    /** Steps after which the search gives up, without an answer. */
    private static final int STEPS = 3_000_000;

    /** Areas below this fraction of the squared bond count as none. */
    private static final double FLAT = 1e-6;

    private final LatticeFrame frame;
    private final BondList bonds;
    private final double[][] displacements;
    private final int[][] leaving;
    private final int[][] arriving;
    private final double reach;
    private int steps;
    private double smallest;
    private int startBasis;

    private Loops(LatticeFrame frame) {
        this.frame = frame;
        bonds = frame.bonds();
        displacements = new double[bonds.count()][];
        double longest = 0;
        for (int bond = 0; bond < bonds.count(); bond++) {
            displacements[bond] = frame.displacement(bonds, bond);
            longest = Math.max(longest, Vectors.length(displacements[bond]));
        }
        reach = longest * (1 + LatticeFrame.BORDER);
        leaving = bonds.leaving(frame.basisCount());
        arriving = bonds.arriving(frame.basisCount());
    }

    /** Area of the smallest loop, nm²; none where the lattice has no loop. */
    public static OptionalDouble smallestArea(LatticeFrame frame) {
        return new Loops(frame).search();
    }

    private OptionalDouble search() {
        for (int length = 3; length <= LONGEST; length++) {
            smallest = Double.POSITIVE_INFINITY;
            for (startBasis = 0; startBasis < frame.basisCount(); startBasis++) {
                walk(startBasis, 0, 0, 0, new double[3], 0, length, -1);
            }
            if (steps > STEPS) {
                return OptionalDouble.empty();
            }
            if (smallest < Double.POSITIVE_INFINITY) {
                return OptionalDouble.of(smallest);
            }
        }
        return OptionalDouble.empty();
    }

    /**
     * Goes on from a site.
     *
     * @param at where it is, from the start
     * @param area twice the area so far, by the shoelace formula
     * @param left bonds that are left
     * @param before step that led here, 2·bond + 1 for a reversed one, so that no walk turns on its heel
     */
    private void walk(int basis, int n1, int n2, int n3, double[] at, double area, int left, int before) {
        if (left == 0) {
            if (basis == startBasis && n1 == 0 && n2 == 0 && n3 == 0) {
                double size = Math.abs(area) / 2;
                if (size > FLAT * frame.shortestBond() * frame.shortestBond()) {
                    smallest = Math.min(smallest, size);
                }
            }
            return;
        }
        if (steps > STEPS || Vectors.length(at) > left * reach) {
            return;
        }
        for (int bond : leaving[basis]) {
            if (before != 2 * bond + 1) {
                step(bond, 1, bonds.to(bond), n1, n2, n3, at, area, left);
            }
        }
        for (int bond : arriving[basis]) {
            if (before != 2 * bond) {
                step(bond, -1, bonds.from(bond), n1, n2, n3, at, area, left);
            }
        }
    }

    private void step(int bond, int sign, int basis, int n1, int n2, int n3, double[] at, double area, int left) {
        steps++;
        double[] d = displacements[bond];
        double[] next = {at[0] + sign * d[0], at[1] + sign * d[1], at[2] + sign * d[2]};
        walk(
                basis,
                n1 + sign * bonds.n1(bond),
                n2 + sign * bonds.n2(bond),
                n3 + sign * bonds.n3(bond),
                next,
                area + at[0] * next[1] - at[1] * next[0],
                left - 1,
                sign > 0 ? 2 * bond : 2 * bond + 1);
    }
}
