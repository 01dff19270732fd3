package org.isthmus.runtime.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.ByteArrayInputStream;
import java.nio.charset.StandardCharsets;
import java.util.List;
import javax.xml.parsers.DocumentBuilderFactory;
import org.junit.jupiter.api.Test;
import org.w3c.dom.Document;
import org.w3c.dom.Element;

class LinePlotTest {
    @Test
    void isWellFormedWhateverTheNames() throws Exception {
        Document svg = parsed(new LinePlot(
                "a < b & \"c\"",
                "energy (eV)",
                "transmission",
                List.of(
                        new LinePlot.Curve("source>drain", new double[] {0, 1}, new double[] {0, 1}),
                        new LinePlot.Curve("drain>source", new double[] {0, 1}, new double[] {1, 0}))));
        assertEquals(2, svg.getElementsByTagName("polyline").getLength());
        assertEquals("a < b & \"c\"", svg.getElementsByTagName("title").item(0).getTextContent());
    }

    /** The data's corners lie in the frame's corners: x from 84 to 696, y from 360 up to 44. */
    @Test
    void cornersOfTheDataAreCornersOfTheFrame() throws Exception {
        Document svg = parsed(new LinePlot(
                "", "x", "y", List.of(new LinePlot.Curve("c", new double[] {-2, 3}, new double[] {-1, 5}))));
        Element line = (Element) svg.getElementsByTagName("polyline").item(0);
        assertEquals("84.00,360.00 696.00,44.00", line.getAttribute("points"));
    }

    @Test
    void aGapInterruptsTheCurve() throws Exception {
        double[] x = {0, 1, 2, 3, 4};
        double[] y = {0, 1, Double.NaN, 1, 2};
        Document svg = parsed(new LinePlot("", "x", "y", List.of(new LinePlot.Curve("c", x, y))));
        assertEquals(2, svg.getElementsByTagName("polyline").getLength());
    }

    @Test
    void nothingToShowIsStillAPlot() throws Exception {
        parsed(new LinePlot("", "x", "y", List.of(new LinePlot.Curve("c", new double[0], new double[0]))));
        parsed(new LinePlot("", "x", "y", List.of(new LinePlot.Curve("c", new double[] {1}, new double[] {0}))));
    }

    @Test
    void ticksAreRound() {
        AxisScale scale = AxisScale.covering(0.013, 0.987, true);
        assertEquals(0, scale.lower());
        assertEquals(1, scale.upper(), 1e-12);
        assertEquals(
                List.of("0", "0.2", "0.4", "0.6", "0.8", "1.0"),
                scale.ticks().stream().map(scale::label).toList());
        AxisScale small = AxisScale.covering(-2e-7, 3e-7, true);
        assertTrue(small.ticks().stream().map(small::label).toList().contains("−2e-7"), small.toString());
    }

    private static Document parsed(LinePlot plot) throws Exception {
        return DocumentBuilderFactory.newInstance()
                .newDocumentBuilder()
                .parse(new ByteArrayInputStream(plot.svg().getBytes(StandardCharsets.UTF_8)));
    }
}
