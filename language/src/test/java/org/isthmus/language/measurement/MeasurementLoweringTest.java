package org.isthmus.language.measurement;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.google.inject.Injector;
import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.util.List;
import java.util.Map;
import org.eclipse.emf.common.util.URI;
import org.eclipse.emf.ecore.resource.Resource;
import org.eclipse.emf.ecore.util.EcoreUtil;
import org.eclipse.xtext.resource.XtextResourceSet;
import org.isthmus.language.isthmus.MeasurementDeclaration;
import org.isthmus.language.isthmus.SourceFile;
import org.isthmus.language.tests.IsthmusInjectorProvider;
import org.isthmus.runtime.device.AxisPosition;
import org.isthmus.runtime.device.ExpectedValue;
import org.isthmus.runtime.device.Measurement;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** What the statements of a measurement mean, as the page of the language fixes it. */
class MeasurementLoweringTest {
    private static final Injector INJECTOR = new IsthmusInjectorProvider().getInjector();
    private static final String WIRE =
            """
            let low = 0.1 eV;
            device Wire {
                parameter height : energy = 0.3 eV in 0 eV .. 1 eV;
                parameter gap = 1 nm;
                parameter count = 1;
                lattice Chain(a = 0.5 nm, m = 0.067 me);
                body box(0 nm .. 10 nm);
                potential barrier = count*height where 4 nm <= x <= 4 nm + gap;
                lead source from left  { mu = 0.1 eV; }
                lead drain  from right { mu = 0.1 eV; }
            }
            """;

    private static MeasurementLowering.Lowered lowered(String statements, Map<String, Double> given) {
        XtextResourceSet resources = INJECTOR.getInstance(XtextResourceSet.class);
        Resource resource = resources.createResource(URI.createURI("memory:/gauge.isth"));
        String text = WIRE + "measurement M of Wire {\n" + statements + "\n}\n";
        try {
            resource.load(new ByteArrayInputStream(text.getBytes(StandardCharsets.UTF_8)), Map.of());
        } catch (IOException e) {
            throw new AssertionError(e);
        }
        EcoreUtil.resolveAll(resource);
        assertEquals(List.of(), resource.getErrors());
        SourceFile file = (SourceFile) resource.getContents().get(0);
        return MeasurementLowering.lower(
                (MeasurementDeclaration)
                        file.getDeclarations().get(file.getDeclarations().size() - 1),
                given);
    }

    private static Measurement measurement(String statements) {
        MeasurementLowering.Lowered lowered = lowered(statements, Map.of());
        assertEquals(List.of(), lowered.findings());
        return lowered.measurement();
    }

    private static List<Double> energies(String points) {
        return ((Measurement.EnergyPoints)
                        measurement("energy = " + points + "; record dos;").energy())
                .values();
    }

    private static ExpectedValue left(String axes, String side) {
        return measurement(axes + "expect " + side + " <= 1;")
                .expectations()
                .get(0)
                .left();
    }

    @Test
    void pointsIncludeBothEndsExactly() {
        assertEquals(List.of(0.1, 0.2, 0.3, 0.4, 0.5), energies("0.1 eV .. 0.5 eV in 5 points"));
        List<Double> many = energies("0 eV .. 1 eV in 201 points");
        assertEquals(201, many.size());
        assertEquals(0.8, many.get(160));
        assertEquals(1.0, many.get(200));
        assertEquals(List.of(0.1), energies("0.1 eV .. 0.1 eV in 1 points"));
    }

    /** 0.3/0.1 is 2.9999999999999996 in binary: the upper end must be reached all the same. */
    @Test
    void stepsEndAtOrBeforeTheUpperEnd() {
        assertEquals(List.of(0.0, 0.1, 0.2, 0.3), energies("0 eV .. 0.3 eV step 0.1 eV"));
        assertEquals(List.of(0.0, 0.1, 0.2, 0.3), energies("0 eV .. 0.35 eV step 100 meV"));
        assertEquals(101, energies("-0.5 eV .. 0.5 eV step 10 meV").size());
        assertEquals(List.of(0.2), energies("0.2 eV .. 0.25 eV step 1 eV"));
    }

