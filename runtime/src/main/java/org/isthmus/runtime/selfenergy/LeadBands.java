package org.isthmus.runtime.selfenergy;

import java.util.ArrayList;
import java.util.List;
import org.apache.commons.math3.optim.MaxEval;
import org.apache.commons.math3.optim.nonlinear.scalar.GoalType;
import org.apache.commons.math3.optim.univariate.BrentOptimizer;
import org.apache.commons.math3.optim.univariate.SearchInterval;
import org.apache.commons.math3.optim.univariate.UnivariateObjectiveFunction;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.ComplexBackend.HermitianEigen;
import org.isthmus.runtime.kernel.ComplexMatrix;
import org.isthmus.runtime.kernel.Op;

/** The band structure E_m(k) of a lead, with k in radians per cell. */
public final class LeadBands {
    /** Complex multiply-adds that a scan of the bands may cost. */
    private static final double BUDGET = 4e9;

    private static final int MOST_POINTS = 129;
    private static final int FEWEST_POINTS = 9;

    private final LeadBlocks blocks;
    private final ComplexBackend backend;

    public LeadBands(LeadBlocks blocks, ComplexBackend backend) {
        this.blocks = blocks;
        this.backend = backend;
    }

    /** Energies at one wave number, ascending, eV. */
    public double[] energies(double k) {
        ComplexMatrix h = bloch(blocks.h00(), blocks.h01(), k);
        if (blocks.s00() == null) {
            return backend.hermitianEigen(h).values();
        }
        HermitianEigen s = backend.hermitianEigen(bloch(blocks.s00(), blocks.s01(), k));
        ComplexMatrix half = s.vectors().copy();
        for (int j = 0; j < half.columns(); j++) {
            if (s.values()[j] <= 0) {
                throw new ArithmeticException("the overlap of a lead is not positive definite");
            }
            double factor = 1 / Math.sqrt(s.values()[j]);
            for (int i = 0; i < half.rows(); i++) {
                half.set(i, j, half.real(i, j) * factor, half.imaginary(i, j) * factor);
            }
        }
        return backend.hermitianEigen(backend.multiply(Op.ADJOINT, half, Op.NONE, backend.multiply(h, half)))
                .values();
    }

    private static ComplexMatrix bloch(ComplexMatrix inside, ComplexMatrix outward, double k) {
        ComplexMatrix turned = outward.copy();
        turned.scale(Math.cos(k), Math.sin(k));
        ComplexMatrix h = inside.copy();
        h.addScaled(turned, 1);
        h.addScaled(turned.adjoint(), 1);
        return h;
    }

    /**
     * Energies at which a band has a local minimum or maximum, ascending, without repeats: where the number of open modes
     * changes. Found on a grid of k and refined, so that a pair of extrema closer than the grid can be missed: good for
     * break points of integrals, not for counting.
     */
    public List<Double> extrema() {
        int n = blocks.size();
        int points = (int) Math.max(FEWEST_POINTS, Math.min(MOST_POINTS, BUDGET / (8.0 * n * n * n)));
        boolean symmetric = real(blocks.h00()) && real(blocks.h01());
        double start = symmetric ? 0 : -Math.PI;
        double step = (Math.PI - start) / (points - 1);
        double[][] bands = new double[points][];
        for (int p = 0; p < points; p++) {
            bands[p] = energies(start + p * step);
        }
        List<Double> found = new ArrayList<>();
        for (int band = 0; band < n; band++) {
            for (int p = 0; p < points; p++) {
                double before = p > 0 ? bands[p - 1][band] : symmetric ? bands[1][band] : bands[points - 2][band];
                double after =
                        p < points - 1 ? bands[p + 1][band] : symmetric ? bands[points - 2][band] : bands[1][band];
                double here = bands[p][band];
                boolean edge = symmetric && (p == 0 || p == points - 1);
                if (here <= before && here <= after || here >= before && here >= after) {
                    boolean flat = Math.abs(before - here) + Math.abs(after - here) < 1e-12 * (1 + Math.abs(here));
                    found.add(edge || flat ? here : refine(band, start + p * step, step, here <= before));
                }
            }
        }
        return merged(found);
    }

    private static boolean real(ComplexMatrix m) {
        for (int k = 1; k < m.data().length; k += 2) {
            if (m.data()[k] != 0) {
                return false;
            }
        }
        return true;
    }

    private double refine(int band, double k, double step, boolean minimum) {
        if (blocks.size() > 48) {
            return energies(k)[band];
        }
        return new BrentOptimizer(1e-7, 1e-12)
                .optimize(
                        new MaxEval(60),
                        new UnivariateObjectiveFunction(x -> energies(x)[band]),
                        minimum ? GoalType.MINIMIZE : GoalType.MAXIMIZE,
                        new SearchInterval(k - step, k + step, k))
                .getValue();
    }

    private static List<Double> merged(List<Double> values) {
        double[] sorted = values.stream().mapToDouble(v -> v).sorted().toArray();
        List<Double> distinct = new ArrayList<>();
        for (double value : sorted) {
            if (distinct.isEmpty() || value - distinct.get(distinct.size() - 1) > 1e-9 * (1 + Math.abs(value))) {
                distinct.add(value);
            }
        }
        return distinct;
    }

    /** Bounds of all bands by Gershgorin's circles, lowest and highest, eV; for an orthogonal basis. */
    public double[] bounds() {
        double[] bounds = {Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY};
        if (blocks.s00() != null) {
            for (int p = 0; p <= 16; p++) {
                double[] values = energies(Math.PI * p / 16);
                bounds[0] = Math.min(bounds[0], values[0]);
                bounds[1] = Math.max(bounds[1], values[values.length - 1]);
            }
            double width = bounds[1] - bounds[0];
            return new double[] {bounds[0] - 0.1 * width, bounds[1] + 0.1 * width};
        }
        double[] radius = new double[blocks.size()];
        for (int i = 0; i < radius.length; i++) {
            for (int j = 0; j < radius.length; j++) {
                if (i != j) {
                    radius[i] +=
                            Math.hypot(blocks.h00().real(i, j), blocks.h00().imaginary(i, j));
                }
                radius[i] += Math.hypot(blocks.h01().real(i, j), blocks.h01().imaginary(i, j));
                radius[i] += Math.hypot(blocks.h01().real(j, i), blocks.h01().imaginary(j, i));
            }
            bounds[0] = Math.min(bounds[0], blocks.h00().real(i, i) - radius[i]);
            bounds[1] = Math.max(bounds[1], blocks.h00().real(i, i) + radius[i]);
        }
        return bounds;
    }

    /** Highest and lowest energies of each band on a grid of k, for telling whether a window is beyond the bands. */
    public double[] range() {
        List<Double> extrema = extrema();
        return extrema.isEmpty() ? bounds() : new double[] {extrema.get(0), extrema.get(extrema.size() - 1)};
    }
}
