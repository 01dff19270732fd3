package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.LatticeLead;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;

/** Waves that propagate in a lead; not a number for a lead without bands. */
final class Modes implements Observable.Resolved {
    @Override
    public String name() {
        return "modes";
    }

    @Override
    public List<ObservableCall> all(Device device) {
        return device.leads().stream()
                .filter(LatticeLead.class::isInstance)
                .map(lead -> new ObservableCall(name(), lead.name()))
                .toList();
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
        int modes = solution.openModes(context.lead(call, 0));
        return new double[] {modes < 0 ? Double.NaN : modes};
    }
}
