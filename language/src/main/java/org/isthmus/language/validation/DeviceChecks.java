package org.isthmus.language.validation;

import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.stream.Collectors;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.emf.ecore.resource.Resource;
import org.eclipse.xtext.validation.Check;
import org.eclipse.xtext.validation.ValidationMessageAcceptor;
import org.isthmus.language.elaboration.Elaborator;
import org.isthmus.language.evaluation.Environment;
import org.isthmus.language.evaluation.EvaluationFailure;
import org.isthmus.language.evaluation.Evaluator;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.findings.Places;
import org.isthmus.language.isthmus.CatalogueEntry;
import org.isthmus.language.isthmus.DeviceDeclaration;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.LatticeDeclaration;
import org.isthmus.language.isthmus.MeasurementDeclaration;
import org.isthmus.language.isthmus.MeasurementSetting;
import org.isthmus.language.isthmus.MeasurementStatement;
import org.isthmus.language.isthmus.Parameter;
import org.isthmus.language.isthmus.SweepAxis;
import org.isthmus.language.measurement.MeasurementLowering;
import org.isthmus.language.structure.DeviceStructure;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.DeviceFamily.Elaborated;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.Measurement;
import org.isthmus.runtime.device.Severity;

/** What only the elaborated device shows: its geometry, its leads, and whether a measurement fits its bands. */
public class DeviceChecks extends ConcernChecks {
    /** Sweeps are looked at from end to end only on devices that elaborate in passing. */
    private static final int IN_PASSING = 20_000;

    /** A lattice at the values of its own header, so that one that no device uses is looked at too. */
    @Check
    public void lattice(LatticeDeclaration lattice) {
        if (sound(lattice)) {
            for (Finding finding : Elaborator.check(lattice)) {
                report(finding, lattice, IsthmusPackage.Literals.DECLARATION__NAME);
            }
        }
    }

    @Check
    public void elaborates(DeviceDeclaration device) {
        if (!soundFamily(device)) {
            return;
        }
        for (Finding finding : elaborated(device, Map.of()).findings()) {
            report(finding, device, IsthmusPackage.Literals.DECLARATION__NAME);
        }
    }

    /** True where no device of the family, nor its lattice, has errors of its own already. */
    private boolean soundFamily(DeviceDeclaration device) {
        DeviceStructure structure = DeviceStructure.of(device);
        if (structure.lattice().isEmpty()
                || structure.body().isEmpty()
                || structure.lattice().get().getLattice() == null
                || structure.lattice().get().getLattice().eIsProxy()) {
            return false;
        }
        boolean complete = structure.chain().get(0).getBase() == null;
        return complete && sound(device);
    }

    /** Elaborates once per check and set of values. */
    private Elaborated elaborated(DeviceDeclaration device, Map<String, Double> values) {
        record Key(DeviceDeclaration device, Map<String, Double> values) {}
        Key key = new Key(device, values);
        Map<Object, Object> context = getContext();
        Object known = context == null ? null : context.get(key);
        if (known instanceof Elaborated elaborated) {
            return elaborated;
        }
        Elaborated fresh = Elaborator.of(device).elaborate(values);
        if (context != null) {
            context.put(key, fresh);
        }
        return fresh;
    }

    /** Several devices of one lattice or one base find the same thing at the same place: it is told once. */
    private boolean news(Finding finding) {
        Map<Object, Object> context = getContext();
        if (context == null || finding.place().line() == 0 || finding.severity() == Severity.INFORMATION) {
            return true;
        }
        record Told(String code, org.isthmus.runtime.device.SourceRef place) {}
        return context.put(new Told(finding.code(), finding.place()), Boolean.TRUE) == null;
    }

    /** Puts a finding where it belongs; one about another file stands at the object that led to it. */
    private void report(Finding finding, EObject fallback, org.eclipse.emf.ecore.EStructuralFeature feature) {
        if (!news(finding)) {
            return;
        }
        Resource resource = fallback.eResource();
        IssueCode code = IssueCode.byId(finding.code()).orElseThrow();
        boolean here = finding.place().line() > 0
                && finding.place().file().equals(Places.of(fallback).file());
        if (!here) {
            String where = finding.place().line() > 0 ? " (" + finding.place() + ")" : "";
            report(code, fallback, feature, finding.text() + where);
            return;
        }
        ValidationMessageAcceptor acceptor = getMessageAcceptor();
        int offset = finding.place().offset();
        int length = finding.place().length();
        EObject root = resource.getContents().get(0);
        switch (code.severity()) {
            case ERROR -> acceptor.acceptError(finding.text(), root, offset, length, code.id());
            case WARNING -> acceptor.acceptWarning(finding.text(), root, offset, length, code.id());
            default -> acceptor.acceptInfo(finding.text(), root, offset, length, code.id());
        }
    }

