package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.Needs;

/** ∫Gn/∫A per site over the energies at which some lead is neither full nor empty. */
final class MeanOccupation implements Observable.Integrated {
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
    public Integrand integrand(PointContext context, ObservableCall call) {
        int sites = context.device().sites().count();
        Window window = context.thermal();
        return new Integrand(
                new Needs(true, false),
                window,
                2 * sites,
                // at zero temperature and zero bias the window shrinks to mu itself
                window.empty() ? List.of(context.leads().get(0).mu()) : List.of(),
                (solution, values, first) -> {
                    if (solution.energy() < window.lower() || solution.energy() > window.upper()) {
                        return;
                    }
                    for (int lead = 0; lead < context.leads().size(); lead++) {
                        double fermi = Occupation.fermi(
                                solution.energy(), context.leads().get(lead));
                        double[] fed = solution.siteSpectral(lead);
                        for (int site = 0; site < sites; site++) {
                            values[first + site] += fermi * fed[site];
                            values[first + sites + site] += fed[site];
                        }
                    }
                },
                (integrals, points) -> points.isEmpty()
                        ? ResolvedOccupation.share(
                                java.util.Arrays.copyOfRange(integrals, 0, sites),
                                java.util.Arrays.copyOfRange(integrals, sites, 2 * sites))
                        : new ResolvedOccupation().at(context, call, points.get(0)));
    }
}
