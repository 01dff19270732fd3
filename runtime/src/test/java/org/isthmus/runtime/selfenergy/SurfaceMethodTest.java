package org.isthmus.runtime.selfenergy;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import java.util.stream.IntStream;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.ComplexMatrix;
import org.isthmus.runtime.kernel.selection.Backends;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Methods for the end of a lead agree with each other, with closed forms and with their equation, on both back ends. */
class SurfaceMethodTest {
    private static int[] all(int n) {
        return IntStream.range(0, n).toArray();
    }

    /** A strip of the square lattice, W wide, on-site 0, hopping −1; the flux per plaquette turns the outward hoppings. */
    private static LeadBlocks strip(int width, double flux) {
        ComplexMatrix h00 = ComplexMatrix.zeros(width, width);
        ComplexMatrix h01 = ComplexMatrix.zeros(width, width);
        for (int i = 0; i < width; i++) {
            if (i + 1 < width) {
                h00.set(i, i + 1, -1, 0);
                h00.set(i + 1, i, -1, 0);
            }
            h01.set(i, i, -Math.cos(2 * Math.PI * flux * i), -Math.sin(2 * Math.PI * flux * i));
        }
        return new LeadBlocks(h00, h01, null, null);
    }

    /** A zigzag ribbon of honeycomb rows: four orbitals of a row pair, a singular coupling between cells. */
    private static LeadBlocks honeycomb(int rows) {
        int n = 4 * rows;
        ComplexMatrix h00 = ComplexMatrix.zeros(n, n);
        ComplexMatrix h01 = ComplexMatrix.zeros(n, n);
        for (int r = 0; r < rows; r++) {
            int a = 4 * r;
            bond(h00, a, a + 1);
            bond(h00, a + 1, a + 2);
            bond(h00, a + 2, a + 3);
            if (r + 1 < rows) {
                bond(h00, a + 3, a + 4);
            }
            h01.set(a + 1, a, -1, 0);
            h01.set(a + 2, a + 3, -1, 0);
        }
        return new LeadBlocks(h00, h01, null, null);
    }

    private static void bond(ComplexMatrix h, int i, int j) {
        h.set(i, j, -1, 0);
        h.set(j, i, -1, 0);
    }

    private static LeadBlocks random(int n, long seed, boolean overlap) {
        Random random = new Random(seed);
        ComplexMatrix h00 = ComplexMatrix.zeros(n, n);
        ComplexMatrix h01 = ComplexMatrix.zeros(n, n);
        for (int k = 0; k < h01.data().length; k++) {
            h00.data()[k] = random.nextGaussian();
            h01.data()[k] = 0.5 * random.nextGaussian();
        }
        h00.addScaled(h00.adjoint(), 1);
        ComplexMatrix s00 = null;
        ComplexMatrix s01 = null;
        if (overlap) {
            s00 = ComplexMatrix.identity(n);
            s01 = ComplexMatrix.zeros(n, n);
            for (int k = 0; k < s01.data().length; k++) {
                s01.data()[k] = 0.02 * random.nextGaussian();
            }
        }
        return new LeadBlocks(h00, h01, s00, s01);
    }

    private static List<LeadBlocks> leads() {
        List<LeadBlocks> leads = new ArrayList<>();
        leads.add(strip(1, 0));
        leads.add(strip(9, 0));
        leads.add(strip(8, 0.03));
        leads.add(honeycomb(3));
        leads.add(random(5, 7, false));
        leads.add(random(4, 8, true));
        return leads;
    }

    private static double distance(ComplexMatrix a, ComplexMatrix b) {
        ComplexMatrix difference = a.copy();
        difference.addScaled(b, -1);
        return difference.frobenius() / Math.max(1, b.frobenius());
    }

