package org.isthmus.runtime.kernel.ejml;

import org.ejml.data.ZMatrixRMaj;
import org.ejml.dense.row.CommonOps_ZDRM;
import org.ejml.dense.row.decompose.lu.LUDecompositionAlt_ZDRM;
import org.ejml.dense.row.linsol.lu.LinearSolverLu_ZDRM;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.ComplexMatrix;
import org.isthmus.runtime.kernel.Op;
import org.isthmus.runtime.kernel.Schur;
import org.isthmus.runtime.kernel.SingularMatrixException;

/** EJML's dense complex matrices, with eigenproblems of its own. Slower than native code by a factor of five or so. */
public final class PureBackend implements ComplexBackend {
    private static final String EJML_VERSION = "0.46.1";

    @Override
    public String name() {
        return "pure";
    }

    @Override
    public String description() {
        return "EJML " + EJML_VERSION + ", no native code";
    }

    @Override
    public void multiplyAdd(double factor, Op opA, ComplexMatrix a, Op opB, ComplexMatrix b, ComplexMatrix c) {
        ZMatrixRMaj left = rowMajor(a, opA);
        ZMatrixRMaj right = rowMajor(b, opB);
        if (left.numCols != right.numRows || c.rows() != left.numRows || c.columns() != right.numCols) {
            throw new IllegalArgumentException("cannot add " + opA + " " + a + " times " + opB + " " + b + " to " + c);
        }
        ZMatrixRMaj product = new ZMatrixRMaj(left.numRows, right.numCols);
        if (left.numRows > 0 && right.numCols > 0 && left.numCols > 0) {
            CommonOps_ZDRM.mult(left, right, product);
        }
        for (int j = 0; j < c.columns(); j++) {
            for (int i = 0; i < c.rows(); i++) {
                int at = 2 * (i * product.numCols + j);
                c.add(i, j, factor * product.data[at], factor * product.data[at + 1]);
            }
        }
    }

    private static ZMatrixRMaj rowMajor(ComplexMatrix m, Op op) {
        int rows = op == Op.NONE ? m.rows() : m.columns();
        int columns = op == Op.NONE ? m.columns() : m.rows();
        ZMatrixRMaj result = new ZMatrixRMaj(rows, columns);
        double[] from = m.data();
        if (op == Op.NONE) {
            for (int i = 0; i < rows; i++) {
                for (int j = 0; j < columns; j++) {
                    result.data[2 * (i * columns + j)] = from[2 * (j * rows + i)];
                    result.data[2 * (i * columns + j) + 1] = from[2 * (j * rows + i) + 1];
                }
            }
            return result;
        }
        // column by column of m is row by row of its transpose
        System.arraycopy(from, 0, result.data, 0, from.length);
        if (op == Op.ADJOINT) {
            for (int k = 1; k < result.data.length; k += 2) {
                result.data[k] = -result.data[k];
            }
        }
        return result;
    }

    private static ComplexMatrix columnMajor(ZMatrixRMaj m) {
        ComplexMatrix result = ComplexMatrix.zeros(m.numRows, m.numCols);
        for (int i = 0; i < m.numRows; i++) {
            for (int j = 0; j < m.numCols; j++) {
                result.set(i, j, m.data[2 * (i * m.numCols + j)], m.data[2 * (i * m.numCols + j) + 1]);
            }
        }
        return result;
    }

    @Override
    public Factors factor(ComplexMatrix a) {
        int n = square(a);
        if (n == 0) {
            return new EmptyFactors();
        }
        LUDecompositionAlt_ZDRM decomposition = new LUDecompositionAlt_ZDRM();
        LinearSolverLu_ZDRM solver = new LinearSolverLu_ZDRM(decomposition);
        if (!solver.setA(rowMajor(a, Op.NONE)) || decomposition.isSingular()) {
            throw new SingularMatrixException("a pivot of " + n + " is zero");
        }
        return new LuFactors(n, solver, oneNorm(a));
    }

    private record EmptyFactors() implements Factors {
        @Override
        public ComplexMatrix solve(ComplexMatrix b) {
            return b.copy();
        }

        @Override
        public double reciprocalCondition() {
            return 1;
        }
    }

    private record LuFactors(int size, LinearSolverLu_ZDRM solver, double norm) implements Factors {
        @Override
        public ComplexMatrix solve(ComplexMatrix b) {
            if (b.rows() != size) {
                throw new IllegalArgumentException("cannot solve for " + b + " with a matrix of size " + size);
            }
            ZMatrixRMaj x = new ZMatrixRMaj(size, b.columns());
            if (b.columns() > 0) {
                solver.solve(rowMajor(b, Op.NONE), x);
            }
            return columnMajor(x);
        }

        /** With the inverse itself: this back end is for small problems and for checking the other. */
        @Override
        public double reciprocalCondition() {
            return 1 / (norm * oneNorm(solve(ComplexMatrix.identity(size))));
        }
    }

    private static double oneNorm(ComplexMatrix a) {
        double largest = 0;
        for (int j = 0; j < a.columns(); j++) {
            double sum = 0;
            for (int i = 0; i < a.rows(); i++) {
                sum += Math.hypot(a.real(i, j), a.imaginary(i, j));
            }
            largest = Math.max(largest, sum);
        }
        return largest;
    }

    @Override
    public HermitianEigen hermitianEigen(ComplexMatrix a) {
        square(a);
        return HermitianJacobi.solve(a);
    }

    @Override
    public Schur schur(ComplexMatrix a) {
        square(a);
        return ComplexQr.schur(a);
    }

    private static int square(ComplexMatrix a) {
        if (a.rows() != a.columns()) {
            throw new IllegalArgumentException(a + " is not square");
        }
        return a.rows();
    }
}
