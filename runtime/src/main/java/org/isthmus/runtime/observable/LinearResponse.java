package org.isthmus.runtime.observable;

import org.isthmus.runtime.solve.EnergySolution;

/** ∫ T(a→b)(E − µ_a)ⁿ(−df_a/dE) dE for all b at once, n = 0 and 1. */
final class LinearResponse {
    private LinearResponse() {}

    /** n = 0, a number. From a lead to itself: to all the others. */
    static double passing(Bench bench, int from, int to) {
        return moments(bench, from)[to];
    }

    /** n = 1, eV. */
    static double heat(Bench bench, int from, int to) {
        return moments(bench, from)[bench.leads() + to];
    }

    private static double[] moments(Bench bench, int from) {
        int n = bench.leads();
        double mu = bench.lead(from).mu();
        String what = "linear response of " + bench.device().leads().get(from).name();
        return bench.once(
                what,
                () -> bench.linearResponse(what, from, energy -> {
                    EnergySolution solution = bench.at(energy);
                    double[] values = new double[2 * n];
                    for (int to = 0; to < n; to++) {
                        if (to != from) {
                            double passing = solution.transmission(from, to);
                            values[to] = passing;
                            values[from] += passing;
                            values[n + to] = (energy - mu) * passing;
                            values[n + from] += (energy - mu) * passing;
                        }
                    }
                    return values;
                }));
    }
}
