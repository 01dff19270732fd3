package org.isthmus.language.ide.pipeline;

import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.concurrent.ConcurrentHashMap;
import org.eclipse.emf.common.util.URI;
import org.eclipse.xtext.resource.XtextResource;
import org.eclipse.xtext.resource.XtextResourceSet;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.SourceRef;

/**
 * Parsed files, ready for the checks: those asked for and those that their names lead to. What was given as one path sees
 * its own files only, so that unrelated files cannot get into each other's way.
 *
 * <p>The syntax model is read only from here on.
 */
public final class Project {
    private final List<Part> parts;
    private final Map<String, String> shown;

    Project(List<Part> parts) {
        this.parts = List.copyOf(parts);
        shown = new ConcurrentHashMap<>();
        for (Part part : parts) {
            part.others().forEach(file -> shown.put(file.path().toString(), file.shown()));
        }
        for (Part part : parts) {
            part.asked().keySet().forEach(file -> shown.put(file.path().toString(), file.shown()));
        }
    }

    /**
     * One path's files.
     *
     * @param asked those that the request is about and that could be parsed, in its order
     * @param others those that their names led to
     * @param unread why files that were asked for could not even be parsed
     */
    record Part(
            XtextResourceSet resources,
            Map<SourceFile, XtextResource> asked,
            List<SourceFile> others,
            List<Finding> unread) {}

    List<Part> parts() {
        return parts;
    }

    /** The files that the request is about and that could be parsed, in its order. */
    public List<SourceFile> parsed() {
        return parts.stream().flatMap(p -> p.asked().keySet().stream()).toList();
    }

    /** Number of files that the request is about. */
    public int size() {
        return parts.stream()
                .mapToInt(p -> p.asked().size() + p.unread().size())
                .sum();
    }

    /** Why files could not even be parsed. */
    public List<Finding> unread() {
        return parts.stream().flatMap(p -> p.unread().stream()).toList();
    }

    XtextResource resource(SourceFile file) {
        return parts.stream()
                .map(p -> p.asked().get(file))
                .filter(r -> r != null)
                .findFirst()
                .orElseThrow();
    }

    /** A path as the user gave it. */
    String shown(Path path) {
        return shown.computeIfAbsent(path.toString(), p -> ProjectFiles.shownFromHere(Path.of(p)));
    }

    /** The same finding with its file named as the user gave it. */
    Finding shown(Finding finding) {
        SourceRef place = shown(finding.place());
        return place == finding.place()
                ? finding
                : new Finding(finding.code(), finding.severity(), finding.text(), place);
    }

    /** The same place with its file named as the user gave it. */
    SourceRef shown(SourceRef place) {
        String file = place.file();
        String path = file.startsWith("file:") ? URI.createURI(file).toFileString() : file;
        String name = path.startsWith("/") ? shown(Path.of(path)) : path;
        return name.equals(file)
                ? place
                : new SourceRef(name, place.line(), place.column(), place.offset(), place.length());
    }
}
