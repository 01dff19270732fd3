package org.isthmus.runtime.measure;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.OptionalDouble;
import org.apache.commons.math3.analysis.integration.SimpsonIntegrator;
import org.isthmus.runtime.device.AxisPosition;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.DeviceFamily;
import org.isthmus.runtime.device.ExpectedValue;
import org.isthmus.runtime.device.Measurement;
import org.isthmus.runtime.device.Measurement.Axis;
import org.isthmus.runtime.device.Measurement.BiasAxis;
import org.isthmus.runtime.device.Measurement.Comparator;
import org.isthmus.runtime.device.Measurement.Drop;
import org.isthmus.runtime.device.Measurement.EnergyAxis;
import org.isthmus.runtime.device.Measurement.EnergyPoints;
import org.isthmus.runtime.device.Measurement.Expectation;
import org.isthmus.runtime.device.Measurement.NoEnergies;
import org.isthmus.runtime.device.Measurement.Recorded;
import org.isthmus.runtime.device.Measurement.SweepAxis;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.device.SourceRef;
import org.isthmus.runtime.kernel.selection.Backends;
import org.isthmus.runtime.result.MeasurementResult;
import org.isthmus.runtime.result.ResultTable;
import org.isthmus.runtime.solve.TestDevices;
import org.junit.jupiter.api.Test;

class MeasurementRunnerTest {
    private static final double KB = 8.617333262e-5;
    private static final double G0 = 7.748091729e-5;

    private static DeviceFamily family(java.util.function.Function<Map<String, Double>, Device> maker) {
        return new DeviceFamily() {
            @Override
            public String name() {
                return "Test";
            }

            @Override
            public Elaborated elaborate(Map<String, Double> values) {
                return new Elaborated(maker.apply(values), List.of());
            }
        };
    }

    private static Measurement measurement(
            List<Axis> axes,
            EnergyAxis energy,
            double temperature,
            double mu,
            List<String> averages,
            List<Expectation> expectations,
            String... records) {
        List<Recorded> recorded = new ArrayList<>();
        for (String name : records) {
            recorded.add(new Recorded(new ObservableCall(name), List.of(), SourceRef.NONE));
        }
        return new Measurement(
                "M",
                "Test",
                Map.of(),
                axes,
                averages,
                energy,
                OptionalDouble.of(temperature),
                OptionalDouble.of(mu),
                Drop.NONE,
                1e-9,
                recorded,
                expectations,
                SourceRef.NONE);
    }

    private static MeasurementResult run(DeviceFamily family, Measurement measurement, int threads) throws Exception {
        return new MeasurementRunner(Backends.standard(), threads)
                .run(family, measurement, List.of(), RunListener.NONE);
    }

    private static ResultTable table(MeasurementResult result, String name) {
        return result.tables().stream()
                .filter(t -> t.name().equals(name))
                .findFirst()
                .orElseThrow();
    }

    private static double line(double energy) {
        return 0.01 * 0.02 / ((energy - 0.05) * (energy - 0.05) + 0.015 * 0.015);
    }

    /** I = (gq/h)·ΓΓ'/((Γ+Γ')/2)·[atan] at T = 0 for one level (closed form of the Breit–Wigner line); here g = 1. */
    @Test
    void currentThroughALevelAtZeroTemperature() throws Exception {
        DeviceFamily family = family(v -> TestDevices.level(0.05, 0.01, 0.02));
        MeasurementResult result = run(
                family,
                measurement(
                        List.of(new BiasAxis("left", List.of(-0.2, 0.1), SourceRef.NONE)),
                        new NoEnergies(),
                        0,
                        0,
                        List.of(),
                        List.of(),
                        "current",
                        "noise"),
                2);
        ResultTable current = table(result, "current");
        assertEquals(List.of("bias (V)", "left (A)", "right (A)"), current.headers());
        for (double[] row : current.rows()) {
            double low = Math.min(0, -row[0]);
            double high = Math.max(0, -row[0]);
            double integral =
                    0.01 * 0.02 / 0.015 * (Math.atan((high - 0.05) / 0.015) - Math.atan((low - 0.05) / 0.015));
            double expected = Math.signum(row[0]) * G0 / 2 * integral;
            assertEquals(expected, row[1], 1e-9 * Math.abs(expected));
            assertEquals(-row[1], row[2], 1e-20);
        }
        // shot noise S = (2 q²/h)·g ∫ T(1 − T) dE at T = 0 (Büttiker 1990)
        double[] row = table(result, "noise").rows().get(0);
        double shot = 2
                * (G0 / 2)
                * 1.602176634e-19
                * new SimpsonIntegrator().integrate(1_000_000, e -> line(e) * (1 - line(e)), 0, 0.2);
        assertEquals(shot, row[1], 1e-6 * shot);
        assertEquals(-shot, row[2], 1e-6 * shot);
        assertTrue(result.residual() < 1e-12);
    }

