package org.isthmus.language.ide.pipeline;

import com.google.inject.Injector;
import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.Deque;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;
import org.eclipse.emf.common.util.TreeIterator;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.emf.ecore.resource.Resource;
import org.eclipse.emf.ecore.util.EcoreUtil;
import org.eclipse.xtext.diagnostics.Severity;
import org.eclipse.xtext.util.CancelIndicator;
import org.eclipse.xtext.validation.CheckMode;
import org.eclipse.xtext.validation.IResourceValidator;
import org.eclipse.xtext.validation.Issue;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.SourceRef;

/** What the language says of files, and of those that they stand on. */
final class ProjectCheck {
    private final Project project;
    private final IResourceValidator validator;
    private final CancelIndicator cancel;

    ProjectCheck(Project project, Injector injector, CancelIndicator cancel) {
        this.project = project;
        this.cancel = cancel;
        validator = injector.getInstance(IResourceValidator.class);
    }

    /** Findings of all files asked for, in the order of files and lines; errors of files that they refer to come last. */
    List<Finding> run() {
        Set<Finding> findings = new LinkedHashSet<>(project.unread());
        Set<Finding> ofOthers = new LinkedHashSet<>();
        for (Project.Part part : project.parts()) {
            for (SourceFile file : part.asked().keySet()) {
                findings.addAll(of(part, file));
            }
            for (Resource other : referredTo(part)) {
                validate(other).stream().filter(ProjectCheck::isError).forEach(ofOthers::add);
            }
        }
        findings.addAll(ofOthers);
        return List.copyOf(findings);
    }

    /** Findings of one file. */
    private List<Finding> of(Project.Part part, SourceFile file) {
        List<Finding> findings = validate(part.asked().get(file));
        findings.sort(Comparator.comparing((Finding f) -> f.place().file())
                .thenComparingInt(f -> f.place().offset()));
        return findings;
    }

    private static boolean isError(Finding finding) {
        return finding.severity() == org.isthmus.runtime.device.Severity.ERROR;
    }

    private List<Finding> validate(Resource resource) {
        List<Finding> findings = new ArrayList<>();
        String path = resource.getURI().toFileString();
        for (Issue issue : validator.validate(resource, CheckMode.ALL, cancel)) {
            if (IssueCode.byId(String.valueOf(issue.getCode())).isEmpty()) {
                // the platform turns what a check throws into an issue and logs it: it is a failure of ours, not of the
                // file
                throw new IllegalStateException("a check failed on " + path + ": " + issue.getMessage());
            }
            SourceRef place = new SourceRef(
                    path,
                    orZero(issue.getLineNumber()),
                    orZero(issue.getColumn()),
                    orZero(issue.getOffset()),
                    orZero(issue.getLength()));
            findings.add(project.shown(
                    new Finding(issue.getCode(), severity(issue.getSeverity()), issue.getMessage(), place)));
        }
        return findings;
    }

    /** Files that were not asked for and that names of the asked ones lead to, directly or through each other. */
    private static Set<Resource> referredTo(Project.Part part) {
        Set<Resource> seen = new LinkedHashSet<>(part.asked().values());
        Deque<Resource> open = new ArrayDeque<>(seen);
        while (!open.isEmpty()) {
            Resource resource = open.remove();
            EcoreUtil.resolveAll(resource);
            TreeIterator<EObject> contents = resource.getAllContents();
            while (contents.hasNext()) {
                for (EObject target : contents.next().eCrossReferences()) {
                    Resource its = target.eResource();
                    if (its != null && its.getURI().isFile() && seen.add(its)) {
                        open.add(its);
                    }
                }
            }
        }
        seen.removeAll(part.asked().values());
        return seen;
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
