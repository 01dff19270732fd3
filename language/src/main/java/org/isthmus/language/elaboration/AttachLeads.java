package org.isthmus.language.elaboration;

import java.util.HashMap;
import java.util.List;
import java.util.Map;
import org.eclipse.emf.ecore.EObject;
import org.isthmus.language.evaluation.EvaluationFailure;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.Across;
import org.isthmus.language.isthmus.Floating;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.LeadDeclaration;
import org.isthmus.language.isthmus.Setting;
import org.isthmus.runtime.device.DeviceText;
import org.isthmus.runtime.device.Lead;

/** Attaches every lead: the lattice going on from a side, or a contact on chosen sites. */
final class AttachLeads implements Pass {
    private static final double TEMPERATURE = 300;
    private static final double MU = 0;

    @Override
    public void run(Draft draft) {
        Map<Integer, String> owners = new HashMap<>();
        for (LeadDeclaration lead : draft.structure.leads()) {
            Elaborator.stopIf(draft.cancelled);
            try {
                attach(draft, lead, owners);
            } catch (EvaluationFailure failure) {
                draft.findings.add(failure);
            }
        }
    }

    private static void attach(Draft draft, LeadDeclaration lead, Map<Integer, String> owners) {
        double temperature = number(draft, lead, "temperature", TEMPERATURE);
        double mu = number(draft, lead, "mu", MU);
        if (temperature < 0) {
            draft.findings.add(
                    IssueCode.NEGATIVE_TEMPERATURE,
                    LatticeReading.setting(lead.getSettings(), "temperature"),
                    "Lead '" + lead.getName() + "' has the temperature " + Told.number(temperature)
                            + " K: it must be 0 K or more.");
            return;
        }
        boolean floating = lead.getSettings().stream().anyMatch(Floating.class::isInstance);
        Lead attached = lead.getSide() != null
                ? new SideLead(draft, lead, owners).attach(temperature, mu, floating)
                : new SiteLead(draft, lead).attach(temperature, mu, floating);
        if (attached != null) {
            draft.leads.add(attached);
        }
    }

    private static double number(Draft draft, LeadDeclaration lead, String name, double absent) {
        Setting setting = LatticeReading.setting(lead.getSettings(), name);
        return setting == null ? absent : draft.evaluator.real(setting.getValue());
    }

    /** Says that some settings of a lead have no meaning for its kind; true where there are any. */
    static boolean misplaced(Draft draft, LeadDeclaration lead, List<String> names, String why) {
        boolean found = false;
        for (EObject setting : lead.getSettings()) {
            String name =
                    setting instanceof Setting plain ? plain.getName() : setting instanceof Across ? "across" : "";
            if (names.contains(name)) {
                draft.findings.add(
                        IssueCode.MISPLACED,
                        setting,
                        "'" + name + "' has no meaning for lead '" + lead.getName() + "': " + why + ".");
                found = true;
            }
        }
        return found;
    }

    /** A finding about a lead, at its name. */
    static void tell(Draft draft, LeadDeclaration lead, IssueCode code, String text) {
        draft.findings.add(code, lead, IsthmusPackage.Literals.DECLARATION__NAME, text);
    }

    @Override
    public String text(Draft draft) {
        StringBuilder text = new StringBuilder();
        draft.leads.forEach(lead -> text.append(DeviceText.lead(lead, draft.sites)));
        return text.toString();
    }
}
