package org.isthmus.runtime.solve;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.selection.Backends;
import org.isthmus.runtime.plan.Planner;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * Energies at which a wave of a lead stands still, exactly, so that nothing tells in from out: the answer is the limit from
 * one side, and for a perfect conductor still a whole number (Landauer, IBM J. Res. Dev. 1, 223 (1957)). At a distance of
 * 10⁻⁹ of the hopping the waves are known to some 10⁻¹², next to flat bands to 10⁻⁸: hence the tolerance.
 */
class BandEdgeTest {
    private static void wholeNumbers(Device device, String backend, double... more) {
        ComplexBackend algebra = Backends.named(backend);
        try (Solver solver = Solvers.open(
                OperatingPoint.unbiased(device), Planner.plan(device), Solvers.contacts(device, algebra), algebra)) {
            List<Double> energies = new ArrayList<>(solver.modeOpenings());
            for (double energy : more) {
                energies.add(energy);
            }
            for (double energy : energies) {
                EnergySolution solution = solver.solve(energy, new Needs(true, false));
                assertEquals(solution.openModes(0), solution.openModes(1), "at " + energy);
                assertEquals(solution.openModes(0), solution.transmission(0, 1), 1e-6, "at " + energy);
                assertEquals(energy, solution.energy(), 0.0);
                assertTrue(solution.equationResidual() < 1e-6);
            }
        }
    }

    @ParameterizedTest
    @ValueSource(strings = {"native", "pure"})
    void edgesOfLandauBands(String backend) {
        wholeNumbers(TestDevices.strip(12, 5, s -> 0, 0.05), backend, 0, 4, -4);
        wholeNumbers(TestDevices.strip(8, 6, s -> 0, 0.25), backend, 0);
    }

    /** At E = 0 the zigzag edge states are flat to the last digit, at E = ±t whole bands are. */
    @Test
    void flatBandsOfTheHoneycomb() {
        wholeNumbers(TestDevices.honeycombRibbon(12, 6, s -> 0), "native", 0, 1, -1, 1e-12, 1e-9, 1e-6, 3);
        wholeNumbers(TestDevices.honeycombRibbon(12, 7, s -> 0), "native", 0, 1, -1, 1e-12, 1e-9, 1e-6, -3);
    }

    @Test
    void edgesWithOverlap() {
        wholeNumbers(TestDevices.overlapChain(9, s -> 0, 0.1), "native", -2 / 1.2, 2 / 0.8);
    }

    @Test
    void edgesOfSeparableLeads() {
        wholeNumbers(TestDevices.strip(12, 5, s -> 0, 0), "native", 0, 4, -4);
    }
}
