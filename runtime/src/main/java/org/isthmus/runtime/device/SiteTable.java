package org.isthmus.runtime.device;

import java.util.Arrays;

/**
 * Sites in the order of their lattice cells (first lattice vector fastest, then the basis): positions in nm, number of
 * orbitals, and the on-site block in eV with the potentials of the device added.
 *
 * <p>Blocks are Hermitian matrices orbitals × orbitals, row by row.
 */
public final class SiteTable {
    /** No sites. */
    public static final SiteTable EMPTY = new Builder(0).build();

    private final int count;
    private final double[] positions;
    private final int[] basis;
    private final int[] firstOrbital;
    private final BlockStore onSite;

    private SiteTable(Builder builder) {
        count = builder.count;
        positions = Arrays.copyOf(builder.positions, 3 * count);
        basis = Arrays.copyOf(builder.basis, count);
        firstOrbital = new int[count + 1];
        for (int site = 0; site < count; site++) {
            firstOrbital[site + 1] = firstOrbital[site] + builder.onSite.rows(site);
        }
        onSite = builder.onSite.build();
    }

    public int count() {
        return count;
    }

    /** Position in nm. */
    public double x(int site) {
        return positions[3 * site];
    }

    /** Position in nm. */
    public double y(int site) {
        return positions[3 * site + 1];
    }

    /** Position in nm. */
    public double z(int site) {
        return positions[3 * site + 2];
    }

    /** Index of the site in its lattice's basis. */
    public int basis(int site) {
        return basis[site];
    }

    public int orbitals(int site) {
        return firstOrbital[site + 1] - firstOrbital[site];
    }

    /** Row of the site's first orbital in the Hamiltonian; {@code firstOrbital(count())} is the number of orbitals. */
    public int firstOrbital(int site) {
        return firstOrbital[site];
    }

    /** Number of orbitals of all sites: the dimension of the Hamiltonian. */
    public int orbitalCount() {
        return firstOrbital[count];
    }

    /** Real part of an element of the on-site block, eV. */
    public double onSiteReal(int site, int row, int column) {
        return onSite.real(site, row, column);
    }

    /** Imaginary part of an element of the on-site block, eV. */
    public double onSiteImaginary(int site, int row, int column) {
        return onSite.imaginary(site, row, column);
    }

    /** True where every on-site block is real. */
    public boolean real() {
        return onSite.real();
    }

    /** Collects sites in table order. */
    public static final class Builder {
        private int count;
        private double[] positions;
        private int[] basis;
        private final BlockStore.Builder onSite;

        public Builder(int expected) {
            positions = new double[3 * Math.max(expected, 1)];
            basis = new int[Math.max(expected, 1)];
            onSite = new BlockStore.Builder(expected);
        }

        /**
         * Adds a site.
         *
         * @param block on-site block, interleaved real and imaginary parts row by row, length 2·orbitals²; copied
         * @return its index
         */
        public int add(double x, double y, double z, int basisIndex, int orbitals, double[] block) {
            if (count == basis.length) {
                int room = Math.max(16, count + (count >> 1));
                positions = Arrays.copyOf(positions, 3 * room);
                basis = Arrays.copyOf(basis, room);
            }
            positions[3 * count] = x;
            positions[3 * count + 1] = y;
            positions[3 * count + 2] = z;
            basis[count] = basisIndex;
            onSite.add(orbitals, orbitals, block);
            return count++;
        }

        public SiteTable build() {
            return new SiteTable(this);
        }
    }
}
