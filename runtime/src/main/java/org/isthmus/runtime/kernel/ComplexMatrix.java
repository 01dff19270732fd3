package org.isthmus.runtime.kernel;

import java.util.Arrays;

/** A dense complex matrix: interleaved real and imaginary parts, column by column. Mutable; not safe for several threads. */
public final class ComplexMatrix {
    private final int rows;
    private final int columns;
    private final double[] data;

    private ComplexMatrix(int rows, int columns, double[] data) {
        this.rows = rows;
        this.columns = columns;
        this.data = data;
    }

    /** All zero. */
    public static ComplexMatrix zeros(int rows, int columns) {
        return new ComplexMatrix(rows, columns, new double[Math.multiplyExact(2 * rows, columns)]);
    }

    /** The unit matrix. */
    public static ComplexMatrix identity(int size) {
        ComplexMatrix matrix = zeros(size, size);
        for (int i = 0; i < size; i++) {
            matrix.set(i, i, 1, 0);
        }
        return matrix;
    }

    /** Takes over interleaved parts, column by column. */
    public static ComplexMatrix wrap(int rows, int columns, double[] interleaved) {
        if (interleaved.length != 2 * rows * columns) {
            throw new IllegalArgumentException(
                    interleaved.length + " numbers for a complex matrix of " + rows + " × " + columns);
        }
        return new ComplexMatrix(rows, columns, interleaved);
    }

    public int rows() {
        return rows;
    }

    public int columns() {
        return columns;
    }

    /** The elements themselves, interleaved, column by column: not a copy. */
    public double[] data() {
        return data;
    }

    public double real(int row, int column) {
        return data[2 * (column * rows + row)];
    }

    public double imaginary(int row, int column) {
        return data[2 * (column * rows + row) + 1];
    }

    public void set(int row, int column, double real, double imaginary) {
        int at = 2 * (column * rows + row);
        data[at] = real;
        data[at + 1] = imaginary;
    }

    public void add(int row, int column, double real, double imaginary) {
        int at = 2 * (column * rows + row);
        data[at] += real;
        data[at + 1] += imaginary;
    }

    public ComplexMatrix copy() {
        return new ComplexMatrix(rows, columns, data.clone());
    }

    /** The conjugate transpose, a copy. */
    public ComplexMatrix adjoint() {
        ComplexMatrix result = zeros(columns, rows);
        for (int j = 0; j < columns; j++) {
            for (int i = 0; i < rows; i++) {
                result.set(j, i, real(i, j), -imaginary(i, j));
            }
        }
        return result;
    }

    /** The rows and columns with these numbers, a copy. */
    public ComplexMatrix select(int[] rowNumbers, int[] columnNumbers) {
        ComplexMatrix result = zeros(rowNumbers.length, columnNumbers.length);
        for (int j = 0; j < columnNumbers.length; j++) {
            for (int i = 0; i < rowNumbers.length; i++) {
                int from = 2 * (columnNumbers[j] * rows + rowNumbers[i]);
                int to = 2 * (j * rowNumbers.length + i);
                result.data[to] = data[from];
                result.data[to + 1] = data[from + 1];
            }
        }
        return result;
    }

    /** Adds another matrix into the rows and columns with these numbers. */
    public void scatterAdd(ComplexMatrix other, int[] rowNumbers, int[] columnNumbers) {
        for (int j = 0; j < other.columns; j++) {
            int base = columnNumbers[j] * rows;
            for (int i = 0; i < other.rows; i++) {
                int to = 2 * (base + rowNumbers[i]);
                int from = 2 * (j * other.rows + i);
                data[to] += other.data[from];
                data[to + 1] += other.data[from + 1];
            }
        }
    }

    /** this += factor · other. */
    public void addScaled(ComplexMatrix other, double factor) {
        for (int k = 0; k < data.length; k++) {
            data[k] += factor * other.data[k];
        }
    }

    /** Multiplies every element by a complex number. */
    public void scale(double real, double imaginary) {
        for (int k = 0; k < data.length; k += 2) {
            double re = data[k];
            double im = data[k + 1];
            data[k] = re * real - im * imaginary;
            data[k + 1] = re * imaginary + im * real;
        }
    }

    /** Square root of the sum of all |element|². */
    public double frobenius() {
        double largest = 0;
        for (double part : data) {
            largest = Math.max(largest, Math.abs(part));
        }
        if (largest == 0 || !Double.isFinite(largest)) {
            return largest;
        }
        double sum = 0;
        for (double part : data) {
            sum += (part / largest) * (part / largest);
        }
        return largest * Math.sqrt(sum);
    }

    /** True where no element is infinite or undefined. */
    public boolean finite() {
        return Arrays.stream(data).allMatch(Double::isFinite);
    }

    @Override
    public String toString() {
        return rows + " × " + columns + " complex matrix";
    }
}
