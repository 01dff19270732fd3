package org.isthmus.language.evaluation;

import org.apache.commons.math3.complex.Complex;

/** A small square matrix of complex numbers; immutable. */
public final class SquareMatrix {
    private final int size;
    private final Complex[] elements;

    private SquareMatrix(int size, Complex[] elements) {
        this.size = size;
        this.elements = elements;
    }

    /** From elements row by row; the array is taken over. */
    static SquareMatrix of(int size, Complex[] elements) {
        if (elements.length != size * size) {
            throw new IllegalArgumentException(elements.length + " elements for a matrix of size " + size);
        }
        return new SquareMatrix(size, elements);
    }

    public int size() {
        return size;
    }

    public Complex get(int row, int column) {
        return elements[row * size + column];
    }

    SquareMatrix plus(SquareMatrix other) {
        return combine(other, false);
    }

    SquareMatrix minus(SquareMatrix other) {
        return combine(other, true);
    }

    private SquareMatrix combine(SquareMatrix other, boolean subtract) {
        Complex[] result = new Complex[elements.length];
        for (int k = 0; k < result.length; k++) {
            result[k] = subtract ? elements[k].subtract(other.elements[k]) : elements[k].add(other.elements[k]);
        }
        return new SquareMatrix(size, result);
    }

    SquareMatrix times(Complex factor) {
        Complex[] result = new Complex[elements.length];
        for (int k = 0; k < result.length; k++) {
            result[k] = elements[k].multiply(factor);
        }
        return new SquareMatrix(size, result);
    }

    SquareMatrix over(Complex divisor) {
        Complex[] result = new Complex[elements.length];
        for (int k = 0; k < result.length; k++) {
            result[k] = elements[k].divide(divisor);
        }
        return new SquareMatrix(size, result);
    }

    SquareMatrix times(SquareMatrix other) {
        Complex[] result = new Complex[elements.length];
        for (int i = 0; i < size; i++) {
            for (int j = 0; j < size; j++) {
                Complex sum = Complex.ZERO;
                for (int k = 0; k < size; k++) {
                    sum = sum.add(get(i, k).multiply(other.get(k, j)));
                }
                result[i * size + j] = sum;
            }
        }
        return new SquareMatrix(size, result);
    }

    /** Interleaved real and imaginary parts, row by row. */
    public double[] interleaved() {
        double[] parts = new double[2 * elements.length];
        for (int k = 0; k < elements.length; k++) {
            parts[2 * k] = elements[k].getReal();
            parts[2 * k + 1] = elements[k].getImaginary();
        }
        return parts;
    }

    /** Largest |M − M†| of its elements, relative to the largest element. */
    public double deviationFromHermitian() {
        double largest = 0;
        double deviation = 0;
        for (int i = 0; i < size; i++) {
            for (int j = 0; j < size; j++) {
                largest = Math.max(largest, get(i, j).abs());
                deviation = Math.max(
                        deviation, get(i, j).subtract(get(j, i).conjugate()).abs());
            }
        }
        return largest == 0 ? 0 : deviation / largest;
    }
}