    @Test
    void sweepsKeepTheirOrderAndStandBeforeBiases() {
        Measurement measurement = measurement(
                """
                bias drain = 0 V .. 0.2 V in 2 points;
                sweep count = 1 .. 3;
                sweep height = [0.3 eV, 100 meV];
                average over count;
                record current;
                """);
        assertEquals(
                List.of("count", "height", "bias drain"),
                measurement.axes().stream()
                        .map(a -> a instanceof Measurement.SweepAxis s
                                ? s.parameter()
                                : AxisPosition.bias(((Measurement.BiasAxis) a).lead()))
                        .toList());
        assertEquals(List.of(1.0, 2.0, 3.0), measurement.axes().get(0).values());
        assertEquals(List.of(0.3, 0.1), measurement.axes().get(1).values());
        assertEquals(List.of("count"), measurement.averages());
    }

    @Test
    void settingsOfTheMeasurementAndOfTheDevice() {
        Measurement measurement = measurement(
                "temperature = 4.2 K; mu = low/2; drop = linear; accuracy = 1e-5; height = 2*low; bias drain = [0.1 V];"
                        + " record current;");
        assertEquals(4.2, measurement.temperature().getAsDouble());
        assertEquals(0.05, measurement.mu().getAsDouble(), 1e-15);
        assertEquals(Measurement.Drop.LINEAR, measurement.drop());
        assertEquals(1e-5, measurement.accuracy());
        assertEquals(Map.of("height", 0.2), measurement.settings());
    }

    @Test
    void whatIsGivenFromOutsideWinsOverTheText() {
        MeasurementLowering.Lowered lowered =
                lowered("height = 0.2 eV; mu = height; record current;", Map.of("height", 0.4));
        assertEquals(Map.of("height", 0.4), lowered.measurement().settings());
        assertEquals(0.4, lowered.measurement().mu().getAsDouble());
    }

    @Test
    void adaptiveEnergies() {
        Measurement.AdaptiveEnergies axis = assertInstanceOf(
                Measurement.AdaptiveEnergies.class,
                measurement("energy = 0 eV .. 0.5 eV adaptive to 1e-3; record transmission;")
                        .energy());
        assertEquals(List.of(0.0, 0.5, 1e-3), List.of(axis.lower(), axis.upper(), axis.tolerance()));
    }

    @Test
    void aPointPicksTheAxisOfItsKind() {
        ExpectedValue.Observed plain =
                (ExpectedValue.Observed) left("sweep height = [0.3 eV];", "transmission(source, drain) at 0.8 eV");
        assertEquals(List.of(new AxisPosition(AxisPosition.ENERGY, 0.8, "0.8 eV")), plain.at());
        assertEquals(List.of("source", "drain"), plain.call().leads());
        ExpectedValue.Observed both = (ExpectedValue.Observed) left(
                "sweep height = [0.3 eV, 0.5 eV]; bias drain = [0 V, 0.2 V];",
                "conductance(source, drain) at (height = 300 meV, 0.2 V)");
        assertEquals(
                List.of(
                        new AxisPosition("height", 0.3, "300 meV"),
                        new AxisPosition(AxisPosition.bias("drain"), 0.2, "0.2 V")),
                both.at());
    }

    /** An integrated quantity has no energy axis to pick from: an energy is then that of a sweep. */
    @Test
    void anEnergyPicksASweepWhereTheObservableIsIntegrated() {
        ExpectedValue.Observed observed = (ExpectedValue.Observed)
                left("sweep height = [0.3 eV, 0.5 eV];", "conductance(source, drain) at 0.3 eV");
        assertEquals(List.of(new AxisPosition("height", 0.3, "0.3 eV")), observed.at());
    }

