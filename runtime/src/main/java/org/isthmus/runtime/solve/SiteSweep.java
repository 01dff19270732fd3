package org.isthmus.runtime.solve;

import java.util.List;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.ComplexMatrix;
import org.isthmus.runtime.kernel.Op;
import org.isthmus.runtime.plan.SolvePlan;
import org.isthmus.runtime.solve.Elimination.Front;
import org.isthmus.runtime.solve.Elimination.Remainder;

/**
 * The downward sweep: with G on a step's border known, G_ee = F_ee⁻¹ + X G_bb Y, G_eb = −X G_bb, G_be = −G_bb Y for X =
 * F_ee⁻¹F_eb and Y = F_beF_ee⁻¹ (selected inversion, Takahashi, Fagan & Chen 1973); the columns of the contacts follow
 * alike, G_ec = −X G_bc. A step's values are let go as soon as its children have them.
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
        int[] waiting = new int[root + 1];
        for (int k = root; k >= 0; k--) {
            List<Integer> children = plan.steps().get(k).children();
            for (int child : children) {
                known[child] = inside(remainder.fronts()[child], known[k]);
                takeDiagonal(child, known[child], values);
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
        ComplexMatrix right = backend.multiply(front.right(), border);
        ComplexMatrix inner = front.inverse().copy();
        backend.multiplyAdd(1, Op.NONE, right, Op.NONE, front.left(), inner);
        ComplexMatrix left = backend.multiply(border, front.left());
        ComplexMatrix green = ComplexMatrix.zeros(ne + nb, ne + nb);
        int[] e = java.util.stream.IntStream.range(0, ne).toArray();
        int[] b = java.util.stream.IntStream.range(ne, ne + nb).toArray();
        right.scale(-1, 0);
        left.scale(-1, 0);
        green.scatterAdd(inner, e, e);
        green.scatterAdd(right, e, b);
        green.scatterAdd(left, b, e);
        green.scatterAdd(border, b, b);
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
     * Site's share of Tr[G Γ_p G† S] for every lead.
     *
     * @param places rows and columns of each lead's Γ in the remainder's labels
     * @param broadening Γ of each lead
     * @return per lead, per site
     */
    double[][] spectral(Remainder remainder, ComplexMatrix rootGreen, int[][] places, ComplexMatrix[] broadening) {
        int root = plan.steps().size() - 1;
        int leads = places.length;
        double[][] values = new double[leads][sites.count()];
        for (int p = 0; p < leads; p++) {
            ComplexMatrix[] columns = new ComplexMatrix[root + 1];
            int[][] labels = new int[root + 1][];
            labels[root] = remainder.orbitals();
            columns[root] = rootGreen.select(
                    java.util.stream.IntStream.range(0, rootGreen.rows()).toArray(), places[p]);
            take(root, labels[root], columns[root], broadening[p], values[p]);
            for (int k = root; k >= 0; k--) {
                for (int child : plan.steps().get(k).children()) {
                    Front front = remainder.fronts()[child];
                    int[] rows = places(front.border(), labels[k]);
                    ComplexMatrix border = columns[k].select(
                            rows,
                            java.util.stream.IntStream.range(0, columns[k].columns())
                                    .toArray());
                    ComplexMatrix inner = backend.multiply(front.right(), border);
                    inner.scale(-1, 0);
                    columns[child] = stacked(inner, border);
                    labels[child] = java.util.Arrays.copyOf(
                            front.eliminated(), front.eliminated().length + front.border().length);
                    System.arraycopy(
                            front.border(), 0, labels[child], front.eliminated().length, front.border().length);
                    take(child, labels[child], columns[child], broadening[p], values[p]);
                }
                columns[k] = null;
                labels[k] = null;
            }
        }
        return values;
    }

    private static ComplexMatrix stacked(ComplexMatrix above, ComplexMatrix below) {
        ComplexMatrix whole = ComplexMatrix.zeros(above.rows() + below.rows(), above.columns());
        int[] columns = java.util.stream.IntStream.range(0, above.columns()).toArray();
        whole.scatterAdd(
                above, java.util.stream.IntStream.range(0, above.rows()).toArray(), columns);
        whole.scatterAdd(
                below,
                java.util.stream.IntStream.range(above.rows(), whole.rows()).toArray(),
                columns);
        return whole;
    }

    private void take(int step, int[] labels, ComplexMatrix columns, ComplexMatrix broadening, double[] values) {
        places(new int[0], labels);
        ComplexMatrix fed = backend.multiply(columns, broadening);
        int width = columns.columns();
        for (int at = entries.first(step); at < entries.end(step); at++) {
            double sr = entries.overlapReal(at);
            double si = entries.overlapImaginary(at);
            if (sr == 0 && si == 0) {
                continue;
            }
            int i = where[entries.row(at)];
            int j = where[entries.column(at)];
            double re = 0;
            double im = 0;
            for (int c = 0; c < width; c++) {
                double fr = fed.real(i, c);
                double fi = fed.imaginary(i, c);
                double gr = columns.real(j, c);
                double gi = columns.imaginary(j, c);
                re += fr * gr + fi * gi;
                im += fi * gr - fr * gi;
            }
            // Re (GΓG†)_ij S_ji, the same for the pair turned round
            double share = re * sr + im * si;
            values[siteOf[entries.row(at)]] += share;
            if (i != j) {
                values[siteOf[entries.column(at)]] += share;
            }
        }
    }
}
