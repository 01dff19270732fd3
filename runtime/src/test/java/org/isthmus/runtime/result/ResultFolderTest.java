package org.isthmus.runtime.result;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.google.gson.JsonObject;
import com.google.gson.JsonParser;
import io.jhdf.HdfFile;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.stream.Stream;
import org.isthmus.runtime.device.AxisPosition;
import org.isthmus.runtime.device.ExpectedValue;
import org.isthmus.runtime.device.Measurement.Comparator;
import org.isthmus.runtime.device.Measurement.EnergyPoints;
import org.isthmus.runtime.device.Measurement.SweepAxis;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.device.SourceRef;
import org.isthmus.runtime.measure.Runs;
import org.isthmus.runtime.solve.TestDevices;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class ResultFolderTest {
    private static final Provenance PROVENANCE = new Provenance(
            "isthmus test", "device Test", Map.of("a.isth", "00"), Map.of("accuracy", "1e-8"), "pure", 2);

    @TempDir
    Path out;

    private static Runs spectrum() {
        return Runs.of(v -> TestDevices.level(v.get("height"), 0.01, 0.02))
                .axis(new SweepAxis("height", "meV", 1e-3, List.of(0.0, 0.05), SourceRef.NONE))
                .energy(new EnergyPoints(List.of(0.0, 0.1), SourceRef.NONE))
                .record("transmission", "conductance")
                .expect(
                        new ExpectedValue.Observed(
                                new ObservableCall("transmission", "left", "right"),
                                List.of(new AxisPosition(AxisPosition.ENERGY, 0, "0 eV"))),
                        Comparator.AT_LEAST,
                        new ExpectedValue.Number(0.5),
                        0,
                        false);
    }

    private List<String> names(Path folder) throws IOException {
        try (Stream<Path> files = Files.list(folder)) {
            return files.map(f -> f.getFileName().toString()).sorted().toList();
        }
    }

    @Test
    void filesOfAResult() throws Exception {
        MeasurementResult result = spectrum().run();
        Path folder = ResultFolder.write(out, result, PROVENANCE, Map.of("report.html", "<p>"));
        assertEquals(out.resolve("Test.M"), folder);
        assertEquals(
                List.of("conductance.csv", "report.html", "result.h5", "result.json", "transmission.csv"),
                names(folder));
        assertEquals(List.of("Test.M"), names(out));
        List<String> lines = Files.readAllLines(folder.resolve("transmission.csv"));
        assertEquals("height (meV),energy (eV),left>right,right>left", lines.get(0));
        // ΓΓ'/(Γ/2 + Γ'/2)² = 8/9 on resonance (Breit and Wigner)
        assertTrue(lines.get(1).startsWith("0,0,0.888888888888"), lines.get(1));
        assertTrue(lines.get(2).startsWith("0,0.1,"), lines.get(2));
        assertTrue(lines.get(3).startsWith("50,0,"), lines.get(3));
        assertEquals(5, lines.size());
        assertEquals(
                "height (meV),left>right (S),right>left (S)",
                Files.readAllLines(folder.resolve("conductance.csv")).get(0));
        JsonObject json = JsonParser.parseString(Files.readString(folder.resolve("result.json")))
                .getAsJsonObject();
        JsonObject expectation = json.getAsJsonArray("expectations").get(0).getAsJsonObject();
        assertEquals("broken", expectation.get("verdict").getAsString());
        assertEquals(0.5, expectation.get("wanted").getAsDouble());
        double measured = expectation.get("measured").getAsDouble();
        assertEquals(2e-4 / (0.0025 + 0.000225), measured, 1e-12);
        assertEquals(measured - 0.5, expectation.get("difference").getAsDouble(), 1e-15);
        assertEquals("height (meV) = 50", expectation.get("at").getAsString());
        assertTrue(json.get("residual").getAsDouble() < 1e-12);
        assertTrue(json.getAsJsonArray("cautions").size() > 0);
    }

    @Test
    void arraysHoldTheColumns() throws Exception {
        MeasurementResult result = spectrum().run();
        Path folder = ResultFolder.write(out, result, PROVENANCE, Map.of());
        byte[] first = Files.readAllBytes(folder.resolve("result.h5"));
        try (HdfFile file = new HdfFile(folder.resolve("result.h5"))) {
            assertArrayEquals(new double[] {0, 0, 50, 50}, (double[])
                    file.getDatasetByPath("/transmission/height").getData());
            assertEquals(
                    "meV",
                    file.getDatasetByPath("/transmission/height")
                            .getAttribute("unit")
                            .getData());
            assertArrayEquals(Runs.column(Runs.table(result, "conductance"), "left>right (S)"), (double[])
                    file.getDatasetByPath("/conductance/left>right").getData());
        }
        ResultFolder.write(out, spectrum().run(), PROVENANCE, Map.of());
        assertArrayEquals(first, Files.readAllBytes(folder.resolve("result.h5")));
    }

    @Test
    void anEarlierResultGoesOnlyWhenTheNewOneStands() throws Exception {
        MeasurementResult result = spectrum().run();
        Path folder = ResultFolder.write(out, result, PROVENANCE, Map.of("old.txt", "old"));
        assertThrows(
                IOException.class,
                () -> ResultFolder.write(out, result, PROVENANCE, Map.of("missing/folder.txt", "cannot be written")));
        assertEquals(List.of("Test.M"), names(out));
        assertEquals("old", Files.readString(folder.resolve("old.txt")));
        ResultFolder.write(out, result, PROVENANCE, Map.of());
        assertEquals(List.of("Test.M"), names(out));
        assertTrue(Files.notExists(folder.resolve("old.txt")));
    }
}
