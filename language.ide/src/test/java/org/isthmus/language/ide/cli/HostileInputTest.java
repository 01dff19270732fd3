package org.isthmus.language.ide.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTimeout;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * Input that nobody writes in good faith ends in a finding, soon, and not in an internal error. Each takes well under a
 * second on an idle machine; the limit is for one that runs a build besides.
 */
class HostileInputTest {
    @TempDir
    Path folder;

    @ParameterizedTest
    @ValueSource(
            strings = {
                "deep brackets",
                "deep unary",
                "deep powers",
                "unary in brackets",
                "hidden in an open string",
                "hidden in an open comment",
                "open comments",
                "open strings",
                "long sum",
                "five megabytes in a line",
                "long word",
                "NUL bytes",
                "no text at all",
                "braces"
            })
    void endsInAFinding(String what) throws Exception {
        byte[] bytes =
                switch (what) {
                    case "deep brackets" -> text("let a = " + "(".repeat(100_000) + "1" + ")".repeat(100_000) + ";");
                    case "deep unary" -> text("let a = " + "-".repeat(100_000) + "1;");
                    case "deep powers" -> text("let a = " + "2^".repeat(100_000) + "1;");
                    case "unary in brackets" -> text("let a = " + ("-".repeat(900) + "(").repeat(190) + "1;");
                    case "hidden in an open string" -> text("let a = \"" + "(".repeat(100_000) + "\n;");
                    case "hidden in an open comment" -> text("let a = /*" + "(".repeat(100_000) + "\n;");
                    case "open comments" -> text("let a = " + "/*".repeat(100_000));
                    case "open strings" -> text("let a = " + "\"\\".repeat(100_000));
                    case "long sum" -> text("let a = 1" + " + 1".repeat(50_000) + ";");
                    case "five megabytes in a line" -> text("let a = 1" + "+1".repeat(2_500_000) + ";");
                    case "long word" -> text("let a = " + "x".repeat(200_000) + ";");
                    case "NUL bytes" -> text("let a = 1;" + "\0".repeat(10_000) + "let b = \0;");
                    case "braces" -> text("device A " + "{".repeat(100_000));
                    default -> new byte[] {(byte) 0xff, (byte) 0xfe, 0, 1, 2, (byte) 0xc0, 'l', 'e', 't'};
                };
        Path file = Files.write(folder.resolve("hostile.isth"), bytes);
        CommandLineRun run = assertTimeout(Duration.ofSeconds(30), () -> CommandLineRun.of("check", file));
        assertEquals(1, run.status(), run.err());
        String line = run.lines().get(0);
        assertTrue(line.startsWith(file + ":1:"), line);
        assertTrue(line.contains(" error "), line);
        assertTrue(run.out().chars().noneMatch(c -> c < ' ' && c != '\n'), "nothing for a terminal to act on");
    }

    private static byte[] text(String text) {
        return text.getBytes(StandardCharsets.UTF_8);
    }
}
