package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;

/** One-sided spectral density of the current fluctuations at zero frequency, (g q²/h) Σ_cd ∫ dE Tr[A_cd(a) A_dc(b)]
 * [f_c(1 − f_d) + f_d(1 − f_c)] (Büttiker, Phys. Rev. B 46, 12485 (1992)); 4kTG in equilibrium. */
final class Noise implements Observable.Integrated {
    @Override
    public String name() {
        return "noise";
    }

    @Override
    public List<ObservableCall> all(Device device) {
        return Columns.pairs(name(), device, true);
    }

    @Override
    public String column(ObservableCall call) {
        return Columns.ofLeads(call);
    }

    @Override
    public String unit(boolean resolved) {
        return "A^2/Hz";
    }

    @Override
    public Integrand integrand(PointContext context, ObservableCall call) {
        int a = context.lead(call, 0);
        int b = context.lead(call, 1);
        return new Integrand(
                new Needs(false, true),
                context.thermal(),
                1,
                List.of(),
                (solution, values, first) -> values[first] += context.flow() * density(context, solution, a, b),
                (integrals, points) -> integrals);
    }

    static double density(PointContext context, EnergySolution solution, int a, int b) {
        double sum = 0;
        for (int c = 0; c < solution.leadCount(); c++) {
            double fc = Occupation.fermi(solution.energy(), context.leads().get(c));
            for (int d = 0; d < solution.leadCount(); d++) {
                double fd = Occupation.fermi(solution.energy(), context.leads().get(d));
                double weight = fc * (1 - fd) + fd * (1 - fc);
                sum += weight == 0 ? 0 : weight * solution.noiseTrace(a, b, c, d);
            }
        }
        return sum;
    }
}
