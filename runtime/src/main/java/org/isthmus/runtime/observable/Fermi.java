package org.isthmus.runtime.observable;

import org.isthmus.runtime.solve.OperatingPoint.LeadState;
import org.isthmus.runtime.units.PhysicalConstants;

/** The Fermi function of a lead. A temperature of zero is a step. */
final class Fermi {
    /** Beyond this many kT from the electrochemical potential the function has reached its end to the last bit. */
    static final double TAIL = 38;

    private Fermi() {}

    static double kT(LeadState lead) {
        return PhysicalConstants.KB * lead.temperature();
    }

    /** Occupation at an energy, eV. */
    static double occupation(LeadState lead, double energy) {
        double x = energy - lead.mu();
        if (lead.temperature() == 0) {
            return x < 0 ? 1 : x > 0 ? 0 : 0.5;
        }
        return 1 / (1 + Math.exp(x / kT(lead)));
    }

    /** f_a − f_b without cancellation where both are near one. */
    static double difference(LeadState a, LeadState b, double energy) {
        if (a.mu() == b.mu() && a.temperature() == b.temperature()) {
            return 0;
        }
        if (energy < Math.min(a.mu(), b.mu())) {
            return hole(b, energy) - hole(a, energy);
        }
        return occupation(a, energy) - occupation(b, energy);
    }

    /** 1 − f without cancellation. */
    static double hole(LeadState lead, double energy) {
        double x = energy - lead.mu();
        if (lead.temperature() == 0) {
            return x > 0 ? 1 : x < 0 ? 0 : 0.5;
        }
        return 1 / (1 + Math.exp(-x / kT(lead)));
    }

    /** −df/dE, 1/eV; for temperatures above zero. */
    static double slope(LeadState lead, double energy) {
        double c = Math.cosh((energy - lead.mu()) / (2 * kT(lead)));
        return 1 / (4 * kT(lead) * c * c);
    }
}
