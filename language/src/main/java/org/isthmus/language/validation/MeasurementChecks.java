package org.isthmus.language.validation;

import java.util.HashSet;
import java.util.List;
import java.util.Set;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.xtext.EcoreUtil2;
import org.eclipse.xtext.nodemodel.util.NodeModelUtils;
import org.eclipse.xtext.validation.Check;
import org.isthmus.language.evaluation.Environment;
import org.isthmus.language.evaluation.EvaluationFailure;
import org.isthmus.language.evaluation.Evaluator;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.Average;
import org.isthmus.language.isthmus.BiasAxis;
import org.isthmus.language.isthmus.BinaryExpression;
import org.isthmus.language.isthmus.CatalogueEntry;
import org.isthmus.language.isthmus.DeviceDeclaration;
import org.isthmus.language.isthmus.Expectation;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.Floating;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.LeadDeclaration;
import org.isthmus.language.isthmus.MeasurementDeclaration;
import org.isthmus.language.isthmus.MeasurementSetting;
import org.isthmus.language.isthmus.MeasurementStatement;
import org.isthmus.language.isthmus.Parameter;
import org.isthmus.language.isthmus.Recording;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.language.isthmus.SweepAxis;
import org.isthmus.language.structure.DeviceStructure;
import org.isthmus.language.typing.MeasurementAxes;
import org.isthmus.runtime.catalogue.Catalogue;
import org.isthmus.runtime.catalogue.ObservableEntry;

/** What a measurement asks, as far as the text alone shows it. */
public class MeasurementChecks extends ConcernChecks {
    private static final Set<String> FLOWS =
            Set.of("current", "conductance", "noise", "fano", "seebeck", "heatCurrent", "resistance");
    private static final Set<String> NEVER_NEGATIVE =
            Set.of("transmission", "dos", "ldos", "density", "modes", "occupation", "residual", "conductance");

    @Check
    public void givenTwice(MeasurementDeclaration measurement) {
        Set<String> seen = new HashSet<>();
        for (MeasurementStatement statement : measurement.getStatements()) {
            String key = null;
            String word = "";
            if (statement instanceof BiasAxis bias && linked(bias.getLead())) {
                key = "bias " + bias.getLead().getName();
                word = "A bias on '" + bias.getLead().getName() + "'";
            } else if (statement instanceof SweepAxis sweep && linked(sweep.getParameter())) {
                key = "value " + sweep.getParameter().getName();
                word = "A value of '" + sweep.getParameter().getName() + "'";
            } else if (statement instanceof MeasurementSetting setting && linked(setting.getTarget())) {
                key = (setting.getTarget() instanceof Parameter ? "value " : "setting ")
                        + setting.getTarget().getName();
                word = "A value of '" + setting.getTarget().getName() + "'";
            } else if (statement instanceof Average average && linked(average.getParameter())) {
                key = "average " + average.getParameter().getName();
                word = "An average over '" + average.getParameter().getName() + "'";
            }
            if (key != null && !seen.add(key)) {
                report(
                        IssueCode.DUPLICATE_NAME,
                        statement,
                        null,
                        word + " is given a second time in this measurement; remove one.");
            }
        }
    }

    private static boolean linked(EObject object) {
        return object != null && !object.eIsProxy();
    }

    @Check
    public void averageNeedsASweep(Average average) {
        MeasurementDeclaration measurement = (MeasurementDeclaration) average.eContainer();
        if (linked(average.getParameter())
                && measurement.getStatements().stream()
                        .noneMatch(
                                s -> s instanceof SweepAxis sweep && sweep.getParameter() == average.getParameter())) {
            report(
                    IssueCode.AVERAGE_WITHOUT_SWEEP,
                    average,
                    IsthmusPackage.Literals.AVERAGE__PARAMETER,
                    "'" + average.getParameter().getName()
                            + "' is not swept here, so there is nothing to average over; add 'sweep "
                            + average.getParameter().getName() + " = …;'.");
        }
    }

