package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;

/** Occupied share of the states that leads feed at a site, Gn/A; not a number where there is none. */
final class ResolvedOccupation implements Observable.Resolved {
    @Override
    public String name() {
        return "occupation";
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
        return "";
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
        int sites = context.device().sites().count();
        double[] filled = new double[sites];
        double[] states = new double[sites];
        for (int lead = 0; lead < context.leads().size(); lead++) {
            double fermi = Occupation.fermi(solution.energy(), context.leads().get(lead));
            double[] fed = solution.siteSpectral(lead);
            for (int site = 0; site < sites; site++) {
                filled[site] += fermi * fed[site];
                states[site] += fed[site];
            }
        }
        return share(filled, states);
    }

    static double[] share(double[] filled, double[] states) {
        double[] share = new double[filled.length];
        for (int site = 0; site < share.length; site++) {
            share[site] = states[site] == 0 ? Double.NaN : filled[site] / states[site];
        }
        return share;
    }
}
