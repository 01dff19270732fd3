package org.isthmus.language.scoping;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.google.inject.Inject;
import com.google.inject.Provider;
import java.io.ByteArrayInputStream;
import java.nio.charset.StandardCharsets;
import java.util.List;
import java.util.Map;
import org.eclipse.emf.common.util.URI;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.emf.ecore.resource.Resource;
import org.eclipse.emf.ecore.util.EcoreUtil;
import org.eclipse.xtext.EcoreUtil2;
import org.eclipse.xtext.resource.XtextResourceSet;
import org.eclipse.xtext.testing.InjectWith;
import org.eclipse.xtext.testing.extensions.InjectionExtension;
import org.isthmus.language.isthmus.CatalogueEntry;
import org.isthmus.language.isthmus.Constant;
import org.isthmus.language.isthmus.HeaderParameter;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.language.tests.IsthmusInjectorProvider;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.extension.ExtendWith;

@ExtendWith(InjectionExtension.class)
@InjectWith(IsthmusInjectorProvider.class)
class LinkingTest {
    @Inject
    private Provider<XtextResourceSet> resourceSets;

    private Resource load(XtextResourceSet resources, String name, String text) throws Exception {
        Resource resource = resources.createResource(URI.createURI("memory:/" + name));
        resource.load(new ByteArrayInputStream(text.getBytes(StandardCharsets.UTF_8)), Map.of());
        return resource;
    }

    private static List<String> errors(Resource resource) {
        EcoreUtil.resolveAll(resource);
        return resource.getErrors().stream()
                .map(Resource.Diagnostic::getMessage)
                .toList();
    }

    @Test
    void theShippedLatticesLinkAndAreAlwaysVisible() throws Exception {
        XtextResourceSet resources = resourceSets.get();
        Resource file = load(
                resources,
                "a.isth",
                """
                device A { lattice Chain(a = 0.3 nm, m = 0.07 me); body box(0 nm .. 3 nm); }
                device B { lattice isthmus.lattices.Honeycomb; body box(0 nm .. 3 nm); }
                """);
        assertEquals(List.of(), errors(file));
        assertEquals(List.of(), errors(resources.getResource(BuiltIns.LIBRARY, false)));
    }

    @Test
    void filesSeeEachOtherThroughNamespaces() throws Exception {
        XtextResourceSet resources = resourceSets.get();
        load(
                resources,
                "m.isth",
                """
                namespace quay.materials;
                material GaAs { mass = 0.067 me; }
                let pitch = 0.3 nm;
                """);
        Resource family = load(
                resources,
                "f.isth",
                """
                namespace quay.wires;
                import quay.materials.*;
                device Base {
                    parameter height = 0.3 eV;
                    let twice = 2*height;
                    lattice Chain(a = pitch, m = GaAs.mass);
                    body box(0 nm .. 3 nm);
                    potential bump = twice where x > 1 nm;
                    lead source from left;
                    lead drain from right;
                }
                """);
        Resource tall = load(
                resources,
                "t.isth",
                """
                namespace quay.tall;
                import quay.wires.Base;
                device Tall extends Base {
                    height = 0.4 eV;
                    replace potential bump = twice/2 where x > 1 nm;
                    remove lead drain;
                    potential other = quay.materials.GaAs.mass/quay.materials.GaAs.mass*height;
                }
                measurement M of Tall {
                    sweep height = [0.1 eV, 0.2 eV];
                    bias source = 0 V .. 1 V in 2 points;
                    record current(source), dos;
                    temperature = 4 K;
                    expect max(current(source)) at (height = 0.1 eV, source = 0 V) <= 1 A;
                }
                """
                        .replace("max(current(source)) at", "current(source) at"));
        assertEquals(List.of(), errors(family));
        assertEquals(List.of(), errors(tall));
    }

    @Test
    void ownNamesComeBeforeTheCatalogue() throws Exception {
        Resource file = load(resourceSets.get(), "s.isth", "let T = 3 K; let twice = 2*T; let field = 5 T;");
        assertEquals(List.of(), errors(file));
        List<EObject> targets = EcoreUtil2.getAllContentsOfType(
                        file.getContents().get(0), Reference.class)
                .stream()
                .map(reference -> (EObject) reference.getTarget())
                .toList();
        assertTrue(targets.get(0) instanceof Constant);
    }

    @Test
    void aHeaderDoesNotSeeItself() throws Exception {
        Resource file = load(
                resourceSets.get(),
                "h.isth",
                "lattice L(m = 1 me, alpha = 0 eV*m) { vector u = (1 nm, 0 nm); site s at (0 nm, 0 nm) { energy = hbar^2/m/nm^2; } }");
        assertEquals(List.of(), errors(file));
        List<Reference> references =
                EcoreUtil2.getAllContentsOfType(file.getContents().get(0), Reference.class).stream()
                        .filter(reference -> reference.getTarget().getName().equals("m"))
                        .toList();
        assertTrue(references.get(0).getTarget() instanceof CatalogueEntry);
        assertTrue(references.get(1).getTarget() instanceof HeaderParameter);
    }

    @Test
    void anUnknownNameIsOneError() throws Exception {
        Resource file = load(resourceSets.get(), "u.isth", "let a = 2*b;");
        assertEquals(1, errors(file).size());
    }
}
