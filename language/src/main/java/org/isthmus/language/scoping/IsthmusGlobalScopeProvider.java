package org.isthmus.language.scoping;

import com.google.common.base.Predicate;
import java.util.ArrayList;
import java.util.List;
import org.eclipse.emf.ecore.EClass;
import org.eclipse.emf.ecore.resource.Resource;
import org.eclipse.emf.ecore.resource.ResourceSet;
import org.eclipse.xtext.naming.QualifiedName;
import org.eclipse.xtext.resource.EObjectDescription;
import org.eclipse.xtext.resource.IEObjectDescription;
import org.eclipse.xtext.scoping.IScope;
import org.eclipse.xtext.scoping.impl.DefaultGlobalScopeProvider;
import org.eclipse.xtext.scoping.impl.SimpleScope;
import org.isthmus.language.isthmus.CatalogueEntry;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.LatticeDeclaration;

/** Behind the declarations of all files: the shipped lattices, and the names of the catalogue. */
public class IsthmusGlobalScopeProvider extends DefaultGlobalScopeProvider {
    @Override
    protected IScope getScope(
            IScope parent, Resource context, boolean ignoreCase, EClass type, Predicate<IEObjectDescription> filter) {
        return super.getScope(new SimpleScope(parent, builtIns(context, type)), context, ignoreCase, type, filter);
    }

    private static List<IEObjectDescription> builtIns(Resource context, EClass type) {
        List<IEObjectDescription> names = new ArrayList<>();
        ResourceSet resources = context.getResourceSet();
        if (resources == null) {
            return names;
        }
        if (type.isSuperTypeOf(IsthmusPackage.Literals.LATTICE_DECLARATION)
                && !BuiltIns.LIBRARY.equals(context.getURI())) {
            for (LatticeDeclaration lattice : BuiltIns.lattices(resources)) {
                names.add(EObjectDescription.create(QualifiedName.create(lattice.getName()), lattice));
                names.add(EObjectDescription.create(
                        QualifiedName.create("isthmus", "lattices", lattice.getName()), lattice));
            }
        }
        if (type.isSuperTypeOf(IsthmusPackage.Literals.CATALOGUE_ENTRY)) {
            for (CatalogueEntry entry : BuiltIns.expressionNames(resources)) {
                names.add(EObjectDescription.create(QualifiedName.create(entry.getName()), entry));
            }
        }
        return names;
    }
}
