package org.isthmus.runtime.solve;

import java.util.List;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.ComplexMatrix;
import org.isthmus.runtime.kernel.Dense;
import org.isthmus.runtime.kernel.Op;
import org.isthmus.runtime.plan.SolvePlan;
import org.isthmus.runtime.solve.Elimination.Front;
import org.isthmus.runtime.solve.Elimination.Remainder;

/**
 * The downward sweep. With G on a step's border known, G_ee = F_ee⁻¹ + X G_bb Y, G_eb = −X G_bb, G_be = −G_bb Y for X =
 * F_ee⁻¹F_eb and Y = F_beF_ee⁻¹ (selected inversion, Takahashi, Fagan & Chen 1973). Anything of the form G M G† with M on
 * the contacts goes down alike, without the first term. A step's values are let go as soon as its children have them.
 */
final class SiteSweep {
    private final SolvePlan plan;
    private final Entries entries;
    private final SiteTable sites;
    private final ComplexBackend backend;
    private final int[] siteOf;
    private final int[] where;

    SiteSweep(SolvePlan plan, Entries entries, SiteTable sites, ComplexBackend backend, int[] siteOf, int[] where) {
        this.plan = plan;
        this.entries = entries;
        this.sites = sites;
        this.backend = backend;
        this.siteOf = siteOf;
        this.where = where;
    }

    /** Labels with G between all of them. */
    private record Block(int[] labels, ComplexMatrix green) {}

    /**
     * Site's share of the trace of G·S: the diagonal of ½(GS + SG).
     *
     * @return interleaved real and imaginary parts per site
     */
    double[] diagonal(Remainder remainder, ComplexMatrix rootGreen) {
        double[] values = new double[2 * sites.count()];
        int root = plan.steps().size() - 1;
        Block[] known = new Block[root + 1];
        known[root] = new Block(remainder.orbitals(), rootGreen);
        takeDiagonal(root, known[root], values);
        for (int k = root; k >= 0; k--) {
            List<Integer> children = plan.steps().get(k).children();
            for (int child : children) {
                known[child] = inside(remainder.fronts()[child], known[k]);
                takeDiagonal(child, known[child], values);
                if (plan.steps().get(child).children().isEmpty()) {
                    known[child] = null;
                }
            }
            known[k] = null;
        }
        return values;
    }

    private Block inside(Front front, Block parent) {
        int[] places = places(front.border(), parent.labels());
        ComplexMatrix border = parent.green().select(places, places);
        int ne = front.eliminated().length;
        int nb = front.border().length;
        ComplexMatrix right = backend.multiply(front.right().complex(), border);
        ComplexMatrix inner = front.inverse().complex().copy();
        backend.multiplyAdd(1, Op.NONE, right, Op.NONE, front.left().complex(), inner);
        ComplexMatrix left = backend.multiply(border, front.left().complex());
        right.scale(-1, 0);
        left.scale(-1, 0);
        Dense whole = Dense.zeros(ne + nb, ne + nb, false);
        whole.put(Dense.of(inner), 0, 0);
        whole.put(Dense.of(right), 0, ne);
        whole.put(Dense.of(left), ne, 0);
        whole.put(Dense.of(border), ne, ne);
        ComplexMatrix green = whole.complex();
        int[] labels = java.util.Arrays.copyOf(front.eliminated(), ne + nb);
        System.arraycopy(front.border(), 0, labels, ne, nb);
        return new Block(labels, green);
    }

    private int[] places(int[] labels, int[] among) {
        for (int i = 0; i < among.length; i++) {
            where[among[i]] = i;
        }
        int[] places = new int[labels.length];
        for (int i = 0; i < labels.length; i++) {
            places[i] = where[labels[i]];
        }
        return places;
    }

    /** Adds (G·S)_ii of the elements of S that the step took in: each pair lies inside its block. */
    private void takeDiagonal(int step, Block block, double[] values) {
        places(new int[0], block.labels());
        for (int at = entries.first(step); at < entries.end(step); at++) {
            double sr = entries.overlapReal(at);
            double si = entries.overlapImaginary(at);
            if (sr == 0 && si == 0) {
                continue;
            }
            int i = where[entries.row(at)];
            int j = where[entries.column(at)];
            // ½(GS + SG)_ii gets ½(G_ij S_ji + G_ji S_ij), and so does jj
            double half = i == j ? 1 : 0.5;
            ComplexMatrix green = block.green();
            double re = half * (green.real(i, j) * sr + green.imaginary(i, j) * si);
            double im = half * (green.imaginary(i, j) * sr - green.real(i, j) * si);
            if (i != j) {
                re += half * (green.real(j, i) * sr - green.imaginary(j, i) * si);
                im += half * (green.imaginary(j, i) * sr + green.real(j, i) * si);
                add(values, siteOf[entries.column(at)], re, im);
            }
            add(values, siteOf[entries.row(at)], re, im);
        }
    }

