package org.isthmus.runtime.observable;

import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.Needs;

/** S = −L1/(q T L0), L_n = ∫ T(E) (E − µ)ⁿ (−df/dE) dE (Sivan & Imry 1986); zero at T = 0. */
public final class Seebeck extends Observable {
    public Seebeck() {
        super("seebeck", Needs.LEADS);
    }

    @Override
    public double[] values(Bench bench, ObservableCall column, double energy) {
        int from = bench.index(column.leads().get(0));
        int to = bench.index(column.leads().get(1));
        double temperature = bench.lead(from).temperature();
        double passing = LinearResponse.passing(bench, from, to);
        if (passing == 0) {
            return new double[] {Double.NaN};
        }
        double heat = LinearResponse.heat(bench, from, to);
        return new double[] {temperature == 0 ? 0 : -heat / (temperature * passing)};
    }
}
