package org.isthmus.language.elaboration;

import org.eclipse.emf.ecore.EObject;
import org.eclipse.xtext.EcoreUtil2;
import org.isthmus.language.elaboration.geometry.BodySites;
import org.isthmus.language.elaboration.geometry.Extent;
import org.isthmus.language.evaluation.Code.TruthNode;
import org.isthmus.language.evaluation.EvaluationFailure;
import org.isthmus.language.evaluation.Shape;
import org.isthmus.language.evaluation.Value;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.Body;

/**
 * Chooses the sites of the body. A random number in the body's condition belongs to the site's number among those inside
 * the shape, chosen or not, in the order of the table.
 */
final class ExpandLattice implements Pass {
    /** Largest number of sites: tables of some hundred bytes per site must fit into a gibibyte with room to spare. */
    static final int MOST_SITES = 2_000_000;

    /** Operations that a condition may cost in all. */
    private static final long MOST_WORK = 80_000_000;

    @Override
    public void run(Draft draft) {
        Body body = draft.structure.body().orElse(null);
        if (body == null) {
            draft.findings.add(
                    IssueCode.INCOMPLETE_DEVICE,
                    draft.structure.device(),
                    "Device '" + draft.structure.device().getName()
                            + "' has no body: add one, such as body box(0 nm .. 10 nm);");
            return;
        }
        try {
            search(draft, body);
        } catch (EvaluationFailure failure) {
            draft.findings.add(failure);
        }
    }

    private static void search(Draft draft, Body body) {
        if (!(draft.evaluator.evaluate(body.getShape()) instanceof Value.ShapeValue value)) {
            draft.findings.add(
                    IssueCode.KIND_MISMATCH, body.getShape(), "A body must be a shape such as box(0 nm .. 10 nm).");
            return;
        }
        Shape shape = value.shape();
        TruthNode condition = draft.evaluator.condition(body.getCondition());
        int nodes = body.getCondition() == null
                ? 0
                : EcoreUtil2.getAllContentsOfType(body.getCondition(), EObject.class)
                        .size();
        BodySites.Chooser chooser =
                new ShapeChooser(shape, draft.frame.tolerance(), body.getCondition() == null ? null : condition);
        double[] bounds = shape.bounds();
        for (double bound : bounds) {
            if (Double.isNaN(bound)) {
                draft.findings.add(IssueCode.NOT_FINITE, body.getShape(), "A bound of the body is not a number.");
                return;
            }
        }
        BodySites.Search found = BodySites.search(
                draft.frame, Extent.of(bounds), chooser, MOST_SITES, MOST_WORK / Math.max(10, nodes), draft.cancelled);
        if (found instanceof BodySites.Unbounded open) {
            draft.findings.add(IssueCode.UNBOUNDED_BODY, body.getShape(), unbounded(draft, open.axis()));
        } else if (found instanceof BodySites.TooMany many) {
            draft.findings.add(
                    IssueCode.BODY_TOO_LARGE,
                    body.getShape(),
                    "The body has too many sites: about " + Told.count(many.estimate()) + " of lattice '"
                            + draft.lattice.name() + "' lie in the box around it, and " + MOST_SITES
                            + " are the most; take a smaller body or a wider spacing.");
        } else if (found instanceof BodySites.Found sites) {
            if (sites.sites().count() == 0) {
                draft.findings.add(IssueCode.NO_SITE, body.getShape(), empty(draft, bounds));
            } else {
                draft.body = sites.sites();
            }
        }
    }

    private static String unbounded(Draft draft, int axis) {
        String name = "xyz".substring(axis, axis + 1);
        return "The body has no bounds along " + name + ", but lattice '" + draft.lattice.name()
                + "' goes on there for ever: give the shape a range along " + name + ".";
    }

    private static String empty(Draft draft, double[] bounds) {
        StringBuilder range = new StringBuilder();
        for (int axis = 0; axis < 3; axis++) {
            if (Double.isFinite(bounds[2 * axis]) && Double.isFinite(bounds[2 * axis + 1])) {
                range.append(range.isEmpty() ? "" : ", ")
                        .append("xyz".charAt(axis))
                        .append(" from ")
                        .append(Told.nm(bounds[2 * axis]))
                        .append(" to ")
                        .append(Told.nm(bounds[2 * axis + 1]));
            }
        }
        return "The body holds no site of lattice '" + draft.lattice.name() + "' (shortest bond "
                + Told.nm(draft.frame.shortestBond()) + ", zero cell at "
                + Told.place(draft.frame.origin(0), draft.frame.origin(1), draft.frame.origin(2)) + "): it lies in "
                + range + "; move or enlarge it.";
    }

    @Override
    public String text(Draft draft) {
        BodySites body = draft.body;
        StringBuilder text = new StringBuilder("sites: " + body.count() + "\n");
        int shown = Math.min(body.count(), 12);
        for (int site = 0; site < shown; site++) {
            text.append(site)
                    .append(": cell ")
                    .append(body.n1(site))
                    .append(' ')
                    .append(body.n2(site))
                    .append(' ')
                    .append(body.n3(site))
                    .append(" basis ")
                    .append(body.basis(site))
                    .append(" at ")
                    .append(body.x(site))
                    .append(' ')
                    .append(body.y(site))
                    .append(' ')
                    .append(body.z(site))
                    .append('\n');
        }
        return shown < body.count() ? text + "and " + (body.count() - shown) + " more\n" : text.toString();
    }
}
