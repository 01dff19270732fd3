package org.isthmus.runtime.selfenergy;

import java.util.ArrayList;
import java.util.List;
import java.util.TreeSet;
import org.apache.commons.math3.complex.Complex;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.ComplexMatrix;
import org.isthmus.runtime.kernel.Dense;
import org.isthmus.runtime.kernel.Op;
import org.isthmus.runtime.kernel.Schur;
import org.isthmus.runtime.kernel.SingularMatrixException;

/**
 * Any periodic lead, by the waves ψ_n = λⁿψ of λ²Tψ − λMψ + T'ψ = 0 with M = E·S00 − H00 and T = H01 − E·S01: those that
 * decay outward, |λ| &lt; 1, and those that carry current outward, |λ| = 1 with positive group velocity. They give the step
 * ψ_{n+1} = F·ψ_n and with it g = (M − T·F)⁻¹.
 *
 * <p>Orbitals that neither the next cell nor the body touches are eliminated first. The pencil is turned into an ordinary
 * eigenproblem by shift and inversion, so that a singular T costs nothing; decaying waves enter as an invariant subspace
 * of the Schur form, which exists also where their eigenvectors do not (defective λ = 0). About 25·(2n)³ multiply-adds.
 */
public final class BlochModes implements SurfaceMethod {
    /** How far from the unit circle a propagating wave may be found: a double root is good to √ε. */
    private static final double ON_CIRCLE = 1e-7;

    private static final double NEAR = 1e-6;
    private static final double[][] SHIFTS = {{0.83, 1.31}, {-1.17, 0.71}, {0.57, -1.61}, {-0.77, -1.93}};

    /** Where the end of a lead is looked for, as part of the hopping. */
    private static final double[] BESIDE = {
        0, 1e-9, -1e-9, 1e-8, -1e-8, 1e-7, -1e-7, 1e-6, -1e-6, 1e-5, -1e-5, 1e-4, -1e-4
    };

    /** A wave slower than this part of the hopping stands still; 10⁻⁹ off a band edge, v = 6·10⁻⁵. */
    private static final double STANDING = 2e-5;

    private static final double ACCURATE = 1e-9;

    private final LeadBlocks blocks;
    private final double hopping;
    private final int[] kept;
    private final int[] eliminated;
    private final int[] wanted;
    private final ComplexBackend backend;

    public BlochModes(LeadBlocks blocks, int[] orbitals, ComplexBackend backend) {
        this.blocks = blocks;
        this.backend = backend;
        double largest = Dense.of(blocks.h01()).largest();
        hopping = largest > 0 ? largest : 1;
        TreeSet<Integer> touched = new TreeSet<>();
        for (int orbital : orbitals) {
            touched.add(orbital);
        }
        addCoupled(blocks.h01(), touched);
        if (blocks.s01() != null) {
            addCoupled(blocks.s01(), touched);
        }
        kept = touched.stream().mapToInt(i -> i).toArray();
        eliminated = java.util.stream.IntStream.range(0, blocks.size())
                .filter(i -> !touched.contains(i))
                .toArray();
        wanted = new int[orbitals.length];
        for (int i = 0; i < orbitals.length; i++) {
            wanted[i] = java.util.Arrays.binarySearch(kept, orbitals[i]);
        }
    }

    private static void addCoupled(ComplexMatrix m, TreeSet<Integer> touched) {
        for (int j = 0; j < m.columns(); j++) {
            for (int i = 0; i < m.rows(); i++) {
                if (m.real(i, j) != 0 || m.imaginary(i, j) != 0) {
                    touched.add(i);
                    touched.add(j);
                }
            }
        }
    }

