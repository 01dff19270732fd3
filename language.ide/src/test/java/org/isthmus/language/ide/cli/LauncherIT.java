package org.isthmus.language.ide.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.concurrent.TimeUnit;
import java.util.stream.Stream;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The packaged folder, copied elsewhere and started as a user starts it. */
class LauncherIT {
    private static final Set<String> LICENCES =
            Set.of("Apache", "EPL", "Eclipse Public", "MIT", "BSD", "Public Domain");

    @TempDir
    static Path anywhere;

    private static Path home;

    @BeforeAll
    static void copyTheFolder() throws IOException {
        Path packaged = Path.of(System.getProperty("distribution"));
        home = anywhere.resolve("a copy, elsewhere");
        try (Stream<Path> files = Files.walk(packaged)) {
            for (Path file : (Iterable<Path>) files::iterator) {
                Files.copy(file, home.resolve(packaged.relativize(file).toString()));
            }
        }
        assertTrue(home.resolve("bin/isthmus").toFile().setExecutable(true));
    }

    @Test
    void startsFromACopyThroughALinkAndFromAnyFolder() throws Exception {
        Path link = Files.createSymbolicLink(anywhere.resolve("linked"), home.resolve("bin/isthmus"));
        Path relative = Files.createSymbolicLink(anywhere.resolve("again"), Path.of("linked"));
        for (Path launcher : List.of(home.resolve("bin/isthmus"), link, relative)) {
            Outcome outcome = start(anywhere, Map.of(), launcher.toString(), "--version");
            assertEquals(0, outcome.status, outcome.err);
            assertTrue(outcome.out.startsWith("isthmus "), outcome.out);
            assertEquals("", outcome.err, "nothing but the answer");
        }
    }

    @Test
    void findsJavaByJavaHomeAndSaysWhatIsWrongWithIt() throws Exception {
        String launcher = home.resolve("bin/isthmus").toString();
        Outcome wrong = start(anywhere, Map.of("JAVA_HOME", "/no/java/here"), launcher, "--version");
        assertEquals(3, wrong.status);
        assertTrue(wrong.err.contains("JAVA_HOME is '/no/java/here'"), wrong.err);

        Path old = Files.createDirectories(anywhere.resolve("jdk-11/bin")).getParent();
        Files.writeString(old.resolve("release"), "IMPLEMENTOR=\"Nobody\"\nJAVA_VERSION=\"11.0.2\"\n");
        Path java = Files.writeString(old.resolve("bin/java"), "#!/bin/sh\nexit 1\n");
        assertTrue(java.toFile().setExecutable(true));
        Outcome older = start(anywhere, Map.of("JAVA_HOME", old.toString()), launcher, "--version");
        assertEquals(3, older.status);
        assertTrue(older.err.contains("needs Java 17 or newer") && older.err.contains("11.0.2"), older.err);
    }

    @Test
    void checksAFileWithAnUnusualNameUnderAnyLocale() throws Exception {
        Path folder = Files.createDirectories(anywhere.resolve("höhe & breite"));
        Files.writeString(folder.resolve("zwei Wörter.isth"), "let a = = 1;\n");
        Outcome outcome = start(
                folder, Map.of("LC_ALL", "C"), home.resolve("bin/isthmus").toString(), "check", "zwei Wörter.isth");
        assertEquals(1, outcome.status, outcome.err);
        assertTrue(outcome.out.startsWith("zwei Wörter.isth:1:9: error "), outcome.out);
    }

    @Test
    void aClosedPipeIsNoError() throws Exception {
        String command = "'" + home.resolve("bin/isthmus") + "' --help | head -n 1";
        Outcome outcome = start(anywhere, Map.of(), "sh", "-c", command);
        assertEquals(0, outcome.status);
        assertEquals("", outcome.err);
    }

    @Test
    void carriesLicencesOfEverythingInIt() throws Exception {
        assertTrue(Files.readString(home.resolve("LICENSE")).startsWith("Eclipse Public License - v 2.0"));
        List<String> lines = new ArrayList<>(Files.readAllLines(home.resolve("THIRD-PARTY.txt")));
        lines.removeIf(l -> !l.startsWith("     ("));
        assertTrue(lines.size() > 20, "a list: " + lines);
        for (String line : lines) {
            assertTrue(LICENCES.stream().anyMatch(line.substring(0, 60)::contains), line);
        }
    }

