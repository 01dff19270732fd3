package org.isthmus.language.elaboration.geometry;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import java.util.concurrent.CancellationException;
import org.junit.jupiter.api.Test;

class BodySitesTest {
    private static int bonds(BodySites sites) {
        int[] count = {0};
        sites.eachBond(sites.frame().bonds(), (bond, from, to) -> count[0]++);
        return count[0];
    }

    @Test
    void aChainHasBothBorders() {
        BodySites sites = SomeLattices.inBox(SomeLattices.chain(0.25).frame(), 0, 25);
        assertEquals(101, sites.count());
        assertEquals(100, bonds(sites));
        assertEquals(0, sites.x(0));
        assertEquals(25, sites.x(100), 1e-12);
    }

    @Test
    void bordersHoldWithinAMillionthOfABond() {
        LatticeFrame frame = SomeLattices.chain(0.1).frame();
        assertEquals(4, SomeLattices.inBox(frame, 0, 0.3 - 0.9e-7).count());
        assertEquals(3, SomeLattices.inBox(frame, 0, 0.3 - 1.1e-7).count());
    }

    @Test
    void orderIsThirdSecondFirstBasis() {
        BodySites sites = SomeLattices.inBox(SomeLattices.cubic(1).frame(), 0, 1, 0, 1, 0, 1);
        assertEquals(8, sites.count());
        for (int site = 0; site < 8; site++) {
            assertEquals(site & 1, sites.x(site));
            assertEquals(site >> 1 & 1, sites.y(site));
            assertEquals(site >> 2, sites.z(site));
        }
        assertEquals(12, bonds(sites));
    }

    @Test
    void aSquareOfHoneycombByHand() {
        // a = 1: rows of A at y = 0, √3/2, …, B a third of a vertical period above; x from 0 to 1
        BodySites sites = SomeLattices.inBox(SomeLattices.honeycomb(1).frame(), 0, 1, 0, 1);
        List<String> found = new ArrayList<>();
        for (int s = 0; s < sites.count(); s++) {
            found.add(String.format(
                    java.util.Locale.ROOT, "%s %.3f %.3f", sites.basis(s) == 0 ? "A" : "B", sites.x(s), sites.y(s)));
        }
        assertEquals(
                List.of("A 0.000 0.000", "B 0.000 0.577", "A 1.000 0.000", "B 1.000 0.577", "A 0.500 0.866"), found);
        assertEquals(4, bonds(sites));
    }

    @Test
    void skewedLatticesAgreeWithASearchOfEveryCell() {
        Random random = new Random(7);
        for (int round = 0; round < 60; round++) {
            SomeLattices some = SomeLattices.named("random");
            int dimension = 1 + random.nextInt(3);
            for (int v = 0; v < dimension; v++) {
                some.vector(
                        (v == 0 ? 0.6 : 0) + 0.15 * random.nextGaussian(),
                        (v == 1 ? 0.6 : 0) + 0.15 * random.nextGaussian(),
                        (v == 2 ? 0.6 : 0) + 0.15 * random.nextGaussian());
            }
            some.site(0, 0, 0)
                    .site(0.1 * random.nextGaussian(), 0.1 * random.nextGaussian(), 0.1 * random.nextGaussian());
            some.bond(0, 1, 0, 0, 0);
            double[] origin = {random.nextGaussian(), random.nextGaussian(), random.nextGaussian()};
            LatticeFrame frame = some.frame(origin);
            double[] box = {-2, 1.5, -1.2, 2.5, -2.2, 1.1};
            BodySites sites = SomeLattices.inBox(frame, box);
            int n = 30;
            int expected = 0;
            double tolerance = frame.tolerance();
            for (int n3 = dimension > 2 ? -n : 0; n3 <= (dimension > 2 ? n : 0); n3++) {
                for (int n2 = dimension > 1 ? -n : 0; n2 <= (dimension > 1 ? n : 0); n2++) {
                    for (int n1 = -n; n1 <= n; n1++) {
                        for (int b = 0; b < 2; b++) {
                            boolean inside = true;
                            for (int axis = 0; axis < 3; axis++) {
                                double value = frame.coordinate(n1, n2, n3, b, axis);
                                inside &= value >= box[2 * axis] - tolerance && value <= box[2 * axis + 1] + tolerance;
                            }
                            if (inside) {
                                assertEquals(expected, sites.find(n1, n2, n3, b));
                                expected++;
                            } else {
                                assertEquals(-1, sites.find(n1, n2, n3, b));
                            }
                        }
                    }
                }
            }
            assertEquals(expected, sites.count());
        }
    }

