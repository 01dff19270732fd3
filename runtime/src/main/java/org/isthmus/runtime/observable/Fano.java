package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.Needs;

/** Noise relative to that of independent electrons, |S_ab|/(2q|I_a|); not a number where no current flows. */
final class Fano implements Observable.Integrated {
    @Override
    public String name() {
        return "fano";
    }

    @Override
    public List<ObservableCall> all(Device device) {
        return Columns.pairs(name(), device, false);
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
    public Integrand integrand(PointContext context, ObservableCall call) {
        int a = context.lead(call, 0);
        int b = context.lead(call, 1);
        return new Integrand(
                new Needs(false, true),
                context.thermal(),
                2,
                List.of(),
                (solution, values, first) -> {
                    values[first] += Noise.density(context, solution, a, b);
                    values[first + 1] += Current.inflow(context, solution, a);
                },
                (integrals, points) -> new double[] {
                    integrals[1] == 0 ? Double.NaN : Math.abs(integrals[0]) / (2 * Math.abs(integrals[1]))
                });
    }
}
