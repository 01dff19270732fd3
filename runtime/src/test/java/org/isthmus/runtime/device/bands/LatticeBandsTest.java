package org.isthmus.runtime.device.bands;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.isthmus.runtime.device.Lattice;
import org.isthmus.runtime.device.SiteTable;
import org.junit.jupiter.api.Test;

class LatticeBandsTest {
    private static Lattice chain(double t, double s) {
        SiteTable.Builder basis = new SiteTable.Builder(1);
        basis.add(0, 0, 0, 0, 1, new double[] {2 * t, 0});
        return new Lattice(
                "chain",
                List.of(new Lattice.Vector(1, 0, 0)),
                basis.build(),
                List.of(new Lattice.Bond(0, 0, List.of(1, 0, 0), List.of(-t, 0.0))),
                s == 0 ? List.of() : List.of(new Lattice.Bond(0, 0, List.of(1, 0, 0), List.of(s, 0.0))),
                2);
    }

    private static Lattice honeycomb(double t) {
        SiteTable.Builder basis = new SiteTable.Builder(2);
        basis.add(0, 0, 0, 0, 1, new double[] {0, 0});
        basis.add(0, 1 / Math.sqrt(3), 0, 1, 1, new double[] {0, 0});
        return new Lattice(
                "honeycomb",
                List.of(new Lattice.Vector(1, 0, 0), new Lattice.Vector(0.5, Math.sqrt(0.75), 0)),
                basis.build(),
                List.of(
                        new Lattice.Bond(0, 1, List.of(0, 0, 0), List.of(-t, 0.0)),
                        new Lattice.Bond(0, 1, List.of(0, -1, 0), List.of(-t, 0.0)),
                        new Lattice.Bond(0, 1, List.of(1, -1, 0), List.of(-t, 0.0))),
                List.of(),
                2);
    }

    /** E = 2t(1 − cos θ). */
    @Test
    void chainByItsClosedForm() {
        LatticeBands bands = new LatticeBands(chain(1.5, 0));
        assertEquals(3 * (1 - Math.cos(0.7)), bands.energies(0.7)[0], 1e-14);
        assertEquals(0, bands.edges().bottom(), 1e-12);
        assertEquals(6, bands.edges().top(), 1e-12);
    }

    /** E = (2t − 2t cos θ)/(1 + 2s cos θ). */
    @Test
    void overlapByItsClosedForm() {
        LatticeBands bands = new LatticeBands(chain(1, 0.2));
        assertEquals(2 * (1 - Math.cos(1.1)) / (1 + 0.4 * Math.cos(1.1)), bands.energies(1.1)[0], 1e-12);
        assertEquals(0.6, bands.smallestOverlap(), 1e-12);
        assertEquals(-0.8, new LatticeBands(chain(1, 0.9)).smallestOverlap(), 1e-12);
    }

    /** ±t|1 + e^{iθ1} + e^{iθ2}|-like bands of the honeycomb: ±3t at Γ, 0 at (2π/3, −2π/3) (common practice). */
    @Test
    void honeycombByItsClosedForm() {
        LatticeBands bands = new LatticeBands(honeycomb(2.7));
        assertArrayEquals(new double[] {-8.1, 8.1}, bands.energies(0, 0), 1e-12);
        double a = 0.4;
        double b = -1.3;
        double re = 1 + Math.cos(b) + Math.cos(a - b);
        double im = -Math.sin(b) + Math.sin(a - b);
        assertEquals(2.7 * Math.hypot(re, im), bands.energies(a, b)[1], 1e-12);
        assertEquals(0, bands.energies(2 * Math.PI / 3, -2 * Math.PI / 3)[1], 1e-12);
        assertEquals(-8.1, bands.edges().bottom(), 1e-12);
    }

    /** 1 − 2(1 − cos θ)/θ² at the θ with 2t(1 − cos θ) = E. */
    @Test
    void errorOfAChain() {
        LatticeBands bands = new LatticeBands(chain(1, 0));
        double theta = 0.9;
        double energy = 2 * (1 - Math.cos(theta));
        double error = 1 - energy / (theta * theta);
        assertEquals(error, bands.dispersionError(energy).orElseThrow(), 1e-6);
        assertTrue(bands.dispersionError(-0.1).isEmpty());
        double factor = bands.spacingFactor(energy, 0.05).orElseThrow();
        // a finer spacing scales t by 1/factor²
        LatticeBands finer = new LatticeBands(chain(1 / (factor * factor), 0));
        assertEquals(0.05, finer.dispersionError(energy).orElseThrow(), 1e-5);
        assertTrue(finer.spacingFactor(energy, 0.051).isEmpty());
        assertEquals(1 - 4 / (Math.PI * Math.PI), bands.dispersionError(5).orElseThrow(), 1e-5);
    }

    /** Rashba wire: bands 2t(1 − cos θ) ± α/a·sin θ, bottom at tan θ = α/(2ta) (closed form). */
    @Test
    void twoOrbitals() {
        double t = 1;
        double r = 0.3;
        SiteTable.Builder basis = new SiteTable.Builder(1);
        basis.add(0, 0, 0, 0, 2, new double[] {2 * t, 0, 0, 0, 0, 0, 2 * t, 0});
        // −t + i(r/2)σy = [[−t, r/2], [−r/2, −t]]
        Lattice wire = new Lattice(
                "rashba",
                List.of(new Lattice.Vector(1, 0, 0)),
                basis.build(),
                List.of(new Lattice.Bond(0, 0, List.of(1, 0, 0), List.of(-t, 0.0, r / 2, 0.0, -r / 2, 0.0, -t, 0.0))),
                List.of(),
                1);
        LatticeBands bands = new LatticeBands(wire);
        double theta = 0.8;
        double[] expected = {
            2 * t * (1 - Math.cos(theta)) - r * Math.sin(theta), 2 * t * (1 - Math.cos(theta)) + r * Math.sin(theta)
        };
        assertArrayEquals(expected, bands.energies(theta), 1e-12);
        assertEquals(2 * t - Math.sqrt(4 * t * t + r * r), bands.edges().bottom(), 1e-10);
    }
}
