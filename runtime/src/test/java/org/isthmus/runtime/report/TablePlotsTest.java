package org.isthmus.runtime.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class TablePlotsTest {
    private static final String SWEPT =
            """
            height (eV),energy (eV),source>drain,drain>source
            0.3,0,0,0
            0.3,1,0.5,0.5
            0.5,0,0,0
            0.5,1,0.25,0.25
            """;

    @Test
    void sweepsAndAxisAreTheColumnsThatTellRowsApart() {
        CsvTable table = CsvTable.parse("transmission", SWEPT);
        assertEquals(2, table.keys());
        assertEquals(List.of(2, 3), table.values());
        assertEquals(
                0, CsvTable.parse("conductance", "source>drain (S)\n7.7e-5\n").keys());
    }

    @Test
    void aCurveForEachValueAtEachSweptValue() {
        List<String> plots = TablePlots.svg(CsvTable.parse("transmission", SWEPT), "Spectrum");
        assertEquals(1, plots.size());
        assertEquals(4, plots.get(0).split("<polyline", -1).length - 1);
        assertTrue(plots.get(0).contains("source&gt;drain height = 0.3 eV"), plots.get(0));
    }

    @Test
    void errorsBecomeBars() {
        CsvTable table = CsvTable.parse("current", "bias (V),source (A),source +- (A)\n0,0,1e-9\n0.1,1e-6,2e-9\n");
        assertEquals(List.of(1), table.values());
        String plot = TablePlots.svg(table, "Output").get(0);
        assertEquals(2, plot.split("#0072b2", -1)[1].split("<line ", -1).length - 1, plot);
    }

    @Test
    void sitesOfAWireAreACurveAndSitesOfAnAreaAMap() {
        CsvTable wire = CsvTable.parse("density", "x (nm),y (nm),z (nm),density\n0,0,0,1\n0.5,0,0,2\n1,0,0,1\n");
        assertEquals(Optional.of(0), wire.place());
        assertTrue(TablePlots.svg(wire, "n").get(0).contains("<polyline"));
        CsvTable area =
                CsvTable.parse("density", "x (nm),y (nm),z (nm),density\n0,0,0,1\n0.5,0,0,2\n0,1,0,1\n0.5,1,0,3\n");
        String map = TablePlots.svg(area, "n").get(0);
        assertEquals(4, map.split("<circle", -1).length - 1);
        assertTrue(map.contains("#440154") && map.contains("#fde725"), "least dark, greatest bright");
    }

    @Test
    void oneRowIsNoPlotAndRubbishNoTable() {
        assertEquals(List.of(), TablePlots.svg(CsvTable.parse("conductance", "source>drain (S)\n7.7e-5\n"), "G"));
        assertThrows(IllegalArgumentException.class, () -> CsvTable.parse("t", "a,b\n1\n"));
        assertThrows(IllegalArgumentException.class, () -> CsvTable.parse("t", ""));
    }

    @Test
    void aPageEscapesWhatItShows() {
        String html = new ReportPage("A <b>", List.of(new ReportPage.Text("source", "a > b"))).html();
        assertTrue(html.contains("<h1>A &lt;b&gt;</h1>") && html.contains("<pre>a &gt; b</pre>"), html);
    }
}
