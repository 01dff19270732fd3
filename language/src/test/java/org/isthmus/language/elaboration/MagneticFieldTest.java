package org.isthmus.language.elaboration;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.LatticeLead;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.units.PhysicalConstants;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class MagneticFieldTest {
    /**
     * A wave packet with the velocity of the classical particle turns anticlockwise, seen from +z, with the cyclotron
     * frequency ω = qB/m (classical mechanics: F = −q v × B for charge −q). The packet starts along +x; the velocity after
     * the time τ points along the angle ωτ. The lattice lowers ω by a part of order (ka)²/4 = 2 %, hence 5 %.
     */
    @ParameterizedTest
    @ValueSource(doubles = {5, -5})
    void aWavePacketTurnsAnticlockwise(double tesla) {
        Device device = Texts.device(
                """
                device Sheet {
                    lattice Square(a = 2 nm, m = 0.067 me);
                    body box(-60 nm .. 60 nm, -60 nm .. 60 nm);
                    magnetic field = %s T;
                }
                """
                        .formatted(tesla));
        double mass = 0.067 * PhysicalConstants.ELECTRON_MASS;
        double k = 0.15;
        double width = 10;
        SiteTable sites = device.sites();
        int n = sites.count();
        double[] re = new double[n];
        double[] im = new double[n];
        for (int i = 0; i < n; i++) {
            double x = sites.x(i);
            double y = sites.y(i);
            double envelope = Math.exp(-(x * x + y * y) / (4 * width * width));
            // kinetic momentum ħk + qA with A = (−By, 0) averages to ħk for a packet about y = 0
            re[i] = envelope * Math.cos(k * x);
            im[i] = envelope * Math.sin(k * x);
        }
        double step = 0.4;
        int steps = 150;
        double[][] path = new double[3][];
        for (int s = 0; s <= steps; s++) {
            if (s == 0 || s == 10) {
                path[s / 10] = centre(sites, re, im);
            }
            if (s == steps - 10) {
                path[2] = centre(sites, re, im);
            }
            if (s < steps) {
                advance(device, re, im, step);
            }
        }
        double[] end = centre(sites, re, im);
        double first = Math.atan2(path[1][1] - path[0][1], path[1][0] - path[0][0]);
        double last = Math.atan2(end[1] - path[2][1], end[0] - path[2][0]);
        double turned = last - first;
        double expected = tesla * 1e-3 / mass * step * (steps - 10);
        assertTrue(Math.abs(expected) > 0.7, "turns far enough: " + expected);
        assertEquals(expected, turned, 0.05 * Math.abs(expected));
    }

    private static double[] centre(SiteTable sites, double[] re, double[] im) {
        double norm = 0;
        double x = 0;
        double y = 0;
        for (int i = 0; i < re.length; i++) {
            double p = re[i] * re[i] + im[i] * im[i];
            norm += p;
            x += p * sites.x(i);
            y += p * sites.y(i);
        }
        return new double[] {x / norm, y / norm};
    }

    /** exp(−iHτ/ħ)ψ by its Taylor series; ‖H‖τ/ħ is below 1, so that 16 terms are exact to rounding. */
    private static void advance(Device device, double[] re, double[] im, double time) {
        int n = re.length;
        double[] tr = re.clone();
        double[] ti = im.clone();
        for (int order = 1; order <= 16; order++) {
            double[] hr = new double[n];
            double[] hi = new double[n];
            for (int i = 0; i < n; i++) {
                double e = device.sites().onSiteReal(i, 0, 0);
                hr[i] += e * tr[i];
                hi[i] += e * ti[i];
            }
            HoppingTable bonds = device.hoppings();
            for (int b = 0; b < bonds.count(); b++) {
                int i = bonds.from(b);
                int j = bonds.to(b);
                double a = bonds.real(b, 0, 0);
                double c = bonds.imaginary(b, 0, 0);
                hr[i] += a * tr[j] - c * ti[j];
                hi[i] += a * ti[j] + c * tr[j];
                hr[j] += a * tr[i] + c * ti[i];
                hi[j] += a * ti[i] - c * tr[i];
            }
            double factor = time / PhysicalConstants.HBAR / order;
            for (int i = 0; i < n; i++) {
                tr[i] = factor * hi[i];
                ti[i] = -factor * hr[i];
                re[i] += tr[i];
                im[i] += ti[i];
            }
        }
    }

    /**
     * Flux through plaquettes that reach from the body over a contact into the lead, read from the tables of a whole
     * device with leads on four sides: B a² each, whatever the side's gauge (Stokes).
     */
    @Test
    void fluxThroughPlaquettesAcrossContacts() {
        Device device = Texts.device(
                """
                device Cross {
                    lattice Square(a = 5 nm, m = 0.067 me);
                    origin (1 nm, 2 nm);
                    body box(-40 nm .. 40 nm, -20 nm .. 20 nm) + box(-20 nm .. 20 nm, -40 nm .. 40 nm);
                    magnetic field = 3 T;
                    lead w from left; lead e from right; lead s from bottom; lead n from top;
                }
                """);
        double quantum = 3e-3 * 25 / PhysicalConstants.HBAR;
        for (var lead : device.leads()) {
            LatticeLead side = (LatticeLead) lead;
            int m = side.cell().count();
            int loops = 0;
            for (int i = 0; i < side.within().count(); i++) {
                int a = side.within().from(i);
                int b = side.within().to(i);
                int p = bodyOf(side, a);
                int q = bodyOf(side, b);
                // p → a → b → q → p
                double phase = angle(side.contact(), p, a)
                        + angle(side.within(), a, b)
                        - angle(side.contact(), q, b)
                        + angle(device.hoppings(), q, p);
                double area = area(
                        device.sites().x(p), device.sites().y(p),
                        side.cell().x(a), side.cell().y(a),
                        side.cell().x(b), side.cell().y(b),
                        device.sites().x(q), device.sites().y(q));
                assertEquals(25, Math.abs(area), 1e-9);
                assertEquals(quantum * Math.signum(area), Math.IEEEremainder(phase, 2 * Math.PI), 1e-12);
                // a → a' → b' → b → a, with the same bonds in cell 2
                double inside = angle(side.outward(), a, a)
                        + angle(side.within(), a, b)
                        - angle(side.outward(), b, b)
                        - angle(side.within(), a, b);
                assertEquals(quantum * Math.signum(area), Math.IEEEremainder(inside, 2 * Math.PI), 1e-12);
                loops++;
            }
            assertEquals(m - 1, loops);
        }
    }

    private static int bodyOf(LatticeLead lead, int site) {
        for (int bond = 0; bond < lead.contact().count(); bond++) {
            if (lead.contact().to(bond) == site) {
                return lead.contact().from(bond);
            }
        }
        throw new AssertionError("no contact at " + site);
    }

    /** Phase of −⟨from|H|to⟩: hoppings are −t times the phase. */
    private static double angle(HoppingTable bonds, int from, int to) {
        for (int bond = 0; bond < bonds.count(); bond++) {
            double phase = Math.atan2(-bonds.imaginary(bond, 0, 0), -bonds.real(bond, 0, 0));
            if (bonds.from(bond) == from && bonds.to(bond) == to) {
                return phase;
            }
            if (bonds.from(bond) == to && bonds.to(bond) == from) {
                return -phase;
            }
        }
        throw new AssertionError("no bond " + from + " -> " + to);
    }

    private static double area(double... xy) {
        double twice = 0;
        for (int i = 0; i < xy.length; i += 2) {
            int j = (i + 2) % xy.length;
            twice += xy[i] * xy[j + 1] - xy[j] * xy[i + 1];
        }
        return twice / 2;
    }
}
