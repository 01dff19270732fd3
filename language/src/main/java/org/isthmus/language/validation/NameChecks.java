package org.isthmus.language.validation;

import com.google.inject.Inject;
import java.util.ArrayList;
import java.util.Collection;
import java.util.HashMap;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.emf.ecore.resource.Resource;
import org.eclipse.xtext.EcoreUtil2;
import org.eclipse.xtext.naming.IQualifiedNameProvider;
import org.eclipse.xtext.naming.QualifiedName;
import org.eclipse.xtext.resource.IContainer;
import org.eclipse.xtext.resource.IEObjectDescription;
import org.eclipse.xtext.resource.IResourceDescription;
import org.eclipse.xtext.resource.impl.ResourceDescriptionsProvider;
import org.eclipse.xtext.validation.Check;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.Constant;
import org.isthmus.language.isthmus.Declaration;
import org.isthmus.language.isthmus.DeviceDeclaration;
import org.isthmus.language.isthmus.DeviceMember;
import org.isthmus.language.isthmus.FileMember;
import org.isthmus.language.isthmus.Import;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.LatticeDeclaration;
import org.isthmus.language.isthmus.LatticeMember;
import org.isthmus.language.isthmus.Material;
import org.isthmus.language.isthmus.MeasurementDeclaration;
import org.isthmus.language.isthmus.NamedMember;
import org.isthmus.language.isthmus.Parameter;
import org.isthmus.language.isthmus.ParameterOverride;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.language.isthmus.Removal;
import org.isthmus.language.isthmus.Replacement;
import org.isthmus.language.isthmus.SourceFile;
import org.isthmus.language.scoping.BuiltIns;
import org.isthmus.language.structure.DeviceStructure;
import org.isthmus.language.typing.Suggestion;
import org.isthmus.runtime.units.Units;

/** Names: given twice, hiding units, unused, or needing themselves. */
public class NameChecks extends ConcernChecks {
    @Inject
    private IQualifiedNameProvider names;

    @Inject
    private ResourceDescriptionsProvider descriptions;

    @Inject
    private IContainer.Manager containers;

    @Inject
    private IResourceDescription.Manager resourceDescriptions;

    // ---- duplicates

    @Check
    public void declaredTwiceInAFile(SourceFile file) {
        Map<String, FileMember> seen = new HashMap<>();
        for (FileMember member : file.getDeclarations()) {
            Declaration declaration = (Declaration) member;
            if (declaration.getName() == null) {
                continue;
            }
            String key = member instanceof MeasurementDeclaration measurement
                    ? "measurement " + deviceName(measurement) + " " + declaration.getName()
                    : declaration.getName();
            FileMember first = seen.putIfAbsent(key, member);
            if (first != null) {
                twice(declaration, member instanceof MeasurementDeclaration ? "its device" : "this file");
            }
        }
    }

    private static String deviceName(MeasurementDeclaration measurement) {
        DeviceDeclaration device = measurement.getDevice();
        return device == null || device.eIsProxy() ? "" : device.getName();
    }

    private void twice(Declaration declaration, String where) {
        report(
                IssueCode.DUPLICATE_NAME,
                declaration,
                IsthmusPackage.Literals.DECLARATION__NAME,
                "'" + declaration.getName() + "' is declared a second time in " + where
                        + "; rename or remove one of them.");
    }

    /** Two files of one namespace share a scope; files without a namespace are each their own. */
    @Check
    public void declaredTwiceInANamespace(SourceFile file) {
        if (file.getName() == null || BuiltIns.contains(file.eResource().getURI())) {
            return;
        }
        IResourceDescription own = resourceDescriptions.getResourceDescription(file.eResource());
        for (FileMember member : file.getDeclarations()) {
            Declaration declaration = (Declaration) member;
            QualifiedName name =
                    member instanceof MeasurementDeclaration ? null : names.getFullyQualifiedName(declaration);
            if (name == null) {
                continue;
            }
            for (IContainer container :
                    containers.getVisibleContainers(own, descriptions.getResourceDescriptions(file.eResource()))) {
                for (IEObjectDescription other :
                        container.getExportedObjects(IsthmusPackage.Literals.DECLARATION, name, false)) {
                    if (!other.getEObjectURI()
                                    .trimFragment()
                                    .equals(file.eResource().getURI())
                            && other.getEClass() != IsthmusPackage.Literals.MEASUREMENT_DECLARATION) {
                        report(
                                IssueCode.DUPLICATE_NAME,
                                declaration,
                                IsthmusPackage.Literals.DECLARATION__NAME,
                                "'" + name + "' is declared in "
                                        + other.getEObjectURI().trimFragment().lastSegment()
                                        + " too; rename one of them, or give the files different namespaces.");
                        return;
                    }
                }
            }
        }
    }

    @Check
    public void declaredTwiceInAMaterial(Material material) {
        distinct(material.getQuantities(), "this material");
    }

