package org.isthmus.language.scoping;

import static org.isthmus.language.isthmus.IsthmusPackage.Literals.ARGUMENT__PARAMETER;
import static org.isthmus.language.isthmus.IsthmusPackage.Literals.AVERAGE__PARAMETER;
import static org.isthmus.language.isthmus.IsthmusPackage.Literals.AXIS_COORDINATE__AXIS;
import static org.isthmus.language.isthmus.IsthmusPackage.Literals.BIAS_AXIS__LEAD;
import static org.isthmus.language.isthmus.IsthmusPackage.Literals.HOPPING_DECLARATION__SOURCE;
import static org.isthmus.language.isthmus.IsthmusPackage.Literals.HOPPING_DECLARATION__TARGET;
import static org.isthmus.language.isthmus.IsthmusPackage.Literals.MEASUREMENT_SETTING__TARGET;
import static org.isthmus.language.isthmus.IsthmusPackage.Literals.OVERLAP_DECLARATION__SOURCE;
import static org.isthmus.language.isthmus.IsthmusPackage.Literals.OVERLAP_DECLARATION__TARGET;
import static org.isthmus.language.isthmus.IsthmusPackage.Literals.PARAMETER_OVERRIDE__PARAMETER;
import static org.isthmus.language.isthmus.IsthmusPackage.Literals.REFERENCE__TARGET;
import static org.isthmus.language.isthmus.IsthmusPackage.Literals.REMOVAL__MEMBER;
import static org.isthmus.language.isthmus.IsthmusPackage.Literals.SWEEP_AXIS__PARAMETER;

import java.util.ArrayList;
import java.util.List;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.emf.ecore.EReference;
import org.eclipse.xtext.EcoreUtil2;
import org.eclipse.xtext.naming.QualifiedName;
import org.eclipse.xtext.resource.EObjectDescription;
import org.eclipse.xtext.resource.IEObjectDescription;
import org.eclipse.xtext.scoping.IScope;
import org.eclipse.xtext.scoping.impl.SimpleScope;
import org.isthmus.language.isthmus.Argument;
import org.isthmus.language.isthmus.CatalogueEntry;
import org.isthmus.language.isthmus.Constant;
import org.isthmus.language.isthmus.Declaration;
import org.isthmus.language.isthmus.DeviceDeclaration;
import org.isthmus.language.isthmus.HeaderParameter;
import org.isthmus.language.isthmus.LatticeDeclaration;
import org.isthmus.language.isthmus.LatticeMember;
import org.isthmus.language.isthmus.LatticeUse;
import org.isthmus.language.isthmus.MeasurementDeclaration;
import org.isthmus.language.isthmus.Removal;
import org.isthmus.language.isthmus.SiteDeclaration;
import org.isthmus.language.isthmus.VectorDeclaration;
import org.isthmus.language.structure.DeviceStructure;

/** Names inside lattices, devices and measurements; everything else is a matter of files and namespaces. */
public class IsthmusScopeProvider extends AbstractIsthmusScopeProvider {
    @Override
    public IScope getScope(EObject context, EReference reference) {
        if (reference == REFERENCE__TARGET) {
            return new SimpleScope(
                    super.getScope(EcoreUtil2.getRootContainer(context), reference), named(values(context)));
        }
        if (reference == HOPPING_DECLARATION__SOURCE
                || reference == HOPPING_DECLARATION__TARGET
                || reference == OVERLAP_DECLARATION__SOURCE
                || reference == OVERLAP_DECLARATION__TARGET) {
            return only(sites(EcoreUtil2.getContainerOfType(context, LatticeDeclaration.class)));
        }
        if (reference == ARGUMENT__PARAMETER) {
            return only(headerParameters(context));
        }
        if (reference == PARAMETER_OVERRIDE__PARAMETER) {
            return only(inherited(context).map(DeviceStructure::parameters).orElse(List.of()));
        }
        if (reference == REMOVAL__MEMBER) {
            return only(removable(context));
        }
        if (reference == BIAS_AXIS__LEAD) {
            return only(measured(context).map(DeviceStructure::leads).orElse(List.of()));
        }
        if (reference == SWEEP_AXIS__PARAMETER || reference == AVERAGE__PARAMETER) {
            return only(measured(context).map(DeviceStructure::parameters).orElse(List.of()));
        }
        if (reference == MEASUREMENT_SETTING__TARGET) {
            return new SimpleScope(
                    only(measured(context).map(DeviceStructure::parameters).orElse(List.of())),
                    named(settings(context)));
        }
        if (reference == AXIS_COORDINATE__AXIS) {
            List<Declaration> axes = new ArrayList<>();
            measured(context).ifPresent(structure -> {
                axes.addAll(structure.parameters());
                axes.addAll(structure.leads());
            });
            return new SimpleScope(only(axes), named(settings(context)));
        }
        return super.getScope(context, reference);
    }

