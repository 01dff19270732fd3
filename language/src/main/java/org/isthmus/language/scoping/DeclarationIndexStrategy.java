package org.isthmus.language.scoping;

import org.eclipse.emf.ecore.EObject;
import org.eclipse.xtext.resource.IEObjectDescription;
import org.eclipse.xtext.resource.impl.DefaultResourceDescriptionStrategy;
import org.eclipse.xtext.util.IAcceptor;
import org.isthmus.language.isthmus.FileMember;
import org.isthmus.language.isthmus.Material;
import org.isthmus.language.isthmus.Quantity;
import org.isthmus.language.isthmus.SourceFile;

/** Other files see the declarations of a file and the quantities of its materials, not what is inside a device. */
public class DeclarationIndexStrategy extends DefaultResourceDescriptionStrategy {
    @Override
    public boolean createEObjectDescriptions(EObject object, IAcceptor<IEObjectDescription> acceptor) {
        if (object instanceof SourceFile) {
            return true;
        }
        if (object instanceof FileMember || object instanceof Quantity) {
            super.createEObjectDescriptions(object, acceptor);
            return object instanceof Material;
        }
        return false;
    }
}
