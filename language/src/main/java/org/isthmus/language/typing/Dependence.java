package org.isthmus.language.typing;

import java.util.HashSet;
import java.util.Optional;
import java.util.Set;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.xtext.EcoreUtil2;
import org.isthmus.language.isthmus.CatalogueEntry;
import org.isthmus.language.isthmus.Constant;
import org.isthmus.language.isthmus.Declaration;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.runtime.catalogue.Catalogue;
import org.isthmus.runtime.catalogue.CoordinateEntry;
import org.isthmus.runtime.catalogue.Entry;
import org.isthmus.runtime.catalogue.SpecialEntry;

/** Whether an expression depends on where it is evaluated, also through the constants it names. */
final class Dependence {
    /** What an expression may depend on. */
    enum Place {
        /** Nothing. */
        NOWHERE,
        /** A site, or the midpoint of a bond. */
        SITE,
        /** A pair of sites. */
        PAIR
    }

    private Dependence() {}

    /** The first name in the expression that depends on more than is allowed. */
    static Optional<Reference> misplaced(Expression expression, Place allowed) {
        return expression == null ? Optional.empty() : misplaced(expression, allowed, new HashSet<>());
    }

    private static Optional<Reference> misplaced(Expression expression, Place allowed, Set<EObject> seen) {
        if (!seen.add(expression)) {
            return Optional.empty();
        }
        if (expression instanceof Reference own && offends(own, allowed, seen)) {
            return Optional.of(own);
        }
        for (Reference reference : EcoreUtil2.getAllContentsOfType(expression, Reference.class)) {
            if (offends(reference, allowed, seen)) {
                return Optional.of(reference);
            }
        }
        return Optional.empty();
    }

    private static boolean offends(Reference reference, Place allowed, Set<EObject> seen) {
        Declaration target = reference.getTarget();
        if (target instanceof CatalogueEntry entry && !entry.eIsProxy()) {
            return Catalogue.expressionName(entry.getName())
                    .map(known -> !allows(known, allowed))
                    .orElse(false);
        }
        return target instanceof Constant constant
                && !constant.eIsProxy()
                && constant.getValue() != null
                && misplaced(constant.getValue(), allowed, seen).isPresent();
    }

    private static boolean allows(Entry entry, Place allowed) {
        if (entry instanceof CoordinateEntry coordinate) {
            return allowed == (coordinate.pair() ? Place.PAIR : Place.SITE);
        }
        boolean perSite = entry instanceof SpecialEntry special
                && (special.kind() == SpecialEntry.Kind.UNIFORM || special.kind() == SpecialEntry.Kind.NORMAL);
        return !perSite || allowed == Place.SITE;
    }
}
