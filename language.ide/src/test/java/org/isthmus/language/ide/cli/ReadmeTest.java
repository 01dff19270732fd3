package org.isthmus.language.ide.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import picocli.CommandLine;

/** What README shows is what the tool does. */
class ReadmeTest {
    private static final Path TOP = Path.of("..").toAbsolutePath().normalize();

    @Test
    void theDeviceFileChecksStrictlyAndIsLaidOut(@TempDir Path folder) throws Exception {
        Matcher shown = Pattern.compile("```\\n(namespace .*?)```", Pattern.DOTALL)
                .matcher(Files.readString(TOP.resolve("README.md")));
        assertTrue(shown.find());
        Path file = Files.writeString(folder.resolve("demo.isth"), shown.group(1));
        CommandLineRun check = CommandLineRun.of("check", "--strict", file);
        assertEquals(0, check.status(), check.out());
        assertEquals(0, CommandLineRun.of("format", "--check", file).status());
    }

    @Test
    void everyCommandAndOptionIsThere() throws Exception {
        String readme = Files.readString(TOP.resolve("README.md"));
        new CommandLine(new IsthmusCommand()).getSubcommands().forEach((name, command) -> {
            assertTrue(readme.contains("| `isthmus " + name + " "), name);
            command.getCommandSpec().options().stream()
                    .map(option -> option.longestName())
                    .filter(option -> !List.of("--help", "--version").contains(option))
                    .forEach(option -> assertTrue(readme.contains(option), name + " " + option));
        });
    }

    /** The build server runs the very command that README gives, and the picture and the example are there. */
    @Test
    void theCommandsNameWhatExists() throws Exception {
        String readme = Files.readString(TOP.resolve("README.md"));
        String tests = ".ci/prepare && mvn -B verify";
        assertTrue(readme.contains("\n" + tests + "\n"));
        assertTrue(Files.readString(TOP.resolve(".ci/run")).contains("\n" + tests + "\n"));
        Matcher file = Pattern.compile("examples/[\\w/.]+\\w").matcher(readme);
        while (file.find()) {
            assertTrue(Files.exists(TOP.resolve(file.group())), file.group());
        }
    }
}
