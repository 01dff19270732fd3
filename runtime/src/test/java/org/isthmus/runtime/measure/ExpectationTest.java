package org.isthmus.runtime.measure;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.isthmus.runtime.device.AxisPosition;
import org.isthmus.runtime.device.ExpectedValue;
import org.isthmus.runtime.device.ExpectedValue.Applied;
import org.isthmus.runtime.device.ExpectedValue.Arithmetic;
import org.isthmus.runtime.device.ExpectedValue.AxisValue;
import org.isthmus.runtime.device.ExpectedValue.Observed;
import org.isthmus.runtime.device.ExpectedValue.Reduced;
import org.isthmus.runtime.device.ExpectedValue.Reduction;
import org.isthmus.runtime.device.Measurement.Comparator;
import org.isthmus.runtime.device.Measurement.EnergyPoints;
import org.isthmus.runtime.device.Measurement.SweepAxis;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.device.SourceRef;
import org.isthmus.runtime.result.Verdict;
import org.isthmus.runtime.solve.TestDevices;
import org.junit.jupiter.api.Test;

/** Expectations on a level whose height is swept: T = ΓΓ'/((E − h)² + ((Γ + Γ')/2)²) (Breit and Wigner 1936). */
class ExpectationTest {
    private static final ObservableCall THROUGH = new ObservableCall("transmission", "left", "right");

    private static Runs level() {
        return Runs.of(v -> TestDevices.level(v.get("height"), 0.01, 0.01))
                .axis(new SweepAxis("height", "eV", 1, List.of(0.0, 0.02, 0.05), SourceRef.NONE))
                .energy(new EnergyPoints(List.of(-0.02, 0.0, 0.02, 0.05, 0.1), SourceRef.NONE));
    }

    private static double line(double away) {
        return 1e-4 / (away * away + 1e-4);
    }

    private static ExpectedValue number(double value) {
        return new ExpectedValue.Number(value);
    }

    private static Observed through(AxisPosition... at) {
        return new Observed(THROUGH, List.of(at));
    }

    private static Verdict judged(ExpectedValue left, Comparator comparator, ExpectedValue right) throws Exception {
        return judged(left, comparator, right, 1e-10, false);
    }

    private static Verdict judged(
            ExpectedValue left, Comparator comparator, ExpectedValue right, double tolerance, boolean relative)
            throws Exception {
        return level().expect(left, comparator, right, tolerance, relative)
                .run()
                .verdicts()
                .get(0);
    }

    @Test
    void mustHoldAtEveryPointAndTellsTheWorst() throws Exception {
        Verdict verdict = judged(through(), Comparator.AT_LEAST, number(0.5));
        assertFalse(verdict.held());
        // farthest from the level: 0.1 eV from the one at 0
        assertEquals(line(0.1), verdict.measured(), 1e-12);
        assertEquals(line(0.1) - 0.5, verdict.difference(), 1e-12);
        assertEquals("height (eV) = 0, energy (eV) = 0.1", verdict.at());
        assertTrue(judged(through(), Comparator.AT_MOST, number(1)).held());
    }

    /** A point picked on one axis must hold at every point of the others, and is solved where no axis has it. */
    @Test
    void aPointOfOneAxis() throws Exception {
        AxisPosition energy = new AxisPosition(AxisPosition.ENERGY, 0.0123, "0.0123 eV");
        assertEquals(
                line(0.0123 - 0.05),
                judged(through(energy), Comparator.AT_LEAST, number(0.9)).measured(),
                1e-12);
        AxisPosition height = new AxisPosition("height", 0.0123, "0.0123 eV");
        assertTrue(judged(through(energy, height), Comparator.EQUAL, number(1)).held());
    }

