package org.isthmus.runtime.measure;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.atomic.AtomicLong;
import java.util.concurrent.atomic.AtomicReference;
import java.util.stream.IntStream;
import org.isthmus.runtime.device.AxisPosition;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.Measurement.AdaptiveEnergies;
import org.isthmus.runtime.device.Measurement.Drop;
import org.isthmus.runtime.device.Measurement.EnergyPoints;
import org.isthmus.runtime.device.Measurement.SweepAxis;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.device.SourceRef;
import org.isthmus.runtime.device.WideBandLead;
import org.isthmus.runtime.result.MeasurementResult;
import org.isthmus.runtime.result.ResultTable;
import org.isthmus.runtime.solve.TestDevices;
import org.junit.jupiter.api.Test;

class RunBehaviourTest {
    private static EnergyPoints energies(Double... values) {
        return new EnergyPoints(List.of(values), SourceRef.NONE);
    }

    private static List<String> headers(MeasurementResult result, String table) {
        return Runs.table(result, table).headers();
    }

    /** Columns and units as the result files promise them. */
    @Test
    void headersWithAnEnergyAxis() throws Exception {
        Device strip = TestDevices.strip(3, 2, s -> 0, 0);
        MeasurementResult result = Runs.of(strip)
                .at(300, -1)
                .bias("drain", 0.1)
                .energy(energies(-1.0, 0.0))
                .record("transmission", "dos", "ldos", "modes", "fano", "current", "occupation", "residual")
                .record("conductance", "density", "seebeck", "heatCurrent", "noise")
                .run();
        List<String> pairs = List.of("bias (V)", "energy (eV)", "source>drain", "drain>source");
        assertEquals(pairs, headers(result, "transmission"));
        assertEquals(pairs, headers(result, "fano"));
        assertEquals(List.of("bias (V)", "energy (eV)", "dos (1/eV)"), headers(result, "dos"));
        assertEquals(
                List.of("bias (V)", "energy (eV)", "x (nm)", "y (nm)", "z (nm)", "ldos (1/eV)"),
                headers(result, "ldos"));
        assertEquals(List.of("bias (V)", "energy (eV)", "source", "drain"), headers(result, "modes"));
        assertEquals(List.of("bias (V)", "energy (eV)", "source (A/eV)", "drain (A/eV)"), headers(result, "current"));
        assertEquals(
                List.of("bias (V)", "energy (eV)", "x (nm)", "y (nm)", "z (nm)", "occupation"),
                headers(result, "occupation"));
        assertEquals(List.of("bias (V)", "energy (eV)", "residual"), headers(result, "residual"));
        assertEquals(List.of("bias (V)", "source>drain (S)", "drain>source (S)"), headers(result, "conductance"));
        assertEquals(List.of("bias (V)", "x (nm)", "y (nm)", "z (nm)", "density"), headers(result, "density"));
        assertEquals(List.of("bias (V)", "source>drain (V/K)", "drain>source (V/K)"), headers(result, "seebeck"));
        assertEquals(List.of("bias (V)", "source (W)", "drain (W)"), headers(result, "heatCurrent"));
        assertEquals(
                List.of(
                        "bias (V)",
                        "source>source (A^2/Hz)",
                        "source>drain (A^2/Hz)",
                        "drain>source (A^2/Hz)",
                        "drain>drain (A^2/Hz)"),
                headers(result, "noise"));
        assertEquals(2 * 6, Runs.table(result, "ldos").rows().size());
        assertEquals(1, Runs.table(result, "conductance").rows().size());
    }

