package org.isthmus.runtime.observable;

import static org.isthmus.runtime.measure.Runs.G1;
import static org.isthmus.runtime.measure.Runs.KB;
import static org.isthmus.runtime.measure.Runs.Q;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.Measurement.Drop;
import org.isthmus.runtime.device.Measurement.EnergyPoints;
import org.isthmus.runtime.device.SourceRef;
import org.isthmus.runtime.measure.Runs;
import org.isthmus.runtime.result.MeasurementResult;
import org.isthmus.runtime.solve.TestDevices;
import org.junit.jupiter.api.Test;

/** Currents and their noise with a voltage on. Devices here have degeneracy 1. */
class FiniteBiasTest {
    private static double logistic(double mu, double kT, double edge) {
        // ∫ over E > edge of the Fermi function
        return kT * Math.log1p(Math.exp((mu - edge) / kT));
    }

    /** T = 1 in the band: I = (q/h)[F(µ) − F(µ')], F = kT ln(1 + exp((µ − E)/kT)) between the band's edges. */
    @Test
    void perfectConductorAtTwoTemperatures() throws Exception {
        Device chain = Runs.leads(TestDevices.strip(4, 1, s -> 0, 0), 300, -1.9, 100, -1.95);
        double hot = KB * 300;
        double cold = KB * 100;
        double inflow =
                logistic(-1.9, hot, -2) - logistic(-1.9, hot, 2) - logistic(-1.95, cold, -2) + logistic(-1.95, cold, 2);
        double[] row = Runs.of(chain).record("current").table().rows().get(0);
        // more electrons come from the source: the conventional current leaves the device there
        assertEquals(-G1 * inflow, row[0], 1e-8 * G1 * inflow);
        assertEquals(0, row[0] + row[1], 1e-14 * G1);
    }

    /** One lead at zero temperature, the other warm: ½-step and Fermi function side by side. */
    @Test
    void oneLeadAtZeroTemperature() throws Exception {
        Device chain = Runs.leads(TestDevices.strip(4, 1, s -> 0, 0), 0, 0.1, 300, 0);
        double inflow = 0.1 + 2 - (logistic(0, KB * 300, -2) - logistic(0, KB * 300, 2));
        assertEquals(-G1 * inflow, Runs.of(chain).record("current").column("source (A)")[0], 1e-8 * G1 * inflow);
    }

    /** Positive at a lead on positive bias; with the bands of the biased lead moving by −qV and a linear drop. */
    @Test
    void signAndDropOfABias() throws Exception {
        Device chain = TestDevices.strip(10, 1, s -> s == 5 ? 0.4 : 0, 0);
        for (Drop drop : new Drop[] {Drop.NONE, Drop.LINEAR}) {
            double[] current = Runs.of(chain)
                    .at(0, -1)
                    .drop(drop)
                    .bias("drain", -0.01, 0.01)
                    .record("current")
                    .column("drain (A)");
            assertTrue(current[0] < 0 && current[1] > 0, drop.toString());
            double ohmic = Runs.of(chain).at(0, -1).record("conductance").column("source>drain (S)")[0];
            assertEquals(ohmic, (current[1] - current[0]) / 0.02, 1e-3 * ohmic, "small bias, " + drop);
        }
    }

    /** A narrow level inside a wide window carries (q/h)·2πΓΓ'/(Γ + Γ') whatever the window. */
    @Test
    void narrowLevelInAWideWindow() throws Exception {
        Device level = TestDevices.level(0.0513, 1e-8, 1e-8);
        double expected = G1 * 2 * Math.PI * 0.5e-8;
        for (double kelvin : new double[] {0, 4}) {
            double current = Runs.of(level)
                    .at(kelvin, 0)
                    .bias("right", -0.4)
                    .record("current")
                    .column("right (A)")[0];
            assertEquals(-expected, current, 1e-6 * expected, kelvin + " K");
        }
    }

    /** Shot noise 2qI(1 − T) of a barrier at T = 0 (Büttiker, Phys. Rev. Lett. 65, 2901 (1990)). */
    @Test
    void shotNoise() throws Exception {
        Device barrier = TestDevices.strip(5, 1, s -> s == 2 ? 2 : 0, 0);
        // one site raised by U on a chain: T = (2t sin ka)²/((2t sin ka)² + U²) = ½ at the middle of the band, closed
        // form
        MeasurementResult result = Runs.of(barrier)
                .at(0, 0)
                .bias("source", 1e-6)
                .record("current", "noise", "fano")
                .run();
        double current = Runs.column(Runs.table(result, "current"), "source (A)")[0];
        double noise = Runs.column(Runs.table(result, "noise"), "source>source (A^2/Hz)")[0];
        // the bands of the biased lead move by the voltage, a millionth of the hopping
        assertEquals(G1 * 0.5 * 1e-6, current, 1e-6 * current);
        assertEquals(2 * Q * current * 0.5, noise, 1e-6 * noise);
        assertEquals(-noise, Runs.column(Runs.table(result, "noise"), "source>drain (A^2/Hz)")[0], 1e-9 * noise);
        assertEquals(0.5, Runs.column(Runs.table(result, "fano"), "source>drain")[0], 1e-6);
        double[] resolved = Runs.of(barrier)
                .energy(new EnergyPoints(List.of(0.0), SourceRef.NONE))
                .record("fano")
                .column("source>drain");
        assertEquals(0.5, resolved[0], 1e-12);
    }

