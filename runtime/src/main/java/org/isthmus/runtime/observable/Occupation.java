package org.isthmus.runtime.observable;

import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;

/**
 * Gn/A per site: at an energy, or ∫Gn/∫A over the thermal window, from the lowest µ − 10 kT to the highest µ + 10 kT. Not
 * defined on a site that no lead reaches.
 */
public final class Occupation extends Observable {
    private static final double WINDOW = 10;

    public Occupation() {
        super("occupation", new Needs(true, false));
    }

    @Override
    public double[] values(Bench bench, ObservableCall column, double energy) {
        int sites = bench.device().sites().count();
        double[] both;
        if (!Double.isNaN(energy)) {
            both = filledAndAll(bench, energy);
        } else {
            double[] window = bench.thermalWindow(WINDOW);
            both = window[1] > window[0]
                    ? bench.integral(name(), window[0], window[1], e -> filledAndAll(bench, e))
                    : filledAndAll(bench, window[0]);
        }
        double[] values = new double[sites];
        for (int site = 0; site < sites; site++) {
            values[site] = both[sites + site] > 0 ? both[site] / both[sites + site] : Double.NaN;
        }
        return values;
    }

    private static double[] filledAndAll(Bench bench, double energy) {
        EnergySolution solution = bench.at(energy);
        int sites = bench.device().sites().count();
        double[] both = new double[2 * sites];
        for (int p = 0; p < bench.leads(); p++) {
            double f = Fermi.occupation(bench.lead(p), energy);
            double[] fed = solution.siteSpectral(p);
            for (int site = 0; site < sites; site++) {
                both[site] += f * fed[site];
                both[sites + site] += fed[site];
            }
        }
        return both;
    }
}