    @Test
    void headersWithoutAnEnergyAxis() throws Exception {
        MeasurementResult result = Runs.of(v -> TestDevices.level(v.get("h"), 0.01, 0.02))
                .at(300, 0)
                .axis(new SweepAxis("h", "", 1, List.of(0.0, 0.1), SourceRef.NONE))
                .bias("left", 0.0, 0.1)
                .bias("right", 0.0)
                .record("current", "fano", "residual")
                .run();
        assertEquals(
                List.of("h", "bias left (V)", "bias right (V)", "left (A)", "right (A)"), headers(result, "current"));
        assertEquals(
                List.of("h", "bias left (V)", "bias right (V)", "left>right", "right>left"), headers(result, "fano"));
        assertEquals(List.of("h", "bias left (V)", "bias right (V)", "residual"), headers(result, "residual"));
        double[][] keys = Runs.table(result, "current").rows().stream()
                .map(row -> new double[] {row[0], row[1]})
                .toArray(double[][]::new);
        assertArrayEquals(new double[][] {{0, 0}, {0, 0.1}, {0.1, 0}, {0.1, 0.1}}, keys);
        double[] fano = Runs.column(Runs.table(result, "fano"), "left>right");
        assertTrue(Double.isNaN(fano[0]), "no current, no Fano factor");
        assertTrue(Runs.column(Runs.table(result, "residual"), "residual")[1] < 1e-10);
    }

    /** Records of one observable at two energies share a table. */
    @Test
    void pickedPointsShareATable() throws Exception {
        ResultTable table = Runs.table(
                Runs.of(TestDevices.strip(2, 1, s -> 0, 0))
                        .record(new ObservableCall("ldos"), new AxisPosition(AxisPosition.ENERGY, 0.5, "0.5 eV"))
                        .record(new ObservableCall("ldos"), new AxisPosition(AxisPosition.ENERGY, 0, "0 eV"))
                        .run(),
                "ldos");
        assertEquals(List.of("energy (eV)", "x (nm)", "y (nm)", "z (nm)", "ldos (1/eV)"), table.headers());
        // 1/(2π|t| sin ka) per site and spin of an endless chain, E = −2t cos ka (closed form)
        assertEquals(1 / (Math.PI * 2 * Math.sqrt(1 - 0.0625)), table.rows().get(0)[4], 1e-12);
        assertEquals(1 / (Math.PI * 2), table.rows().get(2)[4], 1e-12);
    }

    /** Between the energies of an adaptive axis the straight line is good to the tolerance (Breit–Wigner line). */
    @Test
    void adaptiveEnergies() throws Exception {
        double[] narrow = {0.0, 1e-3};
        ResultTable table = Runs.of(TestDevices.level(0.0371, narrow[1], narrow[1]))
                .energy(new AdaptiveEnergies(-0.5, 0.5, 1e-3, SourceRef.NONE))
                .record("transmission")
                .table();
        double[] x = Runs.column(table, "energy (eV)");
        double[] y = Runs.column(table, "left>right");
        double worst = 0;
        for (int k = 0; k + 1 < x.length; k++) {
            assertTrue(x[k + 1] > x[k]);
            double middle = 0.5 * (x[k] + x[k + 1]);
            double line = 1e-6 / ((middle - 0.0371) * (middle - 0.0371) + 1e-6);
            worst = Math.max(worst, Math.abs(line - 0.5 * (y[k] + y[k + 1])));
        }
        assertTrue(worst < 1.5e-3, "off by " + worst);
        assertTrue(x.length < 400, x.length + " energies");
        assertEquals(1, java.util.Arrays.stream(y).max().orElseThrow(), 1e-3);
    }

    /** What is averaged shares its energies, also where each member would choose its own. */
    @Test
    void averageOverAdaptiveEnergies() throws Exception {
        ResultTable table = Runs.of(v -> TestDevices.level(0.1 * v.get("seed"), 0.01, 0.01))
                .axis(new SweepAxis("seed", "", 1, List.of(1.0, 2.0), SourceRef.NONE))
                .average("seed")
                .energy(new AdaptiveEnergies(0, 0.3, 0.02, SourceRef.NONE))
                .record("transmission")
                .table();
        assertEquals(
                List.of("energy (eV)", "left>right", "left>right +-", "right>left", "right>left +-"), table.headers());
        double before = Double.NEGATIVE_INFINITY;
        for (double[] row : table.rows()) {
            assertTrue(row[0] > before);
            before = row[0];
            double first = 1e-4 / ((row[0] - 0.1) * (row[0] - 0.1) + 1e-4);
            double second = 1e-4 / ((row[0] - 0.2) * (row[0] - 0.2) + 1e-4);
            assertEquals((first + second) / 2, row[1], 1e-12);
            // two values: deviation/√2 is half their distance
            assertEquals(Math.abs(first - second) / 2, row[2], 1e-12);
        }
    }

