package org.isthmus.language.ide.pipeline;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.HexFormat;
import java.util.Map;
import java.util.TreeMap;
import org.eclipse.emf.common.util.TreeIterator;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.emf.ecore.resource.Resource;
import org.isthmus.language.isthmus.TextLiteral;
import org.isthmus.language.tables.TableFailure;
import org.isthmus.language.tables.TableFiles;
import org.isthmus.runtime.result.DeviceDigest;

/** The files that a result depends on, with what is in them as a number. */
final class InputFiles {
    private InputFiles() {}

    /** SHA-256 by path: the device files of a part, and the tables that they name. */
    static Map<String, String> of(Project project, Project.Part part) {
        Map<String, String> inputs = new TreeMap<>();
        for (Resource resource : part.resources().getResources()) {
            if (!resource.getURI().isFile()) {
                continue;
            }
            Path file = Path.of(resource.getURI().toFileString());
            inputs.put(project.shown(file), sha256(file));
            TreeIterator<EObject> contents = resource.getAllContents();
            while (contents.hasNext()) {
                if (contents.next() instanceof TextLiteral text && text.getValue() != null) {
                    table(resource, text.getValue(), project, inputs);
                }
            }
        }
        return inputs;
    }

    private static void table(Resource resource, String written, Project project, Map<String, String> inputs) {
        Path table;
        try {
            table = TableFiles.resolve(resource, written);
        } catch (TableFailure e) {
            // a text that is no path of a table inside the project; the check says so where one is needed
            return;
        }
        if (Files.isRegularFile(table)) {
            inputs.put(project.shown(table), sha256(table));
        }
    }

    private static String sha256(Path file) {
        try {
            return HexFormat.of().formatHex(DeviceDigest.sha256().digest(Files.readAllBytes(file)));
        } catch (IOException e) {
            return "unreadable since it was checked: " + e.getMessage();
        }
    }
}
