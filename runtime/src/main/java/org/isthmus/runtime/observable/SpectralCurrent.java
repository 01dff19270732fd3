package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;

/** Electric current per energy that enters at a lead; see {@link Current}. */
final class SpectralCurrent implements Observable.Resolved {
    @Override
    public String name() {
        return "current";
    }

    @Override
    public List<ObservableCall> all(Device device) {
        return Columns.leads(name(), device);
    }

    @Override
    public String column(ObservableCall call) {
        return Columns.ofLeads(call);
    }

    @Override
    public String unit(boolean resolved) {
        return "A/eV";
    }

    @Override
    public Needs needs() {
        return Needs.LEADS;
    }

    @Override
    public double[] at(PointContext context, ObservableCall call, EnergySolution solution) {
        return new double[] {-context.flow() * Current.inflow(context, solution, context.lead(call, 0))};
    }
}
