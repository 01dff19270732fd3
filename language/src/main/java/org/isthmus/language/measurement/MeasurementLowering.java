package org.isthmus.language.measurement;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.OptionalDouble;
import org.eclipse.xtext.nodemodel.util.NodeModelUtils;
import org.isthmus.language.evaluation.Environment;
import org.isthmus.language.evaluation.EvaluationFailure;
import org.isthmus.language.evaluation.Evaluator;
import org.isthmus.language.evaluation.Value;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.findings.Places;
import org.isthmus.language.isthmus.Average;
import org.isthmus.language.isthmus.BiasAxis;
import org.isthmus.language.isthmus.Declaration;
import org.isthmus.language.isthmus.Expectation;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.MeasurementDeclaration;
import org.isthmus.language.isthmus.MeasurementSetting;
import org.isthmus.language.isthmus.MeasurementStatement;
import org.isthmus.language.isthmus.Parameter;
import org.isthmus.language.isthmus.ParameterOverride;
import org.isthmus.language.isthmus.Points;
import org.isthmus.language.isthmus.Recording;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.language.isthmus.SweepAxis;
import org.isthmus.language.structure.DeviceStructure;
import org.isthmus.language.typing.Inference;
import org.isthmus.language.typing.Type;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.Measurement;
import org.isthmus.runtime.device.Measurement.Axis;
import org.isthmus.runtime.device.Measurement.Comparator;
import org.isthmus.runtime.device.Measurement.Drop;
import org.isthmus.runtime.device.Measurement.EnergyAxis;
import org.isthmus.runtime.device.Measurement.Recorded;
import org.isthmus.runtime.units.Dimension;
import org.isthmus.runtime.units.Unit;
import org.isthmus.runtime.units.Units;

/** Turns a measurement of the text into one of the solver. */
public final class MeasurementLowering {
    private final MeasurementDeclaration declaration;
    private final Map<Parameter, Value> settings = new LinkedHashMap<>();
    private final List<Finding> findings = new ArrayList<>();
    private final Inference inference = new Inference();

    /**
     * What lowering gives.
     *
     * @param measurement null where findings stand in its way
     */
    public record Lowered(Measurement measurement, List<Finding> findings) {
        public Lowered {
            findings = List.copyOf(findings);
        }
    }

    private MeasurementLowering(MeasurementDeclaration declaration) {
        this.declaration = declaration;
    }

    /**
     * Lowers.
     *
     * @param given values of parameters from outside the text, in internal units; they win over the measurement's
     */
    public static Lowered lower(MeasurementDeclaration declaration, Map<String, Double> given) {
        return new MeasurementLowering(declaration).lower(given);
    }

    private Lowered lower(Map<String, Double> given) {
        DeviceStructure structure = DeviceStructure.of(declaration.getDevice());
        Map<Parameter, Expression> overridden = new LinkedHashMap<>();
        for (Parameter parameter : structure.parameters()) {
            structure.override(parameter).map(ParameterOverride::getValue).ifPresent(e -> overridden.put(parameter, e));
            Double value = given.get(parameter.getName());
            if (value != null) {
                settings.put(parameter, new Value.Real(value));
            }
        }
        Evaluator first = new Evaluator(new Environment(settings, overridden, 0));
        for (MeasurementSetting setting : statements(MeasurementSetting.class)) {
            if (setting.getTarget() instanceof Parameter parameter && !given.containsKey(parameter.getName())) {
                attempt(() -> settings.put(
                        parameter, new Value.Real(first.real(setting.getPoints().getValues()))));
            }
        }
        Evaluator evaluator = new Evaluator(new Environment(settings, overridden, 0));
        Measurement measurement = measurement(evaluator);
        return new Lowered(findings.isEmpty() ? measurement : null, findings);
    }

    private <T extends MeasurementStatement> List<T> statements(Class<T> type) {
        return declaration.getStatements().stream()
                .filter(type::isInstance)
                .map(type::cast)
                .toList();
    }

    private void attempt(Runnable action) {
        try {
            action.run();
        } catch (EvaluationFailure failure) {
            Finding finding = Places.finding(failure.code(), failure.place(), null, failure.getMessage());
            if (!findings.contains(finding)) {
                findings.add(finding);
            }
        }
    }

    private Measurement measurement(Evaluator evaluator) {
        List<Axis> axes = new ArrayList<>();
        List<String> averages = new ArrayList<>();
        for (MeasurementStatement statement : declaration.getStatements()) {
            if (statement instanceof BiasAxis bias) {
                attempt(() -> axes.add(new Measurement.BiasAxis(
                        bias.getLead().getName(), AxisValues.of(bias.getPoints(), evaluator), Places.of(bias))));
            } else if (statement instanceof SweepAxis sweep) {
                attempt(() -> axes.add(sweep(sweep, evaluator)));
            } else if (statement instanceof Average average) {
                averages.add(average.getParameter().getName());
            }
        }
        // in tables the sweeps come first, then the axis; among themselves sweeps and biases keep their order
        axes.sort(java.util.Comparator.comparing(axis -> axis instanceof Measurement.BiasAxis));
        Settings values = new Settings();
        attempt(() -> values.energy = energy(evaluator));
        attempt(() -> values.temperature = number("temperature", evaluator));
        attempt(() -> values.mu = number("mu", evaluator));
        attempt(() -> values.accuracy = number("accuracy", evaluator).orElse(Measurement.DEFAULT_ACCURACY));
        attempt(() -> values.drop = drop(evaluator));
        ExpectedValues expected = new ExpectedValues(declaration, evaluator);
        List<Recorded> records = new ArrayList<>();
        for (Recording recording : statements(Recording.class)) {
            for (Expression item : recording.getItems()) {
                Reference reference = (Reference) item;
                attempt(() -> records.add(
                        new Recorded(expected.call(reference), expected.positions(reference), Places.of(reference))));
            }
        }
        List<Measurement.Expectation> expectations = new ArrayList<>();
        for (Expectation expectation : statements(Expectation.class)) {
            attempt(() -> expectations.add(expectation(expectation, expected, evaluator)));
        }
        Map<String, Double> numbers = new LinkedHashMap<>();
        settings.forEach((parameter, value) -> numbers.put(parameter.getName(), ((Value.Real) value).value()));
        return new Measurement(
                declaration.getName(),
                declaration.getDevice().getName(),
                numbers,
                axes,
                averages,
                values.energy,
                values.temperature,
                values.mu,
                values.drop,
                values.accuracy,
                records,
                expectations,
                Places.of(declaration, org.isthmus.language.isthmus.IsthmusPackage.Literals.DECLARATION__NAME));
    }

