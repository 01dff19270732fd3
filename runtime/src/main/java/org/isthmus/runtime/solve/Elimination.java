package org.isthmus.runtime.solve;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.ComplexBackend.HermitianEigen;
import org.isthmus.runtime.kernel.ComplexMatrix;
import org.isthmus.runtime.kernel.Dense;
import org.isthmus.runtime.kernel.Op;
import org.isthmus.runtime.kernel.Reduction;
import org.isthmus.runtime.kernel.SingularMatrixException;
import org.isthmus.runtime.plan.SolvePlan;
import org.isthmus.runtime.plan.SolveStep;
import org.isthmus.runtime.plan.SolveStep.Eliminate;

/**
 * The upward sweep at one energy: every step's front F is split into what is eliminated (e) and its border (b), and the
 * Schur complement F_bb − F_be F_ee⁻¹ F_eb goes to the parent. In real arithmetic where nothing is complex: leads come
 * last.
 *
 * <p>A block F_ee without leads is Hermitian at a real energy and singular where the energy is one of its own levels. The
 * orbitals that carry such a level are then not eliminated here but handed to the parent (delayed pivots), so that no
 * imaginary part is needed to get past it.
 */
final class Elimination {
    /** Largest element of F_ee⁻¹F_eb that is let pass: its square multiplies rounding errors on the way up. */
    private static final double TOLERATED = 30;

    /** A level whose coupling to the border exceeds its distance from the energy by this factor is handed on. */
    private static final double NEAR_LEVEL = 10;

    /** The same where the way down follows, on which the factors of all levels of the tree multiply. */
    private static final double TOLERATED_DOWN = 4;

    private static final double NEAR_LEVEL_DOWN = 2;

    /** A level nearer to the energy than this part of the block's largest level sits on it, to rounding. */
    private static final double ON_LEVEL = 1e-14;

    private final SolvePlan plan;
    private final Entries entries;
    private final ComplexBackend backend;
    private final double zr;
    private final double zi;
    private final Keep keep;
    private final int[] where;
    private final boolean real;
    private final Reduction[] reductions;
    private final int[][] borders;
    private final Front[] fronts;
    private double amplification;

    /** What the downward sweep will want. */
    enum Keep {
        NOTHING,
        /** F_ee⁻¹F_eb, which is enough where F is Hermitian: at a real energy. */
        RIGHT,
        /** F_ee⁻¹ and F_beF_ee⁻¹ as well. */
        ALL
    }

    /**
     * What a step leaves for the downward sweep.
     *
     * @param eliminated orbitals, delayed ones of the children included
     * @param border orbitals of the Schur complement, own delayed ones included
     * @param right F_ee⁻¹F_eb
     * @param left F_beF_ee⁻¹; null where not kept
     * @param inverse F_ee⁻¹; null where not kept
     */
    record Front(int[] eliminated, int[] border, Dense right, Dense left, Dense inverse) {}

    /**
     * What is left for the leads.
     *
     * @param orbitals labels of rows and columns: those that leads touch, then delayed ones
     * @param matrix E·S − H without leads, everything else eliminated
     * @param fronts one per step but the last; null where nothing was to be kept
     * @param rounding bound on the relative error that the elimination has added, to first order
     * @param real true where all fronts are real
     */
    record Remainder(int[] orbitals, ComplexMatrix matrix, Front[] fronts, double rounding, boolean real) {}

    Elimination(SolvePlan plan, Entries entries, ComplexBackend backend, double zr, double zi, Keep keep, int[] where) {
        this.plan = plan;
        this.entries = entries;
        this.backend = backend;
        this.zr = zr;
        this.zi = zi;
        this.keep = keep;
        this.where = where;
        real = zi == 0 && entries.real() && backend.realArithmetic();
        reductions = new Reduction[plan.steps().size()];
        borders = new int[plan.steps().size()][];
        fronts = keep == Keep.NOTHING ? null : new Front[plan.steps().size() - 1];
    }

    Remainder run() {
        int root = plan.steps().size() - 1;
        for (int k = 0; k < root; k++) {
            if (Thread.interrupted()) {
                throw new java.util.concurrent.CancellationException("the solve was cancelled");
            }
            eliminate(k, (Eliminate) plan.steps().get(k));
        }
        int[] orbitals = withDelayed(plan.root().orbitals(), plan.root());
        ComplexMatrix matrix = assemble(root, orbitals, new int[0]).complex();
        letGo(root);
        return new Remainder(orbitals, matrix, fronts, amplification * amplification * Math.ulp(1.0), real);
    }

    /** A step's own orbitals and those that its children could not eliminate. */
    private int[] withDelayed(int[] own, SolveStep step) {
        int count = own.length;
        for (int child : step.children()) {
            count += borders[child].length - ((Eliminate) plan.steps().get(child)).border().length;
        }
        if (count == own.length) {
            return own;
        }
        int[] all = Arrays.copyOf(own, count);
        int next = own.length;
        for (int child : step.children()) {
            int planned = ((Eliminate) plan.steps().get(child)).border().length;
            for (int i = planned; i < borders[child].length; i++) {
                all[next++] = borders[child][i];
            }
        }
        return all;
    }