    /**
     * {@inheritDoc}
     *
     * <p>Where a wave stands still, as at the edge of a band, nothing tells incoming from outgoing, and on a flat band every
     * λ solves the equation: the end of the lead is then taken a little beside, by 10⁻⁹ to 10⁻⁴ of the hopping. That is
     * the end of a lead whose bands are moved by as much, so that every sum rule stays exact.
     */
    @Override
    public Surface solve(double real, double imaginary) {
        if (imaginary > 0) {
            return attempt(real, imaginary).surface();
        }
        Surface first = null;
        RuntimeException failure = null;
        for (double step : BESIDE) {
            try {
                Attempt attempt = attempt(real + step * hopping, 0);
                Surface surface = new Surface(
                        attempt.surface().green(),
                        attempt.surface().openModes(),
                        attempt.surface().residual(),
                        step * hopping);
                if (trustworthy(attempt)) {
                    return surface;
                }
                first = first == null && retarded(surface) ? surface : first;
            } catch (ArithmeticException | SingularMatrixException e) {
                failure = failure == null ? e : failure;
            }
        }
        if (first != null) {
            return first;
        }
        throw failure != null ? failure : new ArithmeticException("its waves in and out cannot be told apart");
    }

    /**
     * An end of the lead.
     *
     * @param slowest smallest group velocity of a propagating wave, eV per cell; infinite without any
     */
    private record Attempt(Surface surface, double slowest) {}

    private boolean trustworthy(Attempt attempt) {
        return attempt.slowest() > STANDING * hopping
                && attempt.surface().residual() < ACCURATE
                && retarded(attempt.surface());
    }

    /** A = i(g − g†), the spectral function, has no negative eigenvalue. */
    private boolean retarded(Surface surface) {
        if (!surface.green().finite()) {
            return false;
        }
        ComplexMatrix spectral = surface.green().copy();
        spectral.addScaled(surface.green().adjoint(), -1);
        spectral.scale(0, 1);
        double[] values = backend.hermitianEigen(spectral).values();
        return values.length == 0 || values[0] > -ACCURATE * 100 * Math.max(1 / hopping, values[values.length - 1]);
    }

    private Attempt attempt(double real, double imaginary) {
        ComplexMatrix t = blocks.outward(real, imaginary);
        ComplexMatrix back = blocks.inward(real, imaginary);
        ComplexMatrix m = blocks.diagonal(real, imaginary);
        int[] orbitals = wanted;
        if (eliminated.length > 0) {
            ComplexMatrix reduced = reduce(m);
            if (reduced != null) {
                return solve(reduced, t.select(kept, kept), back.select(kept, kept), imaginary == 0, wanted);
            }
            orbitals = new int[wanted.length];
            for (int i = 0; i < orbitals.length; i++) {
                orbitals[i] = kept[wanted[i]];
            }
        }
        return solve(m, t, back, imaginary == 0, orbitals);
    }

    /** The cell without its inner orbitals; null where one of their own levels sits at this energy. */
    private ComplexMatrix reduce(ComplexMatrix m) {
        try {
            ComplexBackend.Factors inner = backend.factor(m.select(eliminated, eliminated));
            if (inner.reciprocalCondition() < 1e-9) {
                return null;
            }
            ComplexMatrix reduced = m.select(kept, kept);
            ComplexMatrix across = inner.solve(m.select(eliminated, kept));
            backend.multiplyAdd(-1, Op.NONE, m.select(kept, eliminated), Op.NONE, across, reduced);
            return reduced;
        } catch (SingularMatrixException e) {
            return null;
        }
    }