    @Test
    void holesInARowAreNotFound() {
        LatticeFrame frame = SomeLattices.square(1).frame();
        BodySites sites = ((BodySites.Found) BodySites.search(
                        frame, Extent.of(0, 9, 0, 0), (x, y, z) -> x < 2.5 || x > 6.5, 100, 100, () -> false))
                .sites();
        assertEquals(6, sites.count());
        assertEquals(-1, sites.find(3, 0, 0, 0));
        assertEquals(3, sites.find(7, 0, 0, 0));
        assertEquals(4, bonds(sites));
    }

    @Test
    void theOriginMovesTheZeroCell() {
        BodySites sites = SomeLattices.inBox(SomeLattices.square(1).frame(0.25, -0.5, 2), 0, 2, 0, 1);
        assertEquals(2, sites.count());
        assertEquals(0.25, sites.x(0));
        assertEquals(0.5, sites.y(0));
        assertEquals(2, sites.z(0));
    }

    @Test
    void openAxesAreNamed() {
        LatticeFrame square = SomeLattices.square(1).frame();
        BodySites.Search search = BodySites.search(square, Extent.of(0, 5), (x, y, z) -> true, 10, 10, () -> false);
        assertEquals(new BodySites.Unbounded(1), search);
        // a slanted chain is bounded by its x alone
        LatticeFrame slanted = SomeLattices.named("slanted")
                .vector(1, 1, 0)
                .site(0, 0, 0)
                .bond(0, 0, 1, 0, 0)
                .frame();
        assertEquals(6, SomeLattices.inBox(slanted, 0, 5).count());
    }

    @Test
    void hugeBodiesAreCountedNotBuilt() {
        LatticeFrame frame = SomeLattices.square(0.1).frame();
        BodySites.Search search =
                BodySites.search(frame, Extent.of(0, 4000, 0, 3000), (x, y, z) -> true, 1000, 1000, () -> false);
        assertEquals(1.2e9, assertInstanceOf(BodySites.TooMany.class, search).estimate(), 1e6);
        for (double side : new double[] {1e6, 1e9, 1e15, 1e200}) {
            assertInstanceOf(
                    BodySites.TooMany.class,
                    BodySites.search(
                            SomeLattices.cubic(0.1).frame(),
                            Extent.of(-side, side, -side, side, -side, side),
                            (x, y, z) -> true,
                            1000,
                            1000,
                            () -> false));
        }
    }

    @Test
    void aTallNarrowStripOfASkewedLatticeIsNoTrouble() {
        BodySites sites = SomeLattices.inBox(SomeLattices.triangular(1).frame(), 0, 2, 0, 1e5);
        // rows alternate between three and two sites
        int rows = (int) Math.floor(1e5 / (Math.sqrt(3) / 2)) + 1;
        assertEquals(rows / 2 * 5 + rows % 2 * 3, sites.count());
    }

    @Test
    void aSearchCanBeCancelled() {
        LatticeFrame frame = SomeLattices.square(1).frame();
        assertThrows(
                CancellationException.class,
                () -> BodySites.search(
                        frame, Extent.of(0, 1000, 0, 1000), (x, y, z) -> true, 2_000_000, 2_000_000, () -> true));
    }

    @Test
    void dependentVectorsAreTold() {
        assertTrue(LatticeFrame.independent(SomeLattices.honeycomb(1).lattice().vectors()));
        assertEquals(
                false,
                LatticeFrame.independent(SomeLattices.named("line")
                        .vector(1, 0, 0)
                        .vector(2, 0, 0)
                        .site(0, 0, 0)
                        .lattice()
                        .vectors()));
    }
}
