package org.isthmus.language.evaluation;

import org.eclipse.emf.ecore.EObject;
import org.isthmus.language.findings.IssueCode;

/** An expression that has no value; the message is one sentence for the user. */
public final class EvaluationFailure extends RuntimeException {
    private static final long serialVersionUID = 1;

    private final transient EObject place;
    private final IssueCode code;

    public EvaluationFailure(EObject place, IssueCode code, String message) {
        super(message);
        this.place = place;
        this.code = code;
    }

    /** The object in the text that is meant. */
    public EObject place() {
        return place;
    }

    public IssueCode code() {
        return code;
    }
}
