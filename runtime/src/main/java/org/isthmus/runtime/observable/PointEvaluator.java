package org.isthmus.runtime.observable;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.NavigableMap;
import java.util.TreeMap;
import java.util.TreeSet;
import java.util.concurrent.atomic.AtomicLong;
import java.util.concurrent.atomic.DoubleAccumulator;
import org.isthmus.runtime.device.Measurement;
import org.isthmus.runtime.device.Measurement.AdaptiveEnergies;
import org.isthmus.runtime.device.Measurement.EnergyPoints;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.observable.Observable.Integrand;
import org.isthmus.runtime.observable.Observable.Integrated;
import org.isthmus.runtime.observable.Observable.Resolved;
import org.isthmus.runtime.observable.Observable.Window;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;
import org.isthmus.runtime.solve.OperatingPoint.LeadState;
import org.isthmus.runtime.solve.SolveFailure;
import org.isthmus.runtime.solve.Solver;

/** Computes what is asked at one operating point. */
final class PointEvaluator {
    private static final int ADAPTIVE_START = 33;
    private static final int ADAPTIVE_MOST = 20_000;

    private final PointContext context;
    private final Workers workers;
    private final Runnable solvedOnAxis;
    private final AtomicLong solves = new AtomicLong();
    private final DoubleAccumulator residual = new DoubleAccumulator(Math::max, 0);

    /**
     * Makes an evaluator.
     *
     * @param solvedOnAxis told after each energy of the axis
     */
    PointEvaluator(Solver solver, Workers workers, double accuracy, Runnable solvedOnAxis) {
        context = new PointContext(solver, workers, accuracy);
        this.workers = workers;
        this.solvedOnAxis = solvedOnAxis;
    }

    /**
     * Computes.
     *
     * @param resolved calls wanted at each energy
     * @param energies of the axis
     * @param extra energies beside the axis
     * @param integrated calls of integrated observables
     */
    PointValues evaluate(
            Collection<ObservableCall> resolved,
            Measurement.EnergyAxis energies,
            Collection<Double> extra,
            Collection<ObservableCall> integrated) {
        NavigableMap<Double, Map<String, double[]>> values = new TreeMap<>();
        double[] axis = new double[0];
        if (!resolved.isEmpty()) {
            if (energies instanceof EnergyPoints points) {
                axis = points.values().stream().mapToDouble(e -> e).toArray();
                solveAll(Arrays.stream(axis).boxed().toList(), resolved, values, true);
            } else if (energies instanceof AdaptiveEnergies adaptive) {
                axis = adapt(adaptive, resolved, values);
            }
            solveAll(new ArrayList<>(new TreeSet<>(extra)), resolved, values, false);
        }
        Map<String, double[]> whole = integrate(integrated);
        return new PointValues(values, axis, whole, positions(), residual.get(), solves.get());
    }

    private double[] positions() {
        SiteTable sites = context.device().sites();
        double[] positions = new double[3 * sites.count()];
        for (int site = 0; site < sites.count(); site++) {
            positions[3 * site] = sites.x(site);
            positions[3 * site + 1] = sites.y(site);
            positions[3 * site + 2] = sites.z(site);
        }
        return positions;
    }

    private EnergySolution solve(double energy, Needs needs) {
        EnergySolution solution = context.solver().solve(energy, needs);
        solves.incrementAndGet();
        residual.accumulate(Residual.of(solution));
        return solution;
    }

    private void solveAll(
            List<Double> energies,
            Collection<ObservableCall> calls,
            NavigableMap<Double, Map<String, double[]>> values,
            boolean axis) {
        List<Double> open =
                energies.stream().distinct().filter(e -> !values.containsKey(e)).toList();
        Needs needs = needs(calls);
        List<Map<String, double[]>> found = workers.map(open, energy -> {
            Map<String, double[]> atEnergy = atEnergy(calls, solve(energy, needs));
            if (axis) {
                solvedOnAxis.run();
            }
            return atEnergy;
        });
        for (int i = 0; i < open.size(); i++) {
            values.put(open.get(i), found.get(i));
        }
    }

    private static Needs needs(Collection<ObservableCall> calls) {
        Needs needs = Needs.LEADS;
        for (ObservableCall call : calls) {
            if (!call.observable().equals(Residual.NAME)) {
                needs = needs.and(observable(call).needs());
            }
        }
        return needs;
    }

    private static Resolved observable(ObservableCall call) {
        return Observables.resolved(call.observable())
                .orElseThrow(() -> new SolveFailure("Observable '" + call.observable()
                        + "' has no values at single energies; record it without an energy axis."));
    }

    private Map<String, double[]> atEnergy(Collection<ObservableCall> calls, EnergySolution solution) {
        Map<String, double[]> values = new LinkedHashMap<>();
        for (ObservableCall call : calls) {
            values.put(
                    call.toString(),
                    call.observable().equals(Residual.NAME)
                            ? new double[] {Residual.of(solution)}
                            : observable(call).at(context, call, solution));
        }
        return values;
    }

