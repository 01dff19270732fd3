package org.isthmus.runtime.solve;

import java.util.ArrayList;
import java.util.List;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.ComplexBackend.HermitianEigen;
import org.isthmus.runtime.kernel.ComplexMatrix;
import org.isthmus.runtime.kernel.Op;
import org.isthmus.runtime.kernel.SingularMatrixException;
import org.isthmus.runtime.plan.SolvePlan;
import org.isthmus.runtime.plan.SolveStep.Eliminate;

/**
 * The upward sweep at one energy: every step's front F is split into what is eliminated (e) and its border (b), and the
 * Schur complement F_bb − F_be F_ee⁻¹ F_eb goes to the parent.
 *
 * <p>A block F_ee without leads is Hermitian at a real energy and singular where the energy is one of its own levels. The
 * orbitals that carry such a level are then not eliminated here but handed to the parent (delayed pivots), so that no
 * imaginary part is needed to get past it.
 */
final class Elimination {
    /** Below this reciprocal condition number the levels of a block are looked at. */
    private static final double WELL_CONDITIONED = 3e-5;

    /** A level nearer than this to the energy, relative to the front's largest element, is handed on: growth stays below 10⁴. */
    private static final double NEAR_LEVEL = 1e-4;

    private final SolvePlan plan;
    private final Entries entries;
    private final ComplexBackend backend;
    private final double zr;
    private final double zi;
    private final boolean keep;
    private final int[] where;
    private final ComplexMatrix[] complements;
    private final Front[] fronts;

    /**
     * What a step leaves for the downward sweep.
     *
     * @param eliminated orbitals, delayed ones of the children included
     * @param border orbitals of the Schur complement, own delayed ones included
     * @param inverse F_ee⁻¹
     * @param right F_ee⁻¹F_eb
     * @param left F_beF_ee⁻¹
     */
    record Front(int[] eliminated, int[] border, ComplexMatrix inverse, ComplexMatrix right, ComplexMatrix left) {}

    /**
     * What is left for the leads.
     *
     * @param orbitals labels of rows and columns: those that leads touch, then delayed ones
     * @param matrix E·S − H without leads, everything else eliminated
     * @param fronts one per step but the last; null where the downward sweep was not asked for
     */
    record Remainder(int[] orbitals, ComplexMatrix matrix, Front[] fronts) {}

    Elimination(
            SolvePlan plan, Entries entries, ComplexBackend backend, double zr, double zi, boolean keep, int[] where) {
        this.plan = plan;
        this.entries = entries;
        this.backend = backend;
        this.zr = zr;
        this.zi = zi;
        this.keep = keep;
        this.where = where;
        complements = new ComplexMatrix[plan.steps().size()];
        fronts = new Front[plan.steps().size() - 1];
    }

    Remainder run() {
        int[][] borders = new int[plan.steps().size()][];
        int root = plan.steps().size() - 1;
        for (int k = 0; k < root; k++) {
            if (Thread.interrupted()) {
                throw new java.util.concurrent.CancellationException("the solve was cancelled");
            }
            Eliminate step = (Eliminate) plan.steps().get(k);
            int[] eliminated = withDelayed(step.eliminated(), step, borders);
            ComplexMatrix front = assemble(k, step.children(), eliminated, step.border(), borders);
            borders[k] = eliminate(k, front, eliminated, step.border());
        }
        int[] orbitals = withDelayed(plan.root().orbitals(), plan.root(), borders);
        ComplexMatrix matrix = assemble(root, plan.root().children(), orbitals, new int[0], borders);
        return new Remainder(orbitals, matrix, keep ? fronts : null);
    }

    /** A step's own orbitals and those that its children could not eliminate. */
    private int[] withDelayed(int[] own, org.isthmus.runtime.plan.SolveStep step, int[][] borders) {
        List<Integer> delayed = new ArrayList<>();
        for (int child : step.children()) {
            int planned = ((Eliminate) plan.steps().get(child)).border().length;
            for (int i = planned; i < borders[child].length; i++) {
                delayed.add(borders[child][i]);
            }
        }
        if (delayed.isEmpty()) {
            return own;
        }
        int[] all = java.util.Arrays.copyOf(own, own.length + delayed.size());
        for (int i = 0; i < delayed.size(); i++) {
            all[own.length + i] = delayed.get(i);
        }
        return all;
    }

