package org.isthmus.examples;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.stream.Stream;

/** The shipped device files. */
final class ExampleFiles {
    static final Path FOLDER = Path.of("lighthouse").toAbsolutePath();

    private ExampleFiles() {}

    static List<Path> all() {
        try (Stream<Path> files = Files.walk(FOLDER)) {
            return files.filter(f -> f.toString().endsWith(".isth")).sorted().toList();
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /** Those that hold a measurement. */
    static Stream<Path> measuring() {
        return all().stream().filter(f -> read(f).contains("measurement "));
    }

    static String read(Path file) {
        try {
            return Files.readString(file);
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }
}
