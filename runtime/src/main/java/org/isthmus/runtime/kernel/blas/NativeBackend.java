package org.isthmus.runtime.kernel.blas;

import java.util.Optional;
import org.bytedeco.javacpp.DoublePointer;
import org.bytedeco.openblas.global.openblas_full;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.ComplexMatrix;
import org.isthmus.runtime.kernel.Dense;
import org.isthmus.runtime.kernel.Op;
import org.isthmus.runtime.kernel.Reduction;
import org.isthmus.runtime.kernel.Schur;
import org.isthmus.runtime.kernel.SingularMatrixException;

/**
 * OpenBLAS through JavaCPP. Operands are copied to buffers outside the heap that each thread keeps, which costs n² beside
 * the n³ of the work and leaves memory to the garbage collector.
 */
public final class NativeBackend implements ComplexBackend {
    private static final byte NO = 'N';
    private static final byte YES = 'V';
    private static final byte UPPER = 'U';
    private static final byte ONE_NORM = '1';

    private final String description;

    private NativeBackend(String description) {
        this.description = description;
    }

    /** The native back end; empty where its library does not load on this machine. */
    public static Optional<NativeBackend> load() {
        try {
            openblas_full.openblas_set_num_threads(1);
            String core = openblas_full.openblas_get_corename().getString();
            String config = openblas_full.openblas_get_config().getString().strip();
            return Optional.of(new NativeBackend(config + ", core type " + core + ", one BLAS thread per worker"));
        } catch (LinkageError | RuntimeException e) {
            return Optional.empty();
        }
    }

    @Override
    public String name() {
        return "native";
    }

    @Override
    public String description() {
        return description;
    }

    @Override
    public void multiplyAdd(double factor, Op opA, ComplexMatrix a, Op opB, ComplexMatrix b, ComplexMatrix c) {
        Product product = Product.of(opA, a.rows(), a.columns(), opB, b.rows(), b.columns());
        product.mustFit(c.rows(), c.columns());
        if (product.empty()) {
            return;
        }
        Buffers buffers = Buffers.ofThread();
        DoublePointer pa = buffers.fill(0, a.data());
        DoublePointer pb = buffers.fill(1, b.data());
        DoublePointer pc = buffers.fill(2, c.data());
        openblas_full.cblas_zgemm(
                openblas_full.CblasColMajor,
                code(opA),
                code(opB),
                product.rows(),
                product.columns(),
                product.inner(),
                buffers.scalar(factor),
                pa,
                a.rows(),
                pb,
                b.rows(),
                buffers.one(),
                pc,
                product.rows());
        pc.position(0).get(c.data(), 0, c.data().length);
    }

    @Override
    public boolean realArithmetic() {
        return true;
    }

    @Override
    public Reduction eliminate(Dense a, int count, boolean hermitian) {
        return new NativeReduction(this, a, count, hermitian);
    }

    @Override
    public void multiplyAdd(double factor, Op opA, Dense a, Op opB, Dense b, Dense c) {
        if (!a.real()) {
            multiplyAdd(factor, opA, a.complex(), opB, b.complex(), c.complex());
            return;
        }
        Product product = Product.of(opA, a.rows(), a.columns(), opB, b.rows(), b.columns());
        product.mustFit(c.rows(), c.columns());
        if (product.empty()) {
            return;
        }
        Buffers buffers = Buffers.ofThread();
        DoublePointer pa = buffers.fill(0, a.data());
        DoublePointer pb = buffers.fill(1, b.data());
        DoublePointer pc = buffers.fill(2, c.data());
        openblas_full.cblas_dgemm(
                openblas_full.CblasColMajor,
                code(opA),
                code(opB),
                product.rows(),
                product.columns(),
                product.inner(),
                factor,
                pa,
                a.rows(),
                pb,
                b.rows(),
                1,
                pc,
                product.rows());
        pc.position(0).get(c.data(), 0, c.data().length);
    }

    /** The shape of op(A)·op(B). */
    private record Product(int rows, int inner, int innerOfB, int columns) {
        static Product of(Op opA, int rowsA, int columnsA, Op opB, int rowsB, int columnsB) {
            boolean plainA = opA == Op.NONE;
            boolean plainB = opB == Op.NONE;
            return new Product(
                    plainA ? rowsA : columnsA,
                    plainA ? columnsA : rowsA,
                    plainB ? rowsB : columnsB,
                    plainB ? columnsB : rowsB);
        }

