package org.isthmus.language.elaboration.geometry;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Optional;
import org.isthmus.runtime.device.Side;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;

class LeadCellsTest {
    private static LeadCells lead(BodySites body, Side side) {
        int[] period =
                LeadCells.period(body.frame(), side, body.frame().bonds()).orElseThrow();
        return LeadCells.of(body, side, period, site -> true);
    }

    private static int[] counts(LeadCells lead, BondList bonds) {
        int[] counts = new int[3];
        lead.eachWithin(bonds, (bond, from, to, reversed) -> counts[0]++);
        lead.eachOutward(bonds, (bond, from, to, reversed) -> counts[1]++);
        lead.eachContact(bonds, (bond, from, to, reversed) -> counts[2]++);
        return counts;
    }

    @ParameterizedTest
    @EnumSource(Side.class)
    void aCubeHasALeadOnEachSide(Side side) {
        BodySites body = SomeLattices.inBox(SomeLattices.cubic(1).frame(), 0, 2, 0, 2, 0, 2);
        LeadCells lead = lead(body, side);
        assertEquals(9, lead.count());
        assertEquals(1, lead.periodLength());
        assertArrayEquals(new int[] {12, 9, 9}, counts(lead, body.frame().bonds()));
        assertEquals(side.sign() > 0 ? 3 : -1, lead.coordinate(0, 1, side.axis()));
    }

    @Test
    void periodsOfATriangularLattice() {
        LatticeFrame frame = SomeLattices.triangular(1).frame();
        assertArrayEquals(
                new int[] {1, 0, 0}, LeadCells.shortestPeriod(frame, Side.RIGHT).orElseThrow());
        assertArrayEquals(
                new int[] {-1, 0, 0}, LeadCells.shortestPeriod(frame, Side.LEFT).orElseThrow());
        assertArrayEquals(
                new int[] {-1, 2, 0}, LeadCells.shortestPeriod(frame, Side.TOP).orElseThrow());
        assertArrayEquals(
                new int[] {1, -2, 0},
                LeadCells.shortestPeriod(frame, Side.BOTTOM).orElseThrow());
        assertEquals(Optional.empty(), LeadCells.shortestPeriod(frame, Side.FRONT));
    }

    @Test
    void aBodyCentredLatticeHasTheCubeEdgeForPeriod() {
        LatticeFrame frame = SomeLattices.bodyCentred(0.3).frame();
        for (Side side : Side.values()) {
            int[] period = LeadCells.shortestPeriod(frame, side).orElseThrow();
            double[] vector = frame.translation(period);
            assertEquals(0.3 * side.sign(), vector[side.axis()], 1e-12);
        }
    }

    @Test
    void aSlantedLatticeHasNoPeriod() {
        LatticeFrame frame = SomeLattices.named("slanted")
                .vector(0.3, 0.3 * 0.0123456 * Math.sqrt(2), 0)
                .vector(0, 0.3, 0)
                .site(0, 0, 0)
                .bond(0, 0, 1, 0, 0)
                .frame();
        assertEquals(Optional.empty(), LeadCells.shortestPeriod(frame, Side.LEFT));
        assertTrue(LeadCells.shortestPeriod(frame, Side.TOP).isPresent());
    }

    @Test
    void aFartherReachingHoppingTakesWholeMultiples() {
        LatticeFrame frame = SomeLattices.named("third neighbours")
                .vector(1, 0, 0)
                .site(0, 0, 0)
                .bond(0, 0, 1, 0, 0)
                .bond(0, 0, 3, 0, 0)
                .frame();
        BodySites body = SomeLattices.inBox(frame, 0, 9);
        LeadCells lead = lead(body, Side.RIGHT);
        assertEquals(3, lead.periodLength());
        assertEquals(3, lead.count());
        // within: two short bonds; outward: one short and three long ones
        assertArrayEquals(new int[] {2, 4, 4}, counts(lead, frame.bonds()));
    }

    @ParameterizedTest
    @EnumSource(
            value = Side.class,
            names = {"LEFT", "RIGHT", "BOTTOM", "TOP"})
    void noBondSkipsACell(Side side) {
        // second neighbours too, so that bonds reach as far as a period
        LatticeFrame frame = SomeLattices.honeycomb(1)
                .bond(0, 0, 1, 0, 0)
                .bond(0, 0, 0, 1, 0)
                .bond(0, 0, 1, -1, 0)
                .bond(1, 1, 1, 0, 0)
                .bond(1, 1, 0, 1, 0)
                .bond(1, 1, 1, -1, 0)
                .frame(0.13, 0.07, 0);
        BodySites body = SomeLattices.inBox(frame, 0, 7.3, 0, 6.1);
        LeadCells lead = lead(body, side);
        BondList bonds = frame.bonds();
        int axis = side.axis();
        lead.eachWithin(bonds, (bond, from, to, reversed) -> {
            double d = lead.coordinate(to, 1, axis) - lead.coordinate(from, 1, axis);
            assertEquals(frame.displacement(bonds, bond)[axis], d, 1e-9);
        });
        lead.eachOutward(bonds, (bond, from, to, reversed) -> {
            double d = lead.coordinate(to, 2, axis) - lead.coordinate(from, 1, axis);
            assertEquals((reversed ? -1 : 1) * frame.displacement(bonds, bond)[axis], d, 1e-9);
        });
        lead.eachContact(bonds, (bond, from, to, reversed) -> {
            double d = lead.coordinate(to, 1, axis) - body.coordinate(from, axis);
            assertEquals((reversed ? -1 : 1) * frame.displacement(bonds, bond)[axis], d, 1e-9);
        });
        // every bond of the infinite ribbon is in the tables: count the ends at the sites of cell 2
        int ends = 0;
        for (int site = 0; site < lead.count(); site++) {
            for (int other = 0; other < lead.count(); other++) {
                for (int cell = -2; cell <= 2; cell++) {
                    double dx = lead.coordinate(other, 10 + cell, 0) - lead.coordinate(site, 10, 0);
                    double dy = lead.coordinate(other, 10 + cell, 1) - lead.coordinate(site, 10, 1);
                    double r = Math.hypot(dx, dy);
                    boolean bonded = Math.abs(r - 1 / Math.sqrt(3)) < 1e-6 || Math.abs(r - 1) < 1e-6;
                    if (bonded) {
                        ends++;
                        assertTrue(Math.abs(cell) < 2, "a bond skips a cell");
                    }
                }
            }
        }
        int[] counts = counts(lead, bonds);
        assertEquals(ends, 2 * (counts[0] + counts[1]));
    }

    @Test
    void acrossTakesAPartAndTheBodyBesideItStillBonds() {
        // triangular: the sites at the rim of the part have slanted bonds to the body beside it
        BodySites body = SomeLattices.inBox(SomeLattices.triangular(1).frame(), 0, 6, 0, 5);
        int[] period =
                LeadCells.period(body.frame(), Side.RIGHT, body.frame().bonds()).orElseThrow();
        LeadCells lead = LeadCells.of(body, Side.RIGHT, period, site -> body.y(site) < 2.7);
        assertEquals(4, lead.count());
        int[] outside = {0};
        lead.eachContact(body.frame().bonds(), (bond, from, to, reversed) -> {
            if (body.y(from) >= 2.7) {
                outside[0]++;
            }
        });
        assertEquals(1, outside[0]);
    }
}
