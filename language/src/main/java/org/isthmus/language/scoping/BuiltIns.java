package org.isthmus.language.scoping;

import java.io.IOException;
import java.io.InputStream;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import org.eclipse.emf.common.util.URI;
import org.eclipse.emf.ecore.resource.Resource;
import org.eclipse.emf.ecore.resource.ResourceSet;
import org.eclipse.emf.ecore.resource.impl.ResourceImpl;
import org.isthmus.language.isthmus.CatalogueEntry;
import org.isthmus.language.isthmus.IsthmusFactory;
import org.isthmus.language.isthmus.LatticeDeclaration;
import org.isthmus.language.isthmus.SourceFile;
import org.isthmus.runtime.catalogue.Catalogue;
import org.isthmus.runtime.catalogue.Entry;
import org.isthmus.runtime.catalogue.SettingEntry;

/** The catalogue and the shipped lattices as objects of a resource set, so that names link to them like to any other. */
public final class BuiltIns {
    /** Where the catalogue's objects live. */
    public static final URI CATALOGUE = URI.createURI("isthmus:/catalogue");

    /** Where the shipped lattices live. */
    public static final URI LIBRARY = URI.createURI("isthmus:/library/lattices.isth");

    /** Namespace of the shipped lattices. */
    public static final String LIBRARY_NAMESPACE = "isthmus.lattices";

    private static final String LIBRARY_FILE = "/org/isthmus/language/library/lattices.isth";
    private static final String EXPRESSION = "expression";
    private static final String SETTING = "setting";

    private BuiltIns() {}

    /** True for what no user's file declares. */
    public static boolean contains(URI uri) {
        return "isthmus".equals(uri.scheme());
    }

    /** Names that expressions may use. */
    public static List<CatalogueEntry> expressionNames(ResourceSet resources) {
        return entries(resources, EXPRESSION);
    }

    /** Settings of measurements. */
    public static List<CatalogueEntry> measurementSettings(ResourceSet resources) {
        return entries(resources, SETTING);
    }

    private static List<CatalogueEntry> entries(ResourceSet resources, String kind) {
        return catalogue(resources).getContents().stream()
                .map(CatalogueEntry.class::cast)
                .filter(entry -> entry.getCatalogue().equals(kind))
                .toList();
    }

    /** True for the objects of {@link #measurementSettings}. */
    public static boolean isSetting(CatalogueEntry entry) {
        return SETTING.equals(entry.getCatalogue());
    }

    private static Resource catalogue(ResourceSet resources) {
        synchronized (resources) {
            Resource present = resources.getResource(CATALOGUE, false);
            if (present != null) {
                return present;
            }
            Resource made = new ResourceImpl(CATALOGUE);
            for (Entry entry : Catalogue.expressionNames()) {
                made.getContents().add(object(EXPRESSION, entry));
            }
            for (Entry entry : Catalogue.settings(SettingEntry.Block.MEASUREMENT)) {
                made.getContents().add(object(SETTING, entry));
            }
            resources.getResources().add(made);
            return made;
        }
    }

    private static CatalogueEntry object(String kind, Entry entry) {
        CatalogueEntry object = IsthmusFactory.eINSTANCE.createCatalogueEntry();
        object.setCatalogue(kind);
        object.setName(entry.name());
        return object;
    }

    /** The lattices that come with the tool. */
    public static List<LatticeDeclaration> lattices(ResourceSet resources) {
        List<LatticeDeclaration> lattices = new ArrayList<>();
        for (Object content : library(resources).getContents()) {
            ((SourceFile) content)
                    .getDeclarations().stream()
                            .filter(LatticeDeclaration.class::isInstance)
                            .map(LatticeDeclaration.class::cast)
                            .forEach(lattices::add);
        }
        return lattices;
    }

    private static Resource library(ResourceSet resources) {
        synchronized (resources) {
            Resource present = resources.getResource(LIBRARY, false);
            if (present != null) {
                return present;
            }
            Resource made = resources.createResource(LIBRARY);
            try (InputStream text = BuiltIns.class.getResourceAsStream(LIBRARY_FILE)) {
                if (text == null) {
                    throw new IllegalStateException("the shipped lattices are missing: " + LIBRARY_FILE);
                }
                made.load(text, Map.of());
            } catch (IOException e) {
                throw new IllegalStateException("the shipped lattices cannot be read", e);
            }
            return made;
        }
    }
}
