package org.isthmus.runtime.description;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.Lattice;
import org.isthmus.runtime.device.LatticeLead;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.Side;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.device.SourceRef;
import org.isthmus.runtime.device.WideBandLead;
import org.isthmus.runtime.kernel.ejml.PureBackend;
import org.isthmus.runtime.plan.Planner;
import org.junit.jupiter.api.Test;

/**
 * A uniform chain: E(k) = 2t(1 − cos ka), so bands from 0 to 4t and, at an energy E, one wave of length 2πa/arccos(1 −
 * E/2t) (any textbook on tight binding).
 */
class DeviceDescriptionTest {
    private static final double T = 1.5;
    private static final double A = 0.25;
    private static final double MU = 0.2;

    @Test
    void aChainsBandsAndWaveAreTheClosedForm() {
        DeviceDescription description = describe();
        LeadDescription source = description.leads().get(0);
        assertEquals(0, source.bandEdges().orElseThrow().lowest(), 1e-9);
        assertEquals(4 * T, source.bandEdges().orElseThrow().highest(), 1e-9);
        assertEquals(1, source.openModes());
        assertEquals(
                2 * Math.PI * A / Math.acos(1 - MU / (2 * T)),
                source.wavelength().orElseThrow(),
                1e-6);
        assertEquals(A, description.spacing(), 1e-12);
    }

    @Test
    void theTextNamesWhatCounts() {
        List<String> lines = describe().lines();
        String text = String.join("\n", lines);
        assertEquals("device Wire", lines.get(0));
        for (String part : List.of(
                "10 sites, 10 orbitals, 9 bonds; x from 0 to 2.25 nm",
                "height = 500 meV",
                "lead source from left",
                "bands from 0 to 6 eV; 1 open mode at mu, shortest wave",
                "lead probe wide band, broadening 0.1 eV",
                "plan: ",
                "per energy and core")) {
            assertTrue(text.contains(part), part + " in\n" + text);
        }
    }

    @Test
    void sitesAreListedInTableOrder() {
        List<String> lines = describe().siteLines();
        assertEquals(11, lines.size());
        assertEquals("site,x (nm),y (nm),z (nm),basis,orbitals,energy (eV)", lines.get(0));
        assertEquals("1,0.25,0,0,0,1,3", lines.get(2));
    }

    private static DeviceDescription describe() {
        Device wire = wire();
        return DeviceDescription.of(wire, Planner.plan(wire), new PureBackend());
    }

    private static Device wire() {
        SiteTable.Builder sites = new SiteTable.Builder(10);
        HoppingTable.Builder bonds = new HoppingTable.Builder(9);
        for (int i = 0; i < 10; i++) {
            sites.add(i * A, 0, 0, 0, 1, new double[] {2 * T, 0});
            if (i > 0) {
                bonds.add(i - 1, i, 1, 1, new double[] {-T, 0});
            }
        }
        SiteTable.Builder basis = new SiteTable.Builder(1);
        basis.add(0, 0, 0, 0, 1, new double[] {2 * T, 0});
        Lattice lattice = new Lattice(
                "Chain",
                List.of(new Lattice.Vector(A, 0, 0)),
                basis.build(),
                List.of(new Lattice.Bond(0, 0, List.of(1, 0, 0), List.of(-T, 0.0))),
                List.of(),
                2);
        List<Lead> leads = List.of(
                lead("source", Side.LEFT, 0, -A),
                lead("drain", Side.RIGHT, 9, 10 * A),
                new WideBandLead("probe", 300, 0, true, List.of(4), List.of(0.1), SourceRef.NONE));
        return new Device(
                "Wire",
                lattice,
                sites.build(),
                bonds.build(),
                HoppingTable.EMPTY,
                leads,
                0,
                List.of(new Device.ParameterValue("height", 0.5, "meV", 1e-3)),
                SourceRef.NONE);
    }

    private static Lead lead(String name, Side side, int site, double x) {
        SiteTable.Builder cell = new SiteTable.Builder(1);
        cell.add(x, 0, 0, 0, 1, new double[] {2 * T, 0});
        HoppingTable bond = new HoppingTable.Builder(1)
                .add(0, 0, 1, 1, new double[] {-T, 0})
                .build();
        HoppingTable contact = new HoppingTable.Builder(1)
                .add(site, 0, 1, 1, new double[] {-T, 0})
                .build();
        return new LatticeLead(
                name,
                300,
                MU,
                false,
                side,
                A,
                cell.build(),
                HoppingTable.EMPTY,
                bond,
                contact,
                HoppingTable.EMPTY,
                HoppingTable.EMPTY,
                HoppingTable.EMPTY,
                List.of(site),
                SourceRef.NONE);
    }
}
