package org.isthmus.runtime.observable;

import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.Needs;

/** T(a→b) = Tr[Γ_b G Γ_a G†] (Caroli et al., J. Phys. C 4, 916 (1971)). */
public final class Transmission extends Observable {
    public Transmission() {
        super("transmission", Needs.LEADS);
    }

    @Override
    public double[] values(Bench bench, ObservableCall column, double energy) {
        int from = bench.index(column.leads().get(0));
        int to = bench.index(column.leads().get(1));
        return new double[] {bench.at(energy).transmission(from, to)};
    }
}
