package org.isthmus.runtime.observable;

import static org.isthmus.runtime.measure.Runs.KB;
import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import java.util.stream.IntStream;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.Measurement.EnergyPoints;
import org.isthmus.runtime.device.SourceRef;
import org.isthmus.runtime.measure.Runs;
import org.isthmus.runtime.solve.TestDevices;
import org.junit.jupiter.api.Test;

/** Electrons per site. Devices here have degeneracy 1. */
class ChargeDensityTest {
    /** Filling of a level of width Γ at T = 0: ½ + atan((µ − ε)/(Γ/2))/π (closed form of the Lorentz line). */
    private static double filling(double mu, double level, double gamma) {
        return 0.5 + Math.atan((mu - level) / (gamma / 2)) / Math.PI;
    }

    @Test
    void levelAtZeroTemperature() throws Exception {
        Device level = TestDevices.level(0.05, 0.01, 0.02);
        for (double mu : new double[] {-3, 0, 0.05, 0.06, 5}) {
            double found = Runs.of(level).at(0, mu).record("density").column("density")[0];
            assertEquals(filling(mu, 0.05, 0.03), found, 1e-8, mu + " eV");
        }
    }

    /** A level of no width to speak of is filled by the Fermi function; width and temperature far apart either way. */
    @Test
    void sharpLevel() throws Exception {
        for (double kelvin : new double[] {1, 300, 3000}) {
            double kT = KB * kelvin;
            Device level = TestDevices.level(0.5 * kT, 1e-9 * kT, 1e-9 * kT);
            double found = Runs.of(level).at(kelvin, 0).record("density").column("density")[0];
            assertEquals(1 / (1 + Math.exp(0.5)), found, 1e-8, kelvin + " K");
        }
    }

    /** T → 0 is continuous. */
    @Test
    void zeroTemperatureIsTheLimit() throws Exception {
        Device chain = TestDevices.strip(5, 2, s -> 0.3 * s, 0.1);
        double[] cold = Runs.of(chain).at(1e-3, -0.7).record("density").column("density");
        double[] limit = Runs.of(chain).at(0, -0.7).record("density").column("density");
        for (int site = 0; site < limit.length; site++) {
            assertEquals(limit[site], cold[site], 1e-7);
        }
    }

    /** Full bands hold one electron per orbital and spin, empty ones none (sum rule Tr A/2π). */
    @Test
    void fullAndEmptyBands() throws Exception {
        Device strip = TestDevices.strip(4, 3, s -> 0.1 * s, 0.05);
        for (double kelvin : new double[] {0, 300}) {
            for (double value : Runs.of(strip).at(kelvin, 8).record("density").column("density")) {
                assertEquals(1, value, 1e-8);
            }
            for (double value : Runs.of(strip).at(kelvin, -8).record("density").column("density")) {
                assertEquals(0, value, 1e-8);
            }
        }
    }

    /** An infinite chain filled up to µ holds acos(−µ/2t)/π electrons per site and spin (closed form). */
    @Test
    void chainAtZeroTemperature() throws Exception {
        Device chain = TestDevices.strip(3, 1, s -> 0, 0);
        for (double mu : new double[] {-2.5, -1.999, -1, 0, 1.5}) {
            double expected = mu < -2 ? 0 : Math.acos(-mu / 2) / Math.PI;
            for (double value : Runs.of(chain).at(0, mu).record("density").column("density")) {
                assertEquals(expected, value, 1e-7, mu + " eV");
            }
        }
    }

    /** What is added between two µ is the integral of the local density of states (definition). */
    @Test
    void agreesWithTheDensityOfStates() throws Exception {
        Device strip = TestDevices.strip(4, 2, s -> s == 3 ? 1.2 : 0, 0);
        double from = -0.9;
        double to = -0.3;
        int n = 1200;
        List<Double> energies = IntStream.rangeClosed(0, n)
                .mapToObj(k -> from + (to - from) * k / n)
                .toList();
        double[] ldos = Runs.of(strip)
                .energy(new EnergyPoints(energies, SourceRef.NONE))
                .record("ldos")
                .column("ldos (1/eV)");
        double[] low = Runs.of(strip).at(0, from).record("density").column("density");
        double[] high = Runs.of(strip).at(0, to).record("density").column("density");
        for (int site = 0; site < low.length; site++) {
            double simpson = 0;
            for (int k = 0; k <= n; k++) {
                double weight = k == 0 || k == n ? 1 : k % 2 == 1 ? 4 : 2;
                simpson += weight * ldos[k * low.length + site] * (to - from) / n / 3;
            }
            assertEquals(simpson, high[site] - low[site], 1e-6, "site " + site);
        }
    }

    /** Between two wide-band contacts at different µ a level is filled by both, each by its share of the width. */
    @Test
    void outOfEquilibrium() throws Exception {
        Device level = Runs.leads(TestDevices.level(0.05, 0.01, 0.03), 0, 0.2, 0, -0.1);
        double expected = 0.25 * filling(0.2, 0.05, 0.04) + 0.75 * filling(-0.1, 0.05, 0.04);
        assertEquals(expected, Runs.of(level).record("density").column("density")[0], 1e-8);
        Device warm = Runs.leads(TestDevices.level(0.05, 1e-9, 3e-9), 300, 0.06, 20, 0.04);
        double mixed = 0.25 / (1 + Math.exp((0.05 - 0.06) / (KB * 300))) + 0.75 / (1 + Math.exp(0.01 / (KB * 20)));
        // the line's tail below µ holds 4e-9/(2π·0.01) electrons
        assertEquals(mixed, Runs.of(warm).record("density").column("density")[0], 1e-7);
    }

    /** Occupation between two contacts is the mean of their Fermi functions, weighted by what each feeds (Gn/A). */
    @Test
    void occupationOnAnAxis() throws Exception {
        Device level = Runs.leads(TestDevices.level(0.05, 0.01, 0.03), 0, 0.2, 0, -0.1);
        double[] resolved = Runs.of(level)
                .energy(new EnergyPoints(List.of(-0.2, 0.1, 0.3), SourceRef.NONE))
                .record("occupation")
                .column("occupation");
        assertEquals(1, resolved[0], 1e-12);
        assertEquals(0.25, resolved[1], 1e-12);
        assertEquals(0, resolved[2], 1e-12);
        assertEquals(0.25, Runs.of(level).record("occupation").column("occupation")[0], 1e-9);
    }
}
