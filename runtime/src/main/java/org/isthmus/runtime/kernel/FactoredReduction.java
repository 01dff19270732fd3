package org.isthmus.runtime.kernel;

/** Elimination by factorising A₁₁ and solving with it. */
final class FactoredReduction implements Reduction {
    private final ComplexBackend backend;
    private final ComplexBackend.Factors factors;
    private final ComplexMatrix below;
    private final ComplexMatrix right;
    private final ComplexMatrix complement;
    private final int count;

    FactoredReduction(ComplexBackend backend, ComplexMatrix a, int count) {
        this.backend = backend;
        this.count = count;
        Dense whole = Dense.of(a);
        int n = a.rows();
        factors = backend.factor(whole.block(0, count, 0, count).complex());
        below = whole.block(count, n, 0, count).complex();
        right = factors.solve(whole.block(0, count, count, n).complex());
        complement = whole.block(count, n, count, n).complex();
        backend.multiplyAdd(-1, Op.NONE, below, Op.NONE, right, complement);
    }

    @Override
    public Dense complement() {
        return Dense.of(complement);
    }

    @Override
    public void addComplement(Dense to, int[] places) {
        to.scatterAdd(complement(), places);
    }

    @Override
    public Dense right() {
        return Dense.of(right);
    }

    @Override
    public Dense left() {
        return Dense.of(backend.multiply(below, inverse().complex()));
    }

    @Override
    public Dense inverse() {
        return Dense.of(factors.solve(ComplexMatrix.identity(count)));
    }

    @Override
    public double amplification() {
        return Dense.of(right).largest();
    }
}
