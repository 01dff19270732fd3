package org.isthmus.runtime.selfenergy;

import java.util.Arrays;
import java.util.Optional;
import org.apache.commons.math3.complex.Complex;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.ComplexBackend.HermitianEigen;
import org.isthmus.runtime.kernel.ComplexMatrix;
import org.isthmus.runtime.kernel.Op;

/**
 * A separable lead: its cells are coupled by one number, ⟨n|H|n + 1⟩ = c·1, in an orthogonal basis. Its transverse modes
 * are chains of their own, each with the closed form g = w/|c|, w² − 2dw + 1 = 0, d = (E − ε)/2|c| (common practice).
 * Exact; n³ once, then n²·(touched orbitals) per energy.
 */
public final class TransverseModes implements SurfaceMethod {
    private static final double[] BESIDE = {0, 1e-9, -1e-9, 3e-9, -3e-9};

    /** Distance from a band edge, in half band widths, below which a wave stands still: v = 3·10⁻⁵ of the hopping. */
    private static final double STANDING = 1e-10;

    private final ComplexBackend backend;
    private final HermitianEigen modes;
    private final double coupling;
    private final ComplexMatrix touched;

    private TransverseModes(ComplexBackend backend, HermitianEigen modes, double coupling, int[] orbitals) {
        this.backend = backend;
        this.modes = modes;
        this.coupling = coupling;
        int n = modes.values().length;
        int[] all = new int[n];
        for (int i = 0; i < n; i++) {
            all[i] = i;
        }
        touched = modes.vectors().select(orbitals, all);
    }

    /** The method, where the lead is separable. */
    public static Optional<TransverseModes> of(LeadBlocks blocks, int[] orbitals, ComplexBackend backend) {
        ComplexMatrix h01 = blocks.h01();
        if (blocks.s00() != null) {
            return Optional.empty();
        }
        double re = h01.real(0, 0);
        double im = h01.imaginary(0, 0);
        for (int j = 0; j < h01.columns(); j++) {
            for (int i = 0; i < h01.rows(); i++) {
                if (i == j
                        ? h01.real(i, j) != re || h01.imaginary(i, j) != im
                        : h01.real(i, j) != 0 || h01.imaginary(i, j) != 0) {
                    return Optional.empty();
                }
            }
        }
        double coupling = Math.hypot(re, im);
        return coupling == 0
                ? Optional.empty()
                : Optional.of(new TransverseModes(backend, backend.hermitianEigen(blocks.h00()), coupling, orbitals));
    }

    /** The step to an energy at which no mode is at the edge of its band; 0 where none is. */
    private double beside(double energy) {
        for (double step : BESIDE) {
            double moved = energy + step * coupling;
            if (Arrays.stream(modes.values())
                    .noneMatch(mode -> Math.abs(Math.abs(moved - mode) / (2 * coupling) - 1) < STANDING)) {
                return step * coupling;
            }
        }
        return 0;
    }

    /**
     * {@inheritDoc}
     *
     * <p>At the very edge of a mode's band, where its wave stands still and its density of states diverges, the end of the
     * lead is taken beside, by about 10⁻⁹ of the hopping.
     */
    @Override
    public Surface solve(double asked, double imaginary) {
        double beside = imaginary == 0 ? beside(asked) : 0;
        double real = asked + beside;
        int n = modes.values().length;
        ComplexMatrix scaled = touched.copy();
        int open = 0;
        for (int m = 0; m < n; m++) {
            double d = (real - modes.values()[m]) / (2 * coupling);
            Complex w;
            if (imaginary == 0) {
                boolean propagates = Math.abs(d) < 1;
                open += propagates ? 1 : 0;
                w = propagates
                        ? new Complex(d, -Math.sqrt((1 - d) * (1 + d)))
                        : new Complex(1 / (d + Math.copySign(Math.sqrt((d - 1) * (d + 1)), d)));
            } else {
                Complex z = new Complex(d, imaginary / (2 * coupling));
                Complex root = z.multiply(z).subtract(1).sqrt();
                Complex plus = z.add(root);
                Complex minus = z.subtract(root);
                w = plus.abs() > minus.abs() ? plus.reciprocal() : minus.reciprocal();
            }
            for (int i = 0; i < scaled.rows(); i++) {
                double re = scaled.real(i, m);
                double im = scaled.imaginary(i, m);
                scaled.set(
                        i,
                        m,
                        (re * w.getReal() - im * w.getImaginary()) / coupling,
                        (re * w.getImaginary() + im * w.getReal()) / coupling);
            }
        }
        return new Surface(backend.multiply(Op.NONE, scaled, Op.ADJOINT, touched), open, 0, beside);
    }

    @Override
    public String describe() {
        return "transverse modes, exact (cells coupled by one number)";
    }
}
