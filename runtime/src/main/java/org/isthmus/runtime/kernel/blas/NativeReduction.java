package org.isthmus.runtime.kernel.blas;

import java.util.stream.IntStream;
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

    /** Columns of a Hermitian complement that are computed at once, from the first's diagonal down. */
    private static final int BLOCK = 64;

    private static final int COLUMNS = openblas_full.LAPACK_COL_MAJOR;

    private final NativeBackend backend;
    private final Dense a;
    private final int count;
    private final boolean hermitian;
    private final int[] pivots;

    NativeReduction(NativeBackend backend, Dense a, int count, boolean hermitian) {
        this.backend = backend;
        this.hermitian = hermitian;
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
            solve(a.real(), count, others, whole, n, rows, whole.getPointer(right), n);
            int width = hermitian ? BLOCK : others;
            for (int first = 0; first < others; first += width) {
                subtractProduct(whole, hermitian ? first : 0, others, first, Math.min(others, first + width), buffers);
            }
        }
        whole.position(0).get(a.data(), 0, a.data().length);
        rows.position(0).get(pivots, 0, count);
    }

    /** A part of A₂₂ − A₂₁·(A₁₁⁻¹A₁₂): rows and columns from the first, without the end. */
    private void subtractProduct(
            DoublePointer whole, int firstRow, int endRow, int firstColumn, int endColumn, Buffers buffers) {
        int n = a.rows();
        long parts = a.real() ? 1 : 2;
        DoublePointer below = whole.getPointer(parts * (count + firstRow));
        DoublePointer right = whole.getPointer(parts * n * (count + firstColumn));
        DoublePointer to = whole.getPointer(parts * ((long) n * (count + firstColumn) + count + firstRow));
        if (a.real()) {
            openblas_full.cblas_dgemm(
                    openblas_full.CblasColMajor,
                    openblas_full.CblasNoTrans,
                    openblas_full.CblasNoTrans,
                    endRow - firstRow,
                    endColumn - firstColumn,
                    count,
                    -1,
                    below,
                    n,
                    right,
                    n,
                    1,
                    to,
                    n);
        } else {
            openblas_full.cblas_zgemm(
                    openblas_full.CblasColMajor,
                    openblas_full.CblasNoTrans,
                    openblas_full.CblasNoTrans,
                    endRow - firstRow,
                    endColumn - firstColumn,
                    count,
                    buffers.scalar(-1),
                    below,
                    n,
                    right,
                    n,
                    buffers.one(),
                    to,
                    n);
        }
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
        int others = a.rows() - count;
        Dense complement = Dense.zeros(others, others, a.real());
        addComplement(complement, IntStream.range(0, others).toArray());
        return complement;
    }

    @Override
    public void addComplement(Dense to, int[] places) {
        if (hermitian) {
            addTriangle(to, places);
            return;
        }
        int n = a.rows();
        double[] from = a.data();
        double[] data = to.data();
        for (int j = count; j < n; j++) {
            int base = places[j - count] * to.rows();
            for (int i = count; i < n; i++) {
                int source = j * n + i;
                int target = base + places[i - count];
                if (a.real()) {
                    data[target] += from[source];
                } else {
                    data[2 * target] += from[2 * source];
                    data[2 * target + 1] += from[2 * source + 1];
                }
            }
        }
    }

    /** Only the diagonal and what is below it was computed. */
    private void addTriangle(Dense to, int[] places) {
        int n = a.rows();
        int m = to.rows();
        double[] from = a.data();
        double[] data = to.data();
        for (int j = count; j < n; j++) {
            int column = places[j - count];
            if (a.real()) {
                data[column * m + column] += from[j * n + j];
            } else {
                data[2 * (column * m + column)] += from[2 * (j * n + j)];
            }
            for (int i = j + 1; i < n; i++) {
                int source = j * n + i;
                int row = places[i - count];
                int target = column * m + row;
                int mirrored = row * m + column;
                if (a.real()) {
                    data[target] += from[source];
                    data[mirrored] += from[source];
                } else {
                    data[2 * target] += from[2 * source];
                    data[2 * target + 1] += from[2 * source + 1];
                    data[2 * mirrored] += from[2 * source];
                    data[2 * mirrored + 1] -= from[2 * source + 1];
                }
            }
        }
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
