package org.isthmus.runtime.observable;

import java.util.ArrayList;
import java.util.Collection;
import java.util.List;
import java.util.TreeSet;
import java.util.function.DoubleFunction;
import org.isthmus.runtime.solve.SolveFailure;

/**
 * Integrals of several functions over one energy window, by adaptive Gauss–Kronrod rules of 7 and 15 points (Kronrod
 * 1965; nodes and weights as in QUADPACK, Piessens et al. 1983).
 *
 * <p>Between two break points the energy is replaced by E = a + (b − a)s²(3 − 2s), so that the square-root behaviour of
 * transmissions and densities of states at mode openings does no harm. Intervals are refined in rounds; which ones does
 * not depend on the number of threads.
 */
final class EnergyIntegral {
    private static final double[] NODES = {
        0.991455371120812639206854697526329, 0.949107912342758524526189684047851,
        0.864864423359769072789712788640926, 0.741531185599394439863864773280788,
        0.586087235467691130294144845693013, 0.405845151377397166906606412076961,
        0.207784955007898467600689403773245, 0
    };
    private static final double[] KRONROD = {
        0.022935322010529224963732008058970, 0.063092092629978553290700663189204,
        0.104790010322250183839876322541518, 0.140653259715525918745189590510238,
        0.169004726639267902826583426598550, 0.190350578064785409913256402421014,
        0.204432940075298892414161999234649, 0.209482141084727828012999174891714
    };
    private static final double[] GAUSS = {
        0.129484966168869693270611432679082, 0.279705391489276667901467771423780,
        0.381830050505118944950369775488975, 0.417959183673469387755102040816327
    };

    private static final int MOST_EVALUATIONS = 400_000;
    private static final int PIECES = 6;

    private final Workers workers;
    private final double accuracy;

    EnergyIntegral(Workers workers, double accuracy) {
        this.workers = workers;
        this.accuracy = accuracy;
    }

    private record Interval(int segment, double from, double to, double[] integral, double[] error, double[] size) {}

    private record Node(double energy, double weight) {}

    /**
     * Integrates.
     *
     * @param breaks energies inside the window where the functions may be rough, in any order
     * @param functions values of all functions at an energy; called from several threads
     * @return an integral per function, each good to accuracy times the integral of its absolute value
     * @throws SolveFailure where that is not reached
     */
    double[] over(double lower, double upper, Collection<Double> breaks, DoubleFunction<double[]> functions) {
        List<double[]> segments = segments(lower, upper, breaks);
        List<Interval> open = new ArrayList<>();
        for (int s = 0; s < segments.size(); s++) {
            open.add(new Interval(s, 0, 1, null, null, null));
        }
        List<Interval> settled = new ArrayList<>();
        int evaluations = 0;
        while (true) {
            List<Interval> measured = measure(open, segments, functions);
            evaluations += 15 * measured.size();
            settled.addAll(measured);
            double[] target = target(settled);
            double[] error = sum(settled, Interval::error);
            if (within(error, target)) {
                return sum(settled, Interval::integral);
            }
            if (evaluations > MOST_EVALUATIONS) {
                throw new SolveFailure("An integral over energies from " + lower + " to " + upper
                        + " eV did not settle after " + evaluations + " solves; allow a larger 'accuracy' than "
                        + accuracy
                        + ", or a temperature above the width of the sharpest resonance.");
            }
            open = new ArrayList<>();
            List<Interval> kept = new ArrayList<>();
            for (Interval interval : settled) {
                if (rough(interval, target, settled.size())) {
                    double middle = (interval.from + interval.to) / 2;
                    open.add(new Interval(interval.segment, interval.from, middle, null, null, null));
                    open.add(new Interval(interval.segment, middle, interval.to, null, null, null));
                } else {
                    kept.add(interval);
                }
            }
            settled = kept;
            if (open.isEmpty()) {
                throw new SolveFailure("An integral over energies from " + lower + " to " + upper
                        + " eV cannot be refined any further; allow a larger 'accuracy' than " + accuracy + ".");
            }
        }
    }

