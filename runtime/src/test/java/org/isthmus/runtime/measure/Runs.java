package org.isthmus.runtime.measure;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.OptionalDouble;
import java.util.function.Function;
import org.isthmus.runtime.device.AxisPosition;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.DeviceFamily;
import org.isthmus.runtime.device.ExpectedValue;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.Measurement;
import org.isthmus.runtime.device.Measurement.Axis;
import org.isthmus.runtime.device.Measurement.BiasAxis;
import org.isthmus.runtime.device.Measurement.Comparator;
import org.isthmus.runtime.device.Measurement.Drop;
import org.isthmus.runtime.device.Measurement.EnergyAxis;
import org.isthmus.runtime.device.Measurement.Expectation;
import org.isthmus.runtime.device.Measurement.NoEnergies;
import org.isthmus.runtime.device.Measurement.Recorded;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.device.SourceRef;
import org.isthmus.runtime.kernel.selection.Backends;
import org.isthmus.runtime.result.MeasurementResult;
import org.isthmus.runtime.result.ResultTable;

/** Measurements put together by hand, and run. */
public final class Runs {
    public static final double KB = 8.617333262e-5;
    public static final double Q = 1.602176634e-19;

    /** q²/h, S (exact SI constants of 2019). */
    public static final double G1 = Q * Q / 6.62607015e-34;

    private final Function<Map<String, Double>, Device> maker;
    private final List<Axis> axes = new ArrayList<>();
    private final List<Recorded> records = new ArrayList<>();
    private final List<Expectation> expectations = new ArrayList<>();
    private final List<String> averages = new ArrayList<>();
    private EnergyAxis energy = new NoEnergies();
    private OptionalDouble temperature = OptionalDouble.empty();
    private OptionalDouble mu = OptionalDouble.empty();
    private Drop drop = Drop.NONE;

    private Runs(Function<Map<String, Double>, Device> maker) {
        this.maker = maker;
    }

    public static Runs of(Device device) {
        return new Runs(values -> device);
    }

    public static Runs of(Function<Map<String, Double>, Device> maker) {
        return new Runs(maker);
    }

    /** The device with other states of its leads: temperature and mu in turn. */
    public static Device leads(Device device, double... states) {
        List<Lead> leads = new ArrayList<>();
        for (int p = 0; p < device.leads().size(); p++) {
            leads.add(device.leads().get(p).with(states[2 * p], states[2 * p + 1]));
        }
        return with(device, leads);
    }

    public static Device with(Device device, List<Lead> leads) {
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

    public Runs at(double kelvin, double electronvolt) {
        temperature = OptionalDouble.of(kelvin);
        mu = OptionalDouble.of(electronvolt);
        return this;
    }

    public Runs drop(Drop how) {
        drop = how;
        return this;
    }

    public Runs energy(EnergyAxis axis) {
        energy = axis;
        return this;
    }

    public Runs axis(Axis axis) {
        axes.add(axis);
        return this;
    }

    public Runs bias(String lead, Double... volts) {
        return axis(new BiasAxis(lead, List.of(volts), SourceRef.NONE));
    }

    public Runs average(String parameter) {
        averages.add(parameter);
        return this;
    }

    public Runs record(String... names) {
        for (String name : names) {
            record(new ObservableCall(name));
        }
        return this;
    }

    public Runs record(ObservableCall call, AxisPosition... at) {
        records.add(new Recorded(call, List.of(at), SourceRef.NONE));
        return this;
    }

    public Runs expect(
            ExpectedValue left, Comparator comparator, ExpectedValue right, double tolerance, boolean relative) {
        expectations.add(
                new Expectation(left, comparator, right, tolerance, relative, "", 1, "as written", SourceRef.NONE));
        return this;
    }

    public MeasurementResult run() throws RunFailure, InterruptedException {
        return run(2, RunListener.NONE);
    }

    public MeasurementResult run(int threads, RunListener listener) throws RunFailure, InterruptedException {
        DeviceFamily family = new DeviceFamily() {
            @Override
            public String name() {
                return "Test";
            }

            @Override
            public Elaborated elaborate(Map<String, Double> values) {
                return new Elaborated(maker.apply(values), List.of());
            }
        };
        Measurement measurement = new Measurement(
                "M",
                "Test",
                Map.of(),
                axes,
                averages,
                energy,
                temperature,
                mu,
                drop,
                Measurement.DEFAULT_ACCURACY,
                records,
                expectations,
                SourceRef.NONE);
        return new MeasurementRunner(Backends.standard(), threads).run(family, measurement, List.of(), listener);
    }

    /** The only table of a run with one record. */
    public ResultTable table() throws RunFailure, InterruptedException {
        return table(run(), records.get(0).call().observable());
    }

    /** A column of the only table. */
    public double[] column(String header) throws RunFailure, InterruptedException {
        return column(table(), header);
    }

    public static ResultTable table(MeasurementResult result, String name) {
        return result.tables().stream()
                .filter(t -> t.name().equals(name))
                .findFirst()
                .orElseThrow();
    }

    public static double[] column(ResultTable table, String header) {
        int at = table.headers().indexOf(header);
        if (at < 0) {
            throw new AssertionError("no '" + header + "' among " + table.headers());
        }
        return table.rows().stream().mapToDouble(row -> row[at]).toArray();
    }
}
