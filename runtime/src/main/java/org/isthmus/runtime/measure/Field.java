package org.isthmus.runtime.measure;

import java.util.function.DoubleBinaryOperator;
import java.util.function.DoubleUnaryOperator;

/**
 * Values over the free axes of a grid: the side of an expectation while it is being worked out.
 *
 * @param free which axes the values depend on
 * @param sizes of all axes
 * @param energies per point the energies of the inner values; null where they do not depend on energy
 * @param values per point of the free axes (last fastest), then inner values: energies, then sites
 */
record Field(boolean[] free, int[] sizes, double[][] energies, double[][] values) {
    static Field constant(double value, int[] sizes) {
        return new Field(new boolean[sizes.length], sizes, null, new double[][] {{value}});
    }

    int points() {
        return values.length;
    }

    Field map(DoubleUnaryOperator operator) {
        double[][] mapped = new double[values.length][];
        for (int p = 0; p < mapped.length; p++) {
            mapped[p] = java.util.Arrays.stream(values[p]).map(operator).toArray();
        }
        return new Field(free, sizes, energies, mapped);
    }

    /** Point by point; an axis that only one side has is repeated for the other. */
    Field with(Field other, DoubleBinaryOperator operator) {
        boolean[] union = new boolean[free.length];
        int points = 1;
        for (int k = 0; k < union.length; k++) {
            union[k] = free[k] || other.free[k];
            points *= union[k] ? sizes[k] : 1;
        }
        double[][] result = new double[points][];
        double[][] resultEnergies = energies == null && other.energies == null ? null : new double[points][];
        for (int p = 0; p < points; p++) {
            int[] index = index(union, p);
            int mine = place(index);
            int theirs = other.place(index);
            double[] a = values[mine];
            double[] b = other.values[theirs];
            int inner = Math.max(a.length, b.length);
            if (a.length != inner && a.length != 1 || b.length != inner && b.length != 1) {
                throw new IllegalArgumentException(
                        "the sides of an expectation have " + a.length + " and " + b.length + " values at one point");
            }
            result[p] = new double[inner];
            for (int i = 0; i < inner; i++) {
                result[p][i] = operator.applyAsDouble(a[a.length == 1 ? 0 : i], b[b.length == 1 ? 0 : i]);
            }
            if (resultEnergies != null) {
                resultEnergies[p] = energies != null ? energies[mine] : other.energies[theirs];
            }
        }
        return new Field(union, sizes, resultEnergies, result);
    }

    /** Number of each axis at a point; 0 for an axis that is not free. */
    int[] index(boolean[] axes, int point) {
        int[] index = new int[axes.length];
        int rest = point;
        for (int k = axes.length - 1; k >= 0; k--) {
            if (axes[k]) {
                index[k] = rest % sizes[k];
                rest /= sizes[k];
            }
        }
        return index;
    }

    private int place(int[] index) {
        int place = 0;
        for (int k = 0; k < free.length; k++) {
            if (free[k]) {
                place = place * sizes[k] + index[k];
            }
        }
        return place;
    }

    /** Mean over an axis, which is then no longer free. */
    Field mean(int axis) {
        if (!free[axis]) {
            return this;
        }
        boolean[] left = free.clone();
        left[axis] = false;
        int points = values.length / sizes[axis];
        double[][] result = new double[points][];
        double[][] resultEnergies = energies == null ? null : new double[points][];
        for (int p = 0; p < points; p++) {
            int[] index = index(left, p);
            for (int k = 0; k < sizes[axis]; k++) {
                index[axis] = k;
                double[] from = values[place(index)];
                if (result[p] == null) {
                    result[p] = new double[from.length];
                    if (energies != null) {
                        resultEnergies[p] = energies[place(index)];
                    }
                }
                for (int i = 0; i < from.length; i++) {
                    result[p][i] += from[i] / sizes[axis];
                }
            }
        }
        return new Field(left, sizes, resultEnergies, result);
    }
}
