package org.isthmus.runtime.solve;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.selection.Backends;
import org.isthmus.runtime.plan.Planner;
import org.isthmus.runtime.plan.SolvePlan;
import org.junit.jupiter.api.Test;

/** Devices that only fit because fronts are let go: the surefire heap is far below what their whole G would take. */
class LargeDeviceTest {
    private static EnergySolution solve(Device device, double energy, Needs needs) {
        ComplexBackend algebra = Backends.standard();
        SolvePlan plan = Planner.plan(device);
        try (Solver solver =
                Solvers.open(OperatingPoint.unbiased(device), plan, Solvers.contacts(device, algebra), algebra)) {
            return solver.solve(energy, needs);
        }
    }

    /**
     * One raised site in a chain of 10⁵: T = v²/(v² + U²), and far from it the local density of states of a half-filled
     * mixture, 2/v·(1 + r·cos …), never above (2/v)(1 + |r|) (closed form).
     */
    @Test
    void aLongChain() {
        double u = 0.5;
        double energy = 0.7;
        EnergySolution solution =
                solve(TestDevices.strip(100_000, 1, s -> s == 40_000 ? u : 0, 0), energy, new Needs(true, false));
        double velocity = Math.sqrt(4 - energy * energy);
        double t = velocity * velocity / (velocity * velocity + u * u);
        assertEquals(t, solution.transmission(0, 1), 1e-10);
        double[] spectral = solution.siteSpectral();
        double bound = 2 / velocity * (1 + Math.sqrt(1 - t));
        assertTrue(Arrays.stream(spectral).allMatch(a -> a > 0 && a < bound + 1e-6));
        // standing waves average out between the raised site and the lead
        double mean = Arrays.stream(spectral, 50_000, 90_000).average().orElseThrow();
        assertEquals(2 / velocity, mean, 1e-4);
    }

    /** A clean strip of 64 × 500: as many as there are open modes (Landauer), everywhere the same along it. */
    @Test
    void aLongStrip() {
        EnergySolution solution = solve(TestDevices.strip(500, 64, s -> 0, 0), 0.313, new Needs(true, false));
        assertEquals(solution.openModes(0), solution.transmission(0, 1), 1e-9);
        double[] spectral = solution.siteSpectral();
        for (int y = 0; y < 64; y++) {
            assertEquals(spectral[y], spectral[250 * 64 + y], 1e-8);
        }
    }
}
