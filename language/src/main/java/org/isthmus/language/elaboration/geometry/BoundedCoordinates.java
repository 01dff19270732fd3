package org.isthmus.language.elaboration.geometry;

/** Which coordinates fix a lattice point, and how the others follow from them. */
final class BoundedCoordinates {
    /** Sines of angles below this do not fix a point. */
    private static final double SHARP = 1e-7;

    private BoundedCoordinates() {}

    static boolean extendsAlong(LatticeFrame frame, int axis) {
        for (int i = 0; i < frame.dimension(); i++) {
            double length = Math.sqrt(square(frame, i));
            if (Math.abs(frame.vector(i, axis)) > SHARP * length) {
                return true;
            }
        }
        return false;
    }

    private static double square(LatticeFrame frame, int vector) {
        double sum = 0;
        for (int axis = 0; axis < 3; axis++) {
            sum += frame.vector(vector, axis) * frame.vector(vector, axis);
        }
        return sum;
    }

    /** As many of these axes as the lattice has vectors, fixing a lattice point as well as can be; null if none do. */
    static int[] choose(LatticeFrame frame, int[] axes) {
        int dimension = frame.dimension();
        int[] best = null;
        double bestSize = 0;
        double scale = 1;
        for (int i = 0; i < dimension; i++) {
            scale *= Math.sqrt(square(frame, i));
        }
        for (int mask = 0; mask < 1 << axes.length; mask++) {
            if (Integer.bitCount(mask) != dimension) {
                continue;
            }
            int[] chosen = new int[dimension];
            int at = 0;
            for (int k = 0; k < axes.length; k++) {
                if ((mask & 1 << k) != 0) {
                    chosen[at++] = axes[k];
                }
            }
            double size = Math.abs(determinant(matrix(frame, chosen)));
            if (size > bestSize) {
                bestSize = size;
                best = chosen;
            }
        }
        return bestSize > SHARP * scale ? best : null;
    }

    /** Rows: chosen axes; columns: lattice vectors. */
    private static double[][] matrix(LatticeFrame frame, int[] axes) {
        double[][] m = new double[axes.length][axes.length];
        for (int r = 0; r < axes.length; r++) {
            for (int c = 0; c < axes.length; c++) {
                m[r][c] = frame.vector(c, axes[r]);
            }
        }
        return m;
    }

    private static double determinant(double[][] m) {
        return switch (m.length) {
            case 1 -> m[0][0];
            case 2 -> m[0][0] * m[1][1] - m[0][1] * m[1][0];
            default -> Vectors.dot(m[0], Vectors.cross(m[1], m[2]));
        };
    }

    /** Coordinate {@code axis} of a lattice point is Σ ties[axis][i] · coordinate chosen[i]. */
    static double[][] ties(LatticeFrame frame, int[] chosen) {
        double[][] m = matrix(frame, chosen);
        double determinant = determinant(m);
        double[][] ties = new double[3][chosen.length];
        for (int axis = 0; axis < 3; axis++) {
            for (int i = 0; i < chosen.length; i++) {
                // Cramer's rule on the transposed system: row `axis` of the vectors as a mixture of the chosen rows
                double[][] replaced = matrix(frame, chosen);
                for (int c = 0; c < chosen.length; c++) {
                    replaced[i][c] = frame.vector(c, axis);
                }
                ties[axis][i] = determinant(replaced) / determinant;
            }
        }
        return ties;
    }
}
