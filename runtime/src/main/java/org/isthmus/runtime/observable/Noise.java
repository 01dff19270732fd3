package org.isthmus.runtime.observable;

import java.util.ArrayList;
import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;
import org.isthmus.runtime.units.PhysicalConstants;

/**
 * One-sided, at zero frequency: S_ab = (g q²/h) Σ_cd ∫ Tr[A_cd(a) A_dc(b)] (f_c(1 − f_d) + f_d(1 − f_c)) dE (Büttiker, Phys.
 * Rev. B 46, 12485 (1992)); S_aa = 4kTG in equilibrium.
 */
public final class Noise extends Observable {
    public Noise() {
        super("noise", new Needs(false, true));
    }

    @Override
    public List<ObservableCall> columns(ObservableCall call, Device device) {
        if (!call.leads().isEmpty()) {
            return List.of(call);
        }
        List<ObservableCall> calls = new ArrayList<>();
        for (Lead a : device.leads()) {
            for (Lead b : device.leads()) {
                calls.add(new ObservableCall(name(), a.name(), b.name()));
            }
        }
        return calls;
    }

    @Override
    public double[] values(Bench bench, ObservableCall column, double energy) {
        int a = bench.index(column.leads().get(0));
        int b = bench.index(column.leads().get(1));
        return new double[] {spectralDensity(bench, a, b)};
    }

    static double spectralDensity(Bench bench, int a, int b) {
        int n = bench.leads();
        return bench.degeneracy() / PhysicalConstants.H * bench.once("noise", () -> integrals(bench, n))[a * n + b];
    }

    private static double[] integrals(Bench bench, int n) {
        double[] window = bench.thermalWindow(Fermi.TAIL);
        if (!(window[1] > window[0])) {
            return new double[n * n];
        }
        return bench.integral("noise", window[0], window[1], rounding(bench), energy -> {
            double[] all = new double[n * n];
            for (int k = 0; k < all.length; k++) {
                all[k] = density(bench, k / n, k % n, energy);
            }
            return all;
        });
    }

    /** What 1 − s†s loses to rounding where everything passes, over the energies that carry noise, eV. */
    private static double rounding(Bench bench) {
        double low = Double.POSITIVE_INFINITY;
        double high = Double.NEGATIVE_INFINITY;
        int waves = 0;
        for (int p = 0; p < bench.leads(); p++) {
            double kT = Fermi.kT(bench.lead(p));
            low = Math.min(low, bench.lead(p).mu() - 2 * kT);
            high = Math.max(high, bench.lead(p).mu() + 2 * kT);
            waves += bench.device().leads().get(p).contactSites().size();
        }
        return 1e-15 * waves * (high - low);
    }

    private static double density(Bench bench, int a, int b, double energy) {
        EnergySolution solution = bench.at(energy);
        double sum = 0;
        for (int c = 0; c < bench.leads(); c++) {
            for (int d = 0; d < bench.leads(); d++) {
                double fc = Fermi.occupation(bench.lead(c), energy);
                double fd = Fermi.occupation(bench.lead(d), energy);
                double thermal = fc * Fermi.hole(bench.lead(d), energy) + fd * Fermi.hole(bench.lead(c), energy);
                sum += thermal == 0 ? 0 : thermal * solution.noiseTrace(a, b, c, d);
            }
        }
        return sum;
    }
}
