package org.isthmus.language.elaboration.geometry;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.OptionalDouble;
import org.isthmus.runtime.device.Side;
import org.isthmus.runtime.units.PhysicalConstants;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;

class GaugeTest {
    private static final double FIELD = 0.01;
    private final Gauge gauge = Gauge.of(FIELD);

    /** Phase around a triangle is 2π times the flux quanta through it (Stokes). */
    @Test
    void fluxThroughATriangle() {
        double[][] p = {{3, 7}, {5.5, 7.25}, {4, 9}};
        double sum = 0;
        double area = 0;
        for (int i = 0; i < 3; i++) {
            double[] a = p[i];
            double[] b = p[(i + 1) % 3];
            sum += gauge.phase(a[0], a[1], b[0], b[1]);
            area += (a[0] * b[1] - a[1] * b[0]) / 2;
        }
        assertEquals(FIELD * area / PhysicalConstants.HBAR, sum, 1e-12);
        assertEquals(2 * Math.PI * gauge.fluxQuanta(area), sum, 1e-12);
    }

    /** One flux quantum h/q: 1 T on 4135.667696 nm² (CODATA 2018: h/(2e) = 2.067833848e-15 Wb). */
    @Test
    void fluxQuantum() {
        assertEquals(1, Gauge.of(1e-3).fluxQuanta(2 * 2067.833848), 1e-9);
    }

    /**
     * A loop that runs from the body into cell 1, along cell 1, out to cell 2 and back encloses B·area, whatever the gauge
     * of the lead; and the phases are the same from cell to cell.
     */
    @ParameterizedTest
    @EnumSource(
            value = Side.class,
            names = {"LEFT", "RIGHT", "BOTTOM", "TOP"})
    void fluxThroughLoopsAcrossTheContact(Side side) {
        LatticeFrame frame = SomeLattices.triangular(1).frame(0.3, 0.2, 0);
        BodySites body = SomeLattices.inBox(frame, 0, 6, 0, 6);
        int[] period = LeadCells.period(frame, side, frame.bonds()).orElseThrow();
        LeadCells lead = LeadCells.of(body, side, period, site -> true);
        int count = body.count() + 2 * lead.count();
        double[][] place = new double[count][];
        for (int i = 0; i < body.count(); i++) {
            place[i] = new double[] {body.x(i), body.y(i)};
        }
        for (int cell = 1; cell <= 2; cell++) {
            for (int i = 0; i < lead.count(); i++) {
                place[body.count() + (cell - 1) * lead.count() + i] =
                        new double[] {lead.coordinate(i, cell, 0), lead.coordinate(i, cell, 1)};
            }
        }
        double[][] phase = new double[count][count];
        body.eachBond(
                frame.bonds(),
                (bond, a, b) -> put(phase, a, b, gauge.phase(place[a][0], place[a][1], place[b][0], place[b][1])));
        lead.eachWithin(frame.bonds(), (bond, from, to, reversed) -> {
            for (int cell = 0; cell < 2; cell++) {
                int a = body.count() + cell * lead.count() + from;
                int b = body.count() + cell * lead.count() + to;
                put(phase, a, b, gauge.phase(side, place[a][0], place[a][1], place[b][0], place[b][1]));
            }
            int a = body.count() + from;
            int b = body.count() + to;
            assertEquals(phase[a][b], phase[a + lead.count()][b + lead.count()], 1e-12, "periodic");
        });
        lead.eachOutward(frame.bonds(), (bond, from, to, reversed) -> {
            int a = body.count() + from;
            int b = body.count() + lead.count() + to;
            put(phase, a, b, gauge.phase(side, place[a][0], place[a][1], place[b][0], place[b][1]));
        });
        lead.eachContact(frame.bonds(), (bond, from, to, reversed) -> {
            int b = body.count() + to;
            double[] p = place[from];
            double[] q = place[b];
            put(phase, from, b, gauge.phase(p[0], p[1], q[0], q[1]) + gauge.turned(side, q[0], q[1]));
        });
        int loops = 0;
        int mixed = 0;
        for (int i = 0; i < count; i++) {
            for (int j = i + 1; j < count; j++) {
                for (int k = i + 1; k < count; k++) {
                    if (k == j || phase[i][j] == 0 || phase[j][k] == 0 || phase[k][i] == 0) {
                        continue;
                    }
                    double area = 0.5
                            * ((place[j][0] - place[i][0]) * (place[k][1] - place[i][1])
                                    - (place[j][1] - place[i][1]) * (place[k][0] - place[i][0]));
                    double sum = phase[i][j] + phase[j][k] + phase[k][i];
                    assertEquals(FIELD * area / PhysicalConstants.HBAR, sum, 1e-11);
                    loops++;
                    mixed += i < body.count() && Math.max(j, k) >= body.count() ? 1 : 0;
                }
            }
        }
        assertTrue(loops > 50 && mixed > 5, loops + " loops, " + mixed + " across the contact");
    }

    private static void put(double[][] phase, int a, int b, double value) {
        // a phase of zero still is a bond
        phase[a][b] = value == 0 ? 1e-300 : value;
        phase[b][a] = -phase[a][b];
    }

    /** Areas of elementary polygons. */
    @Test
    void smallestLoops() {
        double a = 0.246;
        assertEquals(a * a, Loops.smallestArea(SomeLattices.square(a).frame()).orElseThrow(), 1e-12);
        assertEquals(
                a * a * Math.sqrt(3) / 4,
                Loops.smallestArea(SomeLattices.triangular(a).frame()).orElseThrow(),
                1e-12);
        assertEquals(
                a * a * Math.sqrt(3) / 2,
                Loops.smallestArea(SomeLattices.honeycomb(a).frame()).orElseThrow(),
                1e-12);
        assertEquals(a * a, Loops.smallestArea(SomeLattices.cubic(a).frame()).orElseThrow(), 1e-12);
        assertEquals(
                OptionalDouble.empty(),
                Loops.smallestArea(SomeLattices.chain(a).bond(0, 0, 2, 0, 0).frame()));
    }
}