    @Test
    void oneArgumentReducesSeveralCompare() {
        String axis = "energy = 0 eV .. 0.4 eV in 3 points;";
        ExpectedValue.Reduced reduced =
                assertInstanceOf(ExpectedValue.Reduced.class, left(axis, "max(transmission(source, drain))"));
        assertInstanceOf(ExpectedValue.Observed.class, reduced.operand());
        ExpectedValue.Applied applied =
                assertInstanceOf(ExpectedValue.Applied.class, left(axis, "max(transmission(source, drain), 0.5)"));
        assertEquals("max", applied.function());
        assertEquals(new ExpectedValue.Number(0.5), applied.arguments().get(1));
    }

    @Test
    void aSweptParameterStaysAVariableTheOthersAreNumbers() {
        ExpectedValue.Arithmetic sum = (ExpectedValue.Arithmetic)
                left("energy = [0.1 eV]; sweep height = [0.3 eV];", "height/low + gap/(2*gap)");
        assertEquals(new ExpectedValue.AxisValue("height"), ((ExpectedValue.Arithmetic) sum.left()).left());
        assertEquals(new ExpectedValue.Number(0.1), ((ExpectedValue.Arithmetic) sum.left()).right());
        assertEquals(new ExpectedValue.Number(0.5), sum.right());
    }

    @Test
    void tolerancesAreAbsoluteOrRelative() {
        Measurement measurement = measurement(
                """
                energy = [0.1 eV];
                expect transmission(source, drain) == 0.97 within 1e-2;
                expect transmission(source, drain) == 0.97 within 2 %;
                expect max(abs(current(source) + current(drain))) <= 1e-12 A/eV;
                """);
        Measurement.Expectation absolute = measurement.expectations().get(0);
        assertEquals(0.01, absolute.tolerance());
        assertTrue(!absolute.relative());
        Measurement.Expectation relative = measurement.expectations().get(1);
        assertEquals(0.02, relative.tolerance());
        assertTrue(relative.relative());
        assertEquals(Measurement.Comparator.EQUAL, relative.comparator());
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "energy = 0.4 eV .. 0.1 eV in 3 points; | empty-range | from 0.4 eV to 0.1 eV",
                "energy = 0.4 eV .. 0.1 eV step 0.1 eV; | empty-range | from 0.4 eV to 0.1 eV",
                "energy = 0.4 eV .. 0.1 eV adaptive to 1e-3; | empty-range | from 0.4 eV to 0.1 eV",
                "energy = 0.1 eV .. 0.1 eV in 3 points; | empty-range | both ends are 0.1 eV",
                "energy = 0 eV .. 0.1 eV in 0 points; | empty-range | not 0",
                "energy = 0 eV .. 0.1 eV in 2.5 points; | empty-range | not 2.5",
                "energy = 0 eV .. 0.1 eV step 0 eV; | empty-range | greater than zero",
                "bias drain = 0.2 V .. 0 V in 3 points; | empty-range | from 0.2 V to 0 V",
                "bias drain = 0 V .. 0.2 V adaptive to 1e-3; | kind-mismatch | energy axis",
                "sweep height = 0.1 eV .. 0.2 eV; | empty-range | in N points",
                "sweep height = [0.1 eV] in 2 points; | kind-mismatch | points already",
                "temperature = 0 K - 3 K; | negative-temperature | below zero",
                "accuracy = 2; | empty-range | between 0 and 1",
                "expect transmission(source, drain) at 0.2 V <= 1; | missing-axis | a voltage",
                "expect current(source) at (height = 0.2 eV) <= 1 A; | missing-axis | height"
            })
    void whatCannotBeMeantIsAFinding(String statements, String code, String said) {
        MeasurementLowering.Lowered lowered = lowered(statements, Map.of());
        assertNull(lowered.measurement());
        assertEquals(1, lowered.findings().size());
        assertEquals(code, lowered.findings().get(0).code());
        assertTrue(
                lowered.findings().get(0).text().contains(said),
                lowered.findings().get(0).text());
        assertTrue(lowered.findings().get(0).place().line() > 0);
    }
}
