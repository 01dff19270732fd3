package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.observable.Observable.Window;
import org.isthmus.runtime.solve.OperatingPoint.LeadState;
import org.isthmus.runtime.solve.Solver;
import org.isthmus.runtime.units.PhysicalConstants;

/**
 * A device at given voltages, as observables see it.
 *
 * @param accuracy relative accuracy of energy integrals
 */
record PointContext(Solver solver, Workers workers, double accuracy) {
    Device device() {
        return solver.operatingPoint().device();
    }

    List<LeadState> leads() {
        return solver.operatingPoint().leads();
    }

    int lead(ObservableCall call, int argument) {
        return device().leadIndex(call.leads().get(argument)).orElseThrow();
    }

    /** g/h: per eV of energy and full transmission, elementary charges per fs. */
    double flow() {
        return device().degeneracy() / PhysicalConstants.H;
    }

    /** Energies at which one of the leads is neither full nor empty, or at which two differ. */
    Window thermal() {
        double lower = Double.POSITIVE_INFINITY;
        double upper = Double.NEGATIVE_INFINITY;
        for (LeadState lead : leads()) {
            lower = Math.min(lower, lead.mu() - Occupation.reach(lead));
            upper = Math.max(upper, lead.mu() + Occupation.reach(lead));
        }
        return upper > lower ? new Window(lower, upper) : Window.EMPTY;
    }

    /** Energies at which the lead is neither full nor empty; empty at zero temperature. */
    Window thermal(int lead) {
        LeadState state = leads().get(lead);
        return new Window(state.mu() - Occupation.reach(state), state.mu() + Occupation.reach(state));
    }

    /** True where all leads have one mu and one temperature, so that no net current flows. */
    boolean equilibrium() {
        LeadState first = leads().get(0);
        return leads().stream().allMatch(lead -> lead.mu() == first.mu() && lead.temperature() == first.temperature());
    }
}