    private Dense assemble(int step, int[] eliminated, int[] border) {
        for (int i = 0; i < eliminated.length; i++) {
            where[eliminated[i]] = i;
        }
        for (int i = 0; i < border.length; i++) {
            where[border[i]] = eliminated.length + i;
        }
        int n = eliminated.length + border.length;
        Dense front = Dense.zeros(n, n, real);
        for (int at = entries.first(step); at < entries.end(step); at++) {
            int row = where[entries.row(at)];
            int column = where[entries.column(at)];
            double sr = entries.overlapReal(at);
            double si = entries.overlapImaginary(at);
            front.add(row, column, zr * sr - zi * si - entries.hReal(at), zr * si + zi * sr - entries.hImaginary(at));
            if (row != column) {
                front.add(
                        column, row, zr * sr + zi * si - entries.hReal(at), zi * sr - zr * si + entries.hImaginary(at));
            }
        }
        for (int child : plan.steps().get(step).children()) {
            int[] labels = borders[child];
            int[] places = new int[labels.length];
            for (int i = 0; i < labels.length; i++) {
                places[i] = where[labels[i]];
            }
            reductions[child].addComplement(front, places);
        }
        return front;
    }

    private void letGo(int step) {
        for (int child : plan.steps().get(step).children()) {
            reductions[child] = null;
        }
    }

    private void eliminate(int k, Eliminate step) {
        int[] eliminated = withDelayed(step.eliminated(), step);
        int[] border = step.border();
        Reduction reduction = reduced(assemble(k, eliminated, border), eliminated.length);
        while (reduction == null
                || !(reduction.amplification() <= (keep == Keep.NOTHING ? TOLERATED : TOLERATED_DOWN))) {
            boolean[] delayed = levels(assemble(k, eliminated, border), eliminated.length);
            int handed = 0;
            for (boolean flag : delayed) {
                handed += flag ? 1 : 0;
            }
            int[] left = new int[eliminated.length - handed];
            int[] more = Arrays.copyOf(border, border.length + handed);
            int l = 0;
            int m = border.length;
            for (int i = 0; i < delayed.length; i++) {
                if (delayed[i]) {
                    more[m++] = eliminated[i];
                } else {
                    left[l++] = eliminated[i];
                }
            }
            eliminated = left;
            border = more;
            reduction = reduced(assemble(k, eliminated, border), eliminated.length);
        }
        letGo(k);
        amplification = Math.max(amplification, reduction.amplification());
        reductions[k] = reduction;
        borders[k] = border;
        if (keep != Keep.NOTHING) {
            boolean all = keep == Keep.ALL;
            fronts[k] = new Front(
                    eliminated,
                    border,
                    reduction.right(),
                    all ? reduction.left() : null,
                    all ? reduction.inverse() : null);
        }
    }

    /** The elimination; null where the block is exactly singular. */
    private Reduction reduced(Dense front, int count) {
        try {
            return backend.eliminate(front, count, zi == 0);
        } catch (SingularMatrixException ex) {
            return null;
        }
    }

    /**
     * Marks the orbitals that carry a level of the block at this very energy. It is at least one, so that what calls this
     * comes to an end.
     */
    private boolean[] levels(Dense front, int count) {
        int n = front.rows();
        HermitianEigen eigen =
                backend.hermitianEigen(front.block(0, count, 0, count).complex());
        ComplexMatrix coupling = backend.multiply(
                Op.ADJOINT,
                eigen.vectors(),
                Op.NONE,
                front.block(0, count, count, n).complex());
        double[] distances = Arrays.stream(eigen.values()).map(Math::abs).toArray();
        double largest = Arrays.stream(distances).max().orElse(0);
        double[] nearness = new double[count];
        int nearest = 0;
        for (int k = 0; k < count; k++) {
            double size = 0;
            for (int j = 0; j < coupling.columns(); j++) {
                size = Math.max(size, Math.hypot(coupling.real(k, j), coupling.imaginary(k, j)));
            }
            nearness[k] = distances[k] <= ON_LEVEL * largest ? Double.POSITIVE_INFINITY : size / distances[k];
            nearest = nearness[k] > nearness[nearest] ? k : nearest;
        }
        List<double[]> near = new ArrayList<>();
        for (int k = 0; k < count; k++) {
            if (k == nearest || nearness[k] > (keep == Keep.NOTHING ? NEAR_LEVEL : NEAR_LEVEL_DOWN)) {
                double[] vector = new double[2 * count];
                System.arraycopy(eigen.vectors().data(), 2 * count * k, vector, 0, 2 * count);
                near.add(vector);
            }
        }
        boolean[] delayed = new boolean[count];
        for (int orbital : pivots(near, count)) {
            delayed[orbital] = true;
        }
        return delayed;
    }

    /** One orbital per level: the largest component of what is left, one level after the other (pivoted elimination). */
    private static int[] pivots(List<double[]> levels, int n) {
        int[] chosen = new int[levels.size()];
        List<double[]> left = new ArrayList<>(levels);
        for (int k = 0; k < chosen.length; k++) {
            int bestLevel = 0;
            int bestOrbital = 0;
            double best = -1;
            for (int l = 0; l < left.size(); l++) {
                for (int i = 0; i < n; i++) {
                    double size = Math.hypot(left.get(l)[2 * i], left.get(l)[2 * i + 1]);
                    if (size > best) {
                        best = size;
                        bestLevel = l;
                        bestOrbital = i;
                    }
                }
            }
            chosen[k] = bestOrbital;
            double[] pivot = left.remove(bestLevel);
            double pr = pivot[2 * bestOrbital];
            double pi = pivot[2 * bestOrbital + 1];
            double p2 = pr * pr + pi * pi;
            for (double[] level : left) {
                double fr = (level[2 * bestOrbital] * pr + level[2 * bestOrbital + 1] * pi) / p2;
                double fi = (level[2 * bestOrbital + 1] * pr - level[2 * bestOrbital] * pi) / p2;
                for (int i = 0; i < n; i++) {
                    level[2 * i] -= fr * pivot[2 * i] - fi * pivot[2 * i + 1];
                    level[2 * i + 1] -= fr * pivot[2 * i + 1] + fi * pivot[2 * i];
                }
            }
        }
        return chosen;
    }
}