    /** What is read one after the other. */
    private static final class Settings {
        private EnergyAxis energy = new Measurement.NoEnergies();
        private OptionalDouble temperature = OptionalDouble.empty();
        private OptionalDouble mu = OptionalDouble.empty();
        private double accuracy = Measurement.DEFAULT_ACCURACY;
        private Drop drop = Drop.NONE;
    }

    private Measurement.SweepAxis sweep(SweepAxis sweep, Evaluator evaluator) {
        Dimension dimension = inference.typeOf(sweep.getParameter()) instanceof Type.Scalar scalar
                ? scalar.dimension()
                : Dimension.NUMBER;
        Unit unit = Units.fitting(dimension);
        return new Measurement.SweepAxis(
                sweep.getParameter().getName(),
                unit.symbol(),
                unit.factor(),
                AxisValues.of(sweep.getPoints(), evaluator),
                Places.of(sweep));
    }

    private Points setting(String name) {
        for (MeasurementSetting setting : statements(MeasurementSetting.class)) {
            Declaration target = setting.getTarget();
            if (!(target instanceof Parameter) && target != null && name.equals(target.getName())) {
                return setting.getPoints();
            }
        }
        return null;
    }

    private OptionalDouble number(String name, Evaluator evaluator) {
        Points points = setting(name);
        if (points == null) {
            return OptionalDouble.empty();
        }
        double value = evaluator.real(points.getValues());
        if (name.equals("temperature") && value < 0) {
            throw new EvaluationFailure(
                    points.getValues(),
                    IssueCode.NEGATIVE_TEMPERATURE,
                    "A temperature of " + value + " K is below zero.");
        }
        if (name.equals("accuracy") && !(value > 0 && value < 1)) {
            throw new EvaluationFailure(
                    points.getValues(),
                    IssueCode.EMPTY_RANGE,
                    "The accuracy is a fraction between 0 and 1, such as 1e-8, not " + value + ".");
        }
        return OptionalDouble.of(value);
    }

    private EnergyAxis energy(Evaluator evaluator) {
        Points points = setting("energy");
        if (points == null) {
            return new Measurement.NoEnergies();
        }
        if (points.getTolerance() != null && evaluator.evaluate(points.getValues()) instanceof Value.RangeValue range) {
            if (range.upper() <= range.lower()) {
                throw AxisValues.backwards(range.lower(), range.upper(), points);
            }
            double tolerance = evaluator.real(points.getTolerance());
            if (!(tolerance > 0)) {
                throw new EvaluationFailure(
                        points.getTolerance(), IssueCode.EMPTY_RANGE, "The tolerance must be greater than zero.");
            }
            return new Measurement.AdaptiveEnergies(range.lower(), range.upper(), tolerance, Places.of(points));
        }
        return new Measurement.EnergyPoints(AxisValues.of(points, evaluator), Places.of(points));
    }

    private Drop drop(Evaluator evaluator) {
        Points points = setting("drop");
        if (points == null || !(evaluator.evaluate(points.getValues()) instanceof Value.ChoiceValue choice)) {
            return Drop.NONE;
        }
        return Drop.valueOf(choice.word().toUpperCase(java.util.Locale.ROOT));
    }

    private Measurement.Expectation expectation(Expectation expectation, ExpectedValues expected, Evaluator evaluator) {
        Dimension dimension = inference.typeOf(expectation.getLeft()) instanceof Type.Scalar scalar
                ? scalar.dimension()
                : Dimension.NUMBER;
        Unit unit = Units.fitting(dimension);
        double tolerance = expectation.getTolerance() == null ? 0 : evaluator.real(expectation.getTolerance());
        return new Measurement.Expectation(
                expected.of(expectation.getLeft()),
                comparator(expectation.getOperator()),
                expected.of(expectation.getRight()),
                expectation.isRelative() ? tolerance / 100 : tolerance,
                expectation.isRelative(),
                unit.symbol(),
                unit.factor(),
                NodeModelUtils.getTokenText(NodeModelUtils.findActualNodeFor(expectation))
                        .replaceFirst("^expect\\s+", "")
                        .replaceFirst(";$", "")
                        .replaceAll("\\s+", " "),
                Places.of(expectation));
    }

    private static Comparator comparator(String sign) {
        for (Comparator comparator : Comparator.values()) {
            if (comparator.sign().equals(sign)) {
                return comparator;
            }
        }
        throw new IllegalArgumentException("no comparison '" + sign + "'");
    }
}
