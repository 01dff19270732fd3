package org.isthmus.runtime.kernel;

/**
 * Dense complex linear algebra. Arguments are not changed unless said; results are new. Safe for several threads. Cost is
 * given in complex multiply-adds for matrices of size n.
 */
public interface ComplexBackend {
    /** {@code native} or {@code pure}. */
    String name();

    /** Library, version and processor type, for provenance. */
    String description();

    /**
     * op(A)·op(B).
     *
     * @throws IllegalArgumentException where the shapes do not fit
     */
    default ComplexMatrix multiply(Op opA, ComplexMatrix a, Op opB, ComplexMatrix b) {
        int rows = opA == Op.NONE ? a.rows() : a.columns();
        int columns = opB == Op.NONE ? b.columns() : b.rows();
        ComplexMatrix product = ComplexMatrix.zeros(rows, columns);
        multiplyAdd(1, opA, a, opB, b, product);
        return product;
    }

    /** A·B. */
    default ComplexMatrix multiply(ComplexMatrix a, ComplexMatrix b) {
        return multiply(Op.NONE, a, Op.NONE, b);
    }

    /** C ← C + factor·op(A)·op(B); n³. C must be neither A nor B. */
    void multiplyAdd(double factor, Op opA, ComplexMatrix a, Op opB, ComplexMatrix b, ComplexMatrix c);

    /**
     * LU factorisation with partial pivoting; n³/3.
     *
     * @throws SingularMatrixException where a pivot is exactly zero
     */
    Factors factor(ComplexMatrix a);

    /** A factorised matrix. */
    interface Factors {
        /** A⁻¹·B; n² per column. */
        ComplexMatrix solve(ComplexMatrix b);

        /** Estimate of 1/(‖A‖₁·‖A⁻¹‖₁). */
        double reciprocalCondition();
    }

    /** A⁻¹; n³. */
    default ComplexMatrix inverse(ComplexMatrix a) {
        return factor(a).solve(ComplexMatrix.identity(a.rows()));
    }

    /** Eigenvalues, ascending, and orthonormal eigenvectors of a Hermitian matrix; only its Hermitian part is read. */
    HermitianEigen hermitianEigen(ComplexMatrix a);

    /**
     * Eigenvalues and eigenvectors.
     *
     * @param values ascending
     * @param vectors one per column
     */
    record HermitianEigen(double[] values, ComplexMatrix vectors) {}

    /** Schur form A = Z·T·Z† of any square matrix. */
    Schur schur(ComplexMatrix a);

    /** True where real matrices are worked on in real arithmetic; where false, every {@link Dense} must be complex. */
    default boolean realArithmetic() {
        return false;
    }

    /**
     * Eliminates the first {@code count} unknowns of a square matrix, which may be used up; count³/3 + count²·others +
     * count·others², of a Hermitian one half of the last.
     *
     * @param hermitian true promises that A is Hermitian, so that half of the complement need not be computed
     * @throws SingularMatrixException where a pivot is exactly zero
     */
    default Reduction eliminate(Dense a, int count, boolean hermitian) {
        return new FactoredReduction(this, a.complex(), count);
    }

    /** C ← C + factor·op(A)·op(B), all of one kind; n³. C must be neither A nor B. */
    default void multiplyAdd(double factor, Op opA, Dense a, Op opB, Dense b, Dense c) {
        multiplyAdd(factor, opA, a.complex(), opB, b.complex(), c.complex());
    }
}
