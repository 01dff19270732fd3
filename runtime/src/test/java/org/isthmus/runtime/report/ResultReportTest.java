package org.isthmus.runtime.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.StringReader;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import javax.xml.parsers.DocumentBuilderFactory;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ExpectedValue;
import org.isthmus.runtime.device.Measurement.Comparator;
import org.isthmus.runtime.device.Measurement.EnergyPoints;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.device.SourceRef;
import org.isthmus.runtime.measure.Runs;
import org.isthmus.runtime.result.MeasurementResult;
import org.isthmus.runtime.result.Provenance;
import org.isthmus.runtime.solve.TestDevices;
import org.junit.jupiter.api.Test;
import org.xml.sax.InputSource;

class ResultReportTest {
    private static String page() throws Exception {
        Device strip = TestDevices.strip(6, 4, s -> 0.1 * (s % 5), 0);
        MeasurementResult result = Runs.of(strip)
                .energy(new EnergyPoints(List.of(-1.0, -0.5, 0.0, 0.5), SourceRef.NONE))
                .record("transmission", "fano", "dos", "ldos", "conductance")
                .expect(
                        new ExpectedValue.Observed(new ObservableCall("transmission", "source", "drain"), List.of()),
                        Comparator.AT_LEAST,
                        new ExpectedValue.Number(100),
                        0,
                        false)
                .run();
        Provenance provenance = new Provenance(
                "isthmus test", "device <Test>", Map.of("a.isth", "0f"), Map.of("accuracy", "1e-8"), "pure", 1);
        return ResultReport.html(result, provenance, Optional.of(strip));
    }

    /** Nothing is fetched: the only addresses are the names of namespaces (W3C, Scalable Vector Graphics 1.1). */
    @Test
    void needsNothingButItself() throws Exception {
        String page = page().replace("xmlns=\"http://www.w3.org/2000/svg\"", "");
        assertFalse(page.contains("http"), "an address");
        assertFalse(page.contains("<script"), "a script");
        assertFalse(page.contains("NaN"), "a number that is none");
    }

    @Test
    void saysWhatWasMeasuredAndHowItWasJudged() throws Exception {
        String page = page();
        assertTrue(page.contains("<title>M of Test</title>"));
        assertTrue(page.contains("<td class=\"broken\">broken</td>"));
        assertTrue(page.contains("1 of 1 expectations did not hold."));
        assertTrue(page.contains("lead source from left, 300 K"));
        assertTrue(page.contains("device &lt;Test&gt;"));
        assertTrue(page.contains("prefers-color-scheme: dark"));
        for (String caution : Provenance.CAUTIONS) {
            assertTrue(page.contains(LinePlot.escaped(caution)), caution);
        }
        assertEquals(4, page.split("<details>", -1).length - 1, "numbers behind each table of plots");
    }

    /** Every drawing is well-formed by itself and has a title. */
    @Test
    void drawingsAreWellFormed() throws Exception {
        Matcher svg = Pattern.compile("<svg.*?</svg>", Pattern.DOTALL).matcher(page());
        int count = 0;
        while (svg.find()) {
            var document = DocumentBuilderFactory.newInstance()
                    .newDocumentBuilder()
                    .parse(new InputSource(new StringReader(svg.group())));
            assertTrue(document.getElementsByTagName("title").getLength() == 1);
            count++;
        }
        assertTrue(count >= 5, count + " drawings");
    }
}
