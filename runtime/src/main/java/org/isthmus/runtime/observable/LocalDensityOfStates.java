package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;

/** A site's share of Tr[A S]·g/2π, 1/eV. */
final class LocalDensityOfStates implements Observable.Resolved {
    @Override
    public String name() {
        return "ldos";
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
    public boolean perSite() {
        return true;
    }

    @Override
    public Needs needs() {
        return new Needs(true, false);
    }

    @Override
    public double[] at(PointContext context, ObservableCall call, EnergySolution solution) {
        double[] spectral = solution.siteSpectral();
        for (int site = 0; site < spectral.length; site++) {
            spectral[site] *= context.device().degeneracy() / (2 * Math.PI);
        }
        return spectral;
    }
}
