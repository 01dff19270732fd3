package org.isthmus.language.ide.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class FormatCommandTest {
    @TempDir
    Path folder;

    @Test
    void checkTellsAndFormatMends() throws Exception {
        String untidy = "let   a=1 nm  ;\n\n\n\nlet b =  2*a;\n";
        Path file = Files.writeString(folder.resolve("untidy.isth"), untidy);
        CommandLineRun told = CommandLineRun.of("format", "--check", file);
        assertEquals(1, told.status());
        assertTrue(told.out().startsWith(file + ": "), told.out());
        assertEquals(untidy, Files.readString(file));

        assertEquals(0, CommandLineRun.of("format", file).status());
        assertTrue(Files.readString(file).startsWith("let a = 1 nm;\n"), Files.readString(file));
        CommandLineRun again = CommandLineRun.of("format", "--check", file);
        assertEquals(0, again.status(), "a laid out file stays");
        assertEquals("", again.out());
        try (Stream<Path> left = Files.list(folder)) {
            assertEquals(1, left.count(), "nothing left beside it");
        }
    }

    @Test
    void aBrokenFileIsLeftAlone() throws Exception {
        String broken = "let   a= = 1;\n";
        Path file = Files.writeString(folder.resolve("broken.isth"), broken);
        CommandLineRun run = CommandLineRun.of("format", file);
        assertEquals(1, run.status());
        assertTrue(run.err().startsWith(file + ":1:10: error "), run.err());
        assertEquals(broken, Files.readString(file));
    }
}
