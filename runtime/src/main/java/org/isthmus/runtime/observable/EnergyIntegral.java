package org.isthmus.runtime.observable;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.function.DoubleFunction;

/**
 * Integrals over energy by adaptive Gauss–Kronrod panels (15 and 7 points; nodes from Piessens et al., QUADPACK, Springer
 * 1983). The first panels end at the break points; a substitution takes the square-root behaviour at mode openings away. Panels are halved, worst generation first, and summed in order, so that the result does not depend
 * on threads.
 */
final class EnergyIntegral {
    private static final double[] NODES = {
        0.991455371120812639206854697526329, 0.949107912342758524526189684047851,
        0.864864423359769072789712788640926, 0.741531185599394439863864773280788,
        0.586087235467691130294144838258730, 0.405845151377397166906606412076961,
        0.207784955007898467600689403773245, 0.000000000000000000000000000000000
    };
    private static final double[] KRONROD = {
        0.022935322010529224963732008058970, 0.063092092629978553290700663189204,
        0.104790010322250183839876322541518, 0.140653259715525918745189590510238,
        0.169004726639267902826583426598550, 0.190350578064785409913256402421014,
        0.204432940075298892414161999234649, 0.209482141084727828012999174891714
    };
    private static final double[] GAUSS = {
        0, 0.129484966168869693270611432679082,
        0, 0.279705391489276667901467771423780,
        0, 0.381830050505118944950369775488975,
        0, 0.417959183673469387755102040816327
    };
    /** Panels whose energies are solved before any of them is summed. */
    private static final int TOGETHER = 8;

    private static final int DEEPEST = 26;
    private static final int MOST_PANELS = 4000;

    private final Bench bench;

    /** Integrates over energies that the bench solves. */
    EnergyIntegral(Bench bench) {
        this.bench = bench;
    }

    /** Integrates along any line; nothing is announced. */
    static Result alongContour(List<Break> breaks, DoubleFunction<double[]> integrand, double accuracy, double floor) {
        return new EnergyIntegral(null).integrate(breaks, integrand, accuracy, floor);
    }

    /** A value with the error that was reached, relative to the largest component. */
    record Result(double[] values, double relativeError) {}

    /** A first panel's end. {@code rough} where the integrand may go like a square root. */
    record Break(double at, boolean rough) {}

    /** Part {@code from..to} of the way s = 0..1 through a first panel. */
    private record Panel(Break a, Break b, double from, double to, int depth) {
        /** E(s): square at one rough end, s²(3 − 2s) between two, a straight line between smooth ones. */
        double energy(double s) {
            double length = b.at() - a.at();
            if (a.rough() && b.rough()) {
                return a.at() + length * s * s * (3 - 2 * s);
            }
            if (a.rough()) {
                return a.at() + length * s * s;
            }
            return b.rough() ? b.at() - length * (1 - s) * (1 - s) : a.at() + length * s;
        }

        /** dE/ds. */
        double weight(double s) {
            double length = b.at() - a.at();
            if (a.rough() && b.rough()) {
                return length * 6 * s * (1 - s);
            }
            if (a.rough()) {
                return length * 2 * s;
            }
            return b.rough() ? length * 2 * (1 - s) : length;
        }

        double node(int k) {
            double x = k < 7 ? -NODES[k] : k == 7 ? 0 : NODES[14 - k];
            return 0.5 * (from + to) + 0.5 * (to - from) * x;
        }
    }

    private record Done(Panel panel, double[] value, double[] error, double[] size) {}

