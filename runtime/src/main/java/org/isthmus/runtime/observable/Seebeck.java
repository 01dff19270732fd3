package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.Needs;
import org.isthmus.runtime.solve.OperatingPoint.LeadState;

/** Thermovoltage per temperature difference, S = −L1/(q T L0) with L_n = ∫ dE (E − mu)ⁿ T(a→b) (−∂f/∂E); zero at zero
 * temperature (Sivan and Imry, Phys. Rev. B 33, 551 (1986)). */
final class Seebeck implements Observable.Integrated {
    @Override
    public String name() {
        return "seebeck";
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
        return "V/K";
    }

    @Override
    public Integrand integrand(PointContext context, ObservableCall call) {
        int from = context.lead(call, 0);
        int to = context.lead(call, 1);
        LeadState lead = context.leads().get(from);
        return new Integrand(
                Needs.LEADS,
                context.thermal(from),
                2,
                List.of(),
                (solution, values, first) -> {
                    double passed = Occupation.broadened(solution.energy(), lead) * solution.transmission(from, to);
                    values[first] += passed;
                    values[first + 1] += (solution.energy() - lead.mu()) * passed;
                },
                (integrals, points) ->
                        new double[] {lead.temperature() == 0 ? 0 : -integrals[1] / (lead.temperature() * integrals[0])
                        });
    }
}