    @Check
    public void measurement(MeasurementDeclaration declaration) {
        DeviceDeclaration device = declaration.getDevice();
        if (device == null || device.eIsProxy() || !sound(declaration) || !soundFamily(device)) {
            return;
        }
        MeasurementLowering.Lowered lowered = MeasurementLowering.lower(declaration, Map.of());
        for (Finding finding : lowered.findings()) {
            report(finding, declaration, IsthmusPackage.Literals.DECLARATION__NAME);
        }
        Elaborated plain = elaborated(device, Map.of());
        if (lowered.measurement() == null || !plain.ok() || outOfRange(declaration, lowered.measurement())) {
            return;
        }
        Measurement measurement = lowered.measurement();
        Set<Finding> known = new LinkedHashSet<>(plain.findings());
        Device first = null;
        boolean inPassing = plain.device().sites().count() <= IN_PASSING;
        for (Map<String, Double> values : corners(measurement, inPassing)) {
            Elaborated at = elaborated(device, values);
            for (Finding finding : at.findings()) {
                boolean news = finding.severity() != Severity.INFORMATION
                        && known.stream()
                                .noneMatch(k -> k.code().equals(finding.code())
                                        && k.place().equals(finding.place()));
                if (news) {
                    known.add(finding);
                    report(
                            new Finding(
                                    finding.code(),
                                    finding.severity(),
                                    finding.text() + told(device, values),
                                    Places.of(declaration, IsthmusPackage.Literals.DECLARATION__NAME)),
                            declaration,
                            IsthmusPackage.Literals.DECLARATION__NAME);
                }
            }
            if (first == null && at.ok()) {
                first = at.device();
            }
        }
        if (first != null) {
            new WindowChecks(device, measurement, first)
                    .findings()
                    .forEach(f -> report(f.code(), place(declaration, f), f.feature(), f.text()));
        }
        count(declaration, measurement);
    }

    private static EObject place(MeasurementDeclaration declaration, WindowChecks.WindowFinding finding) {
        if (!finding.atEnergyAxis()) {
            return declaration;
        }
        return declaration.getStatements().stream()
                .filter(s -> s instanceof MeasurementSetting setting
                        && setting.getTarget() instanceof CatalogueEntry entry
                        && entry.getName().equals("energy"))
                .map(EObject.class::cast)
                .findFirst()
                .orElse(declaration);
    }

    private static String told(DeviceDeclaration device, Map<String, Double> values) {
        if (values.isEmpty()) {
            return "";
        }
        DeviceStructure structure = DeviceStructure.of(device);
        return values.entrySet().stream()
                .map(value -> value.getKey() + " = "
                        + structure
                                .parameter(value.getKey())
                                .map(p -> ParameterRange.told(p, value.getValue()))
                                .orElse(String.valueOf(value.getValue())))
                .collect(Collectors.joining(", ", " (with ", ")"));
    }

    /** Both ends of every sweep, the others at their first value. */
    private static List<Map<String, Double>> corners(Measurement measurement, boolean ends) {
        Map<String, Double> start = new LinkedHashMap<>(new java.util.TreeMap<>(measurement.settings()));
        for (Measurement.Axis axis : measurement.axes()) {
            if (axis instanceof Measurement.SweepAxis sweep) {
                start.put(sweep.parameter(), sweep.values().get(0));
            }
        }
        Set<Map<String, Double>> corners = new LinkedHashSet<>();
        corners.add(start);
        for (Measurement.Axis axis : measurement.axes()) {
            if (ends && axis instanceof Measurement.SweepAxis sweep && corners.size() < 8) {
                Map<String, Double> end = new LinkedHashMap<>(start);
                end.put(sweep.parameter(), sweep.values().get(sweep.values().size() - 1));
                corners.add(end);
            }
        }
        return List.copyOf(corners);
    }

    /** Settings and sweeps against the declared ranges of their parameters; true after a report. */
    private boolean outOfRange(MeasurementDeclaration declaration, Measurement measurement) {
        boolean found = false;
        Evaluator evaluator = new Evaluator(Environment.ofText());
        for (MeasurementStatement statement : declaration.getStatements()) {
            Parameter parameter = statement instanceof SweepAxis sweep
                    ? sweep.getParameter()
                    : statement instanceof MeasurementSetting setting && setting.getTarget() instanceof Parameter p
                            ? p
                            : null;
            if (parameter == null || parameter.getRange() == null) {
                continue;
            }
            List<Double> values = statement instanceof SweepAxis
                    ? measurement.axes().stream()
                            .filter(a -> a instanceof Measurement.SweepAxis s
                                    && s.parameter().equals(parameter.getName()))
                            .findFirst()
                            .map(Measurement.Axis::values)
                            .orElse(List.of())
                    : List.of(measurement.settings().get(parameter.getName()));
            try {
                ParameterRange range = ParameterRange.of(parameter, evaluator);
                for (double value : values) {
                    if (range.violation(value).isPresent()) {
                        report(
                                IssueCode.OUT_OF_RANGE,
                                statement,
                                null,
                                range.violation(value).get());
                        found = true;
                        break;
                    }
                }
            } catch (EvaluationFailure failure) {
                // a range that depends on other parameters is looked at when the device is elaborated
                continue;
            }
        }
        return found;
    }

    private void count(MeasurementDeclaration declaration, Measurement measurement) {
        long points = 1;
        for (Measurement.Axis axis : measurement.axes()) {
            points *= axis.values().size();
        }
        String energies = measurement.energy() instanceof Measurement.EnergyPoints axis
                ? axis.values().size() + " energies each"
                : measurement.energy() instanceof Measurement.AdaptiveEnergies
                        ? "energies as the tolerance asks"
                        : "integrals over energy where needed";
        report(
                IssueCode.SOLVE_COUNT,
                declaration,
                IsthmusPackage.Literals.DECLARATION__NAME,
                "Measurement '" + declaration.getName() + "' has " + points + (points == 1 ? " point" : " points")
                        + ", " + energies + ".");
    }
}
