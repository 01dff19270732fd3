package org.isthmus.runtime.kernel;

/**
 * A Schur form A = Z·T·Z†: T upper triangular with the eigenvalues on its diagonal, Z unitary. Golub & Van Loan, Matrix
 * Computations, 4th ed., sections 7.1 and 7.6.
 */
public final class Schur {
    private final ComplexMatrix triangle;
    private final ComplexMatrix vectors;
    private final double size;

    public Schur(ComplexMatrix triangle, ComplexMatrix vectors) {
        this.triangle = triangle;
        this.vectors = vectors;
        size = Math.max(triangle.frobenius(), Double.MIN_NORMAL);
    }

    public ComplexMatrix triangle() {
        return triangle;
    }

    public ComplexMatrix vectors() {
        return vectors;
    }

    public int size() {
        return triangle.rows();
    }

    public double valueReal(int k) {
        return triangle.real(k, k);
    }

    public double valueImaginary(int k) {
        return triangle.imaginary(k, k);
    }

    /**
     * Moves chosen eigenvalues to the front, keeping their order, by exchanging neighbours with plane rotations; the first
     * columns of the vectors then span their invariant subspace. Changes this object.
     *
     * @return how many were chosen
     */
    public int toFront(boolean[] chosen) {
        boolean[] flags = chosen.clone();
        int front = 0;
        for (int k = 0; k < size(); k++) {
            if (!flags[k]) {
                continue;
            }
            for (int j = k; j > front; j--) {
                exchange(j - 1);
                boolean flag = flags[j];
                flags[j] = flags[j - 1];
                flags[j - 1] = flag;
            }
            front++;
        }
        return front;
    }

    /** Exchanges the eigenvalues at k and k + 1 (as LAPACK's ztrexc does). */
    private void exchange(int k) {
        ComplexMatrix t = triangle;
        double ar = t.real(k, k);
        double ai = t.imaginary(k, k);
        double br = t.real(k + 1, k + 1);
        double bi = t.imaginary(k + 1, k + 1);
        double fr = t.real(k, k + 1);
        double fi = t.imaginary(k, k + 1);
        double gr = br - ar;
        double gi = bi - ai;
        double norm = Math.sqrt(fr * fr + fi * fi + gr * gr + gi * gi);
        if (norm == 0) {
            return;
        }
        // the eigenvector of the second eigenvalue in the plane is (f, g): rotate it into the first direction
        double[] c1 = {fr / norm, fi / norm};
        double[] c2 = {gr / norm, gi / norm};
        // the triangle is zero left of the pair and below it
        rotateRows(t, k, c1, c2);
        rotateColumns(t, k, k + 2, c1, c2);
        rotateColumns(vectors, k, vectors.rows(), c1, c2);
        t.set(k + 1, k, 0, 0);
        t.set(k, k, br, bi);
        t.set(k + 1, k + 1, ar, ai);
    }

    /** Rows k, k+1 ← Q†·rows for Q = [c1, −c2*; c2, c1*]. */
    private static void rotateRows(ComplexMatrix m, int k, double[] c1, double[] c2) {
        for (int j = k; j < m.columns(); j++) {
            double pr = m.real(k, j);
            double pi = m.imaginary(k, j);
            double qr = m.real(k + 1, j);
            double qi = m.imaginary(k + 1, j);
            // conj(c1)·p + conj(c2)·q ; −c2·p + c1·q
            m.set(
                    k,
                    j,
                    c1[0] * pr + c1[1] * pi + c2[0] * qr + c2[1] * qi,
                    c1[0] * pi - c1[1] * pr + c2[0] * qi - c2[1] * qr);
            m.set(
                    k + 1,
                    j,
                    -(c2[0] * pr - c2[1] * pi) + c1[0] * qr - c1[1] * qi,
                    -(c2[0] * pi + c2[1] * pr) + c1[0] * qi + c1[1] * qr);
        }
    }

    /** The first rows of columns k, k+1 ← columns·Q. */
    private static void rotateColumns(ComplexMatrix m, int k, int rows, double[] c1, double[] c2) {
        for (int i = 0; i < rows; i++) {
            double pr = m.real(i, k);
            double pi = m.imaginary(i, k);
            double qr = m.real(i, k + 1);
            double qi = m.imaginary(i, k + 1);
            // p·c1 + q·c2 ; −p·conj(c2) + q·conj(c1)
            m.set(
                    i,
                    k,
                    pr * c1[0] - pi * c1[1] + qr * c2[0] - qi * c2[1],
                    pr * c1[1] + pi * c1[0] + qr * c2[1] + qi * c2[0]);
            m.set(
                    i,
                    k + 1,
                    -(pr * c2[0] + pi * c2[1]) + qr * c1[0] + qi * c1[1],
                    -(pi * c2[0] - pr * c2[1]) + qi * c1[0] - qr * c1[1]);
        }
    }

    /** The eigenvector of the eigenvalue at k, of norm 1, as a matrix of one column. */
    public ComplexMatrix eigenvector(int k) {
        int n = size();
        double[] yr = new double[k + 1];
        double[] yi = new double[k + 1];
        yr[k] = 1;
        double least = Math.ulp(1.0) * size;
        double[] t = triangle.data();
        for (int j = k; j >= 0; j--) {
            if (j < k) {
                double dr = triangle.real(k, k) - triangle.real(j, j);
                double di = triangle.imaginary(k, k) - triangle.imaginary(j, j);
                double d2 = dr * dr + di * di;
                if (d2 < least * least) {
                    // an equal eigenvalue: any small number serves, as in LAPACK's ztrevc
                    dr = least;
                    di = 0;
                    d2 = least * least;
                }
                double re = (yr[j] * dr + yi[j] * di) / d2;
                yi[j] = (yi[j] * dr - yr[j] * di) / d2;
                yr[j] = re;
            }
            for (int i = 0; i < j; i++) {
                int at = 2 * (j * n + i);
                yr[i] += t[at] * yr[j] - t[at + 1] * yi[j];
                yi[i] += t[at] * yi[j] + t[at + 1] * yr[j];
            }
        }
        ComplexMatrix vector = ComplexMatrix.zeros(n, 1);
        double[] z = vectors.data();
        double[] x = vector.data();
        for (int j = 0; j <= k; j++) {
            for (int i = 0; i < n; i++) {
                int at = 2 * (j * n + i);
                x[2 * i] += z[at] * yr[j] - z[at + 1] * yi[j];
                x[2 * i + 1] += z[at] * yi[j] + z[at + 1] * yr[j];
            }
        }
        vector.scale(1 / vector.frobenius(), 0);
        return vector;
    }
}
