package org.isthmus.runtime.observable;

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
        return new double[] {factor * integrated(bench)[lead]};
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

    /** ∫ Σ_q T(q→p) (f_q − f_p) dE for every lead p, eV. */
    static double[] integrated(Bench bench) {
        return bench.once("current", () -> flows(bench, "current", (lead, energy) -> 1));
    }

    /** The weight of an energy in a flow at a lead. */
    interface Weight {
        double at(int lead, double energy);
    }

    /** Flows at all leads over the same energies, so that what enters and what leaves are equal to the last digits. */
    static double[] flows(Bench bench, String what, Weight weight) {
        int n = bench.leads();
        double[] window = bench.thermalWindow(Fermi.TAIL);
        if (inEquilibrium(bench) || !(window[1] > window[0])) {
            return new double[n];
        }
        return bench.integral(what, window[0], window[1], energy -> {
            double[] flows = new double[n];
            for (int lead = 0; lead < n; lead++) {
                flows[lead] = weight.at(lead, energy) * spectral(bench, lead, energy);
            }
            return flows;
        });
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