    private ComplexMatrix assemble(int step, List<Integer> children, int[] eliminated, int[] border, int[][] borders) {
        for (int i = 0; i < eliminated.length; i++) {
            where[eliminated[i]] = i;
        }
        for (int i = 0; i < border.length; i++) {
            where[border[i]] = eliminated.length + i;
        }
        int n = eliminated.length + border.length;
        ComplexMatrix front = ComplexMatrix.zeros(n, n);
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
        for (int child : children) {
            int[] labels = borders[child];
            int[] places = new int[labels.length];
            for (int i = 0; i < labels.length; i++) {
                places[i] = where[labels[i]];
            }
            front.scatterAdd(complements[child], places, places);
            complements[child] = null;
        }
        return front;
    }

    /** Eliminates and stores the Schur complement; its labels. */
    private int[] eliminate(int step, ComplexMatrix front, int[] eliminated, int[] border) {
        int ne = eliminated.length;
        int[] e = sequence(0, ne);
        int[] b = sequence(ne, front.rows());
        ComplexMatrix block = front.select(e, e);
        ComplexBackend.Factors factors = ne == 0 ? null : factored(block);
        if (ne > 0 && (factors == null || zi == 0 && factors.reciprocalCondition() < WELL_CONDITIONED)) {
            int[] delayed = levels(block, largest(front));
            if (delayed.length > 0) {
                boolean[] isDelayed = new boolean[ne];
                for (int i : delayed) {
                    isDelayed[i] = true;
                }
                e = java.util.Arrays.stream(e).filter(i -> !isDelayed[i]).toArray();
                b = java.util.stream.IntStream.concat(java.util.Arrays.stream(b), java.util.Arrays.stream(delayed))
                        .toArray();
                factors = e.length == 0 ? null : factored(front.select(e, e));
            }
        }
        int[] labels = new int[b.length];
        for (int i = 0; i < b.length; i++) {
            labels[i] = b[i] < ne ? eliminated[b[i]] : border[b[i] - ne];
        }
        ComplexMatrix complement = front.select(b, b);
        if (e.length > 0) {
            if (factors == null) {
                throw new SolveFailure("The inner equations are singular at " + zr + " eV.");
            }
            ComplexMatrix right = factors.solve(front.select(e, b));
            backend.multiplyAdd(-1, Op.NONE, front.select(b, e), Op.NONE, right, complement);
            if (keep) {
                ComplexMatrix inverse = factors.solve(ComplexMatrix.identity(e.length));
                int[] gone = new int[e.length];
                for (int i = 0; i < e.length; i++) {
                    gone[i] = eliminated[e[i]];
                }
                fronts[step] = new Front(gone, labels, inverse, right, backend.multiply(front.select(b, e), inverse));
            }
        } else if (keep) {
            ComplexMatrix none = ComplexMatrix.zeros(0, 0);
            fronts[step] = new Front(
                    new int[0], labels, none, ComplexMatrix.zeros(0, b.length), ComplexMatrix.zeros(b.length, 0));
        }
        complements[step] = complement;
        return labels;
    }

    /** The factors; null where the block is exactly singular. */
    private ComplexBackend.Factors factored(ComplexMatrix block) {
        try {
            return backend.factor(block);
        } catch (SingularMatrixException ex) {
            return null;
        }
    }

    /** Positions of the orbitals that carry a level of the block at this very energy. */
    private int[] levels(ComplexMatrix block, double scale) {
        HermitianEigen eigen = backend.hermitianEigen(block);
        int n = block.rows();
        if (scale == 0) {
            return sequence(0, n);
        }
        List<double[]> near = new ArrayList<>();
        for (int k = 0; k < n; k++) {
            if (Math.abs(eigen.values()[k]) < NEAR_LEVEL * scale) {
                double[] vector = new double[2 * n];
                System.arraycopy(eigen.vectors().data(), 2 * n * k, vector, 0, 2 * n);
                near.add(vector);
            }
        }
        return pivots(near, n);
    }

    private static double largest(ComplexMatrix m) {
        double largest = 0;
        for (double part : m.data()) {
            largest = Math.max(largest, Math.abs(part));
        }
        return largest;
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
        java.util.Arrays.sort(chosen);
        return chosen;
    }

    private static int[] sequence(int from, int to) {
        return java.util.stream.IntStream.range(from, to).toArray();
    }
}