    @Check
    public void declaredTwiceInALattice(LatticeDeclaration lattice) {
        List<Declaration> declarations = new ArrayList<>(lattice.getParameters());
        for (LatticeMember member : lattice.getMembers()) {
            if (member instanceof Declaration declaration) {
                declarations.add(declaration);
            }
        }
        distinct(declarations, "this lattice");
    }

    private void distinct(Collection<? extends Declaration> declarations, String where) {
        Set<String> seen = new HashSet<>();
        for (Declaration declaration : declarations) {
            if (declaration.getName() != null && !seen.add(declaration.getName())) {
                twice(declaration, where);
            }
        }
    }

    /** Members of a device and of its bases: parameters and constants share one set of names, each kind of member has its own. */
    @Check
    public void declaredTwiceInADevice(DeviceDeclaration device) {
        Map<String, String> inherited = new LinkedHashMap<>();
        List<DeviceDeclaration> chain = DeviceStructure.chain(device);
        for (DeviceDeclaration base : chain.subList(0, chain.size() - 1)) {
            for (DeviceMember member : base.getMembers()) {
                String key = key(member);
                if (key != null) {
                    inherited.put(key, base.getName());
                }
            }
        }
        Set<String> own = new HashSet<>();
        Set<String> removed = new HashSet<>();
        for (DeviceMember member : device.getMembers()) {
            if (member instanceof Removal removal
                    && removal.getMember() != null
                    && !removal.getMember().eIsProxy()) {
                removed.add(removal.getKind() + " " + removal.getMember().getName());
            }
            String key = key(member);
            if (key == null) {
                continue;
            }
            Declaration declaration = (Declaration) member;
            if (!own.add(key)) {
                twice(declaration, "this device");
            } else if (inherited.containsKey(key) && !removed.contains(key)) {
                report(
                        IssueCode.DUPLICATE_NAME,
                        declaration,
                        IsthmusPackage.Literals.DECLARATION__NAME,
                        "'" + declaration.getName() + "' is inherited from '" + inherited.get(key) + "'; "
                                + (member instanceof NamedMember named
                                        ? "write 'replace " + DeviceStructure.kind(named) + " " + declaration.getName()
                                                + " …' to put another in its place."
                                        : "write '" + declaration.getName() + " = …;' to override its value."));
            }
        }
    }

    private static String key(DeviceMember member) {
        if (member instanceof Parameter || member instanceof Constant) {
            return ((Declaration) member).getName() == null ? null : "value " + ((Declaration) member).getName();
        }
        if (member instanceof NamedMember named && named.getName() != null) {
            return DeviceStructure.kind(named) + " " + named.getName();
        }
        return null;
    }

    @Check
    public void overriddenTwice(DeviceDeclaration device) {
        Set<Parameter> seen = new HashSet<>();
        for (DeviceMember member : device.getMembers()) {
            if (member instanceof ParameterOverride override
                    && override.getParameter() != null
                    && !override.getParameter().eIsProxy()
                    && !seen.add(override.getParameter())) {
                report(
                        IssueCode.DUPLICATE_NAME,
                        override,
                        IsthmusPackage.Literals.PARAMETER_OVERRIDE__PARAMETER,
                        "'" + override.getParameter().getName()
                                + "' is overridden a second time in this device; remove one.");
            }
        }
    }

    /** A replacement needs something to replace. */
    @Check
    public void replacesNothing(Replacement replacement) {
        NamedMember member = replacement.getMember();
        DeviceDeclaration device = EcoreUtil2.getContainerOfType(replacement, DeviceDeclaration.class);
        if (member == null
                || member.getName() == null
                || device.getBase() != null && device.getBase().eIsProxy()) {
            return;
        }
        List<NamedMember> known = device.getBase() == null
                ? List.of()
                : DeviceStructure.of(device.getBase()).namedMembers().stream()
                        .filter(m -> DeviceStructure.kind(m).equals(DeviceStructure.kind(member)))
                        .toList();
        if (known.stream().noneMatch(m -> member.getName().equals(m.getName()))) {
            report(
                    IssueCode.UNKNOWN_NAME,
                    member,
                    IsthmusPackage.Literals.DECLARATION__NAME,
                    "There is no inherited " + DeviceStructure.kind(member) + " '" + member.getName() + "' to replace"
                            + Suggestion.phrase(member.getName(), known.stream().map(Declaration::getName)) + ".");
        }
    }

    // ---- units and use

    @Check
    public void hidesAUnit(Declaration declaration) {
        boolean value = declaration instanceof Constant || declaration instanceof Parameter;
        if (value
                && declaration.getName() != null
                && Units.bySymbol(declaration.getName()).isPresent()) {
            report(
                    IssueCode.HIDES_UNIT,
                    declaration,
                    IsthmusPackage.Literals.DECLARATION__NAME,
                    "'" + declaration.getName() + "' hides the unit "
                            + Units.bySymbol(declaration.getName()).get().name()
                            + " where it stands alone; directly after a number it is still the unit.");
        }
    }

