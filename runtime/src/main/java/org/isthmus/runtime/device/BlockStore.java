package org.isthmus.runtime.device;

import java.util.Arrays;

/** Small complex matrices one behind the other; imaginary parts take no room while all of them are zero. */
final class BlockStore {
    private final int[] start;
    private final int[] columns;
    private final int uniformColumns;
    private final double[] real;
    private final double[] imaginary;

    private BlockStore(Builder builder) {
        int count = builder.count;
        boolean uniform = true;
        for (int b = 1; b < count; b++) {
            uniform &= builder.rows[b] == builder.rows[0] && builder.columns[b] == builder.columns[0];
        }
        uniformColumns = count == 0 ? 1 : builder.columns[0];
        if (uniform) {
            start = null;
            columns = null;
            uniformSize = count == 0 ? 1 : builder.rows[0] * builder.columns[0];
        } else {
            uniformSize = 0;
            columns = Arrays.copyOf(builder.columns, count);
            start = new int[count];
            for (int b = 1; b < count; b++) {
                start[b] = start[b - 1] + builder.rows[b - 1] * builder.columns[b - 1];
            }
        }
        real = Arrays.copyOf(builder.real, builder.size);
        imaginary = builder.imaginary == null ? null : Arrays.copyOf(builder.imaginary, builder.size);
    }

    private final int uniformSize;

    private int index(int block, int row, int column) {
        return start == null
                ? block * uniformSize + row * uniformColumns + column
                : start[block] + row * columns[block] + column;
    }

    double real(int block, int row, int column) {
        return real[index(block, row, column)];
    }

    double imaginary(int block, int row, int column) {
        return imaginary == null ? 0 : imaginary[index(block, row, column)];
    }

    boolean real() {
        return imaginary == null;
    }

    int columns(int block) {
        return columns == null ? uniformColumns : columns[block];
    }

    int rows(int block) {
        int size = start == null
                ? uniformSize
                : (block + 1 < start.length ? start[block + 1] : real.length) - start[block];
        return size / columns(block);
    }

    static final class Builder {
        private int count;
        private int size;
        private int[] rows;
        private int[] columns;
        private double[] real;
        private double[] imaginary;

        Builder(int expected) {
            rows = new int[Math.max(expected, 1)];
            columns = new int[Math.max(expected, 1)];
            real = new double[Math.max(expected, 1)];
        }

        int rows(int block) {
            return rows[block];
        }

        void add(int rowCount, int columnCount, double[] interleaved) {
            int length = rowCount * columnCount;
            if (rowCount < 1 || columnCount < 1 || interleaved.length != 2 * length) {
                throw new IllegalArgumentException("a block of " + rowCount + " × " + columnCount + " has "
                        + interleaved.length + " numbers, expected " + 2 * length);
            }
            if (count == rows.length) {
                int room = Math.max(16, count + (count >> 1));
                rows = Arrays.copyOf(rows, room);
                columns = Arrays.copyOf(columns, room);
            }
            if (size + length > real.length) {
                int room = Math.max(size + length, real.length + (real.length >> 1));
                real = Arrays.copyOf(real, room);
                imaginary = imaginary == null ? null : Arrays.copyOf(imaginary, room);
            }
            for (int k = 0; k < length; k++) {
                real[size + k] = interleaved[2 * k];
                double im = interleaved[2 * k + 1];
                if (im != 0 && imaginary == null) {
                    imaginary = new double[real.length];
                }
                if (imaginary != null) {
                    imaginary[size + k] = im;
                }
            }
            rows[count] = rowCount;
            columns[count] = columnCount;
            count++;
            size += length;
        }

        BlockStore build() {
            return new BlockStore(this);
        }
    }
}
