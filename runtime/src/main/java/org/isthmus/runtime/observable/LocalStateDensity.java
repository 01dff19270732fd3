package org.isthmus.runtime.observable;

import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.Needs;

/** g·A_ii/2π per site. */
public final class LocalStateDensity extends Observable {
    public LocalStateDensity() {
        super("ldos", new Needs(true, false));
    }

    @Override
    public double[] values(Bench bench, ObservableCall column, double energy) {
        double[] values = bench.at(energy).siteSpectral();
        for (int site = 0; site < values.length; site++) {
            values[site] *= bench.degeneracy() / (2 * Math.PI);
        }
        return values;
    }
}
