package org.isthmus.examples;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.google.gson.JsonObject;
import com.google.gson.JsonParser;
import java.io.PrintWriter;
import java.io.StringWriter;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.isthmus.language.ide.cli.ErrorLog;
import org.isthmus.language.ide.cli.Main;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Every shipped file checks without errors or warnings and runs, and everything that it expects holds. */
class ExamplesRunTest {
    @TempDir
    private Path out;

    private record Outcome(int status, String text) {}

    private static Outcome isthmus(Object... arguments) {
        StringWriter text = new StringWriter();
        PrintWriter writer = new PrintWriter(text);
        String[] words = java.util.Arrays.stream(arguments).map(Object::toString).toArray(String[]::new);
        return new Outcome(Main.execute(writer, writer, new ErrorLog(), words), text.toString());
    }

    @Test
    void theWholeProjectChecksStrictly() {
        Outcome check = isthmus("check", "--strict", ExampleFiles.FOLDER);
        assertEquals(0, check.status(), check.text());
    }

    static java.util.stream.Stream<Path> measuring() {
        return ExampleFiles.measuring();
    }

    @ParameterizedTest
    @MethodSource("measuring")
    void expectationsHold(Path file) throws Exception {
        Outcome run = isthmus("run", file, "--out", out);
        assertEquals(0, run.status(), run.text());
        List<Path> folders;
        try (var found = Files.list(out)) {
            folders = found.toList();
        }
        assertTrue(!folders.isEmpty(), "no result for " + file);
        for (Path folder : folders) {
            JsonObject result = JsonParser.parseString(Files.readString(folder.resolve("result.json"))).getAsJsonObject();
            assertTrue(result.get("residual").getAsDouble() < 1e-10, folder + ": " + result.get("residual"));
            assertTrue(result.getAsJsonArray("expectations").size() > 0, folder + " expects nothing");
            result.getAsJsonArray("expectations")
                    .forEach(e -> assertEquals("held", e.getAsJsonObject().get("verdict").getAsString()));
        }
    }

    /** Canonical layout: what a user reads first should look as the formatter leaves it. */
    @Test
    void theFilesAreLaidOutCanonically() {
        Object[] arguments = new Object[ExampleFiles.all().size() + 2];
        arguments[0] = "format";
        arguments[1] = "--check";
        for (int k = 0; k + 2 < arguments.length; k++) {
            arguments[k + 2] = ExampleFiles.all().get(k);
        }
        Outcome check = isthmus(arguments);
        assertEquals(0, check.status(), check.text());
    }
}
