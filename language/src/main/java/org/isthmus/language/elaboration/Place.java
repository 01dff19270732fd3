package org.isthmus.language.elaboration;

import org.eclipse.emf.common.util.URI;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.emf.ecore.EStructuralFeature;
import org.eclipse.emf.ecore.resource.Resource;
import org.eclipse.xtext.nodemodel.INode;
import org.eclipse.xtext.nodemodel.util.NodeModelUtils;
import org.eclipse.xtext.util.LineAndColumn;
import org.isthmus.runtime.device.SourceRef;

/** Where an object of the syntax model, or one of its features, was written. */
final class Place {
    private Place() {}

    static SourceRef of(EObject object) {
        return of(object, null);
    }

    /**
     * The place of a feature.
     *
     * @param feature null for the whole object
     */
    static SourceRef of(EObject object, EStructuralFeature feature) {
        if (object == null || object.eResource() == null) {
            return SourceRef.NONE;
        }
        INode node = null;
        if (feature != null) {
            node = NodeModelUtils.findNodesForFeature(object, feature).stream()
                    .findFirst()
                    .orElse(null);
        }
        if (node == null) {
            node = NodeModelUtils.findActualNodeFor(object);
        }
        String file = file(object.eResource());
        if (node == null) {
            return SourceRef.file(file);
        }
        LineAndColumn at = NodeModelUtils.getLineAndColumn(node, node.getOffset());
        return new SourceRef(file, at.getLine(), at.getColumn(), node.getOffset(), node.getLength());
    }

    private static String file(Resource resource) {
        URI uri = resource.getURI();
        return uri == null ? "" : uri.isFile() ? uri.toFileString() : uri.toString();
    }
}
