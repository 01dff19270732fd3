package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.Needs;

/** Waves that propagate in a lead. A wide-band or tabulated lead has none to count. */
public final class Modes extends Observable {
    public Modes() {
        super("modes", Needs.LEADS);
    }

    @Override
    public List<ObservableCall> columns(ObservableCall call, Device device) {
        return call.leads().isEmpty() ? latticeLeads(name(), device) : List.of(call);
    }

    @Override
    public double[] values(Bench bench, ObservableCall column, double energy) {
        int open = bench.at(energy).openModes(bench.index(column.leads().get(0)));
        return new double[] {open < 0 ? Double.NaN : open};
    }
}
