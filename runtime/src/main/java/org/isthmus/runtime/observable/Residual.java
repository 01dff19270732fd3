package org.isthmus.runtime.observable;

import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;

/**
 * Largest violation of current conservation, relative to the largest lead current. Currents are taken as Tr[Σin_p A − Γ_p
 * Gn], in which nothing makes their sum vanish but a right solution. Where all leads are in equilibrium with each other no
 * current flows, and the same traces are compared with the transmissions that should add up to them.
 */
public final class Residual extends Observable {
    public Residual() {
        super("residual", Needs.LEADS);
    }

    @Override
    public double[] values(Bench bench, ObservableCall column, double energy) {
        if (!Double.isNaN(energy)) {
            return new double[] {relative(inflows(bench, energy))};
        }
        if (Current.inEquilibrium(bench)) {
            double[] violations = bench.linearResponse(name(), 0, e -> inflows(bench, e));
            return new double[] {relative(violations)};
        }
        double[] window = bench.thermalWindow(Fermi.TAIL);
        if (!(window[1] > window[0])) {
            return new double[] {0};
        }
        return new double[] {relative(bench.integral(name(), window[0], window[1], e -> inflows(bench, e)))};
    }

    /** Net inflow at each lead; in equilibrium the sums of transmissions, with the violation as one more component. */
    private static double[] inflows(Bench bench, double energy) {
        EnergySolution solution = bench.at(energy);
        int n = bench.leads();
        double[] flows = new double[n + 1];
        boolean equilibrium = Current.inEquilibrium(bench);
        for (int p = 0; p < n; p++) {
            double coming = 0;
            double fed = 0;
            for (int q = 0; q < n; q++) {
                coming += solution.transmission(q, p);
                fed += solution.transmission(q, p) * Fermi.difference(bench.lead(q), bench.lead(0), energy);
            }
            if (equilibrium) {
                flows[p] = coming;
                flows[n] += Math.abs(solution.spectralTrace(p) - coming);
            } else {
                flows[p] = Fermi.difference(bench.lead(p), bench.lead(0), energy) * solution.spectralTrace(p) - fed;
                flows[n] += flows[p];
            }
        }
        return flows;
    }

    private static double relative(double[] flows) {
        double largest = 0;
        for (int p = 0; p + 1 < flows.length; p++) {
            largest = Math.max(largest, Math.abs(flows[p]));
        }
        double violation = Math.abs(flows[flows.length - 1]);
        return violation == 0 ? 0 : largest == 0 ? Double.NaN : violation / largest;
    }
}
