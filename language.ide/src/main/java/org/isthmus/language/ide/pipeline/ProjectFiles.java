package org.isthmus.language.ide.pipeline;

import java.io.IOException;
import java.nio.file.FileVisitResult;
import java.nio.file.FileVisitor;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.SimpleFileVisitor;
import java.nio.file.attribute.BasicFileAttributes;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.EnumSet;
import java.util.List;
import java.util.Optional;

/**
 * Which files a path means, and which others their names may come from.
 *
 * @param given the folder, where the path is one
 * @param asked what the path means, a folder's files sorted by path
 * @param others further files of the project, sorted by path: the project is the given folder, or the nearest one above
 *     the file that holds {@code .git} or {@code isthmus.project}, else the file's own folder
 */
public record ProjectFiles(Optional<Path> given, List<SourceFile> asked, List<SourceFile> others) {
    /** What files of the language end with. */
    public static final String EXTENSION = ".isth";

    /** The file that marks a project's folder where there is no repository. */
    public static final String MARKER = "isthmus.project";

    /** Nobody keeps device files deeper; it bounds the walk where somebody calls the tool in a huge folder. */
    private static final int DEPTH = 12;

    /** Directory entries looked at in one project. */
    private static final int ENTRIES = 50_000;

    public ProjectFiles {
        asked = List.copyOf(asked);
        others = List.copyOf(others);
    }

    /**
     * Looks the files up.
     *
     * @param path a file or folder as the user named it
     * @throws MissingInput where it does not exist or holds nothing of the language
     */
    public static ProjectFiles find(Path path) throws MissingInput {
        Path absolute = path.toAbsolutePath().normalize();
        if (Files.isDirectory(path)) {
            List<SourceFile> asked = new ArrayList<>();
            for (Path file : below(absolute)) {
                String shown =
                        path.resolve(absolute.relativize(file)).normalize().toString();
                asked.add(new SourceFile(file, shown));
            }
            if (asked.isEmpty()) {
                throw new MissingInput("folder '" + path + "' holds no " + EXTENSION + " file.");
            }
            return new ProjectFiles(Optional.of(absolute), asked, List.of());
        }
        if (!Files.exists(path)) {
            throw new MissingInput("there is no file or folder '" + path + "'.");
        }
        if (!path.getFileName().toString().endsWith(EXTENSION)) {
            throw new MissingInput("'" + path + "' is no " + EXTENSION + " file.");
        }
        if (!Files.isReadable(path)) {
            throw new MissingInput("'" + path + "' may not be read; look at its permissions.");
        }
        List<SourceFile> others = new ArrayList<>();
        for (Path file : below(projectOf(absolute))) {
            if (!file.equals(absolute)) {
                others.add(new SourceFile(file, shownFromHere(file)));
            }
        }
        return new ProjectFiles(Optional.empty(), List.of(new SourceFile(absolute, path.toString())), others);
    }

    /** The folder of the project that a file belongs to. */
    public static Path projectOf(Path file) {
        Path own = file.toAbsolutePath().normalize().getParent();
        for (Path folder = own; folder != null; folder = folder.getParent()) {
            if (Files.exists(folder.resolve(".git")) || Files.exists(folder.resolve(MARKER))) {
                return folder;
            }
        }
        return own;
    }

    /** A path that nobody gave, as somebody in the present folder would. */
    static String shownFromHere(Path file) {
        Path here = Path.of("").toAbsolutePath();
        return file.startsWith(here) ? here.relativize(file).toString() : file.toString();
    }

    /** All files of the language below a folder, sorted; not in hidden folders nor in those that hold outputs. */
    private static List<Path> below(Path folder) {
        List<Path> found = new ArrayList<>();
        FileVisitor<Path> visitor = new SimpleFileVisitor<>() {
            private int entries;

            @Override
            public FileVisitResult preVisitDirectory(Path directory, BasicFileAttributes attributes) {
                String name = directory.getFileName() == null
                        ? ""
                        : directory.getFileName().toString();
                boolean skipped = name.startsWith(".") || name.equals("target") || name.equals("results");
                return skipped && !directory.equals(folder) ? FileVisitResult.SKIP_SUBTREE : count();
            }

            @Override
            public FileVisitResult visitFile(Path file, BasicFileAttributes attributes) {
                if (attributes.isRegularFile() && file.getFileName().toString().endsWith(EXTENSION)) {
                    found.add(file);
                }
                return count();
            }

            @Override
            public FileVisitResult visitFileFailed(Path file, IOException e) {
                // a folder that may not be read holds nothing for us; a file asked for was looked at before
                return FileVisitResult.CONTINUE;
            }

            private FileVisitResult count() {
                return ++entries > ENTRIES ? FileVisitResult.TERMINATE : FileVisitResult.CONTINUE;
            }
        };
        try {
            Files.walkFileTree(folder, EnumSet.noneOf(java.nio.file.FileVisitOption.class), DEPTH, visitor);
        } catch (IOException e) {
            throw new java.io.UncheckedIOException(e);
        }
        found.sort(Comparator.naturalOrder());
        return found;
    }
}
