package org.isthmus.runtime.measure;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.Measurement;
import org.isthmus.runtime.device.Measurement.AdaptiveEnergies;
import org.isthmus.runtime.device.Measurement.BiasAxis;
import org.isthmus.runtime.device.Measurement.EnergyPoints;
import org.isthmus.runtime.device.Measurement.NoEnergies;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.observable.Bench;
import org.isthmus.runtime.solve.Needs;
import org.isthmus.runtime.solve.OperatingPoint;
import org.isthmus.runtime.solve.SolveFailure;

/** One point of the axes: the requests that want it, answered on one bench. */
final class PointTask {
    private static final int FIRST_ENERGIES = 33;
    /** Energies that are solved before values are taken from them: enough for any number of threads. */
    private static final int TOGETHER = 256;

    private static final int MOST_ENERGIES = 20_000;

    private final Measurement measurement;
    private final Grid grid;
    private final List<Double> point;
    private final List<Request> requests = new ArrayList<>();
    private double[] axis = new double[0];
    private boolean fixed;

    PointTask(Measurement measurement, Grid grid, List<Double> point) {
        this.measurement = measurement;
        this.grid = grid;
        this.point = point;
    }

    void add(Request request) {
        requests.add(request);
    }

    /** Values of the swept parameters at this point, by name. */
    Map<String, Double> sweepValues() {
        Map<String, Double> values = new TreeMap<>(measurement.settings());
        for (int k = 0; k < grid.axes(); k++) {
            if (!(grid.axis(k) instanceof BiasAxis)) {
                values.put(grid.name(k), point.get(k));
            }
        }
        return values;
    }

    OperatingPoint operatingPoint(Device device) {
        Map<String, Double> voltages = new HashMap<>();
        for (int k = 0; k < grid.axes(); k++) {
            if (grid.axis(k) instanceof BiasAxis bias) {
                voltages.put(bias.lead(), point.get(k));
            }
        }
        return Voltages.apply(device, voltages, measurement.drop());
    }

    /** Energies of a fixed axis that will be solved here; 0 where none has to be. */
    int axisEnergies() {
        return measurement.energy() instanceof EnergyPoints points && wantsAxis()
                ? points.values().size()
                : 0;
    }

    private boolean wantsAxis() {
        return requests.stream().anyMatch(this::onAxis);
    }

    private boolean onAxis(Request request) {
        return Double.isNaN(request.energy()) && request.resolved(hasEnergyAxis());
    }

    /** What the requests need of a solve: those that have values at energies, or those that are integrated. */
    private Needs needs(boolean resolved) {
        Needs needs = Needs.LEADS;
        for (Request request : requests) {
            if (request.resolved(hasEnergyAxis()) == resolved) {
                needs = needs.and(request.observable().needs());
            }
        }
        return needs;
    }

    /**
     * Takes the samples.
     *
     * @param solved told after each energy of a fixed axis, from any thread
     */
    void observe(Bench bench, Runnable solved) {
        Bench atEnergies = bench.asking(needs(true));
        Bench overEnergies = bench.asking(needs(false));
        axis = energies(atEnergies);
        alongAxis(atEnergies, measurement.energy() instanceof EnergyPoints ? solved : () -> {});
        for (Request request : requests) {
            if (!onAxis(request)) {
                boolean resolved = request.resolved(hasEnergyAxis());
                double energy = resolved ? request.energy() : Double.NaN;
                Bench used = resolved ? atEnergies : overEnergies;
                List<ObservableCall> columns = request.observable().columns(request.call(), bench.device());
                double[][] values = {at(used, request, columns, energy)};
                request.put(point, new Request.Sample(new double[] {energy}, values, columns.size()));
            }
        }
    }

    /** Some energies at a time for all requests, so that solutions need not be kept. */
    private void alongAxis(Bench bench, Runnable solved) {
        List<Request> wanted = requests.stream().filter(this::onAxis).toList();
        if (wanted.isEmpty()) {
            return;
        }
        if (axis.length == 0) {
            throw new SolveFailure("'" + wanted.get(0).call() + "' has a value per energy, but measurement '"
                    + measurement.name() + "' has no energy axis; add 'energy = …' or pick a point with 'at'.");
        }
        double[][][] values = new double[wanted.size()][axis.length][];
        for (int from = 0; from < axis.length; from += TOGETHER) {
            int to = Math.min(axis.length, from + TOGETHER);
            double[] some = Arrays.copyOfRange(axis, from, to);
            bench.announce(some, solved);
            for (int r = 0; r < values.length; r++) {
                Request request = wanted.get(r);
                List<ObservableCall> columns = request.observable().columns(request.call(), bench.device());
                for (int e = from; e < to; e++) {
                    values[r][e] = at(bench, request, columns, axis[e]);
                }
            }
            bench.forget(some);
        }
        for (int r = 0; r < values.length; r++) {
            Request request = wanted.get(r);
            int columns =
                    request.observable().columns(request.call(), bench.device()).size();
            request.put(point, new Request.Sample(axis, values[r], columns));
        }
    }

