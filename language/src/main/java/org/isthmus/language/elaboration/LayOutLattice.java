package org.isthmus.language.elaboration;

import org.isthmus.language.elaboration.geometry.LatticeFrame;
import org.isthmus.language.evaluation.EvaluationFailure;
import org.isthmus.language.evaluation.Evaluator;
import org.isthmus.language.evaluation.Value;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.LatticeDeclaration;
import org.isthmus.language.isthmus.LatticeUse;
import org.isthmus.language.isthmus.Origin;
import org.isthmus.runtime.device.DeviceText;

/** Reads the lattice, checks it, and lays its zero cell at the origin. */
final class LayOutLattice implements Pass {
    @Override
    public void run(Draft draft) {
        LatticeUse use = draft.structure.lattice().orElse(null);
        if (use == null) {
            draft.findings.add(
                    IssueCode.INCOMPLETE_DEVICE,
                    draft.structure.device(),
                    "Device '" + draft.structure.device().getName()
                            + "' has no lattice: add one, such as lattice Chain(a = 1 nm, m = 1 me);");
            return;
        }
        LatticeDeclaration declaration = use.getLattice();
        if (declaration == null || declaration.eIsProxy()) {
            draft.findings.add(IssueCode.UNKNOWN_NAME, use, "This lattice is not known.");
            return;
        }
        draft.findings.standIn(use);
        draft.lattice = LatticeReading.read(declaration, new Evaluator(draft.environment), draft.findings);
        if (draft.lattice == null) {
            return;
        }
        double[] origin = new double[3];
        Origin statement = draft.structure.origin().orElse(null);
        if (statement != null) {
            try {
                if (new Evaluator(draft.environment).evaluate(statement.getPosition())
                        instanceof Value.PointValue point) {
                    for (int axis = 0; axis < 3; axis++) {
                        origin[axis] = point.component(axis);
                        if (!Double.isFinite(origin[axis])) {
                            draft.findings.add(
                                    IssueCode.NOT_FINITE, statement.getPosition(), "The origin is not a finite place.");
                        }
                    }
                }
            } catch (EvaluationFailure failure) {
                draft.findings.add(failure);
            }
        }
        draft.frame = LatticeFrame.of(draft.lattice, origin);
        draft.evaluator = new Evaluator(draft.environment.withTolerance(draft.frame.tolerance()));
    }

    @Override
    public String text(Draft draft) {
        return DeviceText.lattice(draft.lattice);
    }
}
