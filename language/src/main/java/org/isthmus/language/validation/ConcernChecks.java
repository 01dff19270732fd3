package org.isthmus.language.validation;

import java.util.Map;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.emf.ecore.EStructuralFeature;
import org.eclipse.xtext.validation.AbstractDeclarativeValidator;
import org.eclipse.xtext.validation.EValidatorRegistrar;
import org.isthmus.language.findings.IssueCode;

/** What the validators of one concern share. */
abstract class ConcernChecks extends AbstractDeclarativeValidator {
    /** Composed into {@link IsthmusValidator}, which is registered: registered alone as well, every check would run twice. */
    @Override
    public void register(EValidatorRegistrar registrar) {
        // on purpose nothing
    }

    /** A failure inside a check is a defect of ours: it must not vanish. */
    @Override
    protected void handleExceptionDuringValidation(Throwable failure) {
        throw failure instanceof RuntimeException runtime ? runtime : new IllegalStateException(failure);
    }

    /** Reports a finding of the code's severity. */
    protected void report(IssueCode code, EObject object, EStructuralFeature feature, String message) {
        switch (code.severity()) {
            case ERROR -> error(message, object, feature, code.id());
            case WARNING -> warning(message, object, feature, code.id());
            default -> info(message, object, feature, code.id());
        }
    }

    /** True where nothing is wrong with a declaration, or with those it stands on, that would make later findings follow. */
    protected boolean sound(EObject object) {
        Map<Object, Object> context = getContext();
        if (context == null) {
            return new Soundness().of(object);
        }
        return ((Soundness) context.computeIfAbsent(Soundness.class, key -> new Soundness())).of(object);
    }
}
