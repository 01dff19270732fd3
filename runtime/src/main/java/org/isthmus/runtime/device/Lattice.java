package org.isthmus.runtime.device;

import java.util.List;

/**
 * The infinite lattice that a body is cut from, for what depends on it alone: band edges, the error of its dispersion,
 * the size of its loops.
 *
 * @param name as the user calls it
 * @param vectors one to three independent vectors, each of three components, nm
 * @param basis the sites of a cell, relative to the cell's origin
 * @param bonds hoppings, each once, from the zero cell
 * @param overlaps overlaps, each once; empty in an orthogonal basis
 * @param degeneracy multiplies currents and densities
 */
public record Lattice(
        String name, List<Vector> vectors, SiteTable basis, List<Bond> bonds, List<Bond> overlaps, double degeneracy) {
    public Lattice {
        vectors = List.copyOf(vectors);
        bonds = List.copyOf(bonds);
        overlaps = List.copyOf(overlaps);
    }

    /** A displacement, nm. */
    public record Vector(double x, double y, double z) {
        public double length() {
            return Math.sqrt(x * x + y * y + z * z);
        }
    }

    /**
     * ⟨from in cell 0|H|to in the cell at n1·v1 + n2·v2 + n3·v3⟩.
     *
     * @param cell n1, n2, n3; zero for vectors that the lattice has not
     * @param block interleaved real and imaginary parts row by row, eV (a number for an overlap)
     */
    public record Bond(int from, int to, List<Integer> cell, List<Double> block) {
        public Bond {
            cell = List.copyOf(cell);
            block = List.copyOf(block);
        }
    }
}
