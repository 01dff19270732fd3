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
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeSet;

/**
 * Which files a request is about, and which others their names may come from.
 *
 * @param folder the project: a folder that was given, or the nearest one above the first file that holds {@code .git}
 *     or {@code isthmus.project}, else that file's own
 * @param asked what the request is about, in the order given, a folder's files sorted by path
 * @param others further files of the projects concerned, sorted by path
 */
public record ProjectFiles(Path folder, List<SourceFile> asked, List<SourceFile> others) {
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
     * @param given files and folders as the user named them, not empty
     * @throws MissingInput where one does not exist or holds nothing of the language
     */
    public static ProjectFiles find(List<Path> given) throws MissingInput {
        Map<Path, SourceFile> asked = new LinkedHashMap<>();
        Set<Path> folders = new TreeSet<>();
        Path first = null;
        for (Path path : given) {
            Path absolute = path.toAbsolutePath().normalize();
            Path project;
            if (Files.isDirectory(path)) {
                List<Path> found = below(absolute);
                if (found.isEmpty()) {
                    throw new MissingInput("folder '" + path + "' holds no " + EXTENSION + " file.");
                }
                for (Path file : found) {
                    String shown =
                            path.resolve(absolute.relativize(file)).normalize().toString();
                    asked.putIfAbsent(file, new SourceFile(file, shown));
                }
                project = absolute;
            } else if (!Files.exists(path)) {
                throw new MissingInput("there is no file or folder '" + path + "'.");
            } else if (!path.getFileName().toString().endsWith(EXTENSION)) {
                throw new MissingInput("'" + path + "' is no " + EXTENSION + " file.");
            } else if (!Files.isReadable(path)) {
                throw new MissingInput("'" + path + "' may not be read; look at its permissions.");
            } else {
                asked.putIfAbsent(absolute, new SourceFile(absolute, path.toString()));
                project = projectOf(absolute);
            }
            folders.add(project);
            first = first == null ? project : first;
        }
        Map<Path, SourceFile> others = new LinkedHashMap<>();
        for (Path folder : folders) {
            for (Path file : below(folder)) {
                if (!asked.containsKey(file)) {
                    others.putIfAbsent(file, new SourceFile(file, shownFromHere(file)));
                }
            }
        }
        return new ProjectFiles(first, List.copyOf(asked.values()), List.copyOf(others.values()));
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

    private static String shownFromHere(Path file) {
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
