package org.isthmus.runtime.observable;

import java.util.Arrays;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.Needs;

/** g·Tr[A S]/2π. */
public final class StateDensity extends Observable {
    public StateDensity() {
        super("dos", new Needs(true, false));
    }

    @Override
    public double[] values(Bench bench, ObservableCall column, double energy) {
        double sum = Arrays.stream(bench.at(energy).siteSpectral()).sum();
        return new double[] {bench.degeneracy() * sum / (2 * Math.PI)};
    }
}
