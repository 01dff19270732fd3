package org.isthmus.language.structure;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.emf.ecore.EReference;
import org.eclipse.xtext.nodemodel.util.NodeModelUtils;
import org.isthmus.language.isthmus.Body;
import org.isthmus.language.isthmus.Constant;
import org.isthmus.language.isthmus.Declaration;
import org.isthmus.language.isthmus.DephasingDeclaration;
import org.isthmus.language.isthmus.DeviceDeclaration;
import org.isthmus.language.isthmus.DeviceMember;
import org.isthmus.language.isthmus.Electrostatics;
import org.isthmus.language.isthmus.HoppingScale;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.LatticeUse;
import org.isthmus.language.isthmus.LeadDeclaration;
import org.isthmus.language.isthmus.MagneticField;
import org.isthmus.language.isthmus.NamedMember;
import org.isthmus.language.isthmus.Origin;
import org.isthmus.language.isthmus.Parameter;
import org.isthmus.language.isthmus.ParameterOverride;
import org.isthmus.language.isthmus.PotentialDeclaration;
import org.isthmus.language.isthmus.Removal;
import org.isthmus.language.isthmus.Replacement;

/**
 * A device as its family makes it: members of the base first, then overridden, replaced, removed and added by each
 * device down the chain. A replacement stands where the replaced member stood.
 */
public final class DeviceStructure {
    private final DeviceDeclaration device;
    private final List<DeviceDeclaration> chain;
    private final Map<String, Parameter> parameters = new LinkedHashMap<>();
    private final Map<String, Constant> constants = new LinkedHashMap<>();
    private final Map<String, ParameterOverride> overrides = new LinkedHashMap<>();
    private final Map<String, NamedMember> members = new LinkedHashMap<>();
    private final List<Electrostatics> electrostatics = new ArrayList<>();
    private LatticeUse lattice;
    private Body body;
    private Origin origin;
    private MagneticField field;

    private DeviceStructure(DeviceDeclaration device) {
        this.device = device;
        chain = chain(device);
        for (DeviceDeclaration link : chain) {
            link.getMembers().forEach(this::take);
        }
    }

    /** Reads a device. */
    public static DeviceStructure of(DeviceDeclaration device) {
        return new DeviceStructure(device);
    }

    /** The devices that a device extends, farthest first, itself last; stops before a cycle closes. */
    public static List<DeviceDeclaration> chain(DeviceDeclaration device) {
        Set<DeviceDeclaration> seen = new LinkedHashSet<>();
        DeviceDeclaration link = device;
        while (link != null && !link.eIsProxy() && seen.add(link)) {
            link = link.getBase();
        }
        List<DeviceDeclaration> chain = new ArrayList<>(seen);
        java.util.Collections.reverse(chain);
        return chain;
    }

    private void take(DeviceMember member) {
        if (member instanceof Parameter parameter) {
            parameters.put(parameter.getName(), parameter);
        } else if (member instanceof Constant constant) {
            constants.put(constant.getName(), constant);
        } else if (member instanceof ParameterOverride override) {
            overrides.put(written(override, IsthmusPackage.Literals.PARAMETER_OVERRIDE__PARAMETER), override);
        } else if (member instanceof NamedMember named) {
            members.put(key(named), named);
        } else if (member instanceof Replacement replacement) {
            if (replacement.getMember() != null) {
                members.put(key(replacement.getMember()), replacement.getMember());
            }
        } else if (member instanceof Removal removal) {
            members.remove(removal.getKind() + " " + written(removal, IsthmusPackage.Literals.REMOVAL__MEMBER));
        } else if (member instanceof LatticeUse use) {
            lattice = use;
        } else if (member instanceof Body newBody) {
            body = newBody;
        } else if (member instanceof Origin newOrigin) {
            origin = newOrigin;
        } else if (member instanceof MagneticField newField) {
            field = newField;
        } else if (member instanceof Electrostatics section) {
            electrostatics.add(section);
        }
    }

    /** The name as the text has it: linking asks for the structure, so the structure must not ask for links. */
    private static String written(EObject object, EReference reference) {
        return NodeModelUtils.findNodesForFeature(object, reference).stream()
                .map(NodeModelUtils::getTokenText)
                .findFirst()
                .orElse("");
    }

    /** Members of different kinds may share a name. */
    private static String key(NamedMember member) {
        return kind(member) + " " + member.getName();
    }

    /** The word that starts the member's statement: {@code potential}, {@code hopping}, {@code lead}, {@code dephasing}. */
    public static String kind(NamedMember member) {
        if (member instanceof PotentialDeclaration) {
            return "potential";
        }
        if (member instanceof HoppingScale) {
            return "hopping";
        }
        return member instanceof LeadDeclaration ? "lead" : "dephasing";
    }

    public DeviceDeclaration device() {
        return device;
    }

    /** Base first, the device last. */
    public List<DeviceDeclaration> chain() {
        return chain;
    }

    public List<Parameter> parameters() {
        return List.copyOf(parameters.values());
    }

    public Optional<Parameter> parameter(String name) {
        return Optional.ofNullable(parameters.get(name));
    }

    /** The override that is nearest to the device. */
    public Optional<ParameterOverride> override(Parameter parameter) {
        return Optional.ofNullable(overrides.get(parameter.getName()));
    }

    public List<Constant> constants() {
        return List.copyOf(constants.values());
    }

    public Optional<LatticeUse> lattice() {
        return Optional.ofNullable(lattice);
    }

    public Optional<Body> body() {
        return Optional.ofNullable(body);
    }

    public Optional<Origin> origin() {
        return Optional.ofNullable(origin);
    }

    public Optional<MagneticField> field() {
        return Optional.ofNullable(field);
    }

    public List<Electrostatics> electrostatics() {
        return electrostatics;
    }

    public List<PotentialDeclaration> potentials() {
        return members(PotentialDeclaration.class);
    }

    public List<HoppingScale> hoppingScales() {
        return members(HoppingScale.class);
    }

    public List<LeadDeclaration> leads() {
        return members(LeadDeclaration.class);
    }

    public List<DephasingDeclaration> dephasings() {
        return members(DephasingDeclaration.class);
    }

    private <T extends NamedMember> List<T> members(Class<T> type) {
        return members.values().stream()
                .filter(type::isInstance)
                .map(type::cast)
                .toList();
    }

    public Optional<LeadDeclaration> lead(String name) {
        return leads().stream().filter(lead -> name.equals(lead.getName())).findFirst();
    }

    /** Parameters and constants: what an expression inside the device may name. */
    public List<Declaration> values() {
        List<Declaration> values = new ArrayList<>(parameters.values());
        values.addAll(constants.values());
        return values;
    }

    /** Everything with a name, for override, replacement and removal. */
    public List<NamedMember> namedMembers() {
        return List.copyOf(members.values());
    }
}
