package org.isthmus.runtime.device.bands;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.LatticeLead;
import org.isthmus.runtime.device.SiteTable;

/** The bands of a lead along its own direction, on a coarse grid of wave numbers: for checks before a run. */
public final class LeadSubbands {
    /** A cell with more orbitals would take seconds to look at. */
    private static final int LARGEST_CELL = 100;

    private static final int POINTS = 9;

    private LeadSubbands() {}

    /** From the bottom to the top of one band, eV. */
    public record Band(double bottom, double top) {}

    /**
     * The bands, lowest first.
     *
     * @return none for a cell that is too large to look at in passing, or with overlaps
     */
    public static Optional<List<Band>> of(LatticeLead lead) {
        SiteTable cell = lead.cell();
        int n = cell.orbitalCount();
        boolean overlaps = lead.overlapWithin().count() + lead.overlapOutward().count() > 0;
        if (n > LARGEST_CELL || overlaps) {
            return Optional.empty();
        }
        double[] bottom = new double[n];
        double[] top = new double[n];
        java.util.Arrays.fill(bottom, Double.POSITIVE_INFINITY);
        java.util.Arrays.fill(top, Double.NEGATIVE_INFINITY);
        boolean real = cell.real() && lead.within().real() && lead.outward().real();
        int points = real ? POINTS : 2 * POINTS;
        for (int p = 0; p < points; p++) {
            double k = Math.PI * p / (POINTS - 1);
            double[] values = energies(lead, k);
            for (int band = 0; band < n; band++) {
                bottom[band] = Math.min(bottom[band], values[band]);
                top[band] = Math.max(top[band], values[band]);
            }
        }
        List<Band> bands = new ArrayList<>();
        for (int band = 0; band < n; band++) {
            bands.add(new Band(bottom[band], top[band]));
        }
        return Optional.of(bands);
    }

    private static double[] energies(LatticeLead lead, double k) {
        SiteTable cell = lead.cell();
        int n = cell.orbitalCount();
        double[][] re = new double[n][n];
        double[][] im = new double[n][n];
        for (int site = 0; site < cell.count(); site++) {
            int first = cell.firstOrbital(site);
            for (int i = 0; i < cell.orbitals(site); i++) {
                for (int j = 0; j < cell.orbitals(site); j++) {
                    re[first + i][first + j] += cell.onSiteReal(site, i, j);
                    im[first + i][first + j] += cell.onSiteImaginary(site, i, j);
                }
            }
        }
        add(cell, lead.within(), 1, 0, re, im);
        add(cell, lead.outward(), Math.cos(k), Math.sin(k), re, im);
        return HermitianEigenvalues.of(re, im);
    }

    /** Adds bonds turned by a phase, and their partners. */
    private static void add(SiteTable cell, HoppingTable bonds, double c, double s, double[][] re, double[][] im) {
        for (int b = 0; b < bonds.count(); b++) {
            int row = cell.firstOrbital(bonds.from(b));
            int column = cell.firstOrbital(bonds.to(b));
            for (int i = 0; i < cell.orbitals(bonds.from(b)); i++) {
                for (int j = 0; j < cell.orbitals(bonds.to(b)); j++) {
                    double x = c * bonds.real(b, i, j) - s * bonds.imaginary(b, i, j);
                    double y = s * bonds.real(b, i, j) + c * bonds.imaginary(b, i, j);
                    re[row + i][column + j] += x;
                    im[row + i][column + j] += y;
                    re[column + j][row + i] += x;
                    im[column + j][row + i] -= y;
                }
            }
        }
    }
}
