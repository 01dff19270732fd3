package org.isthmus.examples;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.nio.file.Files;
import java.nio.file.Path;
import org.isthmus.runtime.result.MeasurementResult;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/**
 * One dimension of a saddle: over the top of an inverted parabola −½mω²x² an electron passes with
 * T = 1/(1 + exp(−2π(E − V)/ħω)) (Kemble 1935; the factor of each mode in Büttiker, Phys. Rev. B 41, 7906 (1990)). The
 * parabola must end somewhere: 240 meV below its top of ħω = 8 meV it meets a flat wire. What is reflected there, and the
 * lattice, change T by a few thousandths.
 */
class SaddlePointConstrictionTest {
    @TempDir
    private Path folder;

    @Test
    void parabolicBarrier() throws Exception {
        Path file = folder.resolve("saddle.isth");
        Files.writeString(
                file,
                """
                device Top {
                    lattice Chain(a = 0.5 nm, m = 0.067 me);
                    body box(-100 nm .. 100 nm);
                    potential top = max(240 meV - 0.5*0.067 me*(8 meV/hbar)^2*x^2, 0 meV);
                    lead a from left;
                    lead b from right;
                }
                measurement Steps of Top { energy = 230 meV .. 250 meV in 21 points; record transmission; }
                """);
        MeasurementResult result = ExampleRuns.run(file).get(0);
        double[] energies = ExampleRuns.column(ExampleRuns.table(result, "transmission"), "energy (eV)");
        double[] passed = ExampleRuns.column(ExampleRuns.table(result, "transmission"), "a>b");
        for (int k = 0; k < energies.length; k++) {
            double expected = 1 / (1 + Math.exp(-2 * Math.PI * (energies[k] - 0.240) / 0.008));
            assertEquals(expected, passed[k], 1e-2, "at " + energies[k] + " eV");
        }
    }
}
