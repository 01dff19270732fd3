package org.isthmus.runtime.measure;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.HexFormat;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.TreeSet;
import java.util.concurrent.CancellationException;
import java.util.concurrent.ConcurrentHashMap;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ForkJoinPool;
import java.util.concurrent.atomic.AtomicLong;
import java.util.concurrent.atomic.LongAdder;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.DeviceFamily;
import org.isthmus.runtime.device.ExpectedValue;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.Measurement;
import org.isthmus.runtime.device.Measurement.AdaptiveEnergies;
import org.isthmus.runtime.device.Measurement.Expectation;
import org.isthmus.runtime.device.Severity;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.observable.Bench;
import org.isthmus.runtime.plan.Planner;
import org.isthmus.runtime.plan.SolvePlan;
import org.isthmus.runtime.result.DeviceDigest;
import org.isthmus.runtime.result.MeasurementResult;
import org.isthmus.runtime.result.ResultTable;
import org.isthmus.runtime.result.Verdict;
import org.isthmus.runtime.selfenergy.Contact;
import org.isthmus.runtime.solve.SolveFailure;
import org.isthmus.runtime.solve.Solver;
import org.isthmus.runtime.solve.Solvers;

/**
 * Runs a measurement. Points are done side by side, and within a point its energies; every value is computed from its own
 * point alone and sums run in a fixed order, so results are the same, bit for bit, for any number of threads.
 */
public final class MeasurementRunner {
    private final ComplexBackend backend;
    private final int threads;

    public MeasurementRunner(ComplexBackend backend, int threads) {
        this.backend = backend;
        this.threads = threads;
    }

    /**
     * Runs.
     *
     * @param known findings of the check, kept with the result
     * @throws RunFailure where a point has no device or a solve failed
     * @throws InterruptedException where the calling thread is interrupted: the run is then cancelled
     */
    public MeasurementResult run(
            DeviceFamily family, Measurement measurement, List<Finding> known, RunListener listener)
            throws RunFailure, InterruptedException {
        Run run;
        try {
            run = new Run(family, measurement, listener);
        } catch (SolveFailure e) {
            throw failure(e, family, measurement);
        }
        long start = System.nanoTime();
        ForkJoinPool pool = new ForkJoinPool(threads);
        try {
            pool.submit(run::all).get();
        } catch (ExecutionException e) {
            throw failure(e.getCause(), family, measurement);
        } catch (InterruptedException e) {
            pool.shutdownNow();
            throw e;
        } finally {
            pool.shutdownNow();
        }
        double solving = (System.nanoTime() - start) / 1e9;
        return run.result(known, solving);
    }

    private static RunFailure failure(Throwable cause, DeviceFamily family, Measurement measurement) {
        Throwable root = cause;
        while (root.getCause() != null && !(root instanceof NoDevice) && !(root instanceof SolveFailure)) {
            root = root.getCause();
        }
        if (root instanceof OutOfMemoryError error) {
            throw error;
        }
        if (root instanceof NoDevice none) {
            return new RunFailure(
                    "Device '" + family.name() + "' has errors at a point of measurement '" + measurement.name() + "'.",
                    none.findings,
                    cause);
        }
        String text = root instanceof SolveFailure
                ? root.getMessage()
                : root.getClass().getSimpleName() + ": " + root.getMessage();
        return new RunFailure("Measurement '" + measurement.name() + "': " + text, List.of(), cause);
    }

    private static final class NoDevice extends RuntimeException {
        private static final long serialVersionUID = 1;
        private final transient List<Finding> findings;

        NoDevice(List<Finding> findings) {
            super("a device has errors");
            this.findings = findings;
        }
    }

    /** One run of one measurement. */
    private final class Run {
        private final DeviceFamily family;
        private final Measurement measurement;
        private final RunListener listener;
        private final Grid grid;
        private final List<Request> recorded = new ArrayList<>();
        private final Map<ExpectedValue.Observed, Request> expected = new LinkedHashMap<>();
        private final Map<List<Double>, PointTask> tasks = new LinkedHashMap<>();
        private final Map<List<Double>, Device> devices = new ConcurrentHashMap<>();
        private final Map<Map<String, Double>, String> digests = new ConcurrentHashMap<>();
        private final Map<String, Double> shortfalls = new ConcurrentHashMap<>();
        private final AtomicLong done = new AtomicLong();
        private final LongAdder solves = new LongAdder();
        private long steps;
        private double residual;
        private double equationResidual;

