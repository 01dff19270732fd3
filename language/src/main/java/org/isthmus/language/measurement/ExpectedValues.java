package org.isthmus.language.measurement;

import java.util.ArrayList;
import java.util.List;
import org.apache.commons.math3.complex.Complex;
import org.eclipse.xtext.nodemodel.util.NodeModelUtils;
import org.isthmus.language.evaluation.EvaluationFailure;
import org.isthmus.language.evaluation.Evaluator;
import org.isthmus.language.evaluation.SquareMatrix;
import org.isthmus.language.evaluation.Value;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.AxisCoordinate;
import org.isthmus.language.isthmus.BiasAxis;
import org.isthmus.language.isthmus.BinaryExpression;
import org.isthmus.language.isthmus.CatalogueEntry;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.LeadDeclaration;
import org.isthmus.language.isthmus.MeasurementDeclaration;
import org.isthmus.language.isthmus.MeasurementStatement;
import org.isthmus.language.isthmus.Parameter;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.language.isthmus.SweepAxis;
import org.isthmus.language.isthmus.UnaryExpression;
import org.isthmus.language.typing.Inference;
import org.isthmus.language.typing.MeasurementAxes;
import org.isthmus.language.typing.Type;
import org.isthmus.runtime.catalogue.Catalogue;
import org.isthmus.runtime.catalogue.FunctionEntry;
import org.isthmus.runtime.catalogue.ObservableEntry;
import org.isthmus.runtime.device.AxisPosition;
import org.isthmus.runtime.device.ExpectedValue;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.units.Dimension;

/** Sides of expectations and recorded items. */
final class ExpectedValues {
    private final MeasurementDeclaration measurement;
    private final Evaluator evaluator;
    private final Inference inference = new Inference();

    ExpectedValues(MeasurementDeclaration measurement, Evaluator evaluator) {
        this.measurement = measurement;
        this.evaluator = evaluator;
    }

    /** The tree of an expression over observables. */
    ExpectedValue of(Expression expression) {
        if (expression instanceof Reference reference) {
            return reference(reference);
        }
        if (expression instanceof UnaryExpression unary) {
            ExpectedValue operand = of(unary.getOperand());
            if (!unary.getOperator().equals("-")) {
                return operand;
            }
            return operand instanceof ExpectedValue.Number number
                    ? new ExpectedValue.Number(-number.value())
                    : new ExpectedValue.Negated(operand);
        }
        if (expression instanceof BinaryExpression binary) {
            ExpectedValue left = of(binary.getLeft());
            ExpectedValue right = of(binary.getRight());
            if (left instanceof ExpectedValue.Number && right instanceof ExpectedValue.Number) {
                return new ExpectedValue.Number(evaluator.real(expression));
            }
            return new ExpectedValue.Arithmetic(binary.getOperator().charAt(0), left, right);
        }
        return new ExpectedValue.Number(evaluator.real(expression));
    }

    private ExpectedValue reference(Reference reference) {
        if (reference.getTarget() instanceof CatalogueEntry entry) {
            if (Catalogue.observable(entry.getName()).isPresent()) {
                return new ExpectedValue.Observed(call(reference), positions(reference));
            }
            if (reference.isCall()
                    && reference.getArguments().size() == 1
                    && Catalogue.reduction(entry.getName()).isPresent()) {
                return new ExpectedValue.Reduced(
                        Catalogue.reduction(entry.getName()).get().reduction(),
                        of(reference.getArguments().get(0)));
            }
            if (reference.isCall() && Catalogue.expressionName(entry.getName()).orElse(null) instanceof FunctionEntry) {
                List<ExpectedValue> arguments = new ArrayList<>();
                reference.getArguments().forEach(a -> arguments.add(of(a)));
                if (arguments.stream().allMatch(ExpectedValue.Number.class::isInstance)) {
                    return new ExpectedValue.Number(evaluator.real(reference));
                }
                return new ExpectedValue.Applied(entry.getName(), arguments);
            }
        }
        if (reference.getTarget() instanceof Parameter parameter && swept(parameter)) {
            return new ExpectedValue.AxisValue(parameter.getName());
        }
        return new ExpectedValue.Number(evaluator.real(reference));
    }

    private boolean swept(Parameter parameter) {
        return measurement.getStatements().stream()
                .anyMatch(s -> s instanceof SweepAxis sweep && sweep.getParameter() == parameter);
    }

