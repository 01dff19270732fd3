package org.isthmus.language.validation;

import java.util.Map;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.emf.ecore.EStructuralFeature;
import org.eclipse.xtext.EcoreUtil2;
import org.eclipse.xtext.validation.AbstractDeclarativeValidator;
import org.eclipse.xtext.validation.EValidatorRegistrar;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.SourceFile;
import org.isthmus.language.typing.FileTyping;
import org.isthmus.language.typing.TypeProblem;

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

    /** True where nothing is wrong with the file that would make later findings follow from it. */
    protected boolean sound(EObject object) {
        return sound(object, getContext());
    }

    private static boolean sound(EObject object, Map<Object, Object> context) {
        Object known = context == null ? null : context.get(Soundness.class);
        if (known instanceof Soundness soundness && soundness.file == EcoreUtil2.getRootContainer(object)) {
            return soundness.sound;
        }
        SourceFile file = (SourceFile) EcoreUtil2.getRootContainer(object);
        boolean sound = file.eResource().getErrors().isEmpty()
                && !EcoreUtil2.getAllContentsOfType(file, EObject.class).stream()
                        .anyMatch(o -> o.eCrossReferences().stream().anyMatch(EObject::eIsProxy))
                && FileTyping.problems(file).stream()
                        .map(TypeProblem::code)
                        .allMatch(code -> code.severity() != org.isthmus.runtime.device.Severity.ERROR);
        if (context != null) {
            context.put(Soundness.class, new Soundness(file, sound));
        }
        return sound;
    }

    private record Soundness(SourceFile file, boolean sound) {}
}
