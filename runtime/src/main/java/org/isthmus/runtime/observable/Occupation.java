package org.isthmus.runtime.observable;

import org.isthmus.runtime.solve.OperatingPoint.LeadState;
import org.isthmus.runtime.units.PhysicalConstants;

/** Fermi functions, the limit of zero temperature included. */
final class Occupation {
    /** exp(−38) is below the spacing of doubles next to 1: beyond this many kT a Fermi function is 0 or 1. */
    static final double REACH = 38;

    private Occupation() {}

    /** Occupied share of states at an energy; one half at mu, also at zero temperature. */
    static double fermi(double energy, LeadState lead) {
        double kt = PhysicalConstants.KB * lead.temperature();
        double above = energy - lead.mu();
        if (kt == 0) {
            return above < 0 ? 1 : above > 0 ? 0 : 0.5;
        }
        double x = above / kt;
        return x > 0 ? Math.exp(-x) / (1 + Math.exp(-x)) : 1 / (1 + Math.exp(x));
    }

    /** −∂f/∂E, 1/eV; for temperatures above zero. */
    static double broadened(double energy, LeadState lead) {
        double kt = PhysicalConstants.KB * lead.temperature();
        double x = Math.exp(-Math.abs(energy - lead.mu()) / kt);
        return x / (kt * (1 + x) * (1 + x));
    }

    /** Half the width of the energies at which the lead is neither full nor empty, eV. */
    static double reach(LeadState lead) {
        return REACH * PhysicalConstants.KB * lead.temperature();
    }
}