    /**
     * What an expression may name besides the declarations of files. The defaults in a lattice's header do not see the
     * header: {@code alpha = 0 eV*m} means metres there, though the header has a mass {@code m}.
     */
    private static List<? extends Declaration> values(EObject context) {
        if (EcoreUtil2.getContainerOfType(context, HeaderParameter.class) != null) {
            return List.of();
        }
        LatticeDeclaration lattice = EcoreUtil2.getContainerOfType(context, LatticeDeclaration.class);
        if (lattice != null) {
            List<Declaration> values = new ArrayList<>(lattice.getParameters());
            for (LatticeMember member : lattice.getMembers()) {
                if (member instanceof Constant || member instanceof VectorDeclaration) {
                    values.add((Declaration) member);
                }
            }
            return values;
        }
        DeviceDeclaration device = EcoreUtil2.getContainerOfType(context, DeviceDeclaration.class);
        if (device != null) {
            return DeviceStructure.of(device).values();
        }
        return measured(context)
                .map(structure -> {
                    List<Declaration> values = new ArrayList<>(structure.values());
                    values.addAll(structure.leads());
                    return values;
                })
                .orElse(new ArrayList<>());
    }

    private static java.util.Optional<DeviceStructure> measured(EObject context) {
        MeasurementDeclaration measurement = EcoreUtil2.getContainerOfType(context, MeasurementDeclaration.class);
        if (measurement == null
                || measurement.getDevice() == null
                || measurement.getDevice().eIsProxy()) {
            return java.util.Optional.empty();
        }
        return java.util.Optional.of(DeviceStructure.of(measurement.getDevice()));
    }

    private static java.util.Optional<DeviceStructure> inherited(EObject context) {
        DeviceDeclaration device = EcoreUtil2.getContainerOfType(context, DeviceDeclaration.class);
        return device == null ? java.util.Optional.empty() : java.util.Optional.of(DeviceStructure.of(device));
    }

    /** Members of the base with the kind that the removal names. */
    private static List<? extends Declaration> removable(EObject context) {
        Removal removal = EcoreUtil2.getContainerOfType(context, Removal.class);
        DeviceDeclaration device = EcoreUtil2.getContainerOfType(context, DeviceDeclaration.class);
        if (removal == null
                || device == null
                || device.getBase() == null
                || device.getBase().eIsProxy()) {
            return List.of();
        }
        return DeviceStructure.of(device.getBase()).namedMembers().stream()
                .filter(member -> DeviceStructure.kind(member).equals(removal.getKind()))
                .toList();
    }

    private static List<? extends Declaration> sites(LatticeDeclaration lattice) {
        return lattice == null
                ? List.of()
                : lattice.getMembers().stream()
                        .filter(SiteDeclaration.class::isInstance)
                        .map(SiteDeclaration.class::cast)
                        .toList();
    }

    private static List<? extends Declaration> headerParameters(EObject context) {
        LatticeUse use = context instanceof Argument
                ? EcoreUtil2.getContainerOfType(context, LatticeUse.class)
                : context instanceof LatticeUse direct ? direct : null;
        return use == null || use.getLattice() == null || use.getLattice().eIsProxy()
                ? List.of()
                : use.getLattice().getParameters();
    }

    private static List<CatalogueEntry> settings(EObject context) {
        return context.eResource() == null || context.eResource().getResourceSet() == null
                ? List.of()
                : BuiltIns.measurementSettings(context.eResource().getResourceSet());
    }

    private static IScope only(List<? extends Declaration> declarations) {
        return new SimpleScope(IScope.NULLSCOPE, named(declarations));
    }

    private static List<IEObjectDescription> named(List<? extends Declaration> declarations) {
        List<IEObjectDescription> descriptions = new ArrayList<>();
        for (Declaration declaration : declarations) {
            if (declaration.getName() != null) {
                descriptions.add(EObjectDescription.create(QualifiedName.create(declaration.getName()), declaration));
            }
        }
        return descriptions;
    }
}