    /** The same bits for any number of threads, with everything at once. */
    @Test
    void threadsDoNotMatter() throws Exception {
        List<MeasurementResult> results = new ArrayList<>();
        for (int threads : new int[] {1, 2, 5}) {
            results.add(Runs.of(TestDevices.strip(5, 3, s -> 0.3 * (s % 4), 0.03))
                    .drop(Drop.LINEAR)
                    .bias("drain", 0.0, 0.2, 0.4)
                    .energy(new AdaptiveEnergies(-2, 0, 0.05, SourceRef.NONE))
                    .record("transmission", "dos", "conductance", "noise", "density", "heatCurrent", "residual")
                    .run(threads, RunListener.NONE));
        }
        for (ResultTable table : results.get(0).tables()) {
            for (MeasurementResult other : results) {
                ResultTable same = Runs.table(other, table.name());
                assertEquals(table.rows().size(), same.rows().size());
                for (int row = 0; row < table.rows().size(); row++) {
                    assertArrayEquals(table.rows().get(row), same.rows().get(row), 0.0, table.name());
                }
            }
        }
    }

    @Test
    void progressCountsEnergiesAndPoints() throws Exception {
        AtomicLong calls = new AtomicLong();
        AtomicLong total = new AtomicLong();
        Double[] grid = IntStream.range(0, 21).mapToObj(k -> 0.01 * k).toArray(Double[]::new);
        Runs.of(TestDevices.level(0, 0.01, 0.01))
                .energy(energies(grid))
                .record("transmission")
                .run(2, (done, all) -> {
                    calls.incrementAndGet();
                    total.set(all);
                });
        assertEquals(22, calls.get());
        assertEquals(22, total.get());
    }

    /** An interrupted run ends soon and gives no result. */
    @Test
    void interruption() throws Exception {
        CountDownLatch begun = new CountDownLatch(1);
        AtomicReference<Throwable> end = new AtomicReference<>();
        Double[] grid = IntStream.range(0, 20_000).mapToObj(k -> 1e-4 * k).toArray(Double[]::new);
        Thread run = new Thread(() -> {
            try {
                Runs.of(TestDevices.strip(40, 8, s -> 0, 0))
                        .energy(energies(grid))
                        .record("transmission")
                        .run(2, (done, total) -> begun.countDown());
            } catch (RunFailure | InterruptedException e) {
                end.set(e);
            }
        });
        run.start();
        begun.await();
        run.interrupt();
        run.join(10_000);
        assertTrue(end.get() instanceof InterruptedException, "ended with " + end.get());
    }

    /** What is not solved yet is refused by name, never passed over. */
    @Test
    void whatIsNotSolvedYet() {
        Device level = TestDevices.level(0, 0.01, 0.01);
        List<Lead> leads = new ArrayList<>(level.leads());
        leads.add(new WideBandLead("probe", 300, 0, true, List.of(0), List.of(0.01), SourceRef.NONE));
        refused("probe", Runs.of(Runs.with(level, leads)).record("conductance"));
        refused("bondCurrent", Runs.of(level).record("bondCurrent"));
        refused("resistance", Runs.of(level).record("resistance"));
        refused("poisson", Runs.of(level).drop(Drop.POISSON).bias("left", 0.1).record("current"));
        refused(
                "current(left, sigmaZ)",
                Runs.of(level)
                        .record(new ObservableCall(
                                "current",
                                List.of("left"),
                                List.of(1.0, 0.0, 0.0, 0.0, 0.0, 0.0, -1.0, 0.0),
                                "sigmaZ")));
        refused("energy", Runs.of(level).record("transmission"));
    }

    private static void refused(String name, Runs runs) {
        RunFailure failure = assertThrows(RunFailure.class, runs::run);
        assertTrue(failure.getMessage().contains(name), failure.getMessage());
        assertTrue(!failure.getMessage().contains("Exception"), failure.getMessage());
    }
}
