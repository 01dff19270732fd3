package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;

/** Tr t(1 − t)/Tr t with t = tt† of the waves from a to b; not a number where nothing passes. */
final class ResolvedFano implements Observable.Resolved {
    @Override
    public String name() {
        return "fano";
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
        return new Needs(false, true);
    }

    @Override
    public double[] at(PointContext context, ObservableCall call, EnergySolution solution) {
        int from = context.lead(call, 0);
        int to = context.lead(call, 1);
        double passed = solution.transmission(from, to);
        return new double[] {passed == 0 ? Double.NaN : 1 - solution.transmissionSquared(from, to) / passed};
    }
}
