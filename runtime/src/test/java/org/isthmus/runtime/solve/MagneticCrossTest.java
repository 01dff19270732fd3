package org.isthmus.runtime.solve;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.selection.Backends;
import org.isthmus.runtime.plan.Planner;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Four leads on a disordered square in a magnetic field, which share its corner sites. */
class MagneticCrossTest {
    private static EnergySolution solve(Device device, double energy) {
        ComplexBackend algebra = Backends.standard();
        try (Solver solver = Solvers.open(
                OperatingPoint.unbiased(device), Planner.plan(device), Solvers.contacts(device, algebra), algebra)) {
            return solver.solve(energy, new Needs(true, true));
        }
    }

    /**
     * T_pq(B) = T_qp(−B) and sum rules (Büttiker, Phys. Rev. Lett. 57, 1761 (1986)): Σ_q T_pq = Σ_q T_qp, none negative.
     * The tolerance is the residual of the leads' waves.
     */
    @ParameterizedTest
    @CsvSource({"1, -1.3, 0.03", "2, 0.4, 0.11", "3, -2.6, 0.007"})
    void reciprocityAndSumRules(long seed, double energy, double flux) {
        int width = 9;
        double[] disorder = new Random(seed).doubles(width * width, -1, 1).toArray();
        EnergySolution up = solve(TestDevices.cross(width, s -> disorder[s], flux), energy);
        EnergySolution down = solve(TestDevices.cross(width, s -> disorder[s], -flux), energy);
        double asymmetry = 0;
        for (int p = 0; p < 4; p++) {
            double into = 0;
            double out = 0;
            double all = 0;
            for (int q = 0; q < 4; q++) {
                assertTrue(up.transmission(p, q) > -1e-12);
                assertEquals(up.transmission(p, q), down.transmission(q, p), 1e-8);
                into += p == q ? 0 : up.transmission(q, p);
                out += p == q ? 0 : up.transmission(p, q);
                all += up.transmission(q, p);
                asymmetry = Math.max(asymmetry, Math.abs(up.transmission(p, q) - up.transmission(q, p)));
            }
            assertEquals(into, out, 1e-8);
            assertTrue(into <= up.openModes(p) + 1e-8, "no more than the open modes");
            assertEquals(up.spectralTrace(p), all, 1e-8);
        }
        assertTrue(asymmetry > 1e-3, "the field is felt: " + asymmetry);
        double[] total = up.siteSpectral();
        for (int site = 0; site < total.length; site++) {
            double fed = 0;
            for (int p = 0; p < 4; p++) {
                fed += up.siteSpectral(p)[site];
            }
            assertEquals(total[site], fed, 1e-8);
            assertTrue(total[site] > 0);
        }
    }

    /** A full quantum of flux in every loop is none at all (gauge invariance). */
    @ParameterizedTest
    @CsvSource({"-0.7", "1.9"})
    void aQuantumPerLoopIsNone(double energy) {
        EnergySolution none = solve(TestDevices.cross(6, s -> 0.3 * Math.sin(s), 0), energy);
        EnergySolution quantum = solve(TestDevices.cross(6, s -> 0.3 * Math.sin(s), 1), energy);
        for (int p = 0; p < 4; p++) {
            for (int q = 0; q < 4; q++) {
                assertEquals(none.transmission(p, q), quantum.transmission(p, q), 1e-8);
            }
        }
    }
}
