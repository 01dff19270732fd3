package org.isthmus.language.elaboration;

import com.google.inject.Injector;
import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.List;
import java.util.Map;
import org.eclipse.emf.common.util.URI;
import org.eclipse.emf.ecore.resource.Resource;
import org.eclipse.emf.ecore.util.EcoreUtil;
import org.eclipse.xtext.resource.XtextResourceSet;
import org.isthmus.language.isthmus.DeviceDeclaration;
import org.isthmus.language.isthmus.LatticeDeclaration;
import org.isthmus.language.isthmus.SourceFile;
import org.isthmus.language.tests.IsthmusInjectorProvider;
import org.isthmus.language.typing.FileTyping;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.DeviceFamily.Elaborated;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.Severity;

/** Devices from texts in memory. */
final class Texts {
    private static final Injector INJECTOR = new IsthmusInjectorProvider().getInjector();

    private Texts() {}

    static Resource resource(String text) {
        return resource(text, URI.createURI("memory:/t.isth"));
    }

    static Resource resource(String text, URI uri) {
        XtextResourceSet resources = INJECTOR.getInstance(XtextResourceSet.class);
        Resource resource = resources.createResource(uri);
        try {
            resource.load(new ByteArrayInputStream(text.getBytes(StandardCharsets.UTF_8)), Map.of());
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
        EcoreUtil.resolveAll(resource);
        if (!resource.getErrors().isEmpty()) {
            throw new AssertionError(resource.getErrors().toString());
        }
        List<?> problems =
                FileTyping.problems((SourceFile) resource.getContents().get(0));
        if (!problems.isEmpty()) {
            throw new AssertionError(problems.toString());
        }
        return resource;
    }

    /** The last device of a text. */
    static Elaborator family(String text) {
        return family(resource(text));
    }

    static Elaborator family(Resource resource) {
        List<DeviceDeclaration> devices = ((SourceFile) resource.getContents().get(0))
                .getDeclarations().stream()
                        .filter(DeviceDeclaration.class::isInstance)
                        .map(DeviceDeclaration.class::cast)
                        .toList();
        return Elaborator.of(devices.get(devices.size() - 1));
    }

    static LatticeDeclaration lattice(String text) {
        return ((SourceFile) resource(text).getContents().get(0))
                .getDeclarations().stream()
                        .filter(LatticeDeclaration.class::isInstance)
                        .map(LatticeDeclaration.class::cast)
                        .findFirst()
                        .orElseThrow();
    }

    /** The last device of a text; it must have no error. */
    static Device device(String text) {
        Elaborated elaborated = family(text).elaborate(Map.of());
        if (elaborated.device() == null) {
            throw new AssertionError(elaborated.findings().toString());
        }
        return elaborated.device();
    }

    /** Code, line and text of every error and warning. */
    static List<String> findings(String text) {
        return family(text).elaborate(Map.of()).findings().stream()
                .filter(f -> f.severity() != Severity.INFORMATION)
                .map(Texts::told)
                .toList();
    }

    static String told(Finding finding) {
        return finding.place().line() + " " + finding.code() + ": " + finding.text();
    }
}
