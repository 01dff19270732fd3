package org.isthmus.language.ide.pipeline;

import com.google.inject.Injector;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import org.eclipse.emf.ecore.resource.Resource;
import org.eclipse.xtext.diagnostics.Severity;
import org.eclipse.xtext.resource.XtextResource;
import org.eclipse.xtext.resource.XtextSyntaxDiagnostic;
import org.eclipse.xtext.util.CancelIndicator;
import org.eclipse.xtext.validation.CheckMode;
import org.eclipse.xtext.validation.IResourceValidator;
import org.eclipse.xtext.validation.Issue;
import org.isthmus.language.IsthmusStandaloneSetup;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.formatting.FileLayout;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.SourceRef;

/** The stages from files to results, in order. One instance serves one request at a time. */
public final class Pipeline {
    private final Injector injector;

    public Pipeline() {
        injector = new IsthmusStandaloneSetup().createInjectorAndDoEMFRegistration();
    }

    /**
     * Finds and parses files.
     *
     * @param paths files and folders
     * @throws MissingInput where one of them is not there
     */
    public Project load(List<Path> paths) throws MissingInput {
        return new ProjectLoader(injector).load(paths);
    }

    /** Everything that the language has to say about the files asked for, in the order of files and lines. */
    public List<Finding> check(Project project, CancelIndicator cancel) {
        List<Finding> findings = new ArrayList<>(project.unread());
        IResourceValidator validator = injector.getInstance(IResourceValidator.class);
        for (SourceFile file : project.parsed()) {
            List<Finding> inFile = new ArrayList<>();
            for (Issue issue : validator.validate(project.resource(file), CheckMode.ALL, cancel)) {
                inFile.add(finding(file, issue));
            }
            inFile.sort(Comparator.comparingInt(f -> f.place().offset()));
            findings.addAll(inFile);
        }
        return findings;
    }

    /** What keeps a file from being parsed, in the order of lines. */
    public List<Finding> syntaxErrors(Project project, SourceFile file) {
        List<Finding> findings = new ArrayList<>();
        for (Resource.Diagnostic error : project.resource(file).getErrors()) {
            if (error instanceof XtextSyntaxDiagnostic syntax) {
                SourceRef place = new SourceRef(
                        file.shown(), syntax.getLine(), syntax.getColumn(), syntax.getOffset(), syntax.getLength());
                findings.add(new Finding(
                        IssueCode.SYNTAX.id(), org.isthmus.runtime.device.Severity.ERROR, syntax.getMessage(), place));
            }
        }
        return findings;
    }

    /**
     * A file's text in the canonical layout, where it is laid out otherwise.
     *
     * @throws IllegalArgumentException for a file with syntax errors
     */
    public Optional<String> relaidOut(Project project, SourceFile file) {
        XtextResource resource = project.resource(file);
        String text = injector.getInstance(FileLayout.class).format(resource);
        return text.equals(resource.getParseResult().getRootNode().getText()) ? Optional.empty() : Optional.of(text);
    }

    private static Finding finding(SourceFile file, Issue issue) {
        SourceRef place = new SourceRef(
                file.shown(),
                orZero(issue.getLineNumber()),
                orZero(issue.getColumn()),
                orZero(issue.getOffset()),
                orZero(issue.getLength()));
        return new Finding(issue.getCode(), severity(issue.getSeverity()), issue.getMessage(), place);
    }

    private static int orZero(Integer number) {
        return number == null ? 0 : number;
    }

    private static org.isthmus.runtime.device.Severity severity(Severity severity) {
        return switch (severity) {
            case ERROR -> org.isthmus.runtime.device.Severity.ERROR;
            case WARNING -> org.isthmus.runtime.device.Severity.WARNING;
            default -> org.isthmus.runtime.device.Severity.INFORMATION;
        };
    }
}
