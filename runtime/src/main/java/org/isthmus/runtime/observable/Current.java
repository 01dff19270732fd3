package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;

/** Electric current that enters the device at a lead, (g q/h) ∫ dE Σ_q [f_q T(q→p) − f_p T(p→q)]: positive at a lead on
 * positive bias (Büttiker, Phys. Rev. Lett. 57, 1761 (1986)). */
final class Current implements Observable.Integrated {
    @Override
    public String name() {
        return "current";
    }

    @Override
    public List<ObservableCall> all(Device device) {
        return Columns.leads(name(), device);
    }

    @Override
    public String column(ObservableCall call) {
        return Columns.ofLeads(call);
    }

    @Override
    public String unit(boolean resolved) {
        return "A";
    }

    @Override
    public Integrand integrand(PointContext context, ObservableCall call) {
        int lead = context.lead(call, 0);
        return new Integrand(
                Needs.LEADS,
                context.equilibrium() ? Window.EMPTY : context.thermal(),
                1,
                List.of(),
                (solution, values, first) -> values[first] -= context.flow() * inflow(context, solution, lead),
                (integrals, points) -> integrals);
    }

    /** Electrons that enter at a lead, per state and energy, times h. */
    static double inflow(PointContext context, EnergySolution solution, int lead) {
        double inflow = 0;
        double own = Occupation.fermi(solution.energy(), context.leads().get(lead));
        for (int other = 0; other < solution.leadCount(); other++) {
            if (other != lead) {
                double theirs =
                        Occupation.fermi(solution.energy(), context.leads().get(other));
                inflow += own * solution.transmission(lead, other) - theirs * solution.transmission(other, lead);
            }
        }
        return inflow;
    }
}
