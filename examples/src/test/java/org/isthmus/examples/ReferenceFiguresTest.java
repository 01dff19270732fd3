package org.isthmus.examples;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.isthmus.runtime.result.MeasurementResult;
import org.isthmus.runtime.result.ResultTable;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * Figures of {@code src/test/python/reference.py}, which writes the tight-binding matrices of a few examples down by hand
 * and solves them with NumPy and SciPy: dense inverses, leads in closed form, sums over the matrices' own modes. Both sides
 * are good to some 1e-13 relative; 1e-9 leaves room for the digits of the constants and for resonances.
 */
class ReferenceFiguresTest {
    private static final Path FOLDER = Path.of("src/test/resources/org/isthmus/examples/reference");

    @ParameterizedTest
    @CsvSource({
        "barrier.isth, BarrierWire.Spectrum, transmission, source>drain",
        "superlattice.isth, Filter.Bands, transmission, source>drain",
        "constriction.isth, PointContact.Steps, transmission, source>drain",
        "hall.isth, Bar.Plateaus, transmission, source>drain",
        "ribbon.isth, Metallic.Gap, transmission, lower>upper",
        "contact.isth, Measured.Spectrum, transmission, tip>base",
    })
    void agree(String file, String folder, String observable, String column) throws Exception {
        List<MeasurementResult> results = ExampleRuns.run(ExampleFiles.FOLDER.resolve(file));
        ResultTable table = ExampleRuns.table(ExampleRuns.result(results, folder), observable);
        double[] energies = ExampleRuns.column(table, "energy (eV)");
        double[] values = ExampleRuns.column(table, column);
        List<String> lines = Files.readAllLines(FOLDER.resolve(folder + ".csv"));
        int compared = 0;
        for (String line : lines.subList(1, lines.size())) {
            String[] cells = line.split(",");
            double energy = Double.parseDouble(cells[0]);
            for (int k = 0; k < energies.length; k++) {
                if (Math.abs(energies[k] - energy) < 1e-12) {
                    assertEquals(Double.parseDouble(cells[1]), values[k], 1e-9, folder + " at " + energy + " eV");
                    compared++;
                }
            }
        }
        assertTrue(compared >= 3, folder + ": " + compared + " energies in common");
    }
}