    /** An observable with its arguments. */
    ObservableCall call(Reference reference) {
        List<String> leads = new ArrayList<>();
        List<Double> matrix = new ArrayList<>();
        String text = "";
        for (Expression argument : reference.getArguments()) {
            if (argument instanceof Reference name && name.getTarget() instanceof LeadDeclaration lead) {
                leads.add(lead.getName());
                continue;
            }
            Value value = evaluator.evaluate(argument);
            SquareMatrix flow = ((Value.MatrixValue) value).matrix();
            if (flow.deviationFromHermitian() > 1e-12) {
                throw new EvaluationFailure(
                        argument, IssueCode.NOT_HERMITIAN, "A flow is that of a Hermitian matrix, and this is none.");
            }
            for (int i = 0; i < flow.size(); i++) {
                for (int j = 0; j < flow.size(); j++) {
                    Complex element = flow.get(i, j);
                    matrix.add(element.getReal());
                    matrix.add(element.getImaginary());
                }
            }
            text = NodeModelUtils.getTokenText(NodeModelUtils.findActualNodeFor(argument));
        }
        return new ObservableCall(reference.getTarget().getName(), leads, matrix, text);
    }

    /** The point behind {@code at}. */
    List<AxisPosition> positions(Reference reference) {
        List<AxisPosition> positions = new ArrayList<>();
        if (reference.getPoint() == null) {
            return positions;
        }
        for (AxisCoordinate coordinate : reference.getPoint().getCoordinates()) {
            double value = evaluator.real(coordinate.getValue());
            String text = NodeModelUtils.getTokenText(NodeModelUtils.findActualNodeFor(coordinate.getValue()));
            positions.add(new AxisPosition(axis(reference, coordinate, positions), value, text));
        }
        return positions;
    }

    private String axis(Reference reference, AxisCoordinate coordinate, List<AxisPosition> taken) {
        if (coordinate.getAxis() instanceof LeadDeclaration lead) {
            return known(AxisPosition.bias(lead.getName()), coordinate);
        }
        if (coordinate.getAxis() instanceof Parameter parameter) {
            return known(parameter.getName(), coordinate);
        }
        if (coordinate.getAxis() != null) {
            return AxisPosition.ENERGY;
        }
        Dimension dimension =
                inference.typeOf(coordinate.getValue()) instanceof Type.Scalar scalar ? scalar.dimension() : null;
        List<String> fitting = new ArrayList<>();
        ObservableEntry observable =
                Catalogue.observable(reference.getTarget().getName()).orElseThrow();
        boolean energyResolved = observable.resolution() == ObservableEntry.Resolution.ENERGY
                || observable.resolution() == ObservableEntry.Resolution.EITHER
                        && MeasurementAxes.hasEnergyAxis(measurement);
        if (Dimension.ENERGY.equals(dimension) && energyResolved) {
            fitting.add(AxisPosition.ENERGY);
        }
        for (MeasurementStatement statement : measurement.getStatements()) {
            if (statement instanceof BiasAxis bias && Dimension.VOLTAGE.equals(dimension)) {
                fitting.add(AxisPosition.bias(bias.getLead().getName()));
            }
        }
        for (MeasurementStatement statement : measurement.getStatements()) {
            if (statement instanceof SweepAxis sweep
                    && inference.typeOf(sweep.getParameter()) instanceof Type.Scalar scalar
                    && scalar.dimension().equals(dimension)) {
                fitting.add(sweep.getParameter().getName());
            }
        }
        return fitting.stream()
                .filter(name -> taken.stream().noneMatch(t -> t.axis().equals(name)))
                .findFirst()
                .orElseThrow(() -> new EvaluationFailure(
                        coordinate,
                        IssueCode.MISSING_AXIS,
                        "This point is " + (dimension == null ? "of no known kind" : dimension.withArticle())
                                + ", but the measurement has no axis of that kind left to pick from."));
    }

    private String known(String name, AxisCoordinate coordinate) {
        boolean present = measurement.getStatements().stream()
                .anyMatch(s -> s instanceof SweepAxis sweep
                                && sweep.getParameter().getName().equals(name)
                        || s instanceof BiasAxis bias
                                && AxisPosition.bias(bias.getLead().getName()).equals(name));
        if (!present) {
            throw new EvaluationFailure(
                    coordinate,
                    IssueCode.MISSING_AXIS,
                    "'" + coordinate.getAxis().getName()
                            + "' is no axis of this measurement; sweep it or leave it out here.");
        }
        return name;
    }
}
