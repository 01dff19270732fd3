package org.isthmus.language.elaboration;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import org.eclipse.emf.ecore.EObject;
import org.isthmus.language.evaluation.Environment;
import org.isthmus.language.evaluation.EvaluationFailure;
import org.isthmus.language.evaluation.Evaluator;
import org.isthmus.language.evaluation.Value;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.Argument;
import org.isthmus.language.isthmus.Declaration;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.Parameter;
import org.isthmus.language.isthmus.ParameterOverride;
import org.isthmus.language.typing.Inference;
import org.isthmus.language.typing.Type;
import org.isthmus.runtime.device.Device.ParameterValue;
import org.isthmus.runtime.units.Dimension;
import org.isthmus.runtime.units.Unit;
import org.isthmus.runtime.units.Units;

/**
 * Settles what names stand for: a parameter has the value given from outside, or that of the nearest override down the
 * family, or its own; a parameter of the lattice has that of the device's {@code lattice} statement, or its default.
 */
final class EvaluateParameters implements Pass {
    /** How far a value may lie outside its range by rounding, relative to the range's ends. */
    private static final double ROUNDING = 1e-12;

    @Override
    public void run(Draft draft) {
        Map<Declaration, Value> values = new HashMap<>();
        Map<Declaration, Expression> replacements = new HashMap<>();
        for (Parameter parameter : draft.structure.parameters()) {
            Double given = draft.given.get(parameter.getName());
            if (given != null) {
                values.put(parameter, new Value.Real(given));
            } else {
                draft.structure
                        .override(parameter)
                        .ifPresent(override -> replacements.put(parameter, override.getValue()));
            }
        }
        draft.structure.lattice().ifPresent(use -> {
            for (Argument argument : use.getArguments()) {
                if (argument.getParameter() != null) {
                    replacements.put(argument.getParameter(), argument.getValue());
                }
            }
        });
        draft.environment = new Environment(values, replacements, 0);
        Evaluator evaluator = new Evaluator(draft.environment);
        Inference inference = new Inference();
        List<ParameterValue> resolved = new ArrayList<>();
        for (Parameter parameter : draft.structure.parameters()) {
            try {
                resolved.add(value(draft, parameter, evaluator, inference));
            } catch (EvaluationFailure failure) {
                draft.findings.add(failure);
            }
        }
        draft.parameters = List.copyOf(resolved);
    }

    private static ParameterValue value(Draft draft, Parameter parameter, Evaluator evaluator, Inference inference) {
        ParameterOverride override = draft.structure.override(parameter).orElse(null);
        Double given = draft.given.get(parameter.getName());
        EObject place = override == null ? parameter : override;
        double value =
                given != null ? given : evaluator.real(override == null ? parameter.getValue() : override.getValue());
        Unit unit = Units.fitting(
                inference.typeOf(parameter) instanceof Type.Scalar scalar ? scalar.dimension() : Dimension.NUMBER);
        if (!Double.isFinite(value)) {
            draft.findings.add(
                    IssueCode.NOT_FINITE,
                    place,
                    "Parameter '" + parameter.getName() + "' is " + value + ", not a finite number.");
        } else if (parameter.getRange() != null
                && evaluator.evaluate(parameter.getRange()) instanceof Value.RangeValue range) {
            if (range.upper() < range.lower()) {
                draft.findings.add(
                        IssueCode.EMPTY_RANGE,
                        parameter.getRange(),
                        "The range of parameter '" + parameter.getName() + "' runs backwards, from "
                                + told(range.lower(), unit) + " to " + told(range.upper(), unit)
                                + "; exchange its ends.");
                return new ParameterValue(parameter.getName(), value, unit.symbol(), unit.factor());
            }
            double slack = ROUNDING * Math.max(Math.abs(range.lower()), Math.abs(range.upper()));
            if (value < range.lower() - slack || value > range.upper() + slack) {
                draft.findings.add(
                        IssueCode.OUT_OF_RANGE,
                        place,
                        "Parameter '" + parameter.getName() + "' is " + told(value, unit) + ", outside its range "
                                + told(range.lower(), unit) + " .. " + told(range.upper(), unit) + ".");
            }
        }
        return new ParameterValue(parameter.getName(), value, unit.symbol(), unit.factor());
    }

    private static String told(double value, Unit unit) {
        String number = Told.number(unit.fromInternal(value));
        return unit.symbol().isEmpty() ? number : number + " " + unit.symbol();
    }

    @Override
    public String text(Draft draft) {
        StringBuilder text = new StringBuilder();
        for (ParameterValue parameter : draft.parameters) {
            text.append(parameter.name())
                    .append(" = ")
                    .append(parameter.value() / parameter.unitFactor())
                    .append(parameter.unit().isEmpty() ? "" : " " + parameter.unit())
                    .append('\n');
        }
        return text.toString();
    }
}
