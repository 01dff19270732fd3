package org.isthmus.language.findings;

import java.util.List;
import org.eclipse.emf.common.util.URI;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.emf.ecore.EStructuralFeature;
import org.eclipse.xtext.nodemodel.ICompositeNode;
import org.eclipse.xtext.nodemodel.INode;
import org.eclipse.xtext.nodemodel.util.NodeModelUtils;
import org.eclipse.xtext.util.LineAndColumn;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.SourceRef;

/** Where objects of the syntax model stand in their files. */
public final class Places {
    private Places() {}

    /** The place of an object, or of one of its features. */
    public static SourceRef of(EObject object, EStructuralFeature feature) {
        if (object == null || object.eResource() == null) {
            return SourceRef.NONE;
        }
        INode node = null;
        if (feature != null) {
            List<INode> nodes = NodeModelUtils.findNodesForFeature(object, feature);
            node = nodes.isEmpty() ? null : nodes.get(0);
        }
        if (node == null) {
            ICompositeNode own = NodeModelUtils.findActualNodeFor(object);
            node = own;
        }
        String file = file(object.eResource().getURI());
        if (node == null) {
            return SourceRef.file(file);
        }
        LineAndColumn start = NodeModelUtils.getLineAndColumn(node, node.getOffset());
        return new SourceRef(file, start.getLine(), start.getColumn(), node.getOffset(), node.getLength());
    }

    /** The place of an object. */
    public static SourceRef of(EObject object) {
        return of(object, null);
    }

    private static String file(URI uri) {
        return uri.isFile() ? uri.toFileString() : uri.toString();
    }

    /** A finding at an object. */
    public static Finding finding(IssueCode code, EObject object, EStructuralFeature feature, String text) {
        return new Finding(code.id(), code.severity(), text, of(object, feature));
    }
}