        Run(DeviceFamily family, Measurement measurement, RunListener listener) {
            this.family = family;
            this.measurement = measurement;
            this.listener = listener;
            grid = new Grid(measurement);
            measurement.records().forEach(r -> recorded.add(new Request(r.call(), r.at(), grid)));
            for (Expectation expectation : measurement.expectations()) {
                collect(expectation.left());
                collect(expectation.right());
            }
            recorded.forEach(this::place);
            expected.values().forEach(this::place);
            steps = (twice() ? 2 : 1)
                    * tasks.values().stream()
                            .mapToLong(t -> 1 + t.axisEnergies())
                            .sum();
        }

        private void collect(ExpectedValue value) {
            if (value instanceof ExpectedValue.Observed observed) {
                expected.computeIfAbsent(observed, o -> new Request(o.call(), o.at(), grid));
            } else if (value instanceof ExpectedValue.Arithmetic arithmetic) {
                collect(arithmetic.left());
                collect(arithmetic.right());
            } else if (value instanceof ExpectedValue.Negated negated) {
                collect(negated.operand());
            } else if (value instanceof ExpectedValue.Applied applied) {
                applied.arguments().forEach(this::collect);
            } else if (value instanceof ExpectedValue.Reduced reduced) {
                collect(reduced.operand());
            } else if (value instanceof ExpectedValue.AxisValue axis
                    && !ExpectationCheck.knows(axis.axis(), measurement, grid)) {
                throw new SolveFailure("'" + axis.axis() + "' has no fixed points that an expectation could speak of.");
            }
        }

        private void place(Request request) {
            for (List<Double> point : grid.points(request.fixed())) {
                tasks.computeIfAbsent(point, p -> new PointTask(measurement, grid, p))
                        .add(request);
            }
        }

        /** Averages over adaptive energies: first every member finds its own, then all take values at all of them. */
        private boolean twice() {
            return measurement.energy() instanceof AdaptiveEnergies
                    && !measurement.averages().isEmpty();
        }

        void all() {
            points();
            if (twice()) {
                shareEnergies();
                points();
            }
        }

        /** What is averaged is taken at the same energies: those that any of its members asked for. */
        private void shareEnergies() {
            Map<List<Double>, TreeSet<Double>> shared = new HashMap<>();
            tasks.forEach((point, task) -> {
                TreeSet<Double> energies = shared.computeIfAbsent(notAveraged(point), p -> new TreeSet<>());
                for (double energy : task.axis()) {
                    energies.add(energy);
                }
            });
            tasks.forEach((point, task) -> {
                if (task.axis().length > 0) {
                    task.fix(shared.get(notAveraged(point)).stream()
                            .mapToDouble(e -> e)
                            .toArray());
                }
            });
        }

        private List<Double> notAveraged(List<Double> point) {
            List<Double> kept = new ArrayList<>();
            for (int k = 0; k < grid.axes(); k++) {
                if (!measurement.averages().contains(grid.name(k))) {
                    kept.add(point.get(k));
                }
            }
            return kept;
        }

        /** Points of equal device together, so that it is elaborated and planned once. */
        void points() {
            Map<Map<String, Double>, Map<List<Double>, PointTask>> byDevice = new LinkedHashMap<>();
            tasks.forEach((point, task) -> byDevice.computeIfAbsent(task.sweepValues(), v -> new LinkedHashMap<>())
                    .put(point, task));
            byDevice.entrySet().parallelStream().forEach(entry -> device(entry.getKey(), entry.getValue()));
        }

