package org.isthmus.examples;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.nio.file.Files;
import java.nio.file.Path;
import org.isthmus.runtime.result.MeasurementResult;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * Honeycomb ribbons with armchair edges, n rows of dimers wide, have subbands that start at |t|·|1 + 2 cos(pπ/(n + 1))|
 * (closed form of the nearest-neighbour model; Brey & Fertig, Phys. Rev. B 73, 235411 (2006)): none, thus metallic, for
 * n = 3p + 2. Just below the lowest start nothing passes, just above one mode does, exactly: 1e-8 is rounding beside an
 * edge.
 */
class ArmchairGapTest {
    @TempDir
    private Path folder;

    @ParameterizedTest
    @ValueSource(ints = {5, 6, 7, 8, 9, 10})
    void subbandsStartAtTheClosedForm(int n) throws Exception {
        double start = Double.POSITIVE_INFINITY;
        for (int p = 1; p <= n; p++) {
            double edge = 2.7 * Math.abs(1 + 2 * Math.cos(p * Math.PI / (n + 1)));
            start = Math.min(start, edge);
        }
        boolean metallic = n % 3 == 2;
        assertEquals(metallic, start < 1e-9);
        double below = metallic ? 0.01 : 0.99 * start;
        double above = metallic ? 0.02 : 1.01 * start;
        Path file = folder.resolve("ribbon.isth");
        Files.writeString(
                file,
                "device Ribbon { lattice Honeycomb; body box(0 nm .. " + (n - 0.5) * 0.123 + " nm, 0 nm .. 1.5 nm);"
                        + " lead a from bottom; lead b from top; }\n"
                        + "measurement Gap of Ribbon { energy = " + below + " eV .. " + above
                        + " eV in 2 points; record transmission; }\n");
        MeasurementResult result = ExampleRuns.run(file).get(0);
        double[] passed = ExampleRuns.column(ExampleRuns.table(result, "transmission"), "a>b");
        assertEquals(metallic ? 1 : 0, passed[0], 1e-8, "below");
        assertEquals(1, passed[1], 1e-8, "above");
    }
}
