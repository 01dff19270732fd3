package org.isthmus.runtime.observable;

import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.Needs;
import org.isthmus.runtime.units.PhysicalConstants;

/** (g/h) ∫ (E − µ_p) × electron inflow dE (Sivan & Imry, Phys. Rev. B 33, 551 (1986)); positive into the body. */
public final class HeatCurrent extends Observable {
    public HeatCurrent() {
        super("heatCurrent", Needs.LEADS);
    }

    @Override
    public double[] values(Bench bench, ObservableCall column, double energy) {
        int lead = bench.index(column.leads().get(0));
        double[] flows = bench.once(
                name(),
                () -> Current.flows(bench, name(), (p, e) -> -(e - bench.lead(p).mu())));
        return new double[] {bench.degeneracy() / PhysicalConstants.H * flows[lead]};
    }
}
