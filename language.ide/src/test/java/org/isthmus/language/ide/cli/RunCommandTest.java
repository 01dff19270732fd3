package org.isthmus.language.ide.cli;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.google.gson.JsonObject;
import com.google.gson.JsonParser;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.attribute.FileTime;
import java.util.List;
import java.util.TreeMap;
import java.util.stream.Stream;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class RunCommandTest {
    @TempDir
    Path folder;

    private Path out;

    @BeforeEach
    void place() {
        out = folder.resolve("where results go");
    }

    private Path file(String name, String... texts) throws Exception {
        return Files.writeString(folder.resolve(name), String.join("\n", texts));
    }

    @Test
    void writesWhatWasRecordedAndSaysWhere() throws Exception {
        Path file = file("wire.isth", TestFiles.WIRE, TestFiles.SPECTRUM);
        CommandLineRun run = CommandLineRun.of("run", file, "--out", out);
        assertEquals(0, run.status(), run.err());
        Path result = out.resolve("Wire.Spectrum");
        List<String> transmission = Files.readAllLines(result.resolve("transmission.csv"));
        assertEquals("energy (eV),source>drain,drain>source", transmission.get(0));
        assertEquals(32, transmission.size());
        assertEquals(
                "energy (eV),dos (1/eV)",
                Files.readAllLines(result.resolve("dos.csv")).get(0));
        assertTrue(run.out().contains("1 of 1 expectation held."), run.out());
        assertTrue(run.out().contains("residual of current conservation "), run.out());
        assertTrue(run.out().contains("Results lie in " + out), run.out());
        JsonObject json = JsonParser.parseString(Files.readString(result.resolve("result.json")))
                .getAsJsonObject();
        assertEquals(1, json.getAsJsonObject("inputs").size());
        assertTrue(json.getAsJsonObject("inputs").has(file.toString()), "named as given");
        try (Stream<Path> all = Files.list(out)) {
            assertEquals(1, all.count(), "nothing but the result");
        }
    }

    @Test
    void aBrokenExpectationIsToldWithItsFigures() throws Exception {
        Path file = file("wire.isth", TestFiles.WIRE, TestFiles.BROKEN);
        CommandLineRun run = CommandLineRun.of("run", file, "--out", out);
        assertEquals(1, run.status());
        assertTrue(
                run.err().matches("(?s).*wire.isth:\\d+:5: error broken-expectation: .*measured 0\\.941.*"), run.err());
        assertTrue(Files.exists(out.resolve("Wire.Wrong/transmission.csv")), "the result is kept all the same");
    }

    @Test
    void errorsStopARunBeforeItStarts() throws Exception {
        Path file = file("wire.isth", TestFiles.WIRE, TestFiles.SPECTRUM, "let a = = 1;");
        CommandLineRun run = CommandLineRun.of("run", file, "--out", out);
        assertEquals(1, run.status());
        assertTrue(run.err().startsWith(file + ":"), run.err());
        assertFalse(Files.exists(out));
    }

    @Test
    void picksMeasurementsByName() throws Exception {
        Path file = file("wire.isth", TestFiles.WIRE, TestFiles.SPECTRUM, TestFiles.BROKEN);
        assertEquals(
                0,
                CommandLineRun.of("run", file, "--out", out, "--measurement", "Spectrum")
                        .status());
        assertFalse(Files.exists(out.resolve("Wire.Wrong")));
        CommandLineRun unknown = CommandLineRun.of("run", file, "--out", out, "--measurement", "Nothing");
        assertEquals(2, unknown.status());
        assertTrue(unknown.err().contains("Wire.Spectrum, Wire.Wrong"), unknown.err());
    }

    @Test
    void aParameterCanBeGivenWithItsUnit() throws Exception {
        Path file = file("wire.isth", TestFiles.WIRE, TestFiles.BROKEN);
        CommandLineRun run = CommandLineRun.of("run", file, "--out", out, "--set", "height=0 meV");
        assertEquals(0, run.status(), "nothing raised, everything passes: " + run.err());
        JsonObject json = JsonParser.parseString(Files.readString(out.resolve("Wire.Wrong/result.json")))
                .getAsJsonObject();
        assertEquals("0 meV", json.getAsJsonObject("settings").get("height").getAsString());
    }

    @Test
    void unfittingParametersAreRefused() throws Exception {
        Path file = file("wire.isth", TestFiles.WIRE, TestFiles.SPECTRUM);
        for (String setting :
                List.of("height=1 nm", "height", "=1 eV", "heigt=1 eV", "height=1 eV; let b = 2", "height=x")) {
            CommandLineRun run = CommandLineRun.of("run", file, "--out", out, "--set", setting);
            assertEquals(2, run.status(), setting);
            assertTrue(run.err().contains("--set"), run.err());
        }
        CommandLineRun outside = CommandLineRun.of("run", file, "--out", out, "--set", "height=3 eV");
        assertEquals(1, outside.status());
        assertTrue(outside.err().contains("error out-of-range"), outside.err());
        assertFalse(Files.exists(out));
    }

    @Test
    void theNumberOfThreadsChangesNoByte() throws Exception {
        Path file = file("wire.isth", TestFiles.WIRE, TestFiles.SPECTRUM);
        for (int threads : new int[] {1, 2, 3}) {
            assertEquals(
                    0,
                    CommandLineRun.of("run", file, "--out", out.resolve("" + threads), "--threads", threads)
                            .status());
        }
        for (String table : List.of("transmission.csv", "dos.csv")) {
            byte[] one = Files.readAllBytes(out.resolve("1/Wire.Spectrum").resolve(table));
            assertArrayEquals(
                    one, Files.readAllBytes(out.resolve("2/Wire.Spectrum").resolve(table)));
            assertArrayEquals(
                    one, Files.readAllBytes(out.resolve("3/Wire.Spectrum").resolve(table)));
        }
        assertEquals(2, CommandLineRun.of("run", file, "--threads", "0").status());
    }

    @Test
    void resumingKeepsWhatIsStillThatOfItsFiles() throws Exception {
        Path file = file("wire.isth", TestFiles.WIRE, TestFiles.SPECTRUM);
        assertEquals(0, CommandLineRun.of("run", file, "--out", out).status());
        Path table = out.resolve("Wire.Spectrum/transmission.csv");
        FileTime before = Files.getLastModifiedTime(out.resolve("Wire.Spectrum/result.json"));
        CommandLineRun kept = CommandLineRun.of("run", file, "--out", out, "--resume");
        assertEquals(0, kept.status());
        assertTrue(kept.out().contains("kept from an earlier run"), kept.out());
        assertEquals(before, Files.getLastModifiedTime(out.resolve("Wire.Spectrum/result.json")));

        CommandLineRun other = CommandLineRun.of("run", file, "--out", out, "--resume", "--set", "height=0.5 eV");
        assertFalse(other.out().contains("kept"), "other settings are another run");
        Files.delete(table);
        assertFalse(
                CommandLineRun.of("run", file, "--out", out, "--resume", "--set", "height=0.5 eV")
                        .out()
                        .contains("kept"),
                "an incomplete result is none");
        file("wire.isth", TestFiles.WIRE.replace("0.5 eV in", "0.4 eV in"), TestFiles.SPECTRUM);
        CommandLineRun changed = CommandLineRun.of("run", file, "--out", out, "--resume");
        assertFalse(changed.out().contains("kept"), "a changed file is another run");
        assertEquals(1, changed.status());
    }

    @Test
    void filesOfAProjectSeeEachOtherButUnrelatedOnesStayOut() throws Exception {
        Files.writeString(folder.resolve("isthmus.project"), "");
        Files.createDirectories(folder.resolve("library"));
        file("library/wires.isth", "namespace library;", TestFiles.WIRE);
        file("broken.isth", "device Wire { let = ; }");
        file("same.isth", TestFiles.WIRE, TestFiles.BROKEN);
        Path user = file("user.isth", "namespace user;", "import library.*;", TestFiles.SPECTRUM);
        CommandLineRun run = CommandLineRun.of("run", user, "--out", out);
        assertEquals(0, run.status(), run.err());
        JsonObject inputs = JsonParser.parseString(Files.readString(out.resolve("Wire.Spectrum/result.json")))
                .getAsJsonObject()
                .getAsJsonObject("inputs");
        assertTrue(new TreeMap<>(inputs.asMap()).keySet().stream().anyMatch(k -> k.endsWith("wires.isth")));

        CommandLineRun alone = CommandLineRun.of("run", folder.resolve("same.isth"), "--out", out);
        assertEquals(1, alone.status());
        assertTrue(alone.err().contains("broken-expectation"), alone.err());
    }

    @Test
    void errorsOfAnImportedFileAreToldThere() throws Exception {
        Files.writeString(folder.resolve("isthmus.project"), "");
        Path library = file("library.isth", "namespace library;", TestFiles.WIRE, "let wrong = 1 eV + 1 nm;");
        Path user = file("user.isth", "import library.*;", TestFiles.SPECTRUM);
        CommandLineRun run = CommandLineRun.of("check", user);
        assertTrue(run.out().contains(library.getFileName().toString()), run.out());
        assertEquals(1, run.status());
    }

    @Test
    void aFileWithoutMeasurementsIsSaidToHaveNone() throws Exception {
        CommandLineRun run = CommandLineRun.of("run", file("wire.isth", TestFiles.WIRE), "--out", out);
        assertEquals(2, run.status());
        assertTrue(run.err().contains("no measurement is declared in"), run.err());
    }
}
