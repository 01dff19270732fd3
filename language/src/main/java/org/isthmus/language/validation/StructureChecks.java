package org.isthmus.language.validation;

import java.util.HashSet;
import java.util.List;
import java.util.Set;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.xtext.validation.Check;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.Across;
import org.isthmus.language.isthmus.Argument;
import org.isthmus.language.isthmus.Body;
import org.isthmus.language.isthmus.DephasingDeclaration;
import org.isthmus.language.isthmus.DeviceDeclaration;
import org.isthmus.language.isthmus.DeviceMember;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.LatticeUse;
import org.isthmus.language.isthmus.LeadDeclaration;
import org.isthmus.language.isthmus.LeadSetting;
import org.isthmus.language.isthmus.MagneticField;
import org.isthmus.language.isthmus.Origin;
import org.isthmus.language.isthmus.Setting;
import org.isthmus.language.structure.DeviceStructure;
import org.isthmus.language.typing.Suggestion;
import org.isthmus.runtime.device.Side;

/** What blocks must and must not hold. */
public class StructureChecks extends ConcernChecks {
    @Check
    public void deviceIsComplete(DeviceDeclaration device) {
        if (DeviceStructure.chain(device).stream()
                .anyMatch(d -> d.getBase() != null && d.getBase().eIsProxy())) {
            return;
        }
        DeviceStructure structure = DeviceStructure.of(device);
        boolean lattice = structure.lattice().isPresent();
        boolean body = structure.body().isPresent();
        if ((!lattice || !body) && !isCyclic(device)) {
            report(
                    IssueCode.INCOMPLETE_DEVICE,
                    device,
                    IsthmusPackage.Literals.DECLARATION__NAME,
                    "Device '" + device.getName() + "' has no "
                            + (lattice ? "body" : body ? "lattice" : "lattice and no body")
                            + "; write 'lattice Chain(a = …);' and 'body box(…);', for example.");
        }
    }

    private static boolean isCyclic(DeviceDeclaration device) {
        Set<DeviceDeclaration> seen = new HashSet<>();
        for (DeviceDeclaration link = device; link != null; link = link.getBase()) {
            if (!seen.add(link)) {
                return true;
            }
        }
        return false;
    }

    /** What has no name can be there once; a derived device may give its own. */
    @Check
    public void givenTwice(DeviceDeclaration device) {
        Set<String> seen = new HashSet<>();
        for (DeviceMember member : device.getMembers()) {
            String what = member instanceof LatticeUse
                    ? "lattice"
                    : member instanceof Body
                            ? "body"
                            : member instanceof Origin
                                    ? "origin"
                                    : member instanceof MagneticField ? "magnetic field" : null;
            if (what != null && !seen.add(what)) {
                report(
                        IssueCode.DUPLICATE_NAME,
                        member,
                        null,
                        "The " + what + " of device '" + device.getName()
                                + "' is given a second time; remove one of them.");
            }
        }
    }

    @Check
    public void argumentGivenTwice(LatticeUse use) {
        Set<EObject> seen = new HashSet<>();
        for (Argument argument : use.getArguments()) {
            if (argument.getParameter() != null
                    && !argument.getParameter().eIsProxy()
                    && !seen.add(argument.getParameter())) {
                report(
                        IssueCode.DUPLICATE_NAME,
                        argument,
                        IsthmusPackage.Literals.ARGUMENT__PARAMETER,
                        "'" + argument.getParameter().getName() + "' is given a second time; remove one.");
            }
        }
    }

    @Check
    public void lead(LeadDeclaration lead) {
        if (lead.getSide() != null) {
            side(lead);
        } else if (lead.getCondition() != null) {
            on(lead);
        }
        Set<String> seen = new HashSet<>();
        for (LeadSetting setting : lead.getSettings()) {
            String name = setting instanceof Setting plain
                    ? plain.getName()
                    : setting instanceof Across ? "across" : "floating";
            if (name != null && !seen.add(name)) {
                report(
                        IssueCode.DUPLICATE_NAME,
                        setting,
                        null,
                        "'" + name + "' is given a second time in this lead; remove one.");
            }
        }
    }

    private void side(LeadDeclaration lead) {
        List<String> words =
                java.util.Arrays.stream(Side.values()).map(Side::word).toList();
        if (!words.contains(lead.getSide())) {
            report(
                    IssueCode.UNKNOWN_SIDE,
                    lead,
                    IsthmusPackage.Literals.LEAD_DECLARATION__SIDE,
                    "'" + lead.getSide() + "' is no side of a body" + Suggestion.phrase(lead.getSide(), words.stream())
                            + "; there are " + String.join(", ", words) + ".");
        }
        for (LeadSetting setting : lead.getSettings()) {
            if (setting instanceof Setting plain
                    && ("broadening".equals(plain.getName()) || "selfenergy".equals(plain.getName()))) {
                report(
                        IssueCode.UNKNOWN_SETTING,
                        plain,
                        IsthmusPackage.Literals.SETTING__NAME,
                        "Lead '" + lead.getName() + "' continues the lattice, so its '" + plain.getName()
                                + "' follows from it; write 'lead " + lead.getName()
                                + " on …' for a contact given by numbers.");
            }
        }
    }

    private void on(LeadDeclaration lead) {
        boolean given = false;
        for (LeadSetting setting : lead.getSettings()) {
            if (setting instanceof Across) {
                report(
                        IssueCode.UNKNOWN_SETTING,
                        setting,
                        null,
                        "'across' picks a part of a side; lead '" + lead.getName() + "' says its sites after 'on'.");
            }
            if (setting instanceof Setting plain) {
                boolean source = "broadening".equals(plain.getName()) || "selfenergy".equals(plain.getName());
                if (source && given) {
                    report(
                            IssueCode.DUPLICATE_NAME,
                            plain,
                            IsthmusPackage.Literals.SETTING__NAME,
                            "Lead '" + lead.getName() + "' has both a broadening and a self-energy; keep one.");
                }
                given |= source;
            }
        }
        if (!given) {
            report(
                    IssueCode.INCOMPLETE_LEAD,
                    lead,
                    IsthmusPackage.Literals.DECLARATION__NAME,
                    "Lead '" + lead.getName() + "' needs 'broadening = …' or 'selfenergy = table(…)'.");
        }
    }

    @Check
    public void dephasing(DephasingDeclaration dephasing) {
        Set<String> seen = new HashSet<>();
        dephasing.getSettings().forEach(setting -> {
            String name = setting instanceof Setting plain
                    ? plain.getName()
                    : setting.eClass().getName();
            if (name != null && !seen.add(name)) {
                report(
                        IssueCode.DUPLICATE_NAME,
                        setting,
                        null,
                        "This is given a second time in the dephasing; remove one.");
            }
        });
    }
}