    @Test
    void completionIsAScriptThatTheShellAccepts() throws Exception {
        Path script = home.resolve("completion/isthmus.bash");
        assertTrue(Files.readString(script).contains("check"));
        assertEquals(0, start(anywhere, Map.of(), "bash", "-n", script.toString()).status);
    }

    @Test
    void runsAFileToTheEnd() throws Exception {
        Path folder = Files.createDirectories(anywhere.resolve("a run"));
        Files.writeString(folder.resolve("wire.isth"), TestFiles.WIRE + TestFiles.SPECTRUM);
        Outcome outcome = start(folder, Map.of(), home.resolve("bin/isthmus").toString(), "run", "wire.isth");
        assertEquals(0, outcome.status, outcome.err);
        assertTrue(outcome.out.contains("results/Wire.Spectrum"), outcome.out);
        assertTrue(Files.exists(folder.resolve("results/Wire.Spectrum/transmission.csv")));
    }

    @Test
    void ctrlCLeavesNoHalfResult() throws Exception {
        Path folder = Files.createDirectories(anywhere.resolve("stopped"));
        Files.writeString(
                folder.resolve("wire.isth"),
                TestFiles.WIRE
                        + """
                        measurement Long of Wire {
                            energy = -1.5 eV .. 1.5 eV in 3000000 points;
                            record transmission;
                        }
                        """);
        ProcessBuilder builder = new ProcessBuilder(home.resolve("bin/isthmus").toString(), "run", "wire.isth")
                .directory(folder.toFile())
                .redirectErrorStream(true)
                .redirectOutput(folder.resolve("log").toFile());
        builder.environment().putIfAbsent("JAVA_HOME", System.getProperty("java.home"));
        Process process = builder.start();
        Thread.sleep(6000);
        assertTrue(process.isAlive(), () -> "over too soon: " + read(folder.resolve("log")));
        assertEquals(
                0,
                new ProcessBuilder("kill", "-INT", String.valueOf(process.pid()))
                        .start()
                        .waitFor());
        assertTrue(process.waitFor(90, TimeUnit.SECONDS), "does not stop");
        assertEquals(130, process.exitValue(), () -> read(folder.resolve("log")));
        try (Stream<Path> left = Files.walk(folder)) {
            List<String> names = left.filter(Files::isRegularFile)
                    .map(f -> folder.relativize(f).toString())
                    .sorted()
                    .toList();
            assertEquals(List.of("log", "wire.isth"), names);
        }
    }

    @Test
    void tooLittleMemoryIsASentence() throws Exception {
        Path folder = Files.createDirectories(anywhere.resolve("small"));
        Files.writeString(
                folder.resolve("big.isth"),
                """
                device Big {
                    lattice Square(a = 1 nm);
                    body box(0 nm .. 2000 nm, 0 nm .. 2000 nm);
                    lead source from left;
                    lead drain from right;
                }
                """);
        Outcome outcome = start(
                folder,
                Map.of("ISTHMUS_JAVA_OPTIONS", "-Xmx64m"),
                home.resolve("bin/isthmus").toString(),
                "describe",
                "big.isth");
        assertEquals(3, outcome.status, outcome.err);
        assertTrue(outcome.err.contains("the memory did not suffice"), outcome.err);
        assertTrue(outcome.err.lines().noneMatch(l -> l.startsWith("\tat ")), outcome.err);
    }

    private static String read(Path file) {
        try {
            return Files.readString(file);
        } catch (IOException e) {
            return e.toString();
        }
    }

    record Outcome(int status, String out, String err) {}

    static Outcome start(Path folder, Map<String, String> environment, String... command) throws Exception {
        Path out = Files.createTempFile(anywhere, "out", "");
        Path err = Files.createTempFile(anywhere, "err", "");
        ProcessBuilder builder = new ProcessBuilder(command)
                .directory(folder.toFile())
                .redirectOutput(out.toFile())
                .redirectError(err.toFile());
        builder.environment().putIfAbsent("JAVA_HOME", System.getProperty("java.home"));
        builder.environment().putAll(environment);
        Process process = builder.start();
        assertTrue(process.waitFor(180, TimeUnit.SECONDS), "still running: " + String.join(" ", command));
        return new Outcome(
                process.exitValue(),
                Files.readString(out, StandardCharsets.UTF_8),
                Files.readString(err, StandardCharsets.UTF_8));
    }
}