    /** What passes without loss makes no shot noise (Büttiker 1990), and finding that out takes no effort. */
    @Test
    void noNoiseWithoutPartition() throws Exception {
        Device strip = Runs.leads(TestDevices.strip(4, 2, s -> 0, 0), 0, 0.1, 0, -0.1);
        MeasurementResult result = Runs.of(strip).record("noise").run();
        assertEquals(0, Runs.table(result, "noise").rows().get(0)[0], 1e-12 * Q * G1);
        assertTrue(result.solves() < 2000, result.solves() + " solves");
        assertEquals(List.of(), result.findings());
    }

    /** From thermal to shot noise: S = 2G[2kT·T + qV coth(qV/2kT)(1 − T)] for T independent of energy (Büttiker 1990). */
    @Test
    void noiseBetweenThermalAndShot() throws Exception {
        Device barrier = TestDevices.level(0, 400, 1200);
        double passes = 4 * 400.0 * 1200 / (1600.0 * 1600);
        double kT = KB * 20;
        double volts = 0.004;
        double expected = 2 * G1 * passes * (2 * kT * passes + volts / Math.tanh(volts / (2 * kT)) * (1 - passes)) * Q;
        double found =
                Runs.of(barrier).at(20, 0).bias("left", volts).record("noise").column("left>left (A^2/Hz)")[0];
        // T varies by (kT/1600 eV)² over the window
        assertEquals(expected, found, 1e-8 * expected);
    }

    /** Three contacts on one level: T = ΓΓ'/|…|² for each pair; flows and correlations add up to nothing. */
    @Test
    void threeLeads() throws Exception {
        Device pair = TestDevices.level(0.03, 0.01, 0.02);
        List<org.isthmus.runtime.device.Lead> leads = new java.util.ArrayList<>(pair.leads());
        leads.add(TestDevices.wideBand("third", 0.03, 0));
        Device level = Runs.leads(Runs.with(pair, leads), 0, 0.1, 0, 0, 300, -0.05);
        MeasurementResult result = Runs.of(level)
                .record("current", "noise", "heatCurrent", "residual")
                .run();
        double[] current = Runs.table(result, "current").rows().get(0);
        assertEquals(0, current[0] + current[1] + current[2], 1e-14 * G1);
        double[] noise = Runs.table(result, "noise").rows().get(0);
        for (int a = 0; a < 3; a++) {
            assertTrue(noise[3 * a + a] > 0);
            assertEquals(0, noise[3 * a] + noise[3 * a + 1] + noise[3 * a + 2], 1e-12 * noise[0]);
            for (int b = 0; b < 3; b++) {
                assertEquals(noise[3 * a + b], noise[3 * b + a], 1e-12 * noise[0]);
                // currents of electrons are anticorrelated between contacts (Büttiker 1992)
                assertTrue(a == b || noise[3 * a + b] < 0);
            }
        }
        // what the two cold contacts exchange: ∫ from 0 to 0.1 eV in closed form; the warm one empties both alike
        double atan = (Math.atan((0.1 - 0.03) / 0.03) - Math.atan(-0.03 / 0.03)) / 0.03;
        double share = current[0] / 0.01 - current[1] / 0.02;
        assertEquals(-G1 * (0.01 + 0.02 + 0.03) * atan, share, 1e-8 * Math.abs(share));
        assertTrue(Runs.table(result, "residual").rows().get(0)[0] < 1e-10);
    }

    /** Johnson and Nyquist, S = 4kTG, and charge conservation: noise sums to zero over one of its leads. */
    @Test
    void equilibriumNoise() throws Exception {
        Device strip = TestDevices.strip(6, 3, s -> s % 7 == 3 ? 0.8 : 0, 0.02);
        MeasurementResult result =
                Runs.of(strip).at(300, -1).record("noise", "conductance").run();
        double conductance = Runs.table(result, "conductance").rows().get(0)[0];
        double[] noise = Runs.table(result, "noise").rows().get(0);
        assertEquals(4 * 1.380649e-23 * 300 * conductance, noise[0], 1e-7 * noise[0]);
        assertEquals(0, noise[0] + noise[1], 1e-9 * noise[0]);
        assertEquals(noise[1], noise[2], 1e-9 * noise[0]);
    }

    /** On an energy axis current is spectral: −(q/h)·T·(f − f') at the lead. */
    @Test
    void spectralCurrent() throws Exception {
        Device level = Runs.leads(TestDevices.level(0.05, 0.01, 0.02), 300, 0.1, 0, 0);
        double[] current = Runs.of(level)
                .energy(new EnergyPoints(List.of(0.03), SourceRef.NONE))
                .record("current")
                .column("left (A/eV)");
        double line = 0.01 * 0.02 / (0.02 * 0.02 + 0.015 * 0.015);
        double expected = -G1 * line / (1 + Math.exp((0.03 - 0.1) / (KB * 300)));
        assertEquals(expected, current[0], 1e-10 * Math.abs(expected));
    }
}
