package org.isthmus.runtime.observable;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.concurrent.ConcurrentHashMap;
import java.util.concurrent.atomic.AtomicLong;
import java.util.concurrent.atomic.DoubleAccumulator;
import java.util.function.DoubleFunction;
import java.util.function.Supplier;
import java.util.stream.IntStream;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.LatticeLead;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;
import org.isthmus.runtime.solve.OperatingPoint.LeadState;
import org.isthmus.runtime.solve.Solver;

/**
 * A device at one operating point, ready to be observed. Every energy is solved once, whatever asks for it; what is
 * announced together is solved by as many threads as the caller's pool has.
 */
public final class Bench {
    private static final int FEWEST_PANELS = 6;

    /** Solutions with values for more sites than this are not kept. */
    private static final int MANY_SITES = 10_000;

    /** In kT: between two of them a Fermi function is as good as a polynomial for 15 points. */
    private static final double[] THERMAL_BREAKS = {-22, -12, -6, -2.5, 0, 2.5, 6, 12, 22};

    private final Solver solver;
    private final Needs needs;
    private final double accuracy;
    private final Store store;

    /**
     * Sets up, asking for no more than what goes between the leads.
     *
     * @param accuracy relative accuracy of integrals
     */
    public Bench(Solver solver, double accuracy) {
        this(solver, Needs.LEADS, accuracy, new Store());
    }

    private Bench(Solver solver, Needs needs, double accuracy, Store store) {
        this.solver = solver;
        this.needs = needs;
        this.accuracy = accuracy;
        this.store = store;
    }

    /** The same bench, with the same energies solved, whose solutions hold what is needed. */
    public Bench asking(Needs wanted) {
        return new Bench(solver, wanted, accuracy, store);
    }

    /** A solution and what was asked of it. */
    private record Known(EnergySolution solution, Needs needs) {
        boolean covers(Needs wanted) {
            return needs.and(wanted).equals(needs);
        }
    }

    /** What all views of one bench share. */
    private static final class Store {
        private final Map<Double, Known> solved = new ConcurrentHashMap<>();
        private final Map<String, double[]> integrals = new ConcurrentHashMap<>();
        private final AtomicLong solves = new AtomicLong();
        private final Map<String, Double> shortfalls = new ConcurrentHashMap<>();
        private final DoubleAccumulator conservation = new DoubleAccumulator(Math::max, 0);
        private final DoubleAccumulator equations = new DoubleAccumulator(Math::max, 0);
    }

    public Device device() {
        return solver.operatingPoint().device();
    }

    int leads() {
        return device().leads().size();
    }

    LeadState lead(int index) {
        return solver.operatingPoint().leads().get(index);
    }

    int index(String lead) {
        return device().leadIndex(lead).orElseThrow();
    }

    double degeneracy() {
        return device().degeneracy();
    }

    /** The solution at an energy. */
    public EnergySolution at(double energy) {
        Known known = store.solved.get(energy);
        if (known == null || !known.covers(needs)) {
            Needs all = known == null ? needs : known.needs().and(needs);
            known = new Known(solver.solve(energy, all), all);
            store.solves.incrementAndGet();
            store.equations.accumulate(known.solution().equationResidual());
            store.conservation.accumulate(violation(known.solution()));
            store.solved.put(energy, known);
        }
        return known.solution();
    }

    /** Solves energies that will be asked for, side by side. */
    public void announce(double[] energies) {
        announce(energies, () -> {});
    }

    /**
     * Solves energies that will be asked for, side by side.
     *
     * @param solved told after each, from any thread
     */
    public void announce(double[] energies, Runnable solved) {
        double[] distinct = Arrays.stream(energies).distinct().toArray();
        IntStream.range(0, distinct.length).parallel().forEach(k -> {
            at(distinct[k]);
            solved.run();
        });
    }

    /**
     * Lets go of what was solved at energies that are not needed again, where each solution holds values for very many sites:
     * some hundred of them would fill the memory.
     */
    public void forget(double[] energies) {
        if (needs.sites() && device().sites().count() > MANY_SITES) {
            for (double energy : energies) {
                store.solved.remove(energy);
            }
        }
    }

    /** Number of energies solved so far. */
    public long solves() {
        return store.solves.get();
    }

    /** Largest residual of any equation solved so far. */
    public double equationResidual() {
        return store.equations.get();
    }

    /**
     * Largest difference between what can flow at a lead, Tr[Γ_p A], and the transmissions that it is made of, over all
     * energies solved, relative to the largest such trace: zero but for rounding where no electron is lost.
     */
    public double conservationResidual() {
        return store.conservation.get();
    }

    private static double violation(EnergySolution solution) {
        double largest = 0;
        double violation = 0;
        for (int p = 0; p < solution.leadCount(); p++) {
            double sum = 0;
            for (int q = 0; q < solution.leadCount(); q++) {
                sum += solution.transmission(q, p);
            }
            largest = Math.max(largest, Math.abs(solution.spectralTrace(p)));
            violation = Math.max(violation, Math.abs(solution.spectralTrace(p) - sum));
        }
        return largest < 1e-14 ? 0 : violation / largest;
    }

    /** Integrals that did not reach the accuracy asked for, with what they reached. */
    public Map<String, Double> shortfalls() {
        return new TreeMap<>(store.shortfalls);
    }