        void mustFit(int rowsC, int columnsC) {
            if (inner != innerOfB || rowsC != rows || columnsC != columns) {
                throw new IllegalArgumentException("cannot add a product of " + rows + " × " + inner + " and "
                        + innerOfB + " × " + columns + " to a matrix of " + rowsC + " × " + columnsC);
            }
        }

        boolean empty() {
            return rows == 0 || columns == 0 || inner == 0;
        }
    }

    private static int code(Op op) {
        return switch (op) {
            case NONE -> openblas_full.CblasNoTrans;
            case ADJOINT -> openblas_full.CblasConjTrans;
            case TRANSPOSE -> openblas_full.CblasTrans;
        };
    }

    @Override
    public Factors factor(ComplexMatrix a) {
        int n = square(a);
        double norm =
                n == 0 ? 0 : openblas_full.LAPACKE_zlange(openblas_full.LAPACK_COL_MAJOR, ONE_NORM, n, n, a.data(), n);
        ComplexMatrix lu = a.copy();
        int[] pivots = new int[n];
        int info =
                n == 0 ? 0 : openblas_full.LAPACKE_zgetrf(openblas_full.LAPACK_COL_MAJOR, n, n, lu.data(), n, pivots);
        if (info > 0) {
            throw new SingularMatrixException("pivot " + info + " of " + n + " is zero");
        }
        check(info, "zgetrf");
        return new LuFactors(lu, pivots, norm);
    }

    private record LuFactors(ComplexMatrix lu, int[] pivots, double norm) implements Factors {
        @Override
        public ComplexMatrix solve(ComplexMatrix b) {
            int n = lu.rows();
            if (b.rows() != n) {
                throw new IllegalArgumentException("cannot solve for " + b + " with a matrix of size " + n);
            }
            ComplexMatrix x = b.copy();
            if (n > 0 && b.columns() > 0) {
                check(
                        openblas_full.LAPACKE_zgetrs(
                                openblas_full.LAPACK_COL_MAJOR, NO, n, b.columns(), lu.data(), n, pivots, x.data(), n),
                        "zgetrs");
            }
            return x;
        }

        @Override
        public double reciprocalCondition() {
            int n = lu.rows();
            if (n == 0) {
                return 1;
            }
            double[] reciprocal = new double[1];
            check(
                    openblas_full.LAPACKE_zgecon(
                            openblas_full.LAPACK_COL_MAJOR, ONE_NORM, n, lu.data(), n, norm, reciprocal),
                    "zgecon");
            return reciprocal[0];
        }
    }

    @Override
    public HermitianEigen hermitianEigen(ComplexMatrix a) {
        int n = square(a);
        ComplexMatrix vectors = hermitianPart(a);
        double[] values = new double[n];
        if (n > 0) {
            check(
                    openblas_full.LAPACKE_zheevd(
                            openblas_full.LAPACK_COL_MAJOR, YES, UPPER, n, vectors.data(), n, values),
                    "zheevd");
        }
        return new HermitianEigen(values, vectors);
    }

    private static ComplexMatrix hermitianPart(ComplexMatrix a) {
        ComplexMatrix part = a.adjoint();
        part.addScaled(a, 1);
        part.scale(0.5, 0);
        return part;
    }

    @Override
    public Schur schur(ComplexMatrix a) {
        int n = square(a);
        ComplexMatrix triangle = a.copy();
        ComplexMatrix vectors = ComplexMatrix.zeros(n, n);
        if (n > 0) {
            check(
                    openblas_full.LAPACKE_zgees(
                            openblas_full.LAPACK_COL_MAJOR,
                            YES,
                            NO,
                            null,
                            n,
                            triangle.data(),
                            n,
                            new int[1],
                            new double[2 * n],
                            vectors.data(),
                            n),
                    "zgees");
        }
        return new Schur(triangle, vectors);
    }

    private static int square(ComplexMatrix a) {
        if (a.rows() != a.columns()) {
            throw new IllegalArgumentException(a + " is not square");
        }
        return a.rows();
    }

    static void check(int info, String routine) {
        if (info != 0) {
            throw new ArithmeticException("LAPACK's " + routine + " did not succeed (info " + info + ")");
        }
    }
}
