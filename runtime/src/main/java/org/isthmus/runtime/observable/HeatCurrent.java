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
        double mu = bench.lead(lead).mu();
        double flow = Current.integrated(bench, name(), lead, e -> -(e - mu));
        return new double[] {bench.degeneracy() / PhysicalConstants.H * flow};
    }
}