    @Check
    public void biasOnAFloatingLead(BiasAxis bias) {
        if (linked(bias.getLead()) && floating(bias.getLead())) {
            report(
                    IssueCode.FLOATING_WITH_MU,
                    bias,
                    IsthmusPackage.Literals.BIAS_AXIS__LEAD,
                    "Lead '" + bias.getLead().getName()
                            + "' is floating: its potential is found, so no bias can be given.");
        }
    }

    private static boolean floating(LeadDeclaration lead) {
        return lead.getSettings().stream().anyMatch(Floating.class::isInstance);
    }

    @Check
    public void drop(MeasurementSetting setting) {
        if (!(setting.getTarget() instanceof CatalogueEntry entry)
                || !"drop".equals(entry.getName())
                || setting.getPoints() == null) {
            return;
        }
        if (!(setting.getPoints().getValues() instanceof Reference word) || !linked(word.getTarget())) {
            return;
        }
        if ("poisson".equals(word.getTarget().getName())) {
            report(
                    IssueCode.NOT_SOLVED_YET,
                    setting,
                    null,
                    "The self-consistent field is not solved yet, so a bias cannot fall by 'drop = poisson'; use none or linear.");
        } else if ("linear".equals(word.getTarget().getName())) {
            DeviceDeclaration device = ((MeasurementDeclaration) setting.eContainer()).getDevice();
            long given = linked(device) ? given(device) : 2;
            if (given != 2) {
                report(
                        IssueCode.AMBIGUOUS_DROP,
                        setting,
                        null,
                        "A linear drop lies between two leads, but device '" + device.getName() + "' has " + given
                                + " that carry a given mu; use 'drop = none'.");
            }
        }
    }

    private static long given(DeviceDeclaration device) {
        return DeviceStructure.of(device).leads().stream()
                .filter(l -> !floating(l))
                .count();
    }

    @Check
    public void observables(MeasurementDeclaration measurement) {
        if (!linked(measurement.getDevice())) {
            return;
        }
        // a family without a first device has whatever leads
        boolean told = DeviceStructure.chain(measurement.getDevice()).get(0).getBase() != null;
        for (Reference reference : EcoreUtil2.getAllContentsOfType(measurement, Reference.class)) {
            if (!(reference.getTarget() instanceof CatalogueEntry entry) || !inside(reference)) {
                continue;
            }
            ObservableEntry observable = Catalogue.observable(entry.getName()).orElse(null);
            if (observable == null) {
                continue;
            }
            boolean matrix = observable.arguments().matrix()
                    && reference.getArguments().size() == observable.arguments().mostLeads() + 1;
            if (!observable.available() || matrix) {
                report(
                        IssueCode.NOT_SOLVED_YET,
                        reference,
                        IsthmusPackage.Literals.REFERENCE__TARGET,
                        "'" + observable.name() + (observable.available() ? "' with a matrix" : "'")
                                + " is not solved yet.");
            } else if (FLOWS.contains(observable.name()) && given(measurement.getDevice()) < 2 && !told) {
                told = true;
                report(
                        IssueCode.TOO_FEW_LEADS,
                        reference,
                        IsthmusPackage.Literals.REFERENCE__TARGET,
                        "'" + observable.name() + "' needs two leads that carry a given mu, but device '"
                                + measurement.getDevice().getName() + "' has " + given(measurement.getDevice()) + ".");
            } else if (observable.resolution() == ObservableEntry.Resolution.ENERGY
                    && !MeasurementAxes.hasEnergyAxis(measurement)
                    && reference.getPoint() == null) {
                report(
                        IssueCode.MISSING_AXIS,
                        reference,
                        IsthmusPackage.Literals.REFERENCE__TARGET,
                        "'" + observable.name()
                                + "' has a value per energy, but this measurement has no energy axis; add"
                                + " 'energy = … in N points;' or pick one with 'at'.");
            }
        }
    }

    private static boolean inside(Reference reference) {
        return EcoreUtil2.getContainerOfType(reference, Recording.class) != null
                || EcoreUtil2.getContainerOfType(reference, Expectation.class) != null;
    }

