package org.isthmus.runtime.solve;

import java.util.Arrays;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.plan.SolvePlan;
import org.isthmus.runtime.plan.SolveStep.CoupleContacts;
import org.isthmus.runtime.plan.SolveStep.Eliminate;

/**
 * The elements of H and S on and above the diagonal, sorted by the step that takes them in: the one that eliminates the
 * earlier of the two orbitals. The voltages are in them.
 */
final class Entries {
    private final int[] start;
    private final int[] rows;
    private final int[] columns;
    private final double[] hReal;
    private final double[] hImaginary;
    private final double[] sReal;
    private final double[] sImaginary;
    private final boolean real;

    /** Counts first, then fills: what is offered twice in the same order. */
    private interface Sink {
        void take(int row, int column, double hRe, double hIm, double sRe, double sIm);
    }

    Entries(OperatingPoint point, SolvePlan plan) {
        Device device = point.device();
        int steps = plan.steps().size();
        int[] stepOf = new int[plan.orbitals()];
        for (int k = 0; k < steps; k++) {
            int[] orbitals = plan.steps().get(k) instanceof Eliminate e
                    ? e.eliminated()
                    : ((CoupleContacts) plan.steps().get(k)).orbitals();
            for (int orbital : orbitals) {
                stepOf[orbital] = k;
            }
        }
        start = new int[steps + 1];
        offer(point, (r, c, hr, hi, sr, si) -> start[Math.min(stepOf[r], stepOf[c]) + 1]++);
        for (int k = 0; k < steps; k++) {
            start[k + 1] += start[k];
        }
        int count = start[steps];
        rows = new int[count];
        columns = new int[count];
        hReal = new double[count];
        hImaginary = new double[count];
        boolean overlaps = device.overlaps().count() > 0;
        sReal = overlaps ? new double[count] : null;
        sImaginary = overlaps ? new double[count] : null;
        real = device.sites().real()
                && device.hoppings().real()
                && device.overlaps().real();
        int[] next = Arrays.copyOf(start, steps);
        offer(point, (r, c, hr, hi, sr, si) -> {
            int at = next[Math.min(stepOf[r], stepOf[c])]++;
            rows[at] = r;
            columns[at] = c;
            hReal[at] = hr;
            hImaginary[at] = hi;
            if (overlaps) {
                sReal[at] = sr;
                sImaginary[at] = si;
            }
        });
    }

    private static void offer(OperatingPoint point, Sink sink) {
        Device device = point.device();
        SiteTable sites = device.sites();
        for (int site = 0; site < sites.count(); site++) {
            int first = sites.firstOrbital(site);
            for (int i = 0; i < sites.orbitals(site); i++) {
                for (int j = i; j < sites.orbitals(site); j++) {
                    double re = sites.onSiteReal(site, i, j) + (i == j ? point.shift(site) : 0);
                    double im = i == j ? 0 : sites.onSiteImaginary(site, i, j);
                    sink.take(first + i, first + j, re, im, i == j ? 1 : 0, 0);
                }
            }
        }
        offer(sites, device.hoppings(), point, sink, false);
        offer(sites, device.overlaps(), point, sink, true);
    }

    /** An overlap element comes with the shift of the potential on it, half from each end. */
    private static void offer(SiteTable sites, HoppingTable bonds, OperatingPoint point, Sink sink, boolean overlap) {
        for (int b = 0; b < bonds.count(); b++) {
            int from = bonds.from(b);
            int to = bonds.to(b);
            double shift = overlap ? 0.5 * (point.shift(from) + point.shift(to)) : 0;
            for (int i = 0; i < sites.orbitals(from); i++) {
                for (int j = 0; j < sites.orbitals(to); j++) {
                    double re = bonds.real(b, i, j);
                    double im = bonds.imaginary(b, i, j);
                    int row = sites.firstOrbital(from) + i;
                    int column = sites.firstOrbital(to) + j;
                    if (overlap) {
                        sink.take(row, column, shift * re, shift * im, re, im);
                    } else {
                        sink.take(row, column, re, im, 0, 0);
                    }
                }
            }
        }
    }

    int first(int step) {
        return start[step];
    }

    int end(int step) {
        return start[step + 1];
    }

    int row(int at) {
        return rows[at];
    }

    int column(int at) {
        return columns[at];
    }

    /** True where no element is complex. */
    boolean real() {
        return real;
    }

    double overlapReal(int at) {
        return sReal == null ? (rows[at] == columns[at] ? 1 : 0) : sReal[at];
    }

    double overlapImaginary(int at) {
        return sImaginary == null ? 0 : sImaginary[at];
    }

    double hReal(int at) {
        return hReal[at];
    }

    double hImaginary(int at) {
        return hImaginary[at];
    }
}
