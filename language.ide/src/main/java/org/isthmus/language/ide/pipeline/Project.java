package org.isthmus.language.ide.pipeline;

import java.util.List;
import java.util.Map;
import org.eclipse.xtext.resource.XtextResource;
import org.eclipse.xtext.resource.XtextResourceSet;

/**
 * Parsed files, ready for the checks: those asked for and those that their names lead to.
 *
 * <p>The syntax model is read only from here on.
 */
public final class Project {
    private final ProjectFiles files;
    private final XtextResourceSet resources;
    private final Map<SourceFile, XtextResource> asked;

    Project(ProjectFiles files, XtextResourceSet resources, Map<SourceFile, XtextResource> asked) {
        this.files = files;
        this.resources = resources;
        this.asked = asked;
    }

    public ProjectFiles files() {
        return files;
    }

    XtextResourceSet resources() {
        return resources;
    }

    /** The files that the request is about, in its order. */
    public List<SourceFile> asked() {
        return List.copyOf(asked.keySet());
    }

    XtextResource resource(SourceFile file) {
        return asked.get(file);
    }
}
