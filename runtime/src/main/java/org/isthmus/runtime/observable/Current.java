package org.isthmus.runtime.observable;

import java.util.function.DoubleUnaryOperator;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;
import org.isthmus.runtime.units.PhysicalConstants;

/** I_p = (g q/h) ∫ Σ_q T(q→p) (f_q − f_p) dE: electric current that enters at lead p, positive on positive bias. */
public final class Current extends Observable {
    public Current() {
        super("current", Needs.LEADS);
    }

    @Override
    public double[] values(Bench bench, ObservableCall column, double energy) {
        int lead = bench.index(column.leads().get(0));
        double factor = bench.degeneracy() / PhysicalConstants.H;
        if (!Double.isNaN(energy)) {
            return new double[] {factor * spectral(bench, lead, energy)};
        }
        return new double[] {factor * integrated(bench, name(), lead, e -> 1)};
    }

    /** Σ_q T(q→p) (f_q − f_p): conventional current per energy, without (g q/h). */
    static double spectral(Bench bench, int lead, double energy) {
        EnergySolution solution = bench.at(energy);
        double sum = 0;
        for (int q = 0; q < bench.leads(); q++) {
            if (q != lead) {
                double difference = Fermi.difference(bench.lead(q), bench.lead(lead), energy);
                sum += difference == 0 ? 0 : solution.transmission(q, lead) * difference;
            }
        }
        return sum;
    }

    static double integrated(Bench bench, String what, int lead, DoubleUnaryOperator weight) {
        if (inEquilibrium(bench)) {
            return 0;
        }
        double[] window = bench.thermalWindow(Fermi.TAIL);
        if (!(window[1] > window[0])) {
            return 0;
        }
        return bench.integral(what, window[0], window[1], e ->
                new double[] {weight.applyAsDouble(e) * spectral(bench, lead, e)})[0];
    }

    static boolean inEquilibrium(Bench bench) {
        for (int p = 1; p < bench.leads(); p++) {
            if (bench.lead(p).mu() != bench.lead(0).mu()
                    || bench.lead(p).temperature() != bench.lead(0).temperature()) {
                return false;
            }
        }
        return true;
    }
}
