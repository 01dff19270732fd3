package org.isthmus.runtime.kernel;

/**
 * A dense matrix that is either real throughout or complex: column by column, real numbers one by one, complex ones as
 * interleaved parts. What is real stays real, at a quarter of the work. Mutable; not safe for several threads.
 */
public final class Dense {
    private final int rows;
    private final int columns;
    private final boolean real;
    private final double[] data;

    private Dense(int rows, int columns, boolean real, double[] data) {
        this.rows = rows;
        this.columns = columns;
        this.real = real;
        this.data = data;
    }

    /** All zero. */
    public static Dense zeros(int rows, int columns, boolean real) {
        return new Dense(rows, columns, real, new double[Math.multiplyExact((real ? 1 : 2) * rows, columns)]);
    }

    /** Takes over numbers, column by column. */
    public static Dense wrap(int rows, int columns, boolean real, double[] data) {
        if (data.length != (real ? 1 : 2) * rows * columns) {
            throw new IllegalArgumentException(data.length + " numbers for a matrix of " + rows + " × " + columns);
        }
        return new Dense(rows, columns, real, data);
    }

    /** The same elements, not a copy. */
    public static Dense of(ComplexMatrix matrix) {
        return new Dense(matrix.rows(), matrix.columns(), false, matrix.data());
    }

    /** The real parts, a copy. */
    public static Dense realPart(ComplexMatrix matrix) {
        Dense result = zeros(matrix.rows(), matrix.columns(), true);
        for (int k = 0; k < result.data.length; k++) {
            result.data[k] = matrix.data()[2 * k];
        }
        return result;
    }

    /** As a complex matrix; of a complex one the same elements, not a copy. */
    public ComplexMatrix complex() {
        if (!real) {
            return ComplexMatrix.wrap(rows, columns, data);
        }
        ComplexMatrix result = ComplexMatrix.zeros(rows, columns);
        for (int k = 0; k < data.length; k++) {
            result.data()[2 * k] = data[k];
        }
        return result;
    }

    public int rows() {
        return rows;
    }

    public int columns() {
        return columns;
    }

    public boolean real() {
        return real;
    }

    /** The numbers themselves: not a copy. */
    public double[] data() {
        return data;
    }

    public double real(int row, int column) {
        return real ? data[column * rows + row] : data[2 * (column * rows + row)];
    }

    public double imaginary(int row, int column) {
        return real ? 0 : data[2 * (column * rows + row) + 1];
    }

    /** Adds to an element; the imaginary part falls away in a real matrix. */
    public void add(int row, int column, double re, double im) {
        int at = column * rows + row;
        if (real) {
            data[at] += re;
        } else {
            data[2 * at] += re;
            data[2 * at + 1] += im;
        }
    }

    /** Adds a square matrix of the same kind into the rows and columns with these numbers. */
    public void scatterAdd(Dense other, int[] places) {
        int from = 0;
        for (int j = 0; j < other.columns; j++) {
            int base = places[j] * rows;
            if (real) {
                for (int i = 0; i < other.rows; i++) {
                    data[base + places[i]] += other.data[from++];
                }
            } else {
                for (int i = 0; i < other.rows; i++) {
                    int to = 2 * (base + places[i]);
                    data[to] += other.data[from++];
                    data[to + 1] += other.data[from++];
                }
            }
        }
    }

    /** The rows and columns with these numbers, a copy. */
    public Dense select(int[] rowNumbers, int[] columnNumbers) {
        Dense result = zeros(rowNumbers.length, columnNumbers.length, real);
        int to = 0;
        for (int column : columnNumbers) {
            int base = column * rows;
            for (int row : rowNumbers) {
                if (real) {
                    result.data[to++] = data[base + row];
                } else {
                    result.data[to++] = data[2 * (base + row)];
                    result.data[to++] = data[2 * (base + row) + 1];
                }
            }
        }
        return result;
    }

    /** Rows and columns from the given ones on, up to and without the others, a copy. */
    public Dense block(int firstRow, int endRow, int firstColumn, int endColumn) {
        Dense result = zeros(endRow - firstRow, endColumn - firstColumn, real);
        int parts = real ? 1 : 2;
        for (int j = firstColumn; j < endColumn; j++) {
            System.arraycopy(
                    data,
                    parts * (j * rows + firstRow),
                    result.data,
                    parts * (j - firstColumn) * result.rows,
                    parts * result.rows);
        }
        return result;
    }

    /** Copies another matrix of the same kind to a place in this one. */
    public void put(Dense other, int firstRow, int firstColumn) {
        int parts = real ? 1 : 2;
        for (int j = 0; j < other.columns; j++) {
            System.arraycopy(
                    other.data,
                    parts * j * other.rows,
                    data,
                    parts * ((firstColumn + j) * rows + firstRow),
                    parts * other.rows);
        }
    }

    /** Copies the conjugate transpose of another matrix of the same kind to a place in this one. */
    public void putAdjoint(Dense other, int firstRow, int firstColumn) {
        for (int j = 0; j < other.rows; j++) {
            for (int i = 0; i < other.columns; i++) {
                int to = (firstColumn + j) * rows + firstRow + i;
                int from = i * other.rows + j;
                if (real) {
                    data[to] = other.data[from];
                } else {
                    data[2 * to] = other.data[2 * from];
                    data[2 * to + 1] = -other.data[2 * from + 1];
                }
            }
        }
    }

    /** Largest absolute real or imaginary part. */
    public double largest() {
        double largest = 0;
        for (double part : data) {
            largest = Math.max(largest, Math.abs(part));
        }
        return largest;
    }

    @Override
    public String toString() {
        return rows + " × " + columns + (real ? " real" : " complex") + " matrix";
    }
}
