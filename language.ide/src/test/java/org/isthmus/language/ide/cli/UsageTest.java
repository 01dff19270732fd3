package org.isthmus.language.ide.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Files;
import java.nio.file.Path;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import picocli.CommandLine;

class UsageTest {
    @Test
    void helpListsEveryCommandAndNothingElse() {
        CommandLineRun run = CommandLineRun.of("--help");
        assertEquals(0, run.status());
        for (String command :
                new CommandLine(new IsthmusCommand()).getSubcommands().keySet()) {
            assertTrue(run.out().contains("\n  " + command + " "), run.out());
            assertEquals(0, CommandLineRun.of(command, "--help").status());
        }
        assertFalse(run.out().contains("languageserver"), "not there yet, so not to be listed");
    }

    @Test
    void versionIsTheBuilds() {
        CommandLineRun run = CommandLineRun.of("--version");
        assertEquals(0, run.status());
        assertTrue(run.out().matches("isthmus \\d+\\.\\d+\\.\\d+\\S*\\R"), run.out());
    }

    @Test
    void unknownCommandGetsAHint() {
        CommandLineRun run = CommandLineRun.of("chek", "a.isth");
        assertEquals(2, run.status());
        assertTrue(run.err().contains("Did you mean check?"), run.err());
        assertEquals("", run.out());
    }

    @Test
    void noCommandIsWrongUsage() {
        assertEquals(2, CommandLineRun.of().status());
    }

    @Test
    void missingFileIsNamed() {
        CommandLineRun run = CommandLineRun.of("check", "no/such.isth");
        assertEquals(2, run.status());
        assertEquals(
                "isthmus: there is no file or folder 'no/such.isth'.", run.err().strip());
    }

    @Test
    void otherFilesAreRefused(@TempDir Path folder) throws Exception {
        Path notes = Files.writeString(folder.resolve("notes.txt"), "no device");
        assertEquals(2, CommandLineRun.of("check", notes).status());
        CommandLineRun empty = CommandLineRun.of("check", folder);
        assertEquals(2, empty.status());
        assertTrue(empty.err().contains("holds no .isth file"), empty.err());
    }
}