    /**
     * Integrates.
     *
     * @param breaks ascending, the window's ends among them
     * @param integrand vector at an energy; every energy is announced to the bench before
     * @param accuracy relative to the integral of the integrand's absolute value
     * @param floor an error that is small enough, whatever the accuracy: rounding of the integrand cannot be refined away
     */
    Result integrate(List<Break> breaks, DoubleFunction<double[]> integrand, double accuracy, double floor) {
        List<Panel> open = new ArrayList<>();
        for (int k = 0; k + 1 < breaks.size(); k++) {
            if (breaks.get(k + 1).at() > breaks.get(k).at()) {
                open.add(new Panel(breaks.get(k), breaks.get(k + 1), 0, 1, 0));
            }
        }
        int first = open.size();
        List<Done> done = new ArrayList<>();
        while (!open.isEmpty()) {
            for (int from = 0; from < open.size(); from += TOGETHER) {
                List<Panel> some = open.subList(from, Math.min(open.size(), from + TOGETHER));
                double[] energies = energies(some);
                if (bench != null) {
                    bench.announce(energies);
                }
                done.addAll(some.parallelStream()
                        .map(panel -> evaluate(panel, integrand))
                        .toList());
                if (bench != null) {
                    bench.forget(energies);
                }
            }
            open = new ArrayList<>();
            if (done.isEmpty() || done.get(0).value().length == 0 || done.size() > MOST_PANELS) {
                break;
            }
            double[] total = total(done, Done::size);
            double[] error = total(done, Done::error);
            double largest = Arrays.stream(total).max().orElse(0);
            List<Done> kept = new ArrayList<>();
            for (Done one : done) {
                boolean refine = false;
                for (int c = 0; c < total.length; c++) {
                    double allowed = Math.max(floor, accuracy * Math.max(total[c], 1e-6 * largest));
                    refine |= error[c] > allowed && one.error()[c] > allowed * share(one.panel()) / first;
                }
                if (refine && one.panel().depth() < DEEPEST) {
                    Panel p = one.panel();
                    double middle = 0.5 * (p.from() + p.to());
                    open.add(new Panel(p.a(), p.b(), p.from(), middle, p.depth() + 1));
                    open.add(new Panel(p.a(), p.b(), middle, p.to(), p.depth() + 1));
                } else {
                    kept.add(one);
                }
            }
            if (!open.isEmpty()) {
                done = kept;
            }
        }
        done.sort((x, y) -> {
            int order = Double.compare(x.panel().a().at(), y.panel().a().at());
            return order != 0
                    ? order
                    : Double.compare(x.panel().from(), y.panel().from());
        });
        double[] value = total(done, Done::value);
        double[] error = total(done, Done::error);
        double[] size = total(done, Done::size);
        double largest = Arrays.stream(size).max().orElse(0);
        double worst = 0;
        for (int c = 0; c < value.length; c++) {
            worst = Math.max(worst, error[c] <= floor ? 0 : error[c] / Math.max(size[c], 1e-6 * largest));
        }
        return new Result(value, worst);
    }

    /** A panel may err by its share of the first panel's length, so that all of them together stay within the accuracy. */
    private static double share(Panel panel) {
        return panel.to() - panel.from();
    }

    private static double[] energies(List<Panel> panels) {
        double[] energies = new double[15 * panels.size()];
        for (int p = 0; p < panels.size(); p++) {
            for (int k = 0; k < 15; k++) {
                energies[15 * p + k] = panels.get(p).energy(panels.get(p).node(k));
            }
        }
        return energies;
    }

    private static Done evaluate(Panel panel, DoubleFunction<double[]> integrand) {
        double[] kronrod = null;
        double[] gauss = null;
        double[] size = null;
        double half = 0.5 * (panel.to() - panel.from());
        for (int k = 0; k < 15; k++) {
            double s = panel.node(k);
            double[] value = integrand.apply(panel.energy(s));
            if (kronrod == null) {
                kronrod = new double[value.length];
                gauss = new double[value.length];
                size = new double[value.length];
            }
            int pair = Math.min(k, 14 - k);
            double wk = KRONROD[pair] * half * panel.weight(s);
            double wg = GAUSS[pair] * half * panel.weight(s);
            for (int c = 0; c < value.length; c++) {
                kronrod[c] += wk * value[c];
                gauss[c] += wg * value[c];
                size[c] += wk * Math.abs(value[c]);
            }
        }
        double[] error = new double[kronrod.length];
        for (int c = 0; c < error.length; c++) {
            double raw = Math.abs(kronrod[c] - gauss[c]);
            // QUADPACK's scaling: the Kronrod value is far better than the difference of the two
            double scaled = size[c] == 0 ? 0 : size[c] * Math.min(1, Math.pow(200 * raw / size[c], 1.5));
            error[c] = Math.max(Math.min(raw, scaled), 50 * Math.ulp(size[c]));
        }
        return new Done(panel, kronrod, error, size);
    }

    private static double[] total(List<Done> done, java.util.function.Function<Done, double[]> part) {
        if (done.isEmpty()) {
            return new double[0];
        }
        double[] sum = new double[part.apply(done.get(0)).length];
        for (Done one : done) {
            double[] values = part.apply(one);
            for (int c = 0; c < sum.length; c++) {
                sum[c] += values[c];
            }
        }
        return sum;
    }
}
