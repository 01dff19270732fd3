package org.isthmus.runtime.observable;

import org.isthmus.runtime.solve.EnergySolution;

/**
 * How well a solution conserves current: the largest difference, over leads, between what a lead feeds into the body and
 * where that arrives, Tr[Γ_p A] − Σ_q T(q→p), relative to the largest flow that a lead feeds in; or the residual of the
 * solver's own equations where that is larger.
 */
final class Residual {
    static final String NAME = "residual";

    private Residual() {}

    static double of(EnergySolution solution) {
        double worst = 0;
        double largest = 0;
        for (int p = 0; p < solution.leadCount(); p++) {
            double arrived = 0;
            for (int q = 0; q < solution.leadCount(); q++) {
                arrived += solution.transmission(q, p);
            }
            double fed = solution.spectralTrace(p);
            worst = Math.max(worst, Math.abs(fed - arrived));
            largest = Math.max(largest, Math.abs(fed));
        }
        return Math.max(solution.equationResidual(), worst == 0 ? 0 : worst / largest);
    }
}
