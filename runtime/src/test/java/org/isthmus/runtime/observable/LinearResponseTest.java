package org.isthmus.runtime.observable;

import static org.isthmus.runtime.measure.Runs.G1;
import static org.isthmus.runtime.measure.Runs.KB;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.measure.Runs;
import org.isthmus.runtime.solve.TestDevices;
import org.junit.jupiter.api.Test;

/** Conductance, thermopower and heat near equilibrium. Devices here have degeneracy 1: the quantum is q²/h. */
class LinearResponseTest {
    private static double fermi(double x) {
        return 1 / (1 + Math.exp(x));
    }

    /** A perfect conductor conducts N quanta (Landauer, IBM J. Res. Dev. 1, 223 (1957)); three modes overlap at −0.1 eV. */
    @Test
    void conductanceQuantum() throws Exception {
        Device strip = TestDevices.strip(5, 3, s -> 0, 0);
        assertEquals(3 * G1, Runs.of(strip).at(0, -0.1).record("conductance").column("source>drain (S)")[0], 1e-9 * G1);
        // modes open at −2 + {−√2, 0, √2} eV (closed form of a strip of three)
        assertEquals(2 * G1, Runs.of(strip).at(0, -1).record("conductance").column("source>drain (S)")[0], 1e-9 * G1);
        assertEquals(1 * G1, Runs.of(strip).at(0, -2.5).record("conductance").column("source>drain (S)")[0], 1e-9 * G1);
    }

    /** The step of T(E) at a band's bottom is smeared into a Fermi function: G = (q²/h)[f(−2 eV) − f(2 eV)]. */
    @Test
    void thermalSmearing() throws Exception {
        Device chain = TestDevices.strip(4, 1, s -> 0, 0);
        for (double kelvin : new double[] {1e-3, 4, 300, 2000}) {
            double kT = KB * kelvin;
            for (double mu : new double[] {-2 - 3 * kT, -2, -2 + 5 * kT}) {
                double expected = G1 * (fermi((-2 - mu) / kT) - fermi((2 - mu) / kT));
                double found =
                        Runs.of(chain).at(kelvin, mu).record("conductance").column("source>drain (S)")[0];
                assertEquals(expected, found, 2e-8 * expected, kelvin + " K, " + mu + " eV");
            }
        }
    }

    /** T → 0 is continuous: the limit and a millikelvin agree where T(E) is smooth. */
    @Test
    void zeroTemperatureIsTheLimit() throws Exception {
        Device level = TestDevices.level(0.01, 0.01, 0.02);
        double limit = Runs.of(level).at(0, 0).record("conductance").column("left>right (S)")[0];
        for (double kelvin : new double[] {1e-3, 1e-6, 1e-9}) {
            double cold = Runs.of(level).at(kelvin, 0).record("conductance").column("left>right (S)")[0];
            assertEquals(limit, cold, 1e-8 * limit, kelvin + " K");
        }
    }

    /** A resonance far narrower than kT is not missed: G → (q²/h)·2πΓΓ'/(Γ + Γ')·(−df/dE) at the level. */
    @Test
    void narrowResonance() throws Exception {
        double kT = KB * 300;
        for (double gamma : new double[] {1e-4, 1e-6, 1e-8}) {
            Device level = TestDevices.level(0.0513, gamma, 2 * gamma);
            double slope = fermi(0.0513 / kT) * fermi(-0.0513 / kT) / kT;
            double expected = G1 * 2 * Math.PI * (2.0 / 3) * gamma * slope;
            double found = Runs.of(level).at(300, 0).record("conductance").column("left>right (S)")[0];
            // the line's tails beyond the window make a difference of the order of its width over kT
            assertEquals(expected, found, Math.max(1e-7, 10 * gamma / kT) * expected, gamma + " eV");
        }
    }

    /** Heat between 10 K and 20 K: π²kB²(T² − T'²)/(6h) per mode (Pendry, J. Phys. A 16, 2161 (1983)). */
    @Test
    void quantumOfHeat() throws Exception {
        Device chain = Runs.leads(TestDevices.strip(4, 1, s -> 0, 0), 20, 0, 10, 0);
        double perMode = Math.PI * Math.PI * 1.380649e-23 * 1.380649e-23 * (400 - 100) / (6 * 6.62607015e-34);
        double[] row = Runs.of(chain).record("heatCurrent").table().rows().get(0);
        assertEquals(perMode, row[0], 1e-7 * perMode);
        assertEquals(-perMode, row[1], 1e-7 * perMode);
    }

    /** Wiedemann and Franz: heat per temperature over G·T is π²kB²/3q² = 2.443e-8 W Ω/K² (handbook). */
    @Test
    void wiedemannFranz() throws Exception {
        Device smooth = TestDevices.level(0.2, 0.3, 0.3);
        double heat = Runs.of(Runs.leads(smooth, 10.05, 0, 9.95, 0))
                .record("heatCurrent")
                .column("left (W)")[0];
        double conductance = Runs.of(smooth).at(10, 0).record("conductance").column("left>right (S)")[0];
        // next order in (kT/width)²: 10 K against 0.3 eV
        assertEquals(2.443e-8, heat / 0.1 / (conductance * 10), 2e-11);
    }

    /** Mott's formula: S = −(π²kB²T/3q) d ln T/dE at low temperature (handbook). Electrons above mu pass better: S < 0. */
    @Test
    void mottFormula() throws Exception {
        Device level = TestDevices.level(0.05, 0.02, 0.02);
        double slope = 2 * 0.05 / (0.05 * 0.05 + 0.02 * 0.02);
        double expected = -Math.PI * Math.PI * KB * KB * 5 / 3 * slope;
        double found = Runs.of(level).at(5, 0).record("seebeck").column("left>right (V/K)")[0];
        assertTrue(found < 0);
        assertEquals(expected, found, 1e-3 * Math.abs(expected));
        Device below = TestDevices.level(-0.05, 0.02, 0.02);
        assertEquals(-found, Runs.of(below).at(5, 0).record("seebeck").column("left>right (V/K)")[0], 1e-9 * -found);
        assertEquals(0, Runs.of(level).at(0, 0).record("seebeck").column("left>right (V/K)")[0]);
    }

    /** Far outside every band nothing flows, and a thermovoltage is not defined. */
    @Test
    void outsideTheBands() throws Exception {
        Device chain = TestDevices.strip(4, 1, s -> 0, 0);
        assertEquals(0, Runs.of(chain).at(0, -3).record("conductance").column("source>drain (S)")[0]);
        assertTrue(Double.isNaN(Runs.of(chain).at(0, -3).record("seebeck").column("source>drain (V/K)")[0]));
    }

    @Test
    void onlyTheLeadsAskedFor() throws Exception {
        Device chain = TestDevices.strip(4, 1, s -> 0, 0);
        assertEquals(
                java.util.List.of("drain>source (S)"),
                Runs.of(chain)
                        .at(0, 0)
                        .record(new ObservableCall("conductance", "drain", "source"))
                        .table()
                        .headers());
    }
}
