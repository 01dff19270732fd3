package org.isthmus.language.ide.pipeline;

import com.google.inject.Injector;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Deque;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.eclipse.emf.common.util.URI;
import org.eclipse.xtext.resource.XtextResource;
import org.eclipse.xtext.resource.XtextResourceSet;

/**
 * Parses the files asked for, and of the project's others those whose names they use, directly or through each other.
 * A project may hold many files that have nothing to do with a run, broken ones among them.
 */
final class ProjectLoader {
    /** A larger file is not looked at for the sake of others' names. */
    private static final long LARGEST_OTHER = 4L << 20;

    private final Injector injector;

    ProjectLoader(Injector injector) {
        this.injector = injector;
    }

    Project load(ProjectFiles files) throws MissingInput {
        XtextResourceSet resources = injector.getInstance(XtextResourceSet.class);
        Map<SourceFile, XtextResource> asked = new LinkedHashMap<>();
        Deque<DeclaredNames> open = new ArrayDeque<>();
        for (SourceFile file : files.asked()) {
            asked.put(file, parse(resources, file));
            open.add(DeclaredNames.scan(read(file)));
        }
        Map<SourceFile, DeclaredNames> candidates = new LinkedHashMap<>();
        for (SourceFile file : files.others()) {
            if (file.path().toFile().length() <= LARGEST_OTHER) {
                candidates.put(file, DeclaredNames.scan(read(file)));
            }
        }
        while (!open.isEmpty() && !candidates.isEmpty()) {
            DeclaredNames user = open.remove();
            List<SourceFile> used = new ArrayList<>();
            candidates.forEach((file, names) -> {
                if (user.mayUse(names)) {
                    used.add(file);
                }
            });
            for (SourceFile file : used) {
                open.add(candidates.remove(file));
                parse(resources, file);
            }
        }
        return new Project(files, resources, asked);
    }

    private static XtextResource parse(XtextResourceSet resources, SourceFile file) {
        URI uri = URI.createFileURI(file.path().toString());
        return (XtextResource) resources.getResource(uri, true);
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
