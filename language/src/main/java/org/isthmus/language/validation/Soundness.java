package org.isthmus.language.validation;

import java.util.ArrayDeque;
import java.util.Deque;
import java.util.HashMap;
import java.util.HashSet;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.Set;
import java.util.stream.Stream;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.xtext.EcoreUtil2;
import org.eclipse.xtext.resource.XtextSyntaxDiagnostic;
import org.isthmus.language.isthmus.Body;
import org.isthmus.language.isthmus.Constant;
import org.isthmus.language.isthmus.Declaration;
import org.isthmus.language.isthmus.DeviceDeclaration;
import org.isthmus.language.isthmus.DeviceMember;
import org.isthmus.language.isthmus.LatticeUse;
import org.isthmus.language.isthmus.LeadDeclaration;
import org.isthmus.language.isthmus.MagneticField;
import org.isthmus.language.isthmus.MeasurementDeclaration;
import org.isthmus.language.isthmus.Origin;
import org.isthmus.language.isthmus.Parameter;
import org.isthmus.language.isthmus.SourceFile;
import org.isthmus.language.scoping.BuiltIns;
import org.isthmus.language.typing.FileTyping;
import org.isthmus.language.typing.TypeProblem;
import org.isthmus.runtime.device.Severity;
import org.isthmus.runtime.device.Side;

/**
 * Which declarations of files can be looked at further: those without an error that their text alone shows, and that refer
 * to no declaration with one, directly or through others. A mistake in one device does not silence the checks of another.
 */
final class Soundness {
    private final Map<EObject, Set<EObject>> faulty = new HashMap<>();
    private final Map<EObject, Boolean> known = new HashMap<>();

    boolean of(EObject object) {
        EObject start = member(object);
        return start != null && known.computeIfAbsent(start, this::look);
    }

    private boolean look(EObject start) {
        Set<EObject> seen = new LinkedHashSet<>(List.of(start));
        Deque<EObject> open = new ArrayDeque<>(seen);
        while (!open.isEmpty()) {
            EObject member = open.remove();
            if (faulty.computeIfAbsent(member.eContainer(), file -> faulty((SourceFile) file))
                    .contains(member)) {
                return false;
            }
            withContents(member)
                    .flatMap(o -> o.eCrossReferences().stream())
                    .map(Soundness::member)
                    .filter(Objects::nonNull)
                    .filter(seen::add)
                    .forEach(open::add);
        }
        return true;
    }

    private static Stream<EObject> withContents(EObject object) {
        return Stream.concat(Stream.of(object), EcoreUtil2.getAllContentsOfType(object, EObject.class).stream());
    }

    /** The declaration of a file that an object belongs to; null for what no file of the user's declares. */
    private static EObject member(EObject object) {
        EObject member = object;
        while (member != null && !(member.eContainer() instanceof SourceFile)) {
            member = member.eContainer();
        }
        return member == null
                        || member.eResource() == null
                        || BuiltIns.contains(member.eResource().getURI())
                ? null
                : member;
    }

    private static Set<EObject> faulty(SourceFile file) {
        Set<EObject> faulty = new HashSet<>();
        if (file.eResource().getErrors().stream().anyMatch(XtextSyntaxDiagnostic.class::isInstance)) {
            faulty.addAll(file.getDeclarations());
            return faulty;
        }
        FileTyping.problems(file).stream()
                .filter(problem -> problem.code().severity() == Severity.ERROR)
                .map(TypeProblem::object)
                .map(Soundness::member)
                .forEach(faulty::add);
        Map<String, EObject> names = new HashMap<>();
        for (EObject member : file.getDeclarations()) {
            if (withContents(member).anyMatch(o -> o.eCrossReferences().stream().anyMatch(EObject::eIsProxy))
                    || member instanceof DeviceDeclaration device && ambiguous(device)) {
                faulty.add(member);
            }
            EObject other = member instanceof MeasurementDeclaration
                    ? null
                    : names.putIfAbsent(((Declaration) member).getName(), member);
            if (other != null) {
                faulty.addAll(List.of(member, other));
            }
        }
        return faulty;
    }

    /** True where a device says the same thing twice, or names a side that no body has. */
    private static boolean ambiguous(DeviceDeclaration device) {
        Set<Object> seen = new HashSet<>();
        for (DeviceMember member : device.getMembers()) {
            boolean single = member instanceof Body
                    || member instanceof LatticeUse
                    || member instanceof Origin
                    || member instanceof MagneticField;
            boolean value = member instanceof Parameter || member instanceof Constant;
            if (single && !seen.add(member.eClass()) || value && !seen.add(((Declaration) member).getName())) {
                return true;
            }
            if (member instanceof LeadDeclaration lead
                    && lead.getSide() != null
                    && Stream.of(Side.values()).noneMatch(s -> s.word().equals(lead.getSide()))) {
                return true;
            }
        }
        return false;
    }
}
