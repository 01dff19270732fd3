package org.isthmus.runtime.device;

import java.util.Arrays;

/**
 * Bonds, each once: the block ⟨from|H|to⟩ in eV (or ⟨from|S|to⟩, a number, for overlaps). The Hermitian partner
 * ⟨to|H|from⟩ is implied. A block has orbitals(from) rows and orbitals(to) columns, row by row; magnetic phases and
 * scalings are in it.
 *
 * <p>What {@code from} and {@code to} count is said by the owner: both sites of the body, body and lead, or two cells
 * of a lead.
 */
public final class HoppingTable {
    /** No bonds. */
    public static final HoppingTable EMPTY = new Builder(0).build();

    private final int[] from;
    private final int[] to;
    private final BlockStore blocks;

    private HoppingTable(Builder builder) {
        from = Arrays.copyOf(builder.from, builder.count);
        to = Arrays.copyOf(builder.to, builder.count);
        blocks = builder.blocks.build();
    }

    public int count() {
        return from.length;
    }

    public int from(int bond) {
        return from[bond];
    }

    public int to(int bond) {
        return to[bond];
    }

    public double real(int bond, int row, int column) {
        return blocks.real(bond, row, column);
    }

    public double imaginary(int bond, int row, int column) {
        return blocks.imaginary(bond, row, column);
    }

    /** Rows of a block: orbitals of the site it comes from. */
    public int rows(int bond) {
        return blocks.rows(bond);
    }

    /** Columns of a block: orbitals of the site it goes to. */
    public int columns(int bond) {
        return blocks.columns(bond);
    }

    /** True where every block is real. */
    public boolean real() {
        return blocks.real();
    }

    /** Collects bonds. */
    public static final class Builder {
        private int count;
        private int[] from;
        private int[] to;
        private final BlockStore.Builder blocks;

        public Builder(int expected) {
            from = new int[Math.max(expected, 1)];
            to = new int[Math.max(expected, 1)];
            blocks = new BlockStore.Builder(expected);
        }

        /**
         * Adds a bond.
         *
         * @param block interleaved real and imaginary parts row by row, length 2·rows·columns; copied
         */
        public Builder add(int fromSite, int toSite, int rows, int columns, double[] block) {
            if (count == from.length) {
                int room = Math.max(16, count + (count >> 1));
                from = Arrays.copyOf(from, room);
                to = Arrays.copyOf(to, room);
            }
            from[count] = fromSite;
            to[count] = toSite;
            count++;
            blocks.add(rows, columns, block);
            return this;
        }

        public HoppingTable build() {
            return new HoppingTable(this);
        }
    }
}