    @ParameterizedTest
    @ValueSource(strings = {"native", "pure"})
    void wavesFulfilDysonsEquationAndCarryNothingInward(String name) {
        ComplexBackend backend = Backends.named(name);
        for (LeadBlocks lead : leads()) {
            for (double energy : new double[] {-3.3, -1.234, -0.51, 0.2, 0.87, 1.9, 4.7}) {
                Surface surface = new BlochModes(lead, all(lead.size()), backend).solve(energy, 0);
                assertTrue(
                        surface.residual() < 1e-10, lead.size() + " orbitals at " + energy + ": " + surface.residual());
                ComplexMatrix broadening = surface.green().copy();
                broadening.scale(0, 1);
                broadening.addScaled(broadening.adjoint(), 1);
                // A = i(g − g†) is the surface's spectral function: positive semidefinite
                double[] values = backend.hermitianEigen(broadening).values();
                assertTrue(
                        values[0] > -1e-9 * Math.max(1, values[values.length - 1]), "at " + energy + ": " + values[0]);
                if (surface.openModes() == 0) {
                    assertTrue(values[values.length - 1] < 1e-8, "no open mode, no states");
                }
            }
        }
    }

    @ParameterizedTest
    @ValueSource(strings = {"native", "pure"})
    void wavesAndDecimationAgree(String name) {
        ComplexBackend backend = Backends.named(name);
        for (LeadBlocks lead : leads()) {
            for (double energy : new double[] {-1.234, 0.2, 0.87}) {
                int[] orbitals = all(lead.size());
                Surface waves = new BlochModes(lead, orbitals, backend).solve(energy, 0);
                Surface doubled = new Decimation(lead, orbitals, 1e-7, backend).solve(energy, 0);
                // the imaginary part of 1e-7 is worth about 1e-7 divided by the distance to the next band edge
                assertTrue(distance(waves.green(), doubled.green()) < 3e-5, lead.size() + " at " + energy);
                Surface above = new BlochModes(lead, orbitals, backend).solve(energy, 0.1);
                Surface aboveDoubled = new Decimation(lead, orbitals, 1e-9, backend).solve(energy, 0.1);
                assertTrue(distance(above.green(), aboveDoubled.green()) < 1e-11);
            }
        }
    }

    /** A half-infinite chain: g = e^{ika}/t with E = 2t cos ka for hopping t; Σ = t²g = t·e^{ika} (common practice). */
    @ParameterizedTest
    @ValueSource(strings = {"native", "pure"})
    void theChainHasItsClosedForm(String name) {
        ComplexBackend backend = Backends.named(name);
        LeadBlocks chain = strip(1, 0);
        for (double energy : new double[] {-1.999, -1.2, -0.3, 0.0, 0.7, 1.5}) {
            double k = Math.acos(-energy / 2);
            for (SurfaceMethod method : List.of(
                    new BlochModes(chain, all(1), backend),
                    TransverseModes.of(chain, all(1), backend).orElseThrow())) {
                Surface surface = method.solve(energy, 0);
                assertEquals(-Math.cos(k), surface.green().real(0, 0), 1e-12);
                assertEquals(-Math.sin(k), surface.green().imaginary(0, 0), 1e-12);
                assertEquals(1, surface.openModes());
            }
        }
    }

    @ParameterizedTest
    @ValueSource(strings = {"native", "pure"})
    void transverseModesAndWavesAgreeAndCountAlike(String name) {
        ComplexBackend backend = Backends.named(name);
        LeadBlocks lead = strip(9, 0);
        for (double energy : new double[] {-3.9, -2.2, -0.05, 0.4, 1.1, 3.2, 4.5}) {
            Surface exact =
                    TransverseModes.of(lead, all(9), backend).orElseThrow().solve(energy, 0);
            Surface waves = new BlochModes(lead, all(9), backend).solve(energy, 0);
            assertTrue(distance(waves.green(), exact.green()) < 1e-10, "at " + energy);
            assertEquals(exact.openModes(), waves.openModes());
        }
    }

    /** The lowest band edge of a strip of W rows is −2 − 2cos(π/(W+1)) (closed form). */
    @ParameterizedTest
    @ValueSource(strings = {"native", "pure"})
    void bandExtremaAreThoseOfTheStrip(String name) {
        LeadBands bands = new LeadBands(strip(5, 0), Backends.named(name));
        List<Double> extrema = bands.extrema();
        assertEquals(-2 - 2 * Math.cos(Math.PI / 6), extrema.get(0), 1e-12);
        assertEquals(2 + 2 * Math.cos(Math.PI / 6), extrema.get(extrema.size() - 1), 1e-12);
        assertEquals(10, extrema.size());
    }
}