    /** A set of integrals that several columns share: computed when first asked for. */
    double[] once(String integrals, Supplier<double[]> computed) {
        double[] known = store.integrals.get(integrals);
        if (known == null) {
            known = computed.get();
            store.integrals.put(integrals, known);
        }
        return known;
    }

    Solver solver() {
        return solver;
    }

    double accuracy() {
        return accuracy;
    }

    void shortfall(String what, double reached) {
        if (reached > 10 * accuracy) {
            store.shortfalls.merge(what, reached, Math::max);
        }
    }

    /**
     * Integral over the energies from lowest to highest, with mode openings and electrochemical potentials as break points.
     *
     * @param what for the message where the accuracy is not reached
     */
    double[] integral(String what, double lowest, double highest, DoubleFunction<double[]> integrand) {
        return integral(what, lowest, highest, 0, integrand);
    }

    /** The same; {@code floor} is an error that is small enough, whatever the accuracy. */
    double[] integral(String what, double lowest, double highest, double floor, DoubleFunction<double[]> integrand) {
        EnergyIntegral.Result result =
                new EnergyIntegral(this).integrate(breaks(lowest, highest), integrand, accuracy, floor);
        shortfall(what, result.relativeError());
        return result.values();
    }

    private List<EnergyIntegral.Break> breaks(double lowest, double highest) {
        double nearest = Math.min(1e-9 * (1 + Math.abs(highest) + Math.abs(lowest)), 1e-3 * (highest - lowest));
        TreeMap<Double, Boolean> breaks = new TreeMap<>();
        for (int p = 0; p < leads(); p++) {
            for (double width : THERMAL_BREAKS) {
                breaks.put(lead(p).mu() + width * Fermi.kT(lead(p)), false);
            }
        }
        breaks.put(lowest, false);
        breaks.put(highest, false);
        solver.modeOpenings().forEach(opening -> breaks.put(opening, true));
        for (double bound : solver.spectrumBounds()) {
            breaks.put(bound, true);
        }
        List<EnergyIntegral.Break> inside = new ArrayList<>();
        breaks.subMap(lowest, true, highest, true).forEach((at, rough) -> {
            EnergyIntegral.Break last = inside.isEmpty() ? null : inside.get(inside.size() - 1);
            if (last == null || at - last.at() > nearest) {
                inside.add(new EnergyIntegral.Break(at, rough));
            } else if (rough || at == highest) {
                double kept = at == highest ? highest : last.at();
                inside.set(inside.size() - 1, new EnergyIntegral.Break(kept, rough || last.rough()));
            }
        });
        return divided(inside);
    }

    /** At least so many panels that a feature between break points is seen. */
    private static List<EnergyIntegral.Break> divided(List<EnergyIntegral.Break> breaks) {
        int panels = breaks.size() - 1;
        int pieces = Math.max(1, (FEWEST_PANELS + panels - 1) / Math.max(1, panels));
        List<EnergyIntegral.Break> fine = new ArrayList<>();
        for (int k = 0; k < panels; k++) {
            fine.add(breaks.get(k));
            double length = breaks.get(k + 1).at() - breaks.get(k).at();
            for (int i = 1; i < pieces; i++) {
                fine.add(new EnergyIntegral.Break(breaks.get(k).at() + length * i / pieces, false));
            }
        }
        fine.add(breaks.get(panels));
        return fine;
    }

    /** Lowest and highest energy at which the leads' Fermi functions differ from their ends, within the spectrum. */
    double[] thermalWindow(double widthInKT) {
        double lowest = Double.POSITIVE_INFINITY;
        double highest = Double.NEGATIVE_INFINITY;
        for (int p = 0; p < leads(); p++) {
            double width = widthInKT * Fermi.kT(lead(p));
            lowest = Math.min(lowest, lead(p).mu() - width);
            highest = Math.max(highest, lead(p).mu() + width);
        }
        return within(lowest, highest);
    }

    /** The part of a window in which something can flow: lattice leads have no waves outside the spectrum. */
    private double[] within(double lowest, double highest) {
        if (device().leads().stream().anyMatch(lead -> !(lead instanceof LatticeLead))) {
            return new double[] {lowest, highest};
        }
        double[] bounds = solver.spectrumBounds();
        return new double[] {Math.max(lowest, bounds[0]), Math.min(highest, bounds[1])};
    }

    /**
     * ∫ weight(E)·(−df/dE) dE for a lead: at T = 0 the weight at its electrochemical potential.
     */
    double[] linearResponse(String what, int lead, DoubleFunction<double[]> weight) {
        LeadState state = lead(lead);
        if (state.temperature() == 0) {
            return weight.apply(state.mu());
        }
        double width = Fermi.TAIL * Fermi.kT(state);
        double[] window = within(state.mu() - width, state.mu() + width);
        if (!(window[1] > window[0])) {
            // the whole window lies outside the spectrum: nothing flows
            return new double[weight.apply(state.mu()).length];
        }
        return integral(what, window[0], window[1], energy -> {
            double[] values = weight.apply(energy).clone();
            double slope = Fermi.slope(state, energy);
            for (int c = 0; c < values.length; c++) {
                values[c] *= slope;
            }
            return values;
        });
    }
}