    private static void add(double[] values, int site, double re, double im) {
        values[2 * site] += re;
        values[2 * site + 1] += im;
    }

    /**
     * Site's share of Tr[A S], the diagonal of ½(AS + SA), for matrices A = G M G† with M on the contacts, or A = i(G − G†),
     * at a real energy: inwards of a border both go as A_ee = X A_bb X†, A_eb = −X A_bb. Where F and S are real, so is X,
     * and the real part of A is enough.
     *
     * @param rootValues each A on the remainder's labels; Hermitian
     * @return per matrix, per site
     */
    double[][] shares(Remainder remainder, List<ComplexMatrix> rootValues) {
        int root = plan.steps().size() - 1;
        int kinds = rootValues.size();
        double[][] shares = new double[kinds][sites.count()];
        Spread[] known = new Spread[root + 1];
        Dense[] first = new Dense[kinds];
        for (int kind = 0; kind < kinds; kind++) {
            first[kind] = remainder.real() ? Dense.realPart(rootValues.get(kind)) : Dense.of(rootValues.get(kind));
        }
        known[root] = new Spread(remainder.orbitals(), first);
        take(root, known[root], shares);
        for (int k = root; k >= 0; k--) {
            if (Thread.interrupted()) {
                throw new java.util.concurrent.CancellationException("the solve was cancelled");
            }
            for (int child : plan.steps().get(k).children()) {
                known[child] = inside(remainder.fronts()[child], known[k]);
                take(child, known[child], shares);
                if (plan.steps().get(child).children().isEmpty()) {
                    known[child] = null;
                }
            }
            known[k] = null;
        }
        return shares;
    }

    /** Labels with some matrices between all of them. */
    private record Spread(int[] labels, Dense[] values) {}

    private Spread inside(Front front, Spread parent) {
        int[] places = places(front.border(), parent.labels());
        Dense right = front.right();
        int ne = front.eliminated().length;
        int nb = front.border().length;
        Dense[] values = new Dense[parent.values().length];
        for (int kind = 0; kind < values.length; kind++) {
            Dense border = parent.values()[kind].select(places, places);
            Dense across = Dense.zeros(ne, nb, right.real());
            backend.multiplyAdd(-1, Op.NONE, right, Op.NONE, border, across);
            Dense inner = Dense.zeros(ne, ne, right.real());
            backend.multiplyAdd(-1, Op.NONE, across, Op.ADJOINT, right, inner);
            values[kind] = Dense.zeros(ne + nb, ne + nb, right.real());
            values[kind].put(inner, 0, 0);
            values[kind].put(across, 0, ne);
            values[kind].putAdjoint(across, ne, 0);
            values[kind].put(border, ne, ne);
        }
        int[] labels = java.util.Arrays.copyOf(front.eliminated(), ne + nb);
        System.arraycopy(front.border(), 0, labels, ne, nb);
        return new Spread(labels, values);
    }

    /** Adds Re A_ij S_ji of the elements of S that the step took in; a pair counts for both its sites. */
    private void take(int step, Spread spread, double[][] shares) {
        places(new int[0], spread.labels());
        for (int at = entries.first(step); at < entries.end(step); at++) {
            double sr = entries.overlapReal(at);
            double si = entries.overlapImaginary(at);
            if (sr == 0 && si == 0) {
                continue;
            }
            int i = where[entries.row(at)];
            int j = where[entries.column(at)];
            for (int kind = 0; kind < shares.length; kind++) {
                Dense a = spread.values()[kind];
                double share = a.real(i, j) * sr + a.imaginary(i, j) * si;
                shares[kind][siteOf[entries.row(at)]] += share;
                if (i != j) {
                    shares[kind][siteOf[entries.column(at)]] += share;
                }
            }
        }
    }
}
