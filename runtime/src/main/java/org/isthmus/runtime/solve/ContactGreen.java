package org.isthmus.runtime.solve;

import java.util.stream.IntStream;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.ComplexBackend.Factors;
import org.isthmus.runtime.kernel.ComplexBackend.HermitianEigen;
import org.isthmus.runtime.kernel.ComplexMatrix;
import org.isthmus.runtime.kernel.Dense;
import org.isthmus.runtime.kernel.Op;
import org.isthmus.runtime.kernel.SingularMatrixException;

/**
 * G on the contacts, the inverse of M = E·S − H − Σ with everything else eliminated.
 *
 * <p>A state exactly at E that no lead reaches makes M singular: M v = 0, then also Γ v = 0, so that it carries nothing
 * between leads and its spectral weight is a delta function. G is then the inverse on all that is orthogonal to such
 * states.
 *
 * @param green G
 * @param residual of M·G = 1, relative
 */
record ContactGreen(ComplexMatrix green, double residual) {
    /** Below this reciprocal condition number states at the energy are looked for. */
    private static final double ALMOST_SINGULAR = 1e-13;

    /** Where they are looked for: |M v| as part of the largest such; the square of it is well above rounding. */
    private static final double SUSPECT = 1e-7;

    /** What |M v| may be by rounding. */
    private static final double ROUNDING = 1e-12;

    static ContactGreen of(ComplexMatrix matrix, ComplexBackend backend) {
        int n = matrix.rows();
        if (n == 0) {
            return new ContactGreen(matrix, 0);
        }
        ComplexMatrix bound = ComplexMatrix.zeros(n, 0);
        ComplexMatrix green;
        try {
            Factors factors = backend.factor(matrix);
            if (factors.reciprocalCondition() < ALMOST_SINGULAR) {
                bound = boundStates(matrix, backend);
            }
            green = bound.columns() == 0
                    ? factors.solve(ComplexMatrix.identity(n))
                    : orthogonalInverse(matrix, bound, backend);
        } catch (SingularMatrixException e) {
            bound = boundStates(matrix, backend);
            green = orthogonalInverse(matrix, bound, backend);
        }
        return new ContactGreen(green, residual(matrix, green, bound, backend));
    }

    /** |M·G·r − r + X·X†·r| / |r| for one r that all columns have a part in. */
    private static double residual(
            ComplexMatrix matrix, ComplexMatrix green, ComplexMatrix bound, ComplexBackend backend) {
        int n = matrix.rows();
        ComplexMatrix probe = ComplexMatrix.zeros(n, 1);
        for (int i = 0; i < n; i++) {
            // phases that do not repeat, steps of the golden angle
            probe.set(i, 0, Math.cos(2.399963229728653 * i), Math.sin(2.399963229728653 * i));
        }
        ComplexMatrix left = backend.multiply(matrix, backend.multiply(green, probe));
        left.addScaled(probe, -1);
        backend.multiplyAdd(1, Op.NONE, bound, Op.NONE, backend.multiply(Op.ADJOINT, bound, Op.NONE, probe), left);
        return left.frobenius() / probe.frobenius();
    }

    /** Orthonormal v with M v = 0 to rounding, as columns. */
    private static ComplexMatrix boundStates(ComplexMatrix matrix, ComplexBackend backend) {
        int n = matrix.rows();
        int[] all = IntStream.range(0, n).toArray();
        HermitianEigen squares = backend.hermitianEigen(backend.multiply(Op.ADJOINT, matrix, Op.NONE, matrix));
        double scale = Math.sqrt(Math.max(0, squares.values()[n - 1]));
        int[] suspects = IntStream.range(0, n)
                .filter(k -> squares.values()[k] <= SUSPECT * SUSPECT * scale * scale)
                .toArray();
        ComplexMatrix candidates = squares.vectors().select(all, suspects);
        ComplexMatrix images = backend.multiply(matrix, candidates);
        // squares of rounding errors are nothing beside those of the larger suspects: sort these out once more
        ComplexMatrix turned = backend.multiply(
                candidates,
                backend.hermitianEigen(backend.multiply(Op.ADJOINT, images, Op.NONE, images))
                        .vectors());
        int[] found = IntStream.range(0, suspects.length)
                .filter(k -> backend.multiply(matrix, turned.select(all, new int[] {k}))
                                .frobenius()
                        <= ROUNDING * scale)
                .toArray();
        return turned.select(all, found);
    }

    /** The upper left part of [M, X; X†, 0]⁻¹, the inverse on what is orthogonal to X. */
    private static ComplexMatrix orthogonalInverse(ComplexMatrix matrix, ComplexMatrix bound, ComplexBackend backend) {
        int n = matrix.rows();
        int k = bound.columns();
        Dense bordered = Dense.zeros(n + k, n + k, false);
        bordered.put(Dense.of(matrix), 0, 0);
        bordered.put(Dense.of(bound), 0, n);
        bordered.putAdjoint(Dense.of(bound), n, 0);
        return Dense.of(backend.inverse(bordered.complex())).block(0, n, 0, n).complex();
    }
}