    /** Adds energies until the middle of every interval is what a straight line between its ends says. */
    private double[] adapt(
            AdaptiveEnergies axis,
            Collection<ObservableCall> calls,
            NavigableMap<Double, Map<String, double[]>> values) {
        List<Double> open = new ArrayList<>();
        for (int i = 0; i < ADAPTIVE_START; i++) {
            open.add(axis.lower() + (axis.upper() - axis.lower()) * i / (ADAPTIVE_START - 1));
        }
        for (double opening : context.solver().modeOpenings()) {
            if (opening > axis.lower() && opening < axis.upper()) {
                open.add(opening);
            }
        }
        solveAll(open, calls, values, true);
        double narrowest = (axis.upper() - axis.lower()) * 1e-7;
        List<double[]> intervals = neighbours(values.navigableKeySet());
        while (!intervals.isEmpty()) {
            List<Double> middles =
                    intervals.stream().map(i -> (i[0] + i[1]) / 2).toList();
            solveAll(middles, calls, values, true);
            if (values.size() > ADAPTIVE_MOST) {
                throw new SolveFailure("More than " + ADAPTIVE_MOST + " energies from " + axis.lower() + " to "
                        + axis.upper() + " eV did not reach the tolerance of " + axis.tolerance()
                        + "; allow a larger one or a narrower range.");
            }
            List<double[]> rough = new ArrayList<>();
            for (double[] interval : intervals) {
                double middle = (interval[0] + interval[1]) / 2;
                if (interval[1] - interval[0] > narrowest
                        && !straight(
                                values.get(interval[0]),
                                values.get(middle),
                                values.get(interval[1]),
                                axis.tolerance())) {
                    rough.add(new double[] {interval[0], middle});
                    rough.add(new double[] {middle, interval[1]});
                }
            }
            intervals = rough;
        }
        return values.keySet().stream().mapToDouble(e -> e).toArray();
    }

    private static List<double[]> neighbours(Collection<Double> ascending) {
        List<double[]> intervals = new ArrayList<>();
        Double before = null;
        for (Double energy : ascending) {
            if (before != null) {
                intervals.add(new double[] {before, energy});
            }
            before = energy;
        }
        return intervals;
    }

    private static boolean straight(
            Map<String, double[]> left, Map<String, double[]> middle, Map<String, double[]> right, double tolerance) {
        for (Map.Entry<String, double[]> entry : middle.entrySet()) {
            double[] l = left.get(entry.getKey());
            double[] m = entry.getValue();
            double[] r = right.get(entry.getKey());
            for (int i = 0; i < m.length; i++) {
                if (Math.abs(m[i] - (l[i] + r[i]) / 2) > tolerance) {
                    return false;
                }
            }
        }
        return true;
    }

    private Map<String, double[]> integrate(Collection<ObservableCall> calls) {
        Map<String, double[]> results = new LinkedHashMap<>();
        List<ObservableCall> integrals = new ArrayList<>();
        List<Integrand> integrands = new ArrayList<>();
        Needs needs = Needs.LEADS;
        Window window = Window.EMPTY;
        int size = 0;
        for (ObservableCall call : calls) {
            if (call.observable().equals(Residual.NAME)) {
                continue;
            }
            Integrated observable = Observables.integrated(call.observable())
                    .orElseThrow(() -> new SolveFailure("Observable '" + call.observable()
                            + "' has values at single energies only; give the measurement an energy axis."));
            Integrand integrand = observable.integrand(context, call);
            integrals.add(call);
            integrands.add(integrand);
            needs = needs.and(integrand.needs());
            window = window.and(integrand.window());
            size += integrand.size();
        }
        double[] sums = new double[size];
        if (!window.empty()) {
            Needs all = needs;
            int functions = size;
            sums = new EnergyIntegral(workers, context.accuracy())
                    .over(window.lower(), window.upper(), breaks(integrands), energy -> {
                        EnergySolution solution = solve(energy, all);
                        double[] values = new double[functions];
                        int first = 0;
                        for (Integrand integrand : integrands) {
                            if (!integrand.window().empty()) {
                                integrand.functions().at(solution, values, first);
                            }
                            first += integrand.size();
                        }
                        return values;
                    });
        }
        int first = 0;
        for (int i = 0; i < integrals.size(); i++) {
            Integrand integrand = integrands.get(i);
            List<EnergySolution> points = workers.map(integrand.points(), e -> solve(e, integrand.needs()));
            double[] own = Arrays.copyOfRange(sums, first, first + integrand.size());
            first += integrand.size();
            results.put(integrals.get(i).toString(), integrand.finish().values(own, points));
        }
        if (calls.stream().anyMatch(c -> c.observable().equals(Residual.NAME))) {
            if (solves.get() == 0) {
                context.leads().stream().map(LeadState::mu).distinct().forEach(mu -> solve(mu, Needs.LEADS));
            }
            results.put(Residual.NAME, new double[] {residual.get()});
        }
        return results;
    }

    private List<Double> breaks(List<Integrand> integrands) {
        List<Double> breaks = new ArrayList<>(context.solver().modeOpenings());
        for (Integrand integrand : integrands) {
            breaks.add(integrand.window().lower());
            breaks.add(integrand.window().upper());
        }
        for (LeadState lead : context.leads()) {
            breaks.add(lead.mu());
            double reach = Occupation.reach(lead) / Occupation.REACH;
            for (double kts : new double[] {-12, -4, 4, 12}) {
                breaks.add(lead.mu() + kts * reach);
            }
        }
        return breaks;
    }
}
