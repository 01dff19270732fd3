package org.isthmus.runtime.selfenergy;

import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.ComplexMatrix;
import org.isthmus.runtime.kernel.Op;

/**
 * Renormalisation of López Sancho, López Sancho & Rubio, J. Phys. F 15, 851 (1985): every step doubles the length that is
 * taken into account. Exact above the real axis; on it, an imaginary part of {@code width} stands for the limit, with an
 * error proportional to it. Six products and an inversion per step, log₂(1/width) steps.
 */
public final class Decimation implements SurfaceMethod {
    private static final int MOST_STEPS = 80;

    private final LeadBlocks blocks;
    private final int[] orbitals;
    private final double width;
    private final ComplexBackend backend;

    /**
     * Makes the method.
     *
     * @param width imaginary part on the real axis, eV
     */
    public Decimation(LeadBlocks blocks, int[] orbitals, double width, ComplexBackend backend) {
        this.blocks = blocks;
        this.orbitals = orbitals.clone();
        this.width = width;
        this.backend = backend;
    }

    @Override
    public Surface solve(double real, double imaginary) {
        double zi = Math.max(imaginary, width);
        ComplexMatrix surface = blocks.diagonal(real, zi);
        ComplexMatrix bulk = surface.copy();
        ComplexMatrix outward = blocks.outward(real, zi);
        ComplexMatrix inward = blocks.inward(real, zi);
        double scale = bulk.frobenius();
        for (int step = 0; step < MOST_STEPS; step++) {
            if (outward.frobenius() * inward.frobenius() <= 1e-32 * scale * scale) {
                return new Surface(backend.inverse(surface).select(orbitals, orbitals), 0, 0);
            }
            ComplexBackend.Factors factors = backend.factor(bulk);
            ComplexMatrix toOut = factors.solve(outward);
            ComplexMatrix toIn = factors.solve(inward);
            backend.multiplyAdd(-1, Op.NONE, outward, Op.NONE, toIn, surface);
            backend.multiplyAdd(-1, Op.NONE, outward, Op.NONE, toIn, bulk);
            backend.multiplyAdd(-1, Op.NONE, inward, Op.NONE, toOut, bulk);
            outward = backend.multiply(outward, toOut);
            inward = backend.multiply(inward, toIn);
        }
        throw new ArithmeticException("decimation of a lead did not converge at " + real + " eV");
    }

    @Override
    public String describe() {
        return "decimation with an imaginary part of " + width + " eV";
    }
}
