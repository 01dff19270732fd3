package org.isthmus.runtime.solve;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.selection.Backends;
import org.isthmus.runtime.plan.Planner;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** A honeycomb ribbon with zigzag edges, whose lead cells are coupled by a singular matrix. */
class HoneycombRibbonTest {
    /**
     * A perfect ribbon passes its open modes (Landauer, IBM J. Res. Dev. 1, 223 (1957)); near the neutral point that is the
     * one of the zigzag edge states (Brey & Fertig, Phys. Rev. B 73, 235411 (2006)).
     */
    @ParameterizedTest
    @ValueSource(ints = {4, 10, 17})
    void wholeNumbers(int chains) {
        Device device = TestDevices.honeycombRibbon(24, chains, s -> 0);
        ComplexBackend algebra = Backends.standard();
        try (Solver solver = Solvers.open(
                OperatingPoint.unbiased(device), Planner.plan(device), Solvers.contacts(device, algebra), algebra)) {
            assertEquals(1, solver.solve(0.02, Needs.LEADS).transmission(0, 1), 1e-9);
            assertEquals(1, solver.solve(-0.05, Needs.LEADS).transmission(0, 1), 1e-9);
            for (double energy : new double[] {-2.2, -0.9, 0.31, 0.77, 1.4, 2.5}) {
                EnergySolution solution = solver.solve(energy, Needs.LEADS);
                assertEquals(solution.openModes(0), solution.transmission(0, 1), 1e-9, "at " + energy);
                assertEquals(solution.openModes(1), solution.openModes(0));
            }
        }
    }
}
