package org.isthmus.language.ide.pipeline;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class ProjectFilesTest {
    @TempDir
    Path folder;

    @BeforeEach
    void files() throws Exception {
        folder = folder.toRealPath();
        Files.createDirectories(folder.resolve("project/inner"));
        Files.writeString(folder.resolve("outside.isth"), "");
        Files.writeString(folder.resolve("project/a.isth"), "");
        Files.writeString(folder.resolve("project/inner/b.isth"), "");
    }

    @Test
    void theProjectReachesUpToItsMarker() throws Exception {
        Path file = folder.resolve("project/inner/b.isth");
        assertEquals(folder.resolve("project/inner"), ProjectFiles.projectOf(file));
        Files.writeString(folder.resolve("project/isthmus.project"), "");
        assertEquals(folder.resolve("project"), ProjectFiles.projectOf(file));
        ProjectFiles found = ProjectFiles.find(file);
        assertEquals(List.of(file), paths(found.asked()));
        assertEquals(List.of(folder.resolve("project/a.isth")), paths(found.others()));
    }

    @Test
    void aRepositoryIsAProject() throws Exception {
        Files.createDirectories(folder.resolve(".git"));
        assertEquals(folder, ProjectFiles.projectOf(folder.resolve("project/inner/b.isth")));
    }

    @Test
    void aGivenFolderIsTheProject() throws Exception {
        Files.createDirectories(folder.resolve(".git"));
        ProjectFiles found = ProjectFiles.find(folder.resolve("project"));
        assertEquals(Optional.of(folder.resolve("project")), found.given());
        assertEquals(
                List.of(folder.resolve("project/a.isth"), folder.resolve("project/inner/b.isth")),
                paths(found.asked()));
        assertEquals(List.of(), found.others());
    }

    private static List<Path> paths(List<SourceFile> files) {
        return files.stream().map(SourceFile::path).toList();
    }
}
