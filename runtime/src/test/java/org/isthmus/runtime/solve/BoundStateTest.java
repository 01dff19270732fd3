package org.isthmus.runtime.solve;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.selection.Backends;
import org.isthmus.runtime.plan.Planner;
import org.isthmus.runtime.plan.SolvePlan;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** States that no lead reaches, exactly at the energy: they carry nothing and must not be in the way. */
class BoundStateTest {
    private static final Needs SITES = new Needs(true, false);

    private static EnergySolution solve(Device device, SolvePlan plan, String backend, double energy) {
        ComplexBackend algebra = Backends.named(backend);
        try (Solver solver =
                Solvers.open(OperatingPoint.unbiased(device), plan, Solvers.contacts(device, algebra), algebra)) {
            return solver.solve(energy, SITES);
        }
    }

    /** A part that hangs on nothing: two sites with levels at ±1 eV and a single one at 1 eV. */
    @ParameterizedTest
    @ValueSource(strings = {"native", "pure"})
    void aPartOfItsOwn(String backend) {
        Device wire = TestDevices.strip(12, 3, s -> 0, 0);
        Device more = TestDevices.with(wire, new double[] {0, 0, 1}, new int[][] {{36, 37}});
        for (SolvePlan plan :
                new SolvePlan[] {Planner.plan(more), Planner.slices(more), Planner.nestedDissection(more, 4)}) {
            for (double energy : new double[] {1, -1, 0.5}) {
                EnergySolution expected = solve(wire, Planner.plan(wire), backend, energy);
                EnergySolution actual = solve(more, plan, backend, energy);
                assertEquals(expected.transmission(0, 1), actual.transmission(0, 1), 1e-11);
                double[] sites = expected.siteSpectral();
                for (int s = 0; s < sites.length; s++) {
                    assertEquals(sites[s], actual.siteSpectral()[s], 1e-10);
                }
                for (int s = sites.length; s < sites.length + 3; s++) {
                    assertEquals(0, actual.siteSpectral()[s], 1e-10);
                }
            }
        }
    }

    /**
     * Two like sites beside one site of a chain: their even combination acts as U = 2t²/(E − ε) on it (closed form), so that
     * T = v²/(v² + U²) and none at all at E = ε; the odd one is bound, at ε.
     */
    @ParameterizedTest
    @ValueSource(strings = {"native", "pure"})
    void anOddStateBesideAChain(String backend) {
        double level = 0.25;
        Device device = TestDevices.with(
                TestDevices.strip(15, 1, s -> 0, 0), new double[] {level, level}, new int[][] {{7, 15}, {7, 16}});
        for (SolvePlan plan :
                new SolvePlan[] {Planner.plan(device), Planner.slices(device), Planner.nestedDissection(device, 2)}) {
            for (double energy : new double[] {level - 0.3, level, level + 1e-7, level + 0.01}) {
                double velocity2 = 4 - energy * energy;
                double u = 2 / (energy - level);
                EnergySolution solution = solve(device, plan, backend, energy);
                double expected = energy == level ? 0 : velocity2 / (velocity2 + u * u);
                assertEquals(expected, solution.transmission(0, 1), 1e-11);
                assertTrue(Arrays.stream(solution.siteSpectral()).allMatch(a -> a > -1e-9 && a < 100));
            }
        }
    }
}
