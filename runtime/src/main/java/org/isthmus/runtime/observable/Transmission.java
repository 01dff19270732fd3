package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;

/** T from a to b = Tr[Γ_b G Γ_a G†] (Caroli et al., J. Phys. C 4, 916 (1971)). */
final class Transmission implements Observable.Resolved {
    @Override
    public String name() {
        return "transmission";
    }

    @Override
    public List<ObservableCall> all(Device device) {
        return Columns.pairs(name(), device, false);
    }

    @Override
    public String column(ObservableCall call) {
        return Columns.ofLeads(call);
    }

    @Override
    public String unit(boolean resolved) {
        return "";
    }

    @Override
    public Needs needs() {
        return Needs.LEADS;
    }

    @Override
    public double[] at(PointContext context, ObservableCall call, EnergySolution solution) {
        return new double[] {solution.transmission(context.lead(call, 0), context.lead(call, 1))};
    }
}