    @Check
    public void unusedParameter(Parameter parameter) {
        if (parameter.getName() == null) {
            return;
        }
        DeviceDeclaration device = EcoreUtil2.getContainerOfType(parameter, DeviceDeclaration.class);
        boolean twice = device.getMembers().stream()
                .anyMatch(m -> m != parameter
                        && m instanceof Parameter other
                        && parameter.getName().equals(other.getName()));
        if (twice) {
            return;
        }
        for (Resource resource :
                new ArrayList<>(parameter.eResource().getResourceSet().getResources())) {
            if (resource.getContents().isEmpty()
                    || !(resource.getContents().get(0) instanceof SourceFile)
                    || BuiltIns.contains(resource.getURI())) {
                continue;
            }
            for (Reference reference :
                    EcoreUtil2.getAllContentsOfType(resource.getContents().get(0), Reference.class)) {
                if (reference.getTarget() == parameter || unknownInFamily(reference, device)) {
                    return;
                }
            }
        }
        report(
                IssueCode.UNUSED_PARAMETER,
                parameter,
                IsthmusPackage.Literals.DECLARATION__NAME,
                "No expression uses parameter '" + parameter.getName() + "' of device '" + device.getName()
                        + "'; remove it, or use it where its value was meant to matter.");
    }

    /** A name that is not known may have been meant for any parameter of the device around it. */
    private static boolean unknownInFamily(Reference reference, DeviceDeclaration device) {
        if (reference.getTarget() != null && !reference.getTarget().eIsProxy()) {
            return false;
        }
        DeviceDeclaration around = EcoreUtil2.getContainerOfType(reference, DeviceDeclaration.class);
        return around != null && DeviceStructure.chain(around).contains(device);
    }

    // ---- cycles

    @Check
    public void extendsItself(DeviceDeclaration device) {
        List<String> path = new ArrayList<>();
        Set<DeviceDeclaration> seen = new HashSet<>();
        DeviceDeclaration link = device;
        while (link != null && !link.eIsProxy() && seen.add(link)) {
            path.add("'" + link.getName() + "'");
            link = link.getBase();
        }
        if (link == device) {
            report(
                    IssueCode.CYCLE,
                    device,
                    IsthmusPackage.Literals.DEVICE_DECLARATION__BASE,
                    String.join(" extends ", path) + " extends '" + device.getName()
                            + "' again: a family needs a first device.");
        }
    }

    @Check
    public void importsItself(SourceFile file) {
        if (file.getName() == null) {
            return;
        }
        for (Import statement : file.getImports()) {
            List<String> path = new ArrayList<>();
            if (reaches(statement, file.getName(), file, new HashSet<>(), path)) {
                report(
                        IssueCode.CYCLE,
                        statement,
                        IsthmusPackage.Literals.IMPORT__IMPORTED_NAMESPACE,
                        "Namespace '" + file.getName() + "' imports itself through " + String.join(", ", path)
                                + "; move what both need into a third file.");
            }
        }
    }

    private boolean reaches(Import statement, String wanted, SourceFile from, Set<SourceFile> seen, List<String> path) {
        for (SourceFile next : filesOf(statement, from)) {
            if (next == from || !seen.add(next)) {
                continue;
            }
            path.add("'" + next.getName() + "'");
            if (next.getName().equals(wanted)) {
                return false;
            }
            for (Import further : next.getImports()) {
                if (names(further, wanted) || reaches(further, wanted, next, seen, path)) {
                    return true;
                }
            }
            path.remove(path.size() - 1);
        }
        return false;
    }

    private static boolean names(Import statement, String namespace) {
        String written = statement.getImportedNamespace();
        return written != null && (written.equals(namespace + ".*") || written.startsWith(namespace + "."));
    }

    private static List<SourceFile> filesOf(Import statement, SourceFile from) {
        List<SourceFile> files = new ArrayList<>();
        for (Resource resource :
                new ArrayList<>(from.eResource().getResourceSet().getResources())) {
            if (!resource.getContents().isEmpty()
                    && resource.getContents().get(0) instanceof SourceFile file
                    && file.getName() != null
                    && names(statement, file.getName())) {
                files.add(file);
            }
        }
        return files;
    }

    @Check
    public void importsNothing(Import statement) {
        String written = statement.getImportedNamespace();
        SourceFile file = (SourceFile) EcoreUtil2.getRootContainer(statement);
        if (written == null || !filesOf(statement, file).isEmpty() || written.startsWith(BuiltIns.LIBRARY_NAMESPACE)) {
            return;
        }
        List<String> known = new ArrayList<>();
        for (Resource resource :
                new ArrayList<>(file.eResource().getResourceSet().getResources())) {
            for (EObject root : resource.getContents()) {
                if (root instanceof SourceFile other && other.getName() != null) {
                    known.add(other.getName());
                }
            }
        }
        String namespace = written.replaceFirst("\\.\\*$", "");
        report(
                IssueCode.UNKNOWN_NAME,
                statement,
                IsthmusPackage.Literals.IMPORT__IMPORTED_NAMESPACE,
                "No file of this project has namespace '" + namespace + "'"
                        + Suggestion.phrase(namespace, known.stream()) + ".");
    }
}