    private Attempt solve(ComplexMatrix m, ComplexMatrix t, ComplexMatrix back, boolean onAxis, int[] orbitals) {
        int n = m.rows();
        if (t.frobenius() == 0) {
            ComplexMatrix alone = backend.inverse(m);
            return new Attempt(new Surface(alone.select(orbitals, orbitals), 0, 0), Double.POSITIVE_INFINITY);
        }
        double scale = Math.max(t.frobenius(), m.frobenius() / Math.sqrt(n));
        Complex shift = null;
        Schur schur = null;
        for (double[] candidate : SHIFTS) {
            ComplexMatrix inverted = shifted(m, t, back, scale, candidate);
            if (inverted != null) {
                shift = new Complex(candidate[0], candidate[1]);
                schur = backend.schur(inverted);
                break;
            }
        }
        if (schur == null) {
            throw new ArithmeticException("the waves of a lead could not be separated");
        }
        Complex[] lambda = new Complex[2 * n];
        boolean[] decays = new boolean[2 * n];
        List<Integer> circle = new ArrayList<>();
        for (int k = 0; k < 2 * n; k++) {
            Complex mu = new Complex(schur.valueReal(k), schur.valueImaginary(k));
            lambda[k] = mu.abs() < 1e-300 ? Complex.INF : shift.add(mu.reciprocal());
            double size = lambda[k].abs();
            if (onAxis && Math.abs(size - 1) < ON_CIRCLE) {
                circle.add(k);
            } else {
                decays[k] = size < 1;
            }
        }
        List<Wave> waves = onAxis ? propagating(schur, lambda, circle, t, n) : List.of();
        int decaying = schur.toFront(decays);
        List<Wave> outward = outward(waves, n - decaying);
        ComplexMatrix basis = ComplexMatrix.zeros(n, n);
        ComplexMatrix image = ComplexMatrix.zeros(n, n);
        for (int j = 0; j < decaying; j++) {
            for (int i = 0; i < n; i++) {
                basis.set(i, j, schur.vectors().real(i, j), schur.vectors().imaginary(i, j));
                image.set(i, j, schur.vectors().real(n + i, j), schur.vectors().imaginary(n + i, j));
            }
        }
        for (int w = 0; w < outward.size(); w++) {
            ComplexMatrix psi = outward.get(w).psi();
            Complex factor = outward.get(w).lambda();
            for (int i = 0; i < n; i++) {
                Complex element = new Complex(psi.real(i, 0), psi.imaginary(i, 0));
                basis.set(i, decaying + w, element.getReal(), element.getImaginary());
                Complex next = element.multiply(factor);
                image.set(i, decaying + w, next.getReal(), next.getImaginary());
            }
        }
        ComplexMatrix step =
                backend.factor(basis.adjoint()).solve(image.adjoint()).adjoint();
        ComplexMatrix dressed = m.copy();
        backend.multiplyAdd(-1, Op.NONE, t, Op.NONE, step, dressed);
        ComplexMatrix green = backend.inverse(dressed);
        int open = (int) outward.stream().filter(wave -> wave.velocity() > 0).count();
        double slowest = waves.stream()
                .mapToDouble(wave -> Math.abs(wave.velocity()))
                .min()
                .orElse(Double.POSITIVE_INFINITY);
        return new Attempt(new Surface(green.select(orbitals, orbitals), open, residual(m, t, back, green)), slowest);
    }

    /** (A − σB)⁻¹B for the pencil A = [0, 1; −T', M], B = [1, 0; 0, T], energies in units of scale; null near a λ. */
    private ComplexMatrix shifted(ComplexMatrix m, ComplexMatrix t, ComplexMatrix back, double scale, double[] sigma) {
        int n = m.rows();
        ComplexMatrix a = ComplexMatrix.zeros(2 * n, 2 * n);
        ComplexMatrix b = ComplexMatrix.zeros(2 * n, 2 * n);
        for (int j = 0; j < n; j++) {
            a.set(j, j, -sigma[0], -sigma[1]);
            a.set(j, n + j, 1, 0);
            b.set(j, j, 1, 0);
            for (int i = 0; i < n; i++) {
                double tr = t.real(i, j) / scale;
                double ti = t.imaginary(i, j) / scale;
                a.set(n + i, j, -back.real(i, j) / scale, -back.imaginary(i, j) / scale);
                a.set(
                        n + i,
                        n + j,
                        m.real(i, j) / scale - (sigma[0] * tr - sigma[1] * ti),
                        m.imaginary(i, j) / scale - (sigma[0] * ti + sigma[1] * tr));
                b.set(n + i, n + j, tr, ti);
            }
        }
        try {
            ComplexBackend.Factors factors = backend.factor(a);
            return factors.reciprocalCondition() < 1e-11 ? null : factors.solve(b);
        } catch (SingularMatrixException e) {
            return null;
        }
    }

    /** A wave on the unit circle, with a number proportional to its group velocity outward. */
    private record Wave(Complex lambda, ComplexMatrix psi, double velocity) {}

