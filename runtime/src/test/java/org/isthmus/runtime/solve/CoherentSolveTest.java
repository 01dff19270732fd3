package org.isthmus.runtime.solve;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.ComplexMatrix;
import org.isthmus.runtime.kernel.selection.Backends;
import org.isthmus.runtime.plan.Planner;
import org.isthmus.runtime.selfenergy.Contact;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class CoherentSolveTest {
    private static final Needs ALL = new Needs(true, true);

    private static Solver open(Device device, String backend) {
        ComplexBackend algebra = Backends.named(backend);
        return Solvers.open(
                OperatingPoint.unbiased(device), Planner.plan(device), Solvers.contacts(device, algebra), algebra);
    }

    private static Solver open(Device device) {
        return open(device, "native");
    }

    /** T = (2t sin ka)² / ((2t sin ka)² + U²) for one raised site of a chain (closed form). */
    @ParameterizedTest
    @ValueSource(strings = {"native", "pure"})
    void oneRaisedSite(String backend) {
        double u = 0.7;
        try (Solver solver = open(TestDevices.strip(40, 1, site -> site == 17 ? u : 0, 0), backend)) {
            for (double energy : new double[] {-1.9, -1, -0.3, 0, 0.5, 1, Math.sqrt(2), 1.99}) {
                double velocity2 = 4 - energy * energy;
                EnergySolution solution = solver.solve(energy, Needs.LEADS);
                assertEquals(velocity2 / (velocity2 + u * u), solution.transmission(0, 1), 1e-12, "at " + energy);
                assertEquals(solution.transmission(0, 1), solution.transmission(1, 0), 1e-13);
                assertEquals(1, solution.openModes(0));
            }
        }
    }

    /** N raised sites: transfer matrices of the tight-binding chain (closed form). */
    @Test
    void aBarrierByTransferMatrices() {
        double u = 0.6;
        int n = 7;
        try (Solver solver = open(TestDevices.strip(30, 1, site -> site >= 11 && site < 11 + n ? u : 0, 0))) {
            for (double energy : new double[] {-1.7, -0.9, 0.1, 0.8, 1.3}) {
                // inside: E − u = −2cos k'; T = 1/(1 + (M21 combination)²) with the Chebyshev form
                double cosInside = -(energy - u) / 2;
                double k = Math.acos(-energy / 2);
                double chebyshev = Math.abs(cosInside) < 1
                        ? Math.sin(n * Math.acos(cosInside)) / Math.sin(Math.acos(cosInside))
                        : Math.sinh(n * acosh(Math.abs(cosInside))) / Math.sinh(acosh(Math.abs(cosInside)));
                double mismatch = u * chebyshev / (2 * Math.sin(k));
                assertEquals(
                        1 / (1 + mismatch * mismatch),
                        solver.solve(energy, Needs.LEADS).transmission(0, 1),
                        1e-11);
            }
        }
    }

    private static double acosh(double x) {
        return Math.log(x + Math.sqrt(x * x - 1));
    }

    /** A perfect strip passes as many electrons as it has open modes (Landauer, IBM J. Res. Dev. 1, 223 (1957)). */
    @Test
    void aPerfectStripOf64ModesGives64() {
        try (Solver solver = open(TestDevices.strip(20, 64, site -> 0, 0))) {
            EnergySolution centre = solver.solve(0.0, Needs.LEADS);
            assertEquals(64, centre.transmission(0, 1), 1e-9);
            assertEquals(64, centre.openModes(0));
            EnergySolution side = solver.solve(-2.5, Needs.LEADS);
            assertEquals(side.openModes(0), side.transmission(0, 1), 1e-9);
        }
    }

    /** T = ΓΓ'/((E − ε)² + ((Γ + Γ')/2)²) (Breit & Wigner, Phys. Rev. 49, 519 (1936)). */
    @Test
    void breitWignerLine() {
        double a = 0.02;
        double b = 0.05;
        try (Solver solver = open(TestDevices.level(0.3, a, b))) {
            for (double energy : new double[] {0.1, 0.28, 0.3, 0.35}) {
                double half = (a + b) / 2;
                double expected = a * b / ((energy - 0.3) * (energy - 0.3) + half * half);
                EnergySolution solution = solver.solve(energy, ALL);
                assertEquals(expected, solution.transmission(0, 1), 1e-13);
                assertEquals(expected * expected, solution.transmissionSquared(0, 1), 1e-12);
                // A = Γ/((E − ε)² + (Γ/2)²)
                assertEquals(
                        (a + b) / ((energy - 0.3) * (energy - 0.3) + half * half), solution.siteSpectral()[0], 1e-10);
            }
        }
    }

    private static Device random(long seed, int leads, boolean overlap) {
        Random random = new Random(seed);
        int n = 60;
        SiteTable.Builder sites = new SiteTable.Builder(n);
        HoppingTable.Builder bonds = new HoppingTable.Builder(3 * n);
        HoppingTable.Builder overlaps = new HoppingTable.Builder(3 * n);
        int[] orbitals = new int[n];
        for (int i = 0; i < n; i++) {
            orbitals[i] = 1 + i % 2;
            double[] block = new double[2 * orbitals[i] * orbitals[i]];
            for (int k = 0; k < orbitals[i]; k++) {
                block[2 * (k * orbitals[i] + k)] = random.nextGaussian();
            }
            if (orbitals[i] == 2) {
                block[2] = random.nextGaussian();
                block[3] = random.nextGaussian();
                block[4] = block[2];
                block[5] = -block[3];
            }
            sites.add(i % 10, i / 10, 0, 0, orbitals[i], block);
        }
        for (int i = 0; i < n; i++) {
            for (int j : new int[] {i + 1, i + 10}) {
                if (j < n && (j == i + 10 || j % 10 != 0)) {
                    double[] block = new double[2 * orbitals[i] * orbitals[j]];
                    double[] small = new double[block.length];
                    for (int k = 0; k < block.length; k++) {
                        block[k] = 0.7 * random.nextGaussian();
                        small[k] = 0.03 * random.nextGaussian();
                    }
                    bonds.add(i, j, orbitals[i], orbitals[j], block);
                    if (overlap) {
                        overlaps.add(i, j, orbitals[i], orbitals[j], small);
                    }
                }
            }
        }
        List<Lead> contacts = new ArrayList<>();
        for (int p = 0; p < leads; p++) {
            contacts.add(TestDevices.wideBand("p" + p, 0.3 + 0.2 * p, p * 13 % n));
        }
        return TestDevices.device(sites.build(), bonds.build(), overlaps.build(), contacts);
    }

    /** The same by inverting the whole matrix at once. */
    private static ComplexMatrix dense(Device device, double zr, double zi, List<Contact> contacts) {
        SiteTable sites = device.sites();
        ComplexMatrix m = ComplexMatrix.zeros(sites.orbitalCount(), sites.orbitalCount());
        for (int s = 0; s < sites.count(); s++) {
            for (int i = 0; i < sites.orbitals(s); i++) {
                m.add(sites.firstOrbital(s) + i, sites.firstOrbital(s) + i, zr, zi);
                for (int j = 0; j < sites.orbitals(s); j++) {
                    m.add(
                            sites.firstOrbital(s) + i,
                            sites.firstOrbital(s) + j,
                            -sites.onSiteReal(s, i, j),
                            -sites.onSiteImaginary(s, i, j));
                }
            }
        }
        addBonds(m, sites, device.hoppings(), -1, 0);
        addBonds(m, sites, device.overlaps(), zr, zi);
        for (Contact contact : contacts) {
            ComplexMatrix sigma = contact.at(zr, zi).sigma();
            sigma.scale(-1, 0);
            m.scatterAdd(sigma, contact.orbitals(), contact.orbitals());
        }
        return Backends.standard().inverse(m);
    }

    private static void addBonds(ComplexMatrix m, SiteTable sites, HoppingTable bonds, double fr, double fi) {
        for (int b = 0; b < bonds.count(); b++) {
            for (int i = 0; i < sites.orbitals(bonds.from(b)); i++) {
                for (int j = 0; j < sites.orbitals(bonds.to(b)); j++) {
                    double re = bonds.real(b, i, j);
                    double im = bonds.imaginary(b, i, j);
                    int row = sites.firstOrbital(bonds.from(b)) + i;
                    int column = sites.firstOrbital(bonds.to(b)) + j;
                    m.add(row, column, fr * re - fi * im, fr * im + fi * re);
                    m.add(column, row, fr * re + fi * im, fi * re - fr * im);
                }
            }
        }
    }

    @ParameterizedTest
    @ValueSource(longs = {1, 2, 3})
    void theTreeAgreesWithTheWholeInverse(long seed) {
        Device device = random(seed, 3, seed == 2);
        List<Contact> contacts = Solvers.contacts(device, Backends.standard());
        try (Solver solver = open(device)) {
            for (double energy : new double[] {-0.8, 0.13}) {
                ComplexMatrix g = dense(device, energy, 0, contacts);
                EnergySolution solution = solver.solve(energy, ALL);
                for (int p = 0; p < 3; p++) {
                    double sum = 0;
                    for (int q = 0; q < 3; q++) {
                        double expected = 0;
                        for (int i : contacts.get(q).orbitals()) {
                            for (int j : contacts.get(p).orbitals()) {
                                double size = Math.hypot(g.real(i, j), g.imaginary(i, j));
                                expected += size * size * (0.3 + 0.2 * p) * (0.3 + 0.2 * q);
                            }
                        }
                        assertEquals(expected, solution.transmission(p, q), 1e-11);
                        sum += solution.transmission(q, p);
                    }
                    assertEquals(sum, solution.spectralTrace(p), 1e-11);
                }
                double[] total = solution.siteSpectral();
                double[] fed = new double[total.length];
                for (int p = 0; p < 3; p++) {
                    double[] one = solution.siteSpectral(p);
                    for (int s = 0; s < fed.length; s++) {
                        fed[s] += one[s];
                    }
                }
                // A = G Γ G† without dephasing (sum rule)
                assertArrayEquals(total, fed, 1e-9);
                if (device.overlaps().count() == 0) {
                    for (int s = 0; s < total.length; s++) {
                        double expected = 0;
                        for (int o = device.sites().firstOrbital(s);
                                o < device.sites().firstOrbital(s + 1);
                                o++) {
                            expected -= 2 * g.imaginary(o, o);
                        }
                        assertEquals(expected, total[s], 1e-10);
                    }
                    double[] diagonal = solver.siteGreens(energy, 0.2);
                    ComplexMatrix above = dense(device, energy, 0.2, contacts);
                    double re = 0;
                    for (int o = device.sites().firstOrbital(7);
                            o < device.sites().firstOrbital(8);
                            o++) {
                        re += above.real(o, o);
                    }
                    assertEquals(re, diagonal[14], 1e-11);
                }
            }
        }
    }

    /** At the band centre every other block has a level at the energy itself: no pivot may be lost. */
    @Test
    void blocksWithLevelsAtTheEnergyAreNoObstacle() {
        try (Solver solver = open(TestDevices.strip(41, 7, site -> 0, 0))) {
            assertEquals(7, solver.solve(0.0, Needs.LEADS).transmission(0, 1), 1e-10);
            assertEquals(
                    solver.solve(1.0, Needs.LEADS).openModes(0),
                    solver.solve(1.0, ALL).transmission(0, 1),
                    1e-9);
        }
    }

    /** A magnetic field turns T_pq(B) into T_qp(−B) and keeps every sum rule (Büttiker, Phys. Rev. Lett. 57, 1761). */
    @Test
    void reciprocityInAField() {
        Random random = new Random(5);
        double[] disorder = random.doubles(30 * 9, -1, 1).toArray();
        try (Solver up = open(TestDevices.strip(30, 9, s -> disorder[s], 0.04));
                Solver down = open(TestDevices.strip(30, 9, s -> disorder[s], -0.04))) {
            EnergySolution a = up.solve(-1.3, Needs.LEADS);
            EnergySolution b = down.solve(-1.3, Needs.LEADS);
            assertEquals(a.transmission(0, 1), b.transmission(1, 0), 1e-10);
            assertEquals(a.transmission(0, 0), b.transmission(0, 0), 1e-9);
            assertEquals(a.transmission(0, 1), a.transmission(1, 0), 1e-10);
        }
    }

    /** With overlap s between neighbours the chain's hopping is t(E) = −1 − E·s; one raised site as above (closed form). */
    @Test
    void aNonOrthogonalChain() {
        double s = 0.1;
        double u = 0.4;
        try (Solver solver = open(TestDevices.overlapChain(21, site -> site == 9 ? u : 0, s))) {
            for (double energy : new double[] {-1.4, -0.2, 0.9}) {
                double t = -1 - energy * s;
                double velocity2 = 4 * t * t - energy * energy;
                assertEquals(
                        velocity2 / (velocity2 + u * u),
                        solver.solve(energy, Needs.LEADS).transmission(0, 1),
                        1e-11);
            }
        }
    }

    /** Noise at equilibrium: the sum over c, d of Tr A_cd(a)A_dc(a) is 2·(N − T_aa)-like and current noise sums to zero. */
    @Test
    void correlatorsObeyTheirSumRules() {
        Random random = new Random(9);
        double[] disorder = random.doubles(12 * 3, -1, 1).toArray();
        try (Solver solver = open(TestDevices.strip(12, 3, s -> disorder[s], 0))) {
            EnergySolution solution = solver.solve(0.37, ALL);
            double t = solution.transmission(0, 1);
            // s unitary: Σ_a A_cd(a) = 0, so the noise of a and the cross noise cancel (Büttiker 1992)
            for (int c = 0; c < 2; c++) {
                for (int d = 0; d < 2; d++) {
                    assertEquals(0, solution.noiseTrace(0, 0, c, d) + solution.noiseTrace(0, 1, c, d), 1e-10);
                }
            }
            // Tr A_01(0)A_10(0) = Tr tt†(1 − tt†)
            assertEquals(t - solution.transmissionSquared(0, 1), solution.noiseTrace(0, 0, 0, 1), 1e-10);
            assertEquals(solution.transmissionSquared(0, 1), solution.noiseTrace(0, 0, 1, 1), 1e-10);
        }
    }

    /** Surface density of states of a half-infinite chain, √(4t² − E²)/(2πt²) (closed form): a chain cut from one lead. */
    @Test
    void theEndOfAChain() {
        Device whole = TestDevices.strip(10, 1, site -> 0, 0);
        Device half = TestDevices.device(
                whole.sites(),
                whole.hoppings(),
                HoppingTable.EMPTY,
                List.of(whole.leads().get(1)));
        try (Solver solver = open(half)) {
            double energy = 0.4;
            double dos = solver.solve(energy, ALL).siteSpectral()[0] / (2 * Math.PI);
            assertEquals(Math.sqrt(4 - energy * energy) / (2 * Math.PI), dos, 1e-12);
        }
    }

    @Test
    void answersAreTheSameFromAnyThread() throws Exception {
        try (Solver solver = open(TestDevices.strip(30, 9, s -> Math.sin(s), 0.02))) {
            double here = solver.solve(0.3, ALL).transmission(0, 1);
            double[] there = new double[1];
            Thread thread = new Thread(() -> there[0] = solver.solve(0.3, ALL).transmission(0, 1));
            thread.start();
            thread.join();
            assertEquals(here, there[0], 0.0);
        }
    }
}