    @Check
    public void idleExpectation(Expectation expectation) {
        if (!sound(expectation)) {
            return;
        }
        boolean left = observes(expectation.getLeft());
        boolean right = observes(expectation.getRight());
        if (!left && !right) {
            report(
                    IssueCode.IDLE_EXPECTATION,
                    expectation,
                    null,
                    "Neither side of this expectation is measured, so it says nothing about the device; name an observable.");
            return;
        }
        if (left && right) {
            if (!expectation.getOperator().matches("[<>]|!=")
                    && text(expectation.getLeft()).equals(text(expectation.getRight()))) {
                report(
                        IssueCode.IDLE_EXPECTATION,
                        expectation,
                        null,
                        "This cannot fail: both sides are the same. Compare with a value, or with something else.");
            }
            return;
        }
        Expression measured = left ? expectation.getLeft() : expectation.getRight();
        double bound = constant(left ? expectation.getRight() : expectation.getLeft());
        double slack = expectation.getTolerance() == null ? 0 : constant(expectation.getTolerance());
        if (!Double.isFinite(bound) || !Double.isFinite(slack)) {
            return;
        }
        slack = expectation.isRelative() ? slack / 100 * Math.abs(bound) : slack;
        String operator = left ? expectation.getOperator() : mirrored(expectation.getOperator());
        if ((operator.equals(">=") && bound - slack <= 0 || operator.equals(">") && bound - slack < 0)
                && neverNegative(measured)) {
            report(
                    IssueCode.IDLE_EXPECTATION,
                    expectation,
                    null,
                    "This cannot fail: the measured side is never below zero. Expect a value, or an upper bound.");
        } else if ((operator.equals("<=") && bound + slack >= 1 || operator.equals("<") && bound + slack > 1)
                && neverAboveOne(measured)) {
            report(
                    IssueCode.IDLE_EXPECTATION,
                    expectation,
                    null,
                    "This cannot fail: an occupation is never above one. Expect a value, or a lower bound.");
        }
    }

    private static String mirrored(String operator) {
        return operator.replace('<', '~').replace('>', '<').replace('~', '>');
    }

    private static String text(Expression expression) {
        return NodeModelUtils.getTokenText(NodeModelUtils.findActualNodeFor(expression))
                .replaceAll("\\s+", "");
    }

    private static boolean observes(Expression expression) {
        return expression instanceof Reference own && isObservable(own)
                || EcoreUtil2.getAllContentsOfType(expression, Reference.class).stream()
                        .anyMatch(MeasurementChecks::isObservable);
    }

    private static boolean isObservable(Reference reference) {
        return reference.getTarget() instanceof CatalogueEntry entry
                && Catalogue.observable(entry.getName()).isPresent();
    }

    private static boolean neverNegative(Expression expression) {
        if (expression instanceof BinaryExpression binary
                && !binary.getOperator().equals("-")) {
            return neverNegative(binary.getLeft())
                    && (binary.getOperator().equals("^") || neverNegative(binary.getRight()));
        }
        if (!observes(expression)) {
            double value = constant(expression);
            return value >= 0 && Double.isFinite(value);
        }
        if (!(expression instanceof Reference reference) || !(reference.getTarget() instanceof CatalogueEntry entry)) {
            return false;
        }
        return entry.getName().equals("abs")
                || NEVER_NEGATIVE.contains(entry.getName())
                || reduces(reference) && neverNegative(reference.getArguments().get(0));
    }

    private static boolean neverAboveOne(Expression expression) {
        return expression instanceof Reference reference
                && reference.getTarget() instanceof CatalogueEntry entry
                && (entry.getName().equals("occupation")
                        || reduces(reference)
                                && neverAboveOne(reference.getArguments().get(0)));
    }

    private static boolean reduces(Reference reference) {
        return List.of("min", "max", "mean").contains(reference.getTarget().getName())
                && reference.getArguments().size() == 1;
    }

    private static double constant(Expression expression) {
        try {
            return new Evaluator(Environment.ofText()).real(expression);
        } catch (EvaluationFailure failure) {
            // what depends on the device is no constant bound
            return Double.POSITIVE_INFINITY;
        }
    }
}