    @Test
    void reductions() throws Exception {
        AxisPosition height = new AxisPosition("height", 0.02, "0.02 eV");
        assertTrue(judged(new Reduced(Reduction.MAX, through()), Comparator.EQUAL, number(1))
                .held());
        assertTrue(judged(new Reduced(Reduction.MIN, through()), Comparator.EQUAL, number(line(0.1)))
                .held());
        assertTrue(judged(new Reduced(Reduction.ARGMAX, through(height)), Comparator.EQUAL, number(0.02))
                .held());
        assertTrue(judged(new Reduced(Reduction.ARGMIN, through(height)), Comparator.EQUAL, number(0.1))
                .held());
        double mean = (line(0.04) + line(0.02) + line(0) + line(0.03) + line(0.08)) / 5;
        assertTrue(judged(new Reduced(Reduction.MEAN, through(height)), Comparator.EQUAL, number(mean))
                .held());
    }

    /** Without an energy in it, a reduction runs over the sweep: conductance falls as the level leaves µ. */
    @Test
    void slopeOverTheSweep() throws Exception {
        Verdict verdict = Runs.of(v -> TestDevices.level(v.get("height"), 0.01, 0.01))
                .at(0, 0)
                .axis(new SweepAxis("height", "meV", 1e-3, List.of(0.0, 0.01, 0.02), SourceRef.NONE))
                .expect(
                        new Reduced(
                                Reduction.SLOPE,
                                new Observed(new ObservableCall("conductance", "left", "right"), List.of())),
                        Comparator.LESS,
                        number(0),
                        0,
                        false)
                .run()
                .verdicts()
                .get(0);
        // least squares through three equidistant points: (y3 − y1)/2d, in internal units (1 S = 1/(h/q²) of 1/(eV·fs))
        double h = 4.135667696;
        assertEquals((line(0.02) - 1) / h / 0.02, verdict.measured(), 1e-8);
        assertTrue(verdict.held());
    }

    @Test
    void arithmeticFunctionsAndAxes() throws Exception {
        ExpectedValue back = new Observed(new ObservableCall("transmission", "right", "left"), List.of());
        ExpectedValue difference = new Applied("abs", List.of(new Arithmetic('-', through(), back)));
        assertTrue(judged(new Reduced(Reduction.MAX, difference), Comparator.AT_MOST, number(0))
                .held());
        // T·((E − h)² + γ²) = γ² at every point
        ExpectedValue away = new Arithmetic('-', new AxisValue("energy"), new AxisValue("height"));
        ExpectedValue product =
                new Arithmetic('*', through(), new Arithmetic('+', new Arithmetic('^', away, number(2)), number(1e-4)));
        assertTrue(judged(product, Comparator.EQUAL, number(1e-4), 1e-10, true).held());
    }

    @Test
    void tolerances() throws Exception {
        AxisPosition energy = new AxisPosition(AxisPosition.ENERGY, 0, "0 eV");
        AxisPosition height = new AxisPosition("height", 0, "0 eV");
        assertTrue(judged(through(energy, height), Comparator.EQUAL, number(1.04), 0.05, false)
                .held());
        assertFalse(judged(through(energy, height), Comparator.EQUAL, number(1.06), 0.05, false)
                .held());
        assertTrue(judged(through(energy, height), Comparator.EQUAL, number(1.05), 0.05, true)
                .held());
        assertFalse(judged(through(energy, height), Comparator.EQUAL, number(1.06), 0.05, true)
                .held());
        assertTrue(judged(through(energy, height), Comparator.AT_LEAST, number(1.04), 0.05, false)
                .held());
        assertFalse(judged(through(energy, height), Comparator.GREATER, number(1.06), 0.05, false)
                .held());
        assertFalse(judged(through(energy, height), Comparator.LESS, number(1), 0, false)
                .held());
    }

    /** A value that is not defined never fulfils anything. */
    @Test
    void whatIsNotDefinedIsBroken() throws Exception {
        ExpectedValue fano = new Observed(new ObservableCall("fano", "source", "drain"), List.of());
        Verdict verdict = Runs.of(TestDevices.strip(3, 1, s -> 0, 0))
                .energy(new EnergyPoints(List.of(-3.0, 0.0), SourceRef.NONE))
                .expect(new Reduced(Reduction.MAX, fano), Comparator.AT_MOST, number(1), 0, false)
                .run()
                .verdicts()
                .get(0);
        assertFalse(verdict.held());
        assertTrue(Double.isNaN(verdict.measured()));
    }
}