    private static List<double[]> segments(double lower, double upper, Collection<Double> breaks) {
        TreeSet<Double> ends = new TreeSet<>();
        double nearest = 1e-12 * (1 + Math.abs(lower) + Math.abs(upper));
        ends.add(lower);
        ends.add(upper);
        for (int piece = 1; piece < PIECES; piece++) {
            ends.add(lower + (upper - lower) * piece / PIECES);
        }
        for (double at : breaks) {
            if (at > lower + nearest && at < upper - nearest) {
                ends.add(at);
            }
        }
        List<double[]> segments = new ArrayList<>();
        double from = lower;
        for (double end : ends) {
            if (end - from > nearest || end == upper && end > from) {
                segments.add(new double[] {from, end});
                from = end;
            }
        }
        return segments;
    }

    private List<Interval> measure(
            List<Interval> intervals, List<double[]> segments, DoubleFunction<double[]> functions) {
        List<Double> energies = new ArrayList<>();
        for (Interval interval : intervals) {
            for (Node node : nodes(interval, segments.get(interval.segment))) {
                energies.add(node.energy);
            }
        }
        List<double[]> values = workers.map(energies, functions::apply);
        List<Interval> measured = new ArrayList<>(intervals.size());
        int at = 0;
        for (Interval interval : intervals) {
            List<Node> nodes = nodes(interval, segments.get(interval.segment));
            measured.add(estimate(interval, nodes, values.subList(at, at + nodes.size())));
            at += nodes.size();
        }
        return measured;
    }

    /** From the left; the weight holds dE/ds but not the rule's own factor. */
    private static List<Node> nodes(Interval interval, double[] segment) {
        List<Node> nodes = new ArrayList<>(15);
        double middle = (interval.from + interval.to) / 2;
        double half = (interval.to - interval.from) / 2;
        for (int i = 0; i < 15; i++) {
            double x = i < 8 ? -NODES[i] : NODES[14 - i];
            double s = middle + half * x;
            double length = segment[1] - segment[0];
            nodes.add(new Node(segment[0] + length * s * s * (3 - 2 * s), half * length * 6 * s * (1 - s)));
        }
        return nodes;
    }

    private static Interval estimate(Interval interval, List<Node> nodes, List<double[]> values) {
        int n = values.get(0).length;
        double[] kronrod = new double[n];
        double[] gauss = new double[n];
        double[] size = new double[n];
        for (int i = 0; i < 15; i++) {
            int fold = i < 8 ? i : 14 - i;
            double weight = nodes.get(i).weight;
            double[] value = values.get(i);
            for (int c = 0; c < n; c++) {
                kronrod[c] += KRONROD[fold] * weight * value[c];
                size[c] += KRONROD[fold] * weight * Math.abs(value[c]);
                if (fold % 2 == 1) {
                    gauss[c] += GAUSS[fold / 2] * weight * value[c];
                }
            }
        }
        double[] error = new double[n];
        for (int c = 0; c < n; c++) {
            // the higher rule is far better than the difference says; QUADPACK's scaling
            double difference = Math.abs(kronrod[c] - gauss[c]);
            double scaled = size[c] == 0 ? 0 : size[c] * Math.min(1, Math.pow(200 * difference / size[c], 1.5));
            error[c] = Math.min(difference, scaled);
        }
        return new Interval(interval.segment, interval.from, interval.to, kronrod, error, size);
    }

    private double[] target(List<Interval> intervals) {
        double[] target = sum(intervals, Interval::size);
        for (int c = 0; c < target.length; c++) {
            target[c] *= accuracy;
        }
        return target;
    }

    private static boolean within(double[] error, double[] target) {
        for (int c = 0; c < error.length; c++) {
            if (error[c] > target[c]) {
                return false;
            }
        }
        return true;
    }

    /** An interval that has more than its share of the error allowed, and can still be halved. */
    private static boolean rough(Interval interval, double[] target, int intervals) {
        if (interval.to - interval.from < 1e-9) {
            return false;
        }
        for (int c = 0; c < target.length; c++) {
            if (interval.error[c] > target[c] / intervals) {
                return true;
            }
        }
        return false;
    }

    private interface Part {
        double[] of(Interval interval);
    }

    /** In the order of energies, so that the rounding is always the same. */
    private static double[] sum(List<Interval> intervals, Part part) {
        List<Interval> ordered = new ArrayList<>(intervals);
        ordered.sort((a, b) ->
                a.segment != b.segment ? Integer.compare(a.segment, b.segment) : Double.compare(a.from, b.from));
        double[] sum = new double[part.of(ordered.get(0)).length];
        for (Interval interval : ordered) {
            double[] values = part.of(interval);
            for (int c = 0; c < sum.length; c++) {
                sum[c] += values[c];
            }
        }
        return sum;
    }
}
