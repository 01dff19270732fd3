package org.isthmus.language.ide.pipeline;

import java.util.List;
import java.util.Map;
import org.eclipse.xtext.resource.XtextResource;
import org.eclipse.xtext.resource.XtextResourceSet;
import org.isthmus.runtime.device.Finding;

/**
 * Parsed files, ready for the checks: those asked for and those that their names lead to.
 *
 * <p>The syntax model is read only from here on.
 */
public final class Project {
    private final ProjectFiles files;
    private final XtextResourceSet resources;
    private final Map<SourceFile, XtextResource> asked;
    private final List<Finding> unread;

    Project(
            ProjectFiles files,
            XtextResourceSet resources,
            Map<SourceFile, XtextResource> asked,
            List<Finding> unread) {
        this.files = files;
        this.resources = resources;
        this.asked = asked;
        this.unread = List.copyOf(unread);
    }

    /** Why files that were asked for could not even be parsed. */
    public List<Finding> unread() {
        return unread;
    }

    public ProjectFiles files() {
        return files;
    }

    XtextResourceSet resources() {
        return resources;
    }

    /** The files that the request is about and that could be parsed, in its order. */
    public List<SourceFile> parsed() {
        return List.copyOf(asked.keySet());
    }

    XtextResource resource(SourceFile file) {
        return asked.get(file);
    }
}
