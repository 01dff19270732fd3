package org.isthmus.language.ide.pipeline;

import com.google.inject.Injector;
import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.Map;
import org.eclipse.emf.common.util.URI;
import org.eclipse.emf.ecore.util.EcoreUtil;
import org.eclipse.xtext.resource.XtextResource;
import org.eclipse.xtext.resource.XtextResourceSet;
import org.isthmus.language.evaluation.Environment;
import org.isthmus.language.evaluation.EvaluationFailure;
import org.isthmus.language.evaluation.Evaluator;
import org.isthmus.language.isthmus.Constant;
import org.isthmus.language.isthmus.Parameter;
import org.isthmus.language.isthmus.SourceFile;
import org.isthmus.language.typing.Inference;
import org.isthmus.language.typing.Type;
import org.isthmus.runtime.units.Dimension;

/** A parameter's value from outside the text, such as {@code 0.4 eV}: an expression of the language. */
final class SettingText {
    private final String name;
    private final String text;
    private final double value;
    private final Dimension dimension;

    private SettingText(String name, String text, double value, Dimension dimension) {
        this.name = name;
        this.text = text;
        this.value = value;
        this.dimension = dimension;
    }

    /** Reads a value; only units, constants and functions have a meaning in it. */
    static SettingText read(Injector injector, String name, String text) throws BadRequest {
        XtextResourceSet resources = injector.getInstance(XtextResourceSet.class);
        XtextResource resource = (XtextResource) resources.createResource(URI.createURI("given:/set.isth"));
        String file = "let given = " + text + ";";
        try {
            resource.load(new ByteArrayInputStream(file.getBytes(StandardCharsets.UTF_8)), Map.of());
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
        if (SourceLimits.ofText(new org.isthmus.language.ide.pipeline.SourceFile(null, ""), file)
                        .isPresent()
                || !resource.getErrors().isEmpty()
                || resource.getContents().isEmpty()
                || ((SourceFile) resource.getContents().get(0))
                                .getDeclarations()
                                .size()
                        != 1) {
            throw unreadable(name, text, "is no value such as 0.4 eV");
        }
        Constant constant = (Constant)
                ((SourceFile) resource.getContents().get(0)).getDeclarations().get(0);
        EcoreUtil.resolveAll(resource);
        if (!resource.getErrors().isEmpty()) {
            throw unreadable(
                    name, text, "uses a name that has no meaning here; units, constants and functions have one");
        }
        Inference inference = new Inference();
        Type type = inference.typeOf(constant.getValue());
        if (!inference.problems().isEmpty()) {
            throw unreadable(
                    name, text, "cannot be read: " + inference.problems().get(0).message());
        }
        if (!(type instanceof Type.Scalar scalar)) {
            throw unreadable(name, text, "is no number with a unit");
        }
        try {
            double value = new Evaluator(Environment.ofText()).real(constant.getValue());
            return new SettingText(name, text, value, scalar.dimension());
        } catch (EvaluationFailure e) {
            throw unreadable(name, text, "cannot be read: " + e.getMessage());
        }
    }

    private static BadRequest unreadable(String name, String text, String problem) {
        return new BadRequest("--set " + name + "=" + text + ": '" + text + "' " + problem + ".");
    }

    /** The value in internal units, for a parameter of the same dimension. */
    double valueFor(Parameter parameter) throws BadRequest {
        Type type = new Inference().typeOf(parameter);
        if (type instanceof Type.Scalar scalar && !scalar.dimension().equals(dimension)) {
            throw new BadRequest("--set " + name + "=" + text + ": parameter '" + name + "' is "
                    + scalar.dimension().withArticle() + ", but '" + text + "' is " + dimension.withArticle() + ".");
        }
        return value;
    }

    String name() {
        return name;
    }

    String text() {
        return text;
    }
}
