package org.isthmus.runtime.observable;

import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;
import org.isthmus.runtime.units.PhysicalConstants;

/**
 * On an energy axis Tr[tt†(1 − tt†)]/Tr[tt†]; otherwise |S_ab|/(2q|I_b|) (Büttiker, Phys. Rev. Lett. 65, 2901 (1990)). Not
 * defined where nothing flows.
 */
public final class Fano extends Observable {
    public Fano() {
        super("fano", new Needs(false, true));
    }

    @Override
    public double[] values(Bench bench, ObservableCall column, double energy) {
        int from = bench.index(column.leads().get(0));
        int to = bench.index(column.leads().get(1));
        if (!Double.isNaN(energy)) {
            EnergySolution solution = bench.at(energy);
            double t = solution.transmission(from, to);
            return new double[] {t > 0 ? 1 - solution.transmissionSquared(from, to) / t : Double.NaN};
        }
        double current = bench.degeneracy() / PhysicalConstants.H * Current.integrated(bench)[to];
        double noise = Noise.spectralDensity(bench, from, to);
        return new double[] {current == 0 ? Double.NaN : Math.abs(noise) / (2 * Math.abs(current))};
    }
}
