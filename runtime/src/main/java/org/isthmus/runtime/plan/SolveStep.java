package org.isthmus.runtime.plan;

import java.util.List;

/** A step of a plan. Orbital numbers count as in the device's Hamiltonian. */
public sealed interface SolveStep {
    /** Steps whose results this one takes in, by their place in the plan; all earlier. */
    List<Integer> children();

    /** Complex multiply-adds per energy. */
    double work();

    /**
     * Eliminates orbitals that nothing outside the children touches any more, keeping the Schur complement on the border.
     *
     * @param eliminated ascending
     * @param border ascending; eliminated later, or part of the contacts
     */
    record Eliminate(List<Integer> children, int[] eliminated, int[] border) implements SolveStep {
        public Eliminate {
            children = List.copyOf(children);
        }

        @Override
        public double work() {
            double e = eliminated.length;
            double b = border.length;
            return e * e * e / 3 + e * e * b + e * b * b;
        }

        /** Size of the dense front. */
        public int front() {
            return eliminated.length + border.length;
        }
    }

    /**
     * Couples what is left, the orbitals that leads touch, to the leads' self-energies and inverts.
     *
     * @param orbitals ascending
     */
    record CoupleContacts(List<Integer> children, int[] orbitals) implements SolveStep {
        public CoupleContacts {
            children = List.copyOf(children);
        }

        @Override
        public double work() {
            double n = orbitals.length;
            return 4.0 / 3 * n * n * n;
        }
    }
}
