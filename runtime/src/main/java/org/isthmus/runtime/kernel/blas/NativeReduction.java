package org.isthmus.runtime.kernel.blas;

import org.bytedeco.javacpp.DoublePointer;
import org.bytedeco.javacpp.IntPointer;
import org.bytedeco.openblas.global.openblas_full;
import org.isthmus.runtime.kernel.Dense;
import org.isthmus.runtime.kernel.Op;
import org.isthmus.runtime.kernel.Reduction;
import org.isthmus.runtime.kernel.SingularMatrixException;

/**
 * Elimination in place, in one visit to native memory: the matrix then holds the factors of A₁₁, A₁₁⁻¹A₁₂ above the
 * complement, and A₂₁ as it was.
 */
final class NativeReduction implements Reduction {
    private static final byte NO = 'N';
    private static final int COLUMNS = openblas_full.LAPACK_COL_MAJOR;

    private final NativeBackend backend;
    private final Dense a;
    private final int count;
    private final int[] pivots;

    NativeReduction(NativeBackend backend, Dense a, int count) {
        this.backend = backend;
        this.a = a;
        this.count = count;
        pivots = new int[count];
        int n = a.rows();
        if (n != a.columns() || count > n) {
            throw new IllegalArgumentException("cannot eliminate " + count + " unknowns of a " + a);
        }
        if (count == 0) {
            return;
        }
        Buffers buffers = Buffers.ofThread();
        DoublePointer whole = buffers.fill(0, a.data());
        IntPointer rows = buffers.pivots(count);
        int others = n - count;
        int parts = a.real() ? 1 : 2;
        long right = (long) parts * count * n;
        int info = a.real()
                ? openblas_full.LAPACKE_dgetrf_work(COLUMNS, count, count, whole, n, rows)
                : openblas_full.LAPACKE_zgetrf_work(COLUMNS, count, count, whole, n, rows);
        if (info > 0) {
            throw new SingularMatrixException("pivot " + info + " of " + count + " is zero");
        }
        NativeBackend.check(info, "getrf");
        if (others > 0) {
            DoublePointer pRight = whole.getPointer(right);
            DoublePointer pBelow = whole.getPointer((long) parts * count);
            DoublePointer pComplement = whole.getPointer(right + (long) parts * count);
            solve(a.real(), count, others, whole, n, rows, pRight, n);
            if (a.real()) {
                openblas_full.cblas_dgemm(
                        openblas_full.CblasColMajor,
                        openblas_full.CblasNoTrans,
                        openblas_full.CblasNoTrans,
                        others,
                        others,
                        count,
                        -1,
                        pBelow,
                        n,
                        pRight,
                        n,
                        1,
                        pComplement,
                        n);
            } else {
                openblas_full.cblas_zgemm(
                        openblas_full.CblasColMajor,
                        openblas_full.CblasNoTrans,
                        openblas_full.CblasNoTrans,
                        others,
                        others,
                        count,
                        buffers.scalar(-1),
                        pBelow,
                        n,
                        pRight,
                        n,
                        buffers.one(),
                        pComplement,
                        n);
            }
        }
        whole.position(0).get(a.data(), 0, a.data().length);
        rows.position(0).get(pivots, 0, count);
    }

    private static void solve(
            boolean real,
            int size,
            int columns,
            DoublePointer factors,
            int lead,
            IntPointer rows,
            DoublePointer b,
            int leadOfB) {
        NativeBackend.check(
                real
                        ? openblas_full.LAPACKE_dgetrs_work(COLUMNS, NO, size, columns, factors, lead, rows, b, leadOfB)
                        : openblas_full.LAPACKE_zgetrs_work(
                                COLUMNS, NO, size, columns, factors, lead, rows, b, leadOfB),
                "getrs");
    }

    @Override
    public Dense complement() {
        return a.block(count, a.rows(), count, a.rows());
    }

    @Override
    public Dense right() {
        return a.block(0, count, count, a.rows());
    }

    @Override
    public Dense left() {
        Dense left = Dense.zeros(a.rows() - count, count, a.real());
        backend.multiplyAdd(1, Op.NONE, a.block(count, a.rows(), 0, count), Op.NONE, inverse(), left);
        return left;
    }

    @Override
    public Dense inverse() {
        Dense inverse = Dense.zeros(count, count, a.real());
        for (int i = 0; i < count; i++) {
            inverse.add(i, i, 1, 0);
        }
        if (count > 0) {
            Buffers buffers = Buffers.ofThread();
            DoublePointer factors = buffers.fill(0, a.data());
            DoublePointer b = buffers.fill(1, inverse.data());
            IntPointer rows = buffers.pivots(count);
            rows.position(0).put(pivots, 0, count);
            solve(a.real(), count, count, factors, a.rows(), rows, b, count);
            b.position(0).get(inverse.data(), 0, inverse.data().length);
        }
        return inverse;
    }

    @Override
    public double amplification() {
        double largest = 0;
        int parts = a.real() ? 1 : 2;
        double[] data = a.data();
        for (int j = count; j < a.rows(); j++) {
            int from = parts * j * a.rows();
            for (int k = from; k < from + parts * count; k++) {
                largest = Math.max(largest, Math.abs(data[k]));
            }
        }
        return largest;
    }
}
