package org.isthmus.language.ide.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.google.gson.JsonObject;
import com.google.gson.JsonParser;
import java.nio.file.Files;
import java.nio.file.Path;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class CheckCommandTest {
    @TempDir
    Path folder;

    @Test
    void aFileWithoutFaultIsFine() throws Exception {
        Path file = Files.writeString(folder.resolve("fine.isth"), "let spacing = 0.25 nm;\n");
        CommandLineRun run = CommandLineRun.of("check", file);
        assertEquals(0, run.status(), run.out());
        assertEquals("", run.out());
    }

    @Test
    void anErrorIsToldWithItsPlace() throws Exception {
        Path odd = Files.createDirectories(folder.resolve("odd name, ü"));
        Path file = Files.writeString(odd.resolve("broken file.isth"), "let a = 1 nm;\nlet b = = 2;\n");
        CommandLineRun run = CommandLineRun.of("check", file);
        assertEquals(1, run.status());
        String line = run.lines().get(0);
        assertTrue(line.startsWith(file + ":2:9: error "), line);
        assertTrue(line.substring(file.toString().length()).matches(":2:9: error [\\w.-]+: .+"), line);
    }

    @Test
    void aFolderMeansAllFilesBelowButNotOutputs() throws Exception {
        Files.writeString(folder.resolve("b.isth"), "let a = ;\n");
        Files.createDirectories(folder.resolve("deep/er"));
        Files.writeString(folder.resolve("deep/er/a.isth"), "let b = ;\n");
        for (String skipped : new String[] {"target", "results", ".hidden"}) {
            Files.createDirectories(folder.resolve(skipped));
            Files.writeString(folder.resolve(skipped).resolve("c.isth"), "let c = ;\n");
        }
        CommandLineRun run = CommandLineRun.of("check", folder);
        assertEquals(1, run.status());
        assertTrue(run.err().contains("in 2 files"), run.err());
        assertTrue(run.out().contains("b.isth:1:9: error"), run.out());
        assertTrue(run.out().contains("a.isth:1:9: error"), run.out());
    }

    @Test
    void jsonHoldsWhatTheTextSays() throws Exception {
        Path file = Files.writeString(folder.resolve("broken.isth"), "let b = = 2;\n");
        CommandLineRun run = CommandLineRun.of("check", "--format", "json", file);
        JsonObject root = JsonParser.parseString(run.out()).getAsJsonObject();
        JsonObject finding = root.getAsJsonArray("findings").get(0).getAsJsonObject();
        assertEquals(file.toString(), finding.get("file").getAsString());
        assertEquals(1, finding.get("line").getAsInt());
        assertEquals(9, finding.get("column").getAsInt());
        assertEquals("error", finding.get("severity").getAsString());
        assertTrue(root.get("errors").getAsInt() >= 1);
    }

    /** The properties that SARIF 2.1.0 (OASIS, 2020) requires: version, runs, tool.driver.name, message. */
    @Test
    void sarifHasWhatTheStandardRequires() throws Exception {
        Path file = Files.writeString(folder.resolve("broken.isth"), "let b = = 2;\n");
        CommandLineRun run = CommandLineRun.of("check", "--format", "sarif", file);
        JsonObject root = JsonParser.parseString(run.out()).getAsJsonObject();
        assertEquals("2.1.0", root.get("version").getAsString());
        JsonObject first = root.getAsJsonArray("runs").get(0).getAsJsonObject();
        JsonObject driver = first.getAsJsonObject("tool").getAsJsonObject("driver");
        assertEquals("isthmus", driver.get("name").getAsString());
        JsonObject result = first.getAsJsonArray("results").get(0).getAsJsonObject();
        assertEquals("error", result.get("level").getAsString());
        assertTrue(result.getAsJsonObject("message").get("text").getAsString().length() > 5);
        int rule = result.get("ruleIndex").getAsInt();
        assertEquals(
                result.get("ruleId"),
                driver.getAsJsonArray("rules").get(rule).getAsJsonObject().get("id"));
        JsonObject place =
                result.getAsJsonArray("locations").get(0).getAsJsonObject().getAsJsonObject("physicalLocation");
        assertEquals(1, place.getAsJsonObject("region").get("startLine").getAsInt());
        assertTrue(place.getAsJsonObject("artifactLocation")
                .get("uri")
                .getAsString()
                .startsWith("file:"));
    }
}
