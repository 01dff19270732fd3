package org.isthmus.runtime.observable;

import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.Needs;
import org.isthmus.runtime.units.PhysicalConstants;

/** G = (g q²/h) ∫ T(a→b) (−df_a/dE) dE (Landauer 1957; Büttiker, Phys. Rev. Lett. 57, 1761 (1986)). */
public final class Conductance extends Observable {
    public Conductance() {
        super("conductance", Needs.LEADS);
    }

    @Override
    public double[] values(Bench bench, ObservableCall column, double energy) {
        int from = bench.index(column.leads().get(0));
        int to = bench.index(column.leads().get(1));
        return new double[] {bench.degeneracy() / PhysicalConstants.H * LinearResponse.passing(bench, from, to)};
    }
}