        private void device(Map<String, Double> values, Map<List<Double>, PointTask> members) {
            DeviceFamily.Elaborated elaborated = family.elaborate(values);
            if (!elaborated.ok()) {
                throw new NoDevice(elaborated.findings().stream()
                        .filter(f -> f.severity() == Severity.ERROR)
                        .toList());
            }
            Device device = adjusted(elaborated.device());
            for (Lead lead : device.leads()) {
                if (lead.floating()) {
                    throw new SolveFailure("Lead '" + lead.name() + "' floats, and floating leads are not solved yet.");
                }
            }
            digests.put(values, DeviceDigest.of(device));
            SolvePlan plan = Planner.plan(device);
            List<Contact> contacts = Solvers.contacts(device, backend);
            members.entrySet().parallelStream().forEach(entry -> {
                if (Thread.currentThread().isInterrupted()) {
                    throw new CancellationException("the run was cancelled");
                }
                devices.put(entry.getKey(), device);
                point(entry.getValue(), device, plan, contacts);
            });
        }

        private void point(PointTask task, Device device, SolvePlan plan, List<Contact> contacts) {
            try (Solver solver = Solvers.open(task.operatingPoint(device), plan, contacts, backend)) {
                Bench bench = new Bench(solver, measurement.accuracy());
                task.observe(bench, this::step);
                solves.add(bench.solves());
                bench.shortfalls().forEach((what, reached) -> shortfalls.merge(what, reached, Math::max));
                synchronized (this) {
                    residual = Math.max(residual, bench.conservationResidual());
                    equationResidual = Math.max(equationResidual, bench.equationResidual());
                }
            }
            step();
        }

        /** A point counts as one step more than the energies of its axis. */
        private void step() {
            listener.progress(done.incrementAndGet(), steps);
        }

        /** A measurement's temperature and electrochemical potential override every lead's. */
        private Device adjusted(Device device) {
            if (measurement.temperature().isEmpty() && measurement.mu().isEmpty()) {
                return device;
            }
            List<Lead> leads = device.leads().stream()
                    .map(lead -> lead.with(
                            measurement.temperature().orElse(lead.temperature()),
                            measurement.mu().orElse(lead.mu())))
                    .toList();
            return new Device(
                    device.name(),
                    device.lattice(),
                    device.sites(),
                    device.hoppings(),
                    device.overlaps(),
                    leads,
                    device.magneticField(),
                    device.parameters(),
                    device.source());
        }

        MeasurementResult result(List<Finding> known, double solving) {
            long start = System.nanoTime();
            List<ResultTable> tables = tasks.isEmpty()
                    ? List.of()
                    : new Tabulation(measurement, grid, new HashMap<>(devices)).tables(recorded);
            ExpectationCheck check = new ExpectationCheck(measurement, grid, expected);
            List<Verdict> verdicts =
                    measurement.expectations().stream().map(check::judge).toList();
            List<Finding> findings = new ArrayList<>(known);
            new java.util.TreeMap<>(shortfalls)
                    .forEach((what, reached) -> findings.add(new Finding(
                            "accuracy-not-reached",
                            Severity.WARNING,
                            "The integral over energy for '" + what + "' is good to " + reached + " only, not to "
                                    + measurement.accuracy()
                                    + "; ask for less with 'accuracy = …' or look for a state that no"
                                    + " lead broadens.",
                            measurement.source())));
            Map<String, Double> seconds = new LinkedHashMap<>();
            seconds.put("solving", solving);
            seconds.put("judging", (System.nanoTime() - start) / 1e9);
            return new MeasurementResult(
                    family.name(),
                    measurement.name(),
                    tables,
                    verdicts,
                    findings,
                    residual,
                    equationResidual,
                    digest(),
                    solves.sum(),
                    seconds);
        }

        /** One digest for all devices of the sweeps, in their order. */
        private String digest() {
            List<String> all = tasks.values().stream()
                    .map(PointTask::sweepValues)
                    .distinct()
                    .map(digests::get)
                    .toList();
            if (all.size() == 1) {
                return all.get(0);
            }
            return HexFormat.of()
                    .formatHex(DeviceDigest.sha256()
                            .digest(String.join("\n", all).getBytes(java.nio.charset.StandardCharsets.UTF_8)));
        }
    }
}
