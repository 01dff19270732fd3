package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;
import org.isthmus.runtime.solve.OperatingPoint.LeadState;

/** Current at b per voltage at a, in linear response about each lead's own mu and temperature: (g q²/h) ∫ dE T(a→b)
 * (−∂f_a/∂E), at zero temperature T(a→b) at mu. */
final class Conductance implements Observable.Integrated {
    @Override
    public String name() {
        return "conductance";
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
        return "S";
    }

    @Override
    public Integrand integrand(PointContext context, ObservableCall call) {
        int from = context.lead(call, 0);
        int to = context.lead(call, 1);
        LeadState lead = context.leads().get(from);
        Window window = context.thermal(from);
        return new Integrand(
                Needs.LEADS,
                window,
                1,
                window.empty() ? List.of(lead.mu()) : List.of(),
                (solution, values, first) ->
                        values[first] += Occupation.broadened(solution.energy(), lead) * passing(solution, from, to),
                (integrals, points) -> new double[] {
                    context.flow() * (points.isEmpty() ? integrals[0] : passing(points.get(0), from, to))
                });
    }

    /** What passes from a lead to another; to itself: to all others. */
    private static double passing(EnergySolution solution, int from, int to) {
        if (from != to) {
            return solution.transmission(from, to);
        }
        double sum = 0;
        for (int other = 0; other < solution.leadCount(); other++) {
            sum += other == from ? 0 : solution.transmission(from, other);
        }
        return sum;
    }
}
