package org.isthmus.runtime.kernel.ejml;

import java.util.Comparator;
import java.util.stream.IntStream;
import org.isthmus.runtime.kernel.ComplexBackend.HermitianEigen;
import org.isthmus.runtime.kernel.ComplexMatrix;

/** Cyclic Jacobi rotations for Hermitian matrices (Golub & Van Loan, Matrix Computations, 4th ed., section 8.5). */
final class HermitianJacobi {
    private static final int MOST_SWEEPS = 60;

    private HermitianJacobi() {}

    static HermitianEigen solve(ComplexMatrix matrix) {
        int n = matrix.rows();
        ComplexMatrix a = matrix.adjoint();
        a.addScaled(matrix, 1);
        a.scale(0.5, 0);
        ComplexMatrix v = ComplexMatrix.identity(n);
        double total = a.frobenius();
        for (int sweep = 0; sweep < MOST_SWEEPS; sweep++) {
            double off = 0;
            for (int p = 0; p < n; p++) {
                for (int q = p + 1; q < n; q++) {
                    double size = Math.hypot(a.real(p, q), a.imaginary(p, q));
                    off = Math.max(off, size);
                    if (size > 1e-18 * total) {
                        rotate(a, v, p, q, size);
                    }
                }
            }
            if (off <= 1e-16 * total) {
                return sorted(a, v);
            }
        }
        throw new ArithmeticException("Jacobi rotations did not converge for a matrix of size " + n);
    }

    private static void rotate(ComplexMatrix a, ComplexMatrix v, int p, int q, double size) {
        double phaseRe = a.real(p, q) / size;
        double phaseIm = a.imaginary(p, q) / size;
        double theta = (a.real(q, q) - a.real(p, p)) / (2 * size);
        double t = (theta >= 0 ? 1 : -1) / (Math.abs(theta) + Math.sqrt(theta * theta + 1));
        double c = 1 / Math.sqrt(t * t + 1);
        double s = t * c;
        // columns: p' = c·p − s·e^{−iφ}·q, q' = s·e^{iφ}·p + c·q
        columns(a, p, q, c, s, phaseRe, phaseIm);
        columns(v, p, q, c, s, phaseRe, phaseIm);
        for (int j = 0; j < a.columns(); j++) {
            double pr = a.real(p, j);
            double pi = a.imaginary(p, j);
            double qr = a.real(q, j);
            double qi = a.imaginary(q, j);
            a.set(p, j, c * pr - s * (phaseRe * qr - phaseIm * qi), c * pi - s * (phaseRe * qi + phaseIm * qr));
            a.set(q, j, s * (phaseRe * pr + phaseIm * pi) + c * qr, s * (phaseRe * pi - phaseIm * pr) + c * qi);
        }
    }

    private static void columns(ComplexMatrix m, int p, int q, double c, double s, double phaseRe, double phaseIm) {
        for (int i = 0; i < m.rows(); i++) {
            double pr = m.real(i, p);
            double pi = m.imaginary(i, p);
            double qr = m.real(i, q);
            double qi = m.imaginary(i, q);
            m.set(i, p, c * pr - s * (phaseRe * qr + phaseIm * qi), c * pi - s * (phaseRe * qi - phaseIm * qr));
            m.set(i, q, s * (phaseRe * pr - phaseIm * pi) + c * qr, s * (phaseRe * pi + phaseIm * pr) + c * qi);
        }
    }

    private static HermitianEigen sorted(ComplexMatrix a, ComplexMatrix v) {
        int n = a.rows();
        int[] order = IntStream.range(0, n)
                .boxed()
                .sorted(Comparator.comparingDouble(k -> a.real(k, k)))
                .mapToInt(k -> k)
                .toArray();
        double[] values = new double[n];
        for (int k = 0; k < n; k++) {
            values[k] = a.real(order[k], order[k]);
        }
        return new HermitianEigen(values, v.select(IntStream.range(0, n).toArray(), order));
    }
}
