package org.isthmus.runtime.kernel.ejml;

import org.isthmus.runtime.kernel.ComplexMatrix;
import org.isthmus.runtime.kernel.Schur;

/**
 * The Schur form of a complex matrix: Householder reduction to Hessenberg form, then QR steps with Wilkinson's shift and
 * deflation (Golub & Van Loan, Matrix Computations, 4th ed., sections 7.4 and 7.5).
 */
final class ComplexQr {
    private static final int MOST_STEPS_PER_VALUE = 60;
    private static final double EPSILON = Math.ulp(1.0);

    private final int n;
    private final ComplexMatrix h;
    private final ComplexMatrix z;

    private ComplexQr(ComplexMatrix a) {
        n = a.rows();
        h = a.copy();
        z = ComplexMatrix.identity(n);
    }

    static Schur schur(ComplexMatrix a) {
        ComplexQr qr = new ComplexQr(a);
        qr.toHessenberg();
        qr.iterate();
        return new Schur(qr.h, qr.z);
    }

    private void toHessenberg() {
        for (int k = 0; k + 2 < n; k++) {
            double[] vr = new double[n];
            double[] vi = new double[n];
            double norm = 0;
            for (int i = k + 1; i < n; i++) {
                vr[i] = h.real(i, k);
                vi[i] = h.imaginary(i, k);
                norm = Math.hypot(norm, Math.hypot(vr[i], vi[i]));
            }
            if (norm == 0) {
                continue;
            }
            double first = Math.hypot(vr[k + 1], vi[k + 1]);
            double phaseRe = first == 0 ? 1 : vr[k + 1] / first;
            double phaseIm = first == 0 ? 0 : vi[k + 1] / first;
            vr[k + 1] += phaseRe * norm;
            vi[k + 1] += phaseIm * norm;
            double length2 = 0;
            for (int i = k + 1; i < n; i++) {
                length2 += vr[i] * vr[i] + vi[i] * vi[i];
            }
            double beta = 2 / length2;
            reflectRows(vr, vi, beta, k + 1);
            reflectColumns(h, vr, vi, beta, k + 1);
            reflectColumns(z, vr, vi, beta, k + 1);
            for (int i = k + 2; i < n; i++) {
                h.set(i, k, 0, 0);
            }
        }
    }

    private void reflectRows(double[] vr, double[] vi, double beta, int from) {
        for (int j = 0; j < n; j++) {
            double sr = 0;
            double si = 0;
            for (int i = from; i < n; i++) {
                sr += vr[i] * h.real(i, j) + vi[i] * h.imaginary(i, j);
                si += vr[i] * h.imaginary(i, j) - vi[i] * h.real(i, j);
            }
            for (int i = from; i < n; i++) {
                h.add(i, j, -beta * (vr[i] * sr - vi[i] * si), -beta * (vr[i] * si + vi[i] * sr));
            }
        }
    }

    private void reflectColumns(ComplexMatrix m, double[] vr, double[] vi, double beta, int from) {
        for (int i = 0; i < n; i++) {
            double sr = 0;
            double si = 0;
            for (int j = from; j < n; j++) {
                sr += m.real(i, j) * vr[j] - m.imaginary(i, j) * vi[j];
                si += m.real(i, j) * vi[j] + m.imaginary(i, j) * vr[j];
            }
            for (int j = from; j < n; j++) {
                m.add(i, j, -beta * (sr * vr[j] + si * vi[j]), -beta * (si * vr[j] - sr * vi[j]));
            }
        }
    }

    private void iterate() {
        int end = n - 1;
        int steps = 0;
        while (end > 0) {
            int start = end;
            while (start > 0 && !negligible(start)) {
                start--;
            }
            if (start > 0) {
                h.set(start, start - 1, 0, 0);
            }
            if (start == end) {
                end--;
                steps = 0;
                continue;
            }
            if (++steps > MOST_STEPS_PER_VALUE) {
                throw new ArithmeticException("QR steps did not converge for a matrix of size " + n);
            }
            step(start, end, steps);
        }
    }

    private boolean negligible(int i) {
        double size = Math.abs(h.real(i, i - 1)) + Math.abs(h.imaginary(i, i - 1));
        double neighbours = Math.abs(h.real(i, i))
                + Math.abs(h.imaginary(i, i))
                + Math.abs(h.real(i - 1, i - 1))
                + Math.abs(h.imaginary(i - 1, i - 1));
        return size <= EPSILON * neighbours || size < Double.MIN_NORMAL;
    }

