package org.isthmus.language.elaboration;

import org.isthmus.language.evaluation.EvaluationFailure;
import org.isthmus.language.evaluation.Evaluator;
import org.isthmus.language.evaluation.Value;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.Calibration;
import org.isthmus.language.isthmus.DephasingDeclaration;
import org.isthmus.language.isthmus.DephasingSetting;
import org.isthmus.language.isthmus.Electrostatics;
import org.isthmus.language.isthmus.Floating;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.LeadDeclaration;
import org.isthmus.language.isthmus.LeadSetting;
import org.isthmus.language.isthmus.Setting;

/** Says by name what the language knows and the solver does not yet. Dephasing of strength zero has no effect and passes. */
final class RejectUnsolved implements Pass {
    @Override
    public void run(Draft draft) {
        Evaluator evaluator = new Evaluator(draft.environment);
        for (DephasingDeclaration dephasing : draft.structure.dephasings()) {
            if (!idle(dephasing, evaluator, draft.findings)) {
                draft.findings.add(
                        IssueCode.NOT_SOLVED_YET,
                        dephasing,
                        IsthmusPackage.Literals.DECLARATION__NAME,
                        "Dephasing is not solved yet: remove '" + dephasing.getName()
                                + "' or give it strength 0 eV^2.");
            }
        }
        for (LeadDeclaration lead : draft.structure.leads()) {
            for (LeadSetting setting : lead.getSettings()) {
                if (setting instanceof Floating) {
                    floating(draft, lead, setting);
                }
            }
        }
        for (Electrostatics electrostatics : draft.structure.electrostatics()) {
            draft.findings.add(
                    IssueCode.NOT_SOLVED_YET,
                    electrostatics,
                    "Electrostatics is not solved yet: give the potential by 'potential NAME = …;'.");
        }
    }

    private static void floating(Draft draft, LeadDeclaration lead, LeadSetting floating) {
        boolean held = lead.getSettings().stream()
                .anyMatch(s -> s instanceof Setting setting && "mu".equals(setting.getName()));
        if (held) {
            draft.findings.add(
                    IssueCode.FLOATING_WITH_MU,
                    floating,
                    "Lead '" + lead.getName()
                            + "' is floating and has a mu: a floating lead's mu is found, not given; remove one of the two.");
        } else {
            draft.findings.add(
                    IssueCode.NOT_SOLVED_YET,
                    floating,
                    "Floating leads are not solved yet: give '" + lead.getName() + "' a mu instead.");
        }
    }

    private static boolean idle(DephasingDeclaration dephasing, Evaluator evaluator, Findings findings) {
        boolean zero = false;
        for (DephasingSetting setting : dephasing.getSettings()) {
            if (setting instanceof Calibration) {
                return false;
            }
            if (setting instanceof Setting plain && "strength".equals(plain.getName())) {
                try {
                    zero = evaluator.evaluate(plain.getValue()) instanceof Value.Real real && real.value() == 0;
                } catch (EvaluationFailure failure) {
                    findings.add(failure);
                    return true;
                }
            }
        }
        return zero;
    }

    @Override
    public String text(Draft draft) {
        return "";
    }
}
