package org.isthmus.runtime.solve;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.selection.Backends;
import org.isthmus.runtime.plan.Planner;
import org.isthmus.runtime.plan.SolvePlan;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** The answer must not depend on the order of elimination, nor on who multiplies. */
class PlanIndependenceTest {
    private static final Needs SITES = new Needs(true, true);

    private static EnergySolution solve(Device device, SolvePlan plan, String backend, double energy) {
        ComplexBackend algebra = Backends.named(backend);
        try (Solver solver =
                Solvers.open(OperatingPoint.unbiased(device), plan, Solvers.contacts(device, algebra), algebra)) {
            return solver.solve(energy, SITES);
        }
    }

    /**
     * Includes the band centre of a clean strip, where blocks of every shape have levels exactly at the energy. Traces agree
     * to 1e-11; values per site to 1e-9, since multipliers of up to 100 enter squared on each level on the way down (2e-10
     * seen with leaves of one orbital, 2e-11 with those that the planner chooses).
     */
    @ParameterizedTest
    @CsvSource({"0, 0, 0", "0, 0, 1", "0.4, 0, 0.3", "1.5, 0.02, -1.1", "0, 0.05, 0"})
    void slicesAndDissectionsAgree(double disorder, double flux, double energy) {
        double[] raised = new Random(11)
                .doubles(24 * 10, -disorder - 1e-300, disorder + 1e-300)
                .toArray();
        Device device = TestDevices.strip(24, 10, s -> disorder == 0 ? 0 : raised[s], flux);
        List<SolvePlan> plans = new ArrayList<>(List.of(Planner.slices(device)));
        for (int leaf : new int[] {1, 6, 20, 500}) {
            plans.add(Planner.nestedDissection(device, leaf));
        }
        EnergySolution reference = solve(device, plans.get(0), "pure", energy);
        for (SolvePlan plan : plans) {
            for (String backend : List.of("native", "pure")) {
                EnergySolution solution = solve(device, plan, backend, energy);
                for (int p = 0; p < 2; p++) {
                    for (int q = 0; q < 2; q++) {
                        assertEquals(
                                reference.transmission(p, q),
                                solution.transmission(p, q),
                                1e-11,
                                plan.method() + ", " + backend);
                    }
                    assertArrayEquals(reference.siteSpectral(p), solution.siteSpectral(p), 1e-9, plan.method());
                }
                assertArrayEquals(reference.siteSpectral(), solution.siteSpectral(), 1e-9, plan.method());
                assertTrue(solution.equationResidual() < 1e-10);
            }
        }
    }

    /**
     * Slices of a clean strip with a third of a flux quantum per loop hand on level after level next to E = 0, and lose the
     * states at the sites on the long way back: that must be told. A dissection's way is short.
     */
    @Test
    void lostDigitsAreTold() {
        Device device = TestDevices.strip(60, 17, s -> 0, 1.0 / 3);
        assertThrows(SolveFailure.class, () -> solve(device, Planner.slices(device), "native", 1e-5));
        EnergySolution solution = solve(device, Planner.plan(device), "native", 1e-5);
        assertEquals(solution.openModes(0), solution.transmission(0, 1), 1e-9);
        assertTrue(solution.equationResidual() < 1e-8);
    }

    /** Unitarity of a disordered strip: T + R = open modes, from both ends (conservation of current). */
    @ParameterizedTest
    @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8})
    void nothingIsLost(long seed) {
        Random random = new Random(seed);
        int length = 5 + random.nextInt(40);
        int width = 1 + random.nextInt(12);
        double strength = 3 * random.nextDouble();
        double flux = random.nextBoolean() ? 0 : 0.1 * random.nextDouble();
        double[] raised = random.doubles(length * width, -1, 1).toArray();
        Device device = TestDevices.strip(length, width, s -> strength * raised[s], flux);
        double energy = -1.5 + 3 * random.nextDouble();
        EnergySolution solution = solve(device, Planner.plan(device), "native", energy);
        for (int p = 0; p < 2; p++) {
            assertEquals(solution.transmission(0, 1), solution.transmission(1, 0), 1e-8);
            assertTrue(solution.transmission(0, 1) <= solution.openModes(p) + 1e-8);
            assertEquals(
                    solution.spectralTrace(p), solution.transmission(p, p) + solution.transmission(1 - p, p), 1e-8);
            assertTrue(solution.transmissionSquared(0, 1) <= solution.transmission(0, 1) + 1e-8);
            // S unitary: Σ_c Tr s_pc s_pc† = open modes, in the correlators' form Tr A_pp(p) A_pp(p) + 2 … = Tr tt†
            assertEquals(
                    solution.transmission(0, 1),
                    solution.noiseTrace(p, p, 1 - p, 1 - p) + solution.noiseTrace(p, p, p, 1 - p),
                    1e-8);
        }
    }
}
