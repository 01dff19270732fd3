package org.isthmus.runtime.result;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.Lattice;
import org.isthmus.runtime.device.LatticeLead;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.device.SourceRef;
import org.isthmus.runtime.device.TabulatedLead;
import org.isthmus.runtime.device.WideBandLead;
import org.isthmus.runtime.measure.Runs;
import org.isthmus.runtime.solve.TestDevices;
import org.junit.jupiter.api.Test;

class DeviceDigestTest {
    private static final double[] ONE = {1, 0};

    private static HoppingTable bond(int from, int to, double re, double im) {
        return new HoppingTable.Builder(1)
                .add(from, to, 1, 1, new double[] {re, im})
                .build();
    }

    private static SiteTable site(double x, double y, double z, double energy) {
        SiteTable.Builder sites = new SiteTable.Builder(2);
        sites.add(0, 0, 0, 0, 1, ONE);
        sites.add(x, y, z, 0, 1, new double[] {energy, 0});
        return sites.build();
    }

    private static Device plain(SiteTable sites, HoppingTable bonds, HoppingTable overlaps, List<Lead> leads) {
        return TestDevices.device(sites, bonds, overlaps, leads);
    }

    private static LatticeLead lattice(
            SiteTable cell,
            HoppingTable within,
            HoppingTable outward,
            HoppingTable contact,
            HoppingTable overlapWithin,
            HoppingTable overlapOutward,
            HoppingTable overlapContact) {
        LatticeLead some =
                (LatticeLead) TestDevices.strip(2, 1, s -> 0, 0).leads().get(0);
        return new LatticeLead(
                some.name(),
                some.temperature(),
                some.mu(),
                false,
                some.side(),
                some.period(),
                cell,
                within,
                outward,
                contact,
                overlapWithin,
                overlapOutward,
                overlapContact,
                some.contactSites(),
                SourceRef.NONE);
    }

    private static TabulatedLead table(double energy, double real, double imaginary) {
        return new TabulatedLead(
                "t",
                300,
                0,
                false,
                List.of(0),
                List.of(-1.0, energy),
                List.of(0.0, real),
                List.of(-0.1, imaginary),
                "t.csv",
                SourceRef.NONE);
    }

    /** Every entry of every table counts: no two of these devices have one digest. */
    @Test
    void everyEntryCounts() {
        HoppingTable none = HoppingTable.EMPTY;
        List<Lead> leads = List.of(TestDevices.wideBand("left", 0.1, 0));
        Device first = plain(site(1, 0, 0, 0), bond(0, 1, -1, 0), none, leads);
        List<Device> devices = new ArrayList<>();
        devices.add(first);
        devices.add(plain(site(1.5, 0, 0, 0), first.hoppings(), none, leads));
        devices.add(plain(site(1, 0.5, 0, 0), first.hoppings(), none, leads));
        devices.add(plain(site(1, 0, 0.5, 0), first.hoppings(), none, leads));
        devices.add(plain(site(1, 0, 0, Math.ulp(1.0)), first.hoppings(), none, leads));
        devices.add(plain(first.sites(), none, none, leads));
        devices.add(plain(first.sites(), bond(1, 0, -1, 0), none, leads));
        devices.add(plain(first.sites(), bond(0, 1, -1.1, 0), none, leads));
        devices.add(plain(first.sites(), bond(0, 1, -1, 0.1), none, leads));
        devices.add(plain(first.sites(), first.hoppings(), bond(0, 1, 0.1, 0), leads));
        devices.add(plain(first.sites(), none, first.hoppings(), leads));
        devices.add(Runs.leads(first, 299, 0));
        devices.add(Runs.leads(first, 300, 0.1));
        for (Lead lead : List.of(
                TestDevices.wideBand("other", 0.1, 0),
                TestDevices.wideBand("left", 0.2, 0),
                TestDevices.wideBand("left", 0.1, 1),
                new WideBandLead("left", 300, 0, true, List.of(0), List.of(0.1), SourceRef.NONE),
                table(1, 0, -0.1),
                table(2, 0, -0.1),
                table(1, 0.1, -0.1),
                table(1, 0, -0.2))) {
            devices.add(Runs.with(first, List.of(lead)));
        }
        SiteTable cell = site(1, 0, 0, 0);
        HoppingTable some = bond(0, 1, -0.3, 0);
        devices.add(Runs.with(first, List.of(lattice(cell, none, some, some, none, none, none))));
        devices.add(Runs.with(first, List.of(lattice(site(1, 0, 0, 1), none, some, some, none, none, none))));
        devices.add(Runs.with(first, List.of(lattice(cell, some, some, some, none, none, none))));
        devices.add(Runs.with(first, List.of(lattice(cell, none, bond(0, 1, 2, 0), some, none, none, none))));
        devices.add(Runs.with(first, List.of(lattice(cell, none, some, bond(0, 1, 2, 0), none, none, none))));
        devices.add(Runs.with(first, List.of(lattice(cell, none, some, some, some, none, none))));
        devices.add(Runs.with(first, List.of(lattice(cell, none, some, some, none, some, none))));
        devices.add(Runs.with(first, List.of(lattice(cell, none, some, some, none, none, some))));
        Lattice two = new Lattice("Plain", List.of(), SiteTable.EMPTY, List.of(), List.of(), 2);
        devices.add(
                new Device("Test", two, first.sites(), first.hoppings(), none, leads, 0, List.of(), SourceRef.NONE));
        devices.add(new Device(
                "Test",
                first.lattice(),
                first.sites(),
                first.hoppings(),
                none,
                leads,
                1e-3,
                List.of(),
                SourceRef.NONE));
        Set<String> digests = new HashSet<>();
        for (int k = 0; k < devices.size(); k++) {
            assertTrue(digests.add(DeviceDigest.of(devices.get(k))), "device " + k + " is not told from another");
        }
    }

    /** Equal physics is equal, whatever its name and wherever it is written; SHA-256 has 64 hexadecimal digits (FIPS 180-4). */
    @Test
    void namesAndPlacesDoNotCount() {
        Device device = TestDevices.strip(3, 2, s -> s, 0.1);
        Device again = TestDevices.strip(3, 2, s -> s, 0.1);
        Device renamed = new Device(
                "Other",
                again.lattice(),
                again.sites(),
                again.hoppings(),
                again.overlaps(),
                again.leads(),
                0,
                List.of(new Device.ParameterValue("p", 1, "", 1)),
                new SourceRef("elsewhere.isth", 3, 4, 5, 6));
        assertEquals(DeviceDigest.of(device), DeviceDigest.of(renamed));
        assertTrue(DeviceDigest.of(device).matches("[0-9a-f]{64}"));
    }
}