    /** Linear response at T > 0, equilibrium noise 4kTG, and the Seebeck coefficient against quadrature of the line. */
    @Test
    void linearResponseOfALevel() throws Exception {
        DeviceFamily family = family(v -> TestDevices.level(0.05, 0.01, 0.02));
        MeasurementResult result = run(
                family,
                measurement(
                        List.of(),
                        new NoEnergies(),
                        80,
                        0,
                        List.of(),
                        List.of(),
                        "conductance",
                        "seebeck",
                        "noise",
                        "density"),
                1);
        double kT = KB * 80;
        SimpsonIntegrator simpson = new SimpsonIntegrator(1e-10, 1e-14, 5, 60);
        double l0 = simpson.integrate(
                10_000_000, e -> line(e) / (4 * kT * Math.pow(Math.cosh(e / (2 * kT)), 2)), -0.25, 0.25);
        double l1 = simpson.integrate(
                10_000_000, e -> e * line(e) / (4 * kT * Math.pow(Math.cosh(e / (2 * kT)), 2)), -0.25, 0.25);
        double conductance = table(result, "conductance").rows().get(0)[0];
        assertEquals(G0 / 2 * l0, conductance, 1e-8 * conductance);
        assertEquals(-l1 / (80 * l0), table(result, "seebeck").rows().get(0)[0], 1e-10);
        // Johnson and Nyquist, Phys. Rev. 32, 97 and 110 (1928)
        assertEquals(
                4 * 1.380649e-23 * 80 * conductance,
                table(result, "noise").rows().get(0)[0],
                1e-7 * 4 * 1.380649e-23 * 80 * conductance);
        double filled = simpson.integrate(
                        10_000_000,
                        e -> 0.03 / ((e - 0.05) * (e - 0.05) + 0.015 * 0.015) / (2 * Math.PI) / (1 + Math.exp(e / kT)),
                        -3,
                        0.3)
                + 0.03 / (2 * Math.PI) / 3.05;
        assertEquals(filled, table(result, "density").rows().get(0)[3], 1e-5);
    }

    /** A half-filled chain holds g/2 electrons per site (particle–hole symmetry). */
    @Test
    void aHalfFilledChain() throws Exception {
        DeviceFamily family = family(v -> TestDevices.strip(6, 1, s -> 0, 0));
        for (double temperature : new double[] {0, 4, 300}) {
            MeasurementResult result = run(
                    family,
                    measurement(List.of(), new NoEnergies(), temperature, 0, List.of(), List.of(), "density"),
                    1);
            table(result, "density").rows().forEach(row -> assertEquals(0.5, row[3], 1e-7, "at " + temperature + " K"));
        }
    }

    @Test
    void sweepsNestAveragesReduceAndThreadsDoNotMatter() throws Exception {
        DeviceFamily family = family(v -> TestDevices.level(v.get("level"), 0.01 * v.get("seed"), 0.02));
        Measurement m = measurement(
                List.of(
                        new SweepAxis("level", "eV", 1, List.of(0.0, 0.05), SourceRef.NONE),
                        new SweepAxis("seed", "", 1, List.of(1.0, 2.0, 3.0), SourceRef.NONE)),
                new EnergyPoints(List.of(0.0, 0.1), SourceRef.NONE),
                300,
                0,
                List.of("seed"),
                List.of(expect(Comparator.AT_LEAST, 0.5)),
                "transmission");
        MeasurementResult one = run(family, m, 1);
        MeasurementResult two = run(family, m, 2);
        ResultTable table = table(one, "transmission");
        assertEquals(
                List.of("level (eV)", "energy (eV)", "left>right", "left>right +-", "right>left", "right>left +-"),
                table.headers());
        assertEquals(4, table.rows().size());
        double[] values = {0.01, 0.02, 0.03};
        double[] t = new double[3];
        for (int k = 0; k < 3; k++) {
            t[k] = values[k] * 0.02 / Math.pow((values[k] + 0.02) / 2, 2);
        }
        double mean = (t[0] + t[1] + t[2]) / 3;
        double deviation = Math.sqrt(
                ((t[0] - mean) * (t[0] - mean) + (t[1] - mean) * (t[1] - mean) + (t[2] - mean) * (t[2] - mean)) / 2);
        assertEquals(mean, table.rows().get(0)[2], 1e-12);
        assertEquals(deviation / Math.sqrt(3), table.rows().get(0)[3], 1e-12);
        for (int r = 0; r < 4; r++) {
            assertArrayEquals(
                    table.rows().get(r), table(two, "transmission").rows().get(r), 0.0);
        }
        assertFalse(one.held());
        assertEquals("level (eV) = 0, energy (eV) = 0.1", one.verdicts().get(0).at());
    }

    private static Expectation expect(Comparator comparator, double value) {
        return new Expectation(
                new ExpectedValue.Observed(new ObservableCall("transmission", "left", "right"), List.of()),
                comparator,
                new ExpectedValue.Number(value),
                0,
                false,
                "",
                1,
                "transmission(left, right) >= 0.5",
                SourceRef.NONE);
    }

    @Test
    void pointsPickedWithAtAreSolvedExactlyThere() throws Exception {
        DeviceFamily family = family(v -> TestDevices.level(0.05, 0.01, 0.02));
        Expectation expectation = new Expectation(
                new ExpectedValue.Observed(
                        new ObservableCall("transmission", "left", "right"),
                        List.of(new AxisPosition(AxisPosition.ENERGY, 0.0512345, "0.0512345 eV"))),
                Comparator.EQUAL,
                new ExpectedValue.Number(line(0.0512345)),
                1e-13,
                false,
                "",
                1,
                "t",
                SourceRef.NONE);
        MeasurementResult result = run(
                family,
                measurement(
                        List.of(),
                        new EnergyPoints(List.of(0.0, 0.1), SourceRef.NONE),
                        300,
                        0,
                        List.of(),
                        List.of(expectation)),
                1);
        assertTrue(result.held(), result.verdicts().get(0).sentence());
    }
}
