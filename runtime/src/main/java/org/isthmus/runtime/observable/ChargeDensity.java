package org.isthmus.runtime.observable;

import java.util.ArrayList;
import java.util.List;
import java.util.function.DoubleFunction;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;
import org.isthmus.runtime.solve.OperatingPoint.LeadState;
import org.isthmus.runtime.solve.Solver;

/**
 * Electrons per site: what would be there in equilibrium with the lead of the lowest µ, and what the other leads add at the
 * energies where they differ from it, (g/2π) ∫ Σ_p (f_p − f_ref) A_p dE on the real axis.
 *
 * <p>The equilibrium part is −(g/π) Im ∫ f G S dE with the path moved off the real axis, where G is smooth. Poles of f lie at
 * z_n = µ + iπkT(2n + 1). The path comes down from +i∞ at an energy where f is one, crosses above the first M poles, where f
 * is what it is on the real axis, and leaves the poles to the residue theorem; far out G S → 1/z, whatever the contacts:
 * n = ½·orbitals + 2kT Σ_n Re G(z_n) + (1/π) ∫ Re G dy (the way down) − (1/π) ∫ f Im G dx (the crossing). The idea is that of
 * Zeller, Deutz & Dederichs, Solid State Commun. 44, 993 (1982). States that no lead reaches are filled like this part.
 */
public final class ChargeDensity extends Observable {
    /** Height of the crossing that is aimed at, eV. */
    private static final double HEIGHT = 0.2;

    private static final int MOST_POLES = 20;

    private static final int PANELS = 4;

    public ChargeDensity() {
        super("density", new Needs(true, false));
    }

    @Override
    public double[] values(Bench bench, ObservableCall column, double energy) {
        int reference = 0;
        for (int p = 1; p < bench.leads(); p++) {
            if (bench.lead(p).mu() < bench.lead(reference).mu()) {
                reference = p;
            }
        }
        double[] values = equilibrium(bench, bench.lead(reference));
        if (!Current.inEquilibrium(bench)) {
            double[] window = bench.thermalWindow(Fermi.TAIL);
            LeadState state = bench.lead(reference);
            if (window[1] > window[0]) {
                double[] added = bench.integral(name(), window[0], window[1], e -> added(bench, state, e));
                for (int site = 0; site < values.length; site++) {
                    values[site] += added[site];
                }
            }
        }
        return values;
    }

    private static double[] added(Bench bench, LeadState reference, double energy) {
        EnergySolution solution = bench.at(energy);
        double[] sum = new double[bench.device().sites().count()];
        for (int p = 0; p < bench.leads(); p++) {
            double difference = Fermi.difference(bench.lead(p), reference, energy);
            if (difference != 0) {
                double[] fed = solution.siteSpectral(p);
                for (int site = 0; site < sum.length; site++) {
                    sum[site] += bench.degeneracy() * difference * fed[site] / (2 * Math.PI);
                }
            }
        }
        return sum;
    }

    private static double[] equilibrium(Bench bench, LeadState lead) {
        Solver solver = bench.solver();
        SiteTable sites = bench.device().sites();
        double[] density = new double[sites.count()];
        for (int site = 0; site < density.length; site++) {
            density[site] = 0.5 * sites.orbitals(site);
        }
        double kT = Fermi.kT(lead);
        int poles = kT == 0 ? 0 : (int) Math.max(1, Math.min(MOST_POLES, Math.ceil(HEIGHT / (2 * Math.PI * kT))));
        double height = 2 * Math.PI * kT * poles;
        double left = lead.mu() - Fermi.TAIL * kT;
        double[] bounds = solver.spectrumBounds();
        double scale = Math.max(1e-3, 0.25 * (bounds[1] - bounds[0]));
        // y = height + scale·u/(1 − u), so that the way down from infinity is an interval
        add(density, 1 / Math.PI, line(bench, 0, 1, u -> {
            double rest = 1 - u;
            double[] green = solver.siteGreens(left, height + scale * u / rest);
            return parts(green, scale / (rest * rest), 0);
        }));
        if (poles > 0) {
            double right = lead.mu() + Fermi.TAIL * kT;
            add(density, -1 / Math.PI, line(bench, left, right, x -> {
                double[] green = solver.siteGreens(x, height);
                return parts(green, 0, Fermi.occupation(lead, x));
            }));
            for (int n = 0; n < poles; n++) {
                add(density, 2 * kT, parts(solver.siteGreens(lead.mu(), Math.PI * kT * (2 * n + 1)), 1, 0));
            }
        }
        for (int site = 0; site < density.length; site++) {
            density[site] *= bench.degeneracy();
        }
        return density;
    }

    /** Good to the accuracy in electrons: the terms are of the order of one. */
    private static double[] line(Bench bench, double from, double to, DoubleFunction<double[]> integrand) {
        List<EnergyIntegral.Break> breaks = new ArrayList<>();
        for (int k = 0; k <= PANELS; k++) {
            breaks.add(new EnergyIntegral.Break(from + (to - from) * k / PANELS, true));
        }
        EnergyIntegral.Result result =
                EnergyIntegral.alongContour(breaks, integrand, bench.accuracy(), bench.accuracy());
        bench.shortfall("density", result.relativeError());
        return result.values();
    }

    /** real·Re G + imaginary·Im G per site. */
    private static double[] parts(double[] green, double real, double imaginary) {
        double[] values = new double[green.length / 2];
        for (int site = 0; site < values.length; site++) {
            values[site] = real * green[2 * site] + imaginary * green[2 * site + 1];
        }
        return values;
    }

    private static void add(double[] sum, double factor, double[] values) {
        for (int site = 0; site < sum.length; site++) {
            sum[site] += factor * values[site];
        }
    }
}
