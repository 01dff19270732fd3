package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;

/** Tr[A S]·g/2π over the body, 1/eV. */
final class DensityOfStates implements Observable.Resolved {
    @Override
    public String name() {
        return "dos";
    }

    @Override
    public List<ObservableCall> all(Device device) {
        return Columns.single(name());
    }

    @Override
    public String column(ObservableCall call) {
        return name();
    }

    @Override
    public String unit(boolean resolved) {
        return "1/eV";
    }

    @Override
    public Needs needs() {
        return new Needs(true, false);
    }

    @Override
    public double[] at(PointContext context, ObservableCall call, EnergySolution solution) {
        double sum = 0;
        for (double site : solution.siteSpectral()) {
            sum += site;
        }
        return new double[] {context.device().degeneracy() * sum / (2 * Math.PI)};
    }
}