    /** One QR step on the rows and columns from start to end. */
    private void step(int start, int end, int count) {
        double[] shift = count % 10 == 0
                ? new double[] {h.real(end, end) + Math.abs(h.real(end, end - 1)), h.imaginary(end, end)}
                : wilkinson(end);
        for (int i = start; i <= end; i++) {
            h.add(i, i, -shift[0], -shift[1]);
        }
        double[][] rotations = new double[end - start][];
        for (int k = start; k < end; k++) {
            double pr = h.real(k, k);
            double pi = h.imaginary(k, k);
            double qr = h.real(k + 1, k);
            double qi = h.imaginary(k + 1, k);
            double norm = Math.sqrt(pr * pr + pi * pi + qr * qr + qi * qi);
            double[] g =
                    norm == 0 ? new double[] {1, 0, 0, 0} : new double[] {pr / norm, pi / norm, qr / norm, qi / norm};
            rotations[k - start] = g;
            for (int j = k; j < n; j++) {
                rows(k, j, g);
            }
        }
        for (int k = start; k < end; k++) {
            double[] g = rotations[k - start];
            for (int i = 0; i <= Math.min(k + 1, end); i++) {
                columns(h, i, k, g);
            }
            for (int i = 0; i < n; i++) {
                columns(z, i, k, g);
            }
        }
        for (int i = start; i <= end; i++) {
            h.add(i, i, shift[0], shift[1]);
        }
    }

    /** p ← a*·p + b*·q, q ← −b·p + a·q. */
    private void rows(int k, int j, double[] g) {
        double pr = h.real(k, j);
        double pi = h.imaginary(k, j);
        double qr = h.real(k + 1, j);
        double qi = h.imaginary(k + 1, j);
        h.set(k, j, g[0] * pr + g[1] * pi + g[2] * qr + g[3] * qi, g[0] * pi - g[1] * pr + g[2] * qi - g[3] * qr);
        h.set(
                k + 1,
                j,
                -(g[2] * pr - g[3] * pi) + g[0] * qr - g[1] * qi,
                -(g[2] * pi + g[3] * pr) + g[0] * qi + g[1] * qr);
    }

    /** The same from the right: p ← p·a + q·b, q ← −p·b* + q·a*. */
    private static void columns(ComplexMatrix m, int i, int k, double[] g) {
        double pr = m.real(i, k);
        double pi = m.imaginary(i, k);
        double qr = m.real(i, k + 1);
        double qi = m.imaginary(i, k + 1);
        m.set(i, k, pr * g[0] - pi * g[1] + qr * g[2] - qi * g[3], pr * g[1] + pi * g[0] + qr * g[3] + qi * g[2]);
        m.set(
                i,
                k + 1,
                -(pr * g[2] + pi * g[3]) + qr * g[0] + qi * g[1],
                -(pi * g[2] - pr * g[3]) + qi * g[0] - qr * g[1]);
    }

    /** The eigenvalue of the last two rows and columns that is nearer to the last element. */
    private double[] wilkinson(int end) {
        double ar = h.real(end - 1, end - 1);
        double ai = h.imaginary(end - 1, end - 1);
        double dr = h.real(end, end);
        double di = h.imaginary(end, end);
        double br = h.real(end - 1, end);
        double bi = h.imaginary(end - 1, end);
        double cr = h.real(end, end - 1);
        double ci = h.imaginary(end, end - 1);
        double hr = (ar - dr) / 2;
        double hi = (ai - di) / 2;
        double rr = hr * hr - hi * hi + br * cr - bi * ci;
        double ri = 2 * hr * hi + br * ci + bi * cr;
        double size = Math.hypot(rr, ri);
        double rootRe = Math.sqrt(Math.max(0, (size + rr) / 2));
        double rootIm = Math.copySign(Math.sqrt(Math.max(0, (size - rr) / 2)), ri);
        boolean minus = hr * rootRe + hi * rootIm > 0;
        return new double[] {dr + hr + (minus ? -rootRe : rootRe), di + hi + (minus ? -rootIm : rootIm)};
    }
}
