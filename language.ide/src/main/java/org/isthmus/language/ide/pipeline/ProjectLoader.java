package org.isthmus.language.ide.pipeline;

import com.google.inject.Injector;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Deque;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.eclipse.emf.common.util.URI;
import org.eclipse.xtext.resource.XtextResource;
import org.eclipse.xtext.resource.XtextResourceSet;
import org.isthmus.language.tables.TableFiles;
import org.isthmus.runtime.device.Finding;

/**
 * Parses the files asked for, and of the project's others those whose names they use, directly or through each other.
 * A project may hold many files that have nothing to do with a run, broken ones among them.
 */
final class ProjectLoader {
    private final Injector injector;

    ProjectLoader(Injector injector) {
        this.injector = injector;
    }

    Project load(List<Path> paths) throws MissingInput {
        List<Project.Part> parts = new ArrayList<>();
        Set<Path> seen = new HashSet<>();
        for (Path path : paths) {
            parts.add(part(ProjectFiles.find(path), seen));
        }
        return new Project(parts);
    }

    private Project.Part part(ProjectFiles files, Set<Path> seen) throws MissingInput {
        XtextResourceSet resources = injector.getInstance(XtextResourceSet.class);
        files.given().ifPresent(folder -> resources.getLoadOptions().put(TableFiles.PROJECT_FOLDER, folder));
        Map<SourceFile, XtextResource> asked = new LinkedHashMap<>();
        List<SourceFile> others = new ArrayList<>();
        List<Finding> unread = new ArrayList<>();
        Deque<DeclaredNames> open = new ArrayDeque<>();
        for (SourceFile file : files.asked()) {
            if (!seen.add(file.path())) {
                continue;
            }
            Optional<Finding> tooLarge = SourceLimits.ofSize(file, size(file));
            String text = tooLarge.isPresent() ? "" : read(file);
            Optional<Finding> limit = tooLarge.or(() -> SourceLimits.ofText(file, text));
            if (limit.isPresent()) {
                unread.add(limit.get());
            } else {
                asked.put(file, parse(resources, file));
                open.add(DeclaredNames.scan(text));
            }
        }
        Map<SourceFile, DeclaredNames> candidates = new LinkedHashMap<>();
        for (SourceFile file : files.others()) {
            if (SourceLimits.ofSize(file, size(file)).isEmpty()) {
                String text = read(file);
                if (SourceLimits.ofText(file, text).isEmpty()) {
                    candidates.put(file, DeclaredNames.scan(text));
                }
            }
        }
        while (!open.isEmpty() && !candidates.isEmpty()) {
            DeclaredNames user = open.remove();
            List<SourceFile> used = candidates.entrySet().stream()
                    .filter(candidate -> user.mayUse(candidate.getValue()))
                    .map(Map.Entry::getKey)
                    .toList();
            for (SourceFile file : used) {
                open.add(candidates.remove(file));
                parse(resources, file);
                others.add(file);
            }
        }
        return new Project.Part(resources, asked, others, unread);
    }

    private static XtextResource parse(XtextResourceSet resources, SourceFile file) {
        URI uri = URI.createFileURI(file.path().toString());
        return (XtextResource) resources.getResource(uri, true);
    }

    private static long size(SourceFile file) {
        return file.path().toFile().length();
    }

    private static String read(SourceFile file) throws MissingInput {
        try {
            // as the parser does: a malformed byte is a character that the grammar does not know
            return new String(Files.readAllBytes(file.path()), StandardCharsets.UTF_8);
        } catch (IOException e) {
            throw new MissingInput("'" + file.shown() + "' could not be read: " + e.getMessage() + ".");
        }
    }
}
