package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.Needs;

/** Heat that electrons carry into the body at a lead, ∫ dE (E − mu) × electron inflow. */
final class HeatCurrent implements Observable.Integrated {
    @Override
    public String name() {
        return "heatCurrent";
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
        return "J/s";
    }

    @Override
    public Integrand integrand(PointContext context, ObservableCall call) {
        int lead = context.lead(call, 0);
        double mu = context.leads().get(lead).mu();
        return new Integrand(
                Needs.LEADS,
                context.equilibrium() ? Window.EMPTY : context.thermal(),
                1,
                List.of(),
                (solution, values, first) -> values[first] +=
                        context.flow() * (solution.energy() - mu) * Current.inflow(context, solution, lead),
                (integrals, points) -> integrals);
    }
}
