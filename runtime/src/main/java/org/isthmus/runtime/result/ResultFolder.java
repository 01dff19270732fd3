package org.isthmus.runtime.result;

import java.io.BufferedWriter;
import java.io.IOException;
import java.nio.channels.FileChannel;
import java.nio.charset.StandardCharsets;
import java.nio.file.FileVisitResult;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.SimpleFileVisitor;
import java.nio.file.StandardCopyOption;
import java.nio.file.StandardOpenOption;
import java.nio.file.attribute.BasicFileAttributes;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Set;
import java.util.concurrent.ConcurrentHashMap;

/**
 * Writes result folders: beside their place first, under a hidden name, then renamed, so that a folder is whole or not
 * there. An earlier result of the same name goes only when the new one stands.
 */
public final class ResultFolder {
    private static final Set<Path> UNFINISHED = ConcurrentHashMap.newKeySet();

    private ResultFolder() {}

    /**
     * Writes a result.
     *
     * @param out folder that holds the results
     * @param others further files by name, such as a report
     * @return the folder written
     */
    public static Path write(Path out, MeasurementResult result, Provenance provenance, Map<String, String> others)
            throws IOException {
        Files.createDirectories(out);
        Path place = out.resolve(result.folder());
        Path aside = out.resolve(
                "." + result.folder() + "." + ProcessHandle.current().pid() + ".unfinished");
        UNFINISHED.add(aside);
        try {
            delete(aside);
            Files.createDirectories(aside);
            for (ResultTable table : result.tables()) {
                Path file = aside.resolve(table.name() + ".csv");
                try (BufferedWriter writer = Files.newBufferedWriter(file, StandardCharsets.UTF_8)) {
                    CsvText.write(table, writer);
                }
                sync(file);
            }
            Path arrays = aside.resolve("result.h5");
            ResultArrays.write(arrays, result, provenance);
            sync(arrays);
            Map<String, String> texts = new LinkedHashMap<>(others);
            texts.put("result.json", ResultJson.text(result, provenance));
            for (Map.Entry<String, String> text : texts.entrySet()) {
                Path file = aside.resolve(text.getKey());
                Files.writeString(file, text.getValue(), StandardCharsets.UTF_8);
                sync(file);
            }
            Path old = out.resolve(
                    "." + result.folder() + "." + ProcessHandle.current().pid() + ".old");
            if (Files.exists(place)) {
                delete(old);
                Files.move(place, old, StandardCopyOption.ATOMIC_MOVE);
            }
            try {
                Files.move(aside, place, StandardCopyOption.ATOMIC_MOVE);
            } catch (IOException e) {
                if (Files.exists(old)) {
                    Files.move(old, place, StandardCopyOption.ATOMIC_MOVE);
                }
                throw e;
            }
            delete(old);
            return place;
        } finally {
            delete(aside);
            UNFINISHED.remove(aside);
        }
    }

    private static void sync(Path file) throws IOException {
        try (FileChannel channel = FileChannel.open(file, StandardOpenOption.WRITE)) {
            channel.force(true);
        }
    }

    /** Removes what a process that is being stopped has begun to write. */
    public static void removeUnfinished() {
        for (Path folder : UNFINISHED) {
            try {
                delete(folder);
            } catch (IOException e) {
                System.err.println("could not remove " + folder + ": " + e.getMessage());
            }
        }
    }

    private static void delete(Path folder) throws IOException {
        if (!Files.exists(folder)) {
            return;
        }
        Files.walkFileTree(folder, new SimpleFileVisitor<>() {
            @Override
            public FileVisitResult visitFile(Path file, BasicFileAttributes attributes) throws IOException {
                Files.delete(file);
                return FileVisitResult.CONTINUE;
            }

            @Override
            public FileVisitResult postVisitDirectory(Path directory, IOException failed) throws IOException {
                Files.delete(directory);
                return FileVisitResult.CONTINUE;
            }
        });
    }
}
