package org.isthmus.language.elaboration;

import java.util.ArrayList;
import java.util.List;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.emf.ecore.EStructuralFeature;
import org.isthmus.language.evaluation.EvaluationFailure;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.findings.Places;
import org.isthmus.language.scoping.BuiltIns;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.Severity;
import org.isthmus.runtime.device.SourceRef;

/** Findings in the order of their making; one code says one thing about one place only once. */
final class Findings {
    private final List<Finding> list = new ArrayList<>();
    private EObject standIn;

    /** What is shown where the true place is in a file of ours, such as a shipped lattice used with unfit values. */
    void standIn(EObject object) {
        standIn = object;
    }

    void add(IssueCode code, EObject object, String text) {
        add(code, object, null, text);
    }

    void add(IssueCode code, EObject object, EStructuralFeature feature, String text) {
        boolean ours = object != null
                && object.eResource() != null
                && object.eResource().getURI() != null
                && BuiltIns.contains(object.eResource().getURI());
        SourceRef place = ours && standIn != null ? Places.of(standIn) : Places.of(object, feature);
        boolean known = list.stream()
                .anyMatch(f -> f.code().equals(code.id()) && f.place().equals(place));
        if (!known) {
            list.add(new Finding(code.id(), code.severity(), text, place));
        }
    }

    /** An expression that turned out to have no value. */
    void add(EvaluationFailure failure) {
        add(failure.code(), failure.place(), failure.getMessage());
    }

    /** Number of errors so far. */
    int errors() {
        return (int) list.stream().filter(f -> f.severity() == Severity.ERROR).count();
    }

    List<Finding> list() {
        return List.copyOf(list);
    }
}
