package org.isthmus.examples;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.isthmus.runtime.result.MeasurementResult;
import org.junit.jupiter.api.Test;

/**
 * The loop of the examples: its conductance has the period h/q in the flux, is even in it and vanishes at half a quantum
 * (Gefen, Imry & Azbel, Phys. Rev. Lett. 52, 129 (1984), for equal arms). The lattice keeps these symmetries exactly: 1e-9
 * of G0 is rounding.
 */
class RingFluxPeriodTest {
    private static final double G0 = 7.748091729e-5;

    @Test
    void periodAndSymmetry() throws Exception {
        MeasurementResult result =
                ExampleRuns.run(ExampleFiles.FOLDER.resolve("ring.isth")).get(0);
        double[] g = ExampleRuns.column(ExampleRuns.table(result, "conductance"), "west>east (S)");
        assertEquals(33, g.length);
        for (int k = 0; k <= 16; k++) {
            assertEquals(g[k], g[k + 16], 1e-9 * G0, "period at " + k);
            assertEquals(g[k], g[16 - k], 1e-9 * G0, "evenness at " + k);
        }
        assertEquals(0, g[8], 1e-9 * G0);
        assertTrue(g[0] > 0.1 * G0);
    }
}