    private List<Wave> propagating(Schur schur, Complex[] lambda, List<Integer> circle, ComplexMatrix t, int n) {
        List<Wave> waves = new ArrayList<>();
        List<Integer> left = new ArrayList<>(circle);
        while (!left.isEmpty()) {
            Complex first = lambda[left.get(0)];
            List<Integer> group = left.stream()
                    .filter(k -> lambda[k].subtract(first).abs() < NEAR)
                    .toList();
            left.removeAll(group);
            waves.addAll(group(schur, first, group, t, n));
        }
        return waves;
    }

    /** Waves of equal λ, turned so that each has a velocity of its own. */
    private List<Wave> group(Schur schur, Complex lambda, List<Integer> members, ComplexMatrix t, int n) {
        ComplexMatrix psi = ComplexMatrix.zeros(n, members.size());
        for (int j = 0; j < members.size(); j++) {
            ComplexMatrix vector = schur.eigenvector(members.get(j));
            double norm = 0;
            for (int i = 0; i < n; i++) {
                norm = Math.hypot(norm, Math.hypot(vector.real(i, 0), vector.imaginary(i, 0)));
            }
            for (int i = 0; i < n; i++) {
                psi.set(i, j, vector.real(i, 0) / norm, vector.imaginary(i, 0) / norm);
            }
        }
        if (members.size() > 1) {
            psi = orthonormal(psi);
        }
        ComplexMatrix flux = backend.multiply(Op.ADJOINT, psi, Op.NONE, backend.multiply(t, psi));
        flux.scale(-lambda.getImaginary(), lambda.getReal());
        flux.addScaled(flux.adjoint(), 1);
        ComplexBackend.HermitianEigen eigen = backend.hermitianEigen(flux);
        ComplexMatrix turned = backend.multiply(psi, eigen.vectors());
        List<Wave> waves = new ArrayList<>();
        int[] rows = java.util.stream.IntStream.range(0, n).toArray();
        for (int j = 0; j < turned.columns(); j++) {
            waves.add(new Wave(lambda, turned.select(rows, new int[] {j}), eigen.values()[j]));
        }
        return waves;
    }

    /** An orthonormal basis of the columns' span; parallel columns, as at a band edge, leave one direction. */
    private ComplexMatrix orthonormal(ComplexMatrix psi) {
        ComplexBackend.HermitianEigen gram = backend.hermitianEigen(backend.multiply(Op.ADJOINT, psi, Op.NONE, psi));
        int[] independent = java.util.stream.IntStream.range(0, psi.columns())
                .filter(j -> gram.values()[j] > 1e-12)
                .toArray();
        int[] all = java.util.stream.IntStream.range(0, psi.columns()).toArray();
        ComplexMatrix turned = backend.multiply(psi, gram.vectors().select(all, independent));
        for (int j = 0; j < independent.length; j++) {
            double length = Math.sqrt(gram.values()[independent[j]]);
            for (int i = 0; i < psi.rows(); i++) {
                turned.set(i, j, turned.real(i, j) / length, turned.imaginary(i, j) / length);
            }
        }
        return turned;
    }

    /** The waves that leave: as many as the cell still needs, fastest outward first. */
    private static List<Wave> outward(List<Wave> waves, int needed) {
        List<Wave> sorted = new ArrayList<>(waves);
        sorted.sort((a, b) -> Double.compare(b.velocity(), a.velocity()));
        if (needed < 0 || sorted.size() < needed) {
            throw new ArithmeticException("a lead has " + sorted.size() + " waves for " + needed + " places");
        }
        return sorted.subList(0, needed);
    }

    private double residual(ComplexMatrix m, ComplexMatrix t, ComplexMatrix back, ComplexMatrix green) {
        ComplexMatrix dressed = m.copy();
        backend.multiplyAdd(-1, Op.NONE, t, Op.NONE, backend.multiply(green, back), dressed);
        ComplexMatrix unit = backend.multiply(dressed, green);
        unit.addScaled(ComplexMatrix.identity(m.rows()), -1);
        return unit.frobenius() / Math.max(1, m.frobenius() * green.frobenius());
    }

    @Override
    public String describe() {
        return "waves of the lead (" + kept.length + " of " + blocks.size() + " orbitals of a cell)";
    }
}