    private boolean hasEnergyAxis() {
        return !(measurement.energy() instanceof NoEnergies);
    }

    private static double[] at(Bench bench, Request request, List<ObservableCall> columns, double energy) {
        double[] all = null;
        for (int c = 0; c < columns.size(); c++) {
            double[] one = request.observable().values(bench, columns.get(c), energy);
            if (all == null) {
                all = new double[one.length * columns.size()];
            }
            System.arraycopy(one, 0, all, c * one.length, one.length);
        }
        return all == null ? new double[0] : all;
    }

    /** The energies at which values were taken along the axis. */
    double[] axis() {
        return axis;
    }

    /** Where values have to be taken from now on, instead of where the axis says. */
    void fix(double[] energies) {
        axis = energies;
        fixed = true;
    }

    private double[] energies(Bench bench) {
        if (fixed) {
            return axis;
        }
        if (measurement.energy() instanceof EnergyPoints points) {
            return points.values().stream().mapToDouble(e -> e).toArray();
        }
        return measurement.energy() instanceof AdaptiveEnergies adaptive ? adaptive(bench, adaptive) : new double[0];
    }

    /** Halves intervals until the straight line between neighbours is good to the tolerance at the middle of each. */
    private double[] adaptive(Bench bench, AdaptiveEnergies wanted) {
        List<Request> watched = requests.stream().filter(this::onAxis).toList();
        if (watched.isEmpty()) {
            return new double[0];
        }
        TreeMap<Double, double[]> known = new TreeMap<>();
        double[] first = new double[FIRST_ENERGIES];
        for (int k = 0; k < FIRST_ENERGIES; k++) {
            first[k] = wanted.lower() + (wanted.upper() - wanted.lower()) * k / (FIRST_ENERGIES - 1);
        }
        bench.announce(first);
        for (double energy : first) {
            known.put(energy, watch(bench, watched, energy));
        }
        List<double[]> open = new ArrayList<>();
        for (int k = 0; k + 1 < FIRST_ENERGIES; k++) {
            open.add(new double[] {first[k], first[k + 1]});
        }
        double narrowest = 1e-9 * (wanted.upper() - wanted.lower());
        while (!open.isEmpty() && known.size() < MOST_ENERGIES) {
            bench.announce(open.stream().mapToDouble(i -> 0.5 * (i[0] + i[1])).toArray());
            List<double[]> next = new ArrayList<>();
            for (double[] interval : open) {
                double middle = 0.5 * (interval[0] + interval[1]);
                double[] a = known.get(interval[0]);
                double[] b = known.get(interval[1]);
                double[] value = watch(bench, watched, middle);
                double error = 0;
                for (int c = 0; c < value.length; c++) {
                    double deviation = Math.abs(value[c] - 0.5 * (a[c] + b[c]));
                    error = Math.max(error, Double.isNaN(deviation) ? 0 : deviation);
                }
                known.put(middle, value);
                if (error > wanted.tolerance() && interval[1] - interval[0] > narrowest) {
                    next.add(new double[] {interval[0], middle});
                    next.add(new double[] {middle, interval[1]});
                }
            }
            open = next;
        }
        return known.keySet().stream().mapToDouble(e -> e).toArray();
    }

    private static double[] watch(Bench bench, List<Request> watched, double energy) {
        double[] all = new double[0];
        for (Request request : watched) {
            double[] one = at(bench, request, request.observable().columns(request.call(), bench.device()), energy);
            for (int k = 0; k < one.length; k++) {
                one[k] = request.observable().told(one[k], true);
            }
            int before = all.length;
            all = Arrays.copyOf(all, before + one.length);
            System.arraycopy(one, 0, all, before, one.length);
        }
        return all;
    }
}
