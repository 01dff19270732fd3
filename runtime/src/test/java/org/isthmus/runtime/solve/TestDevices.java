package org.isthmus.runtime.solve;

import java.util.ArrayList;
import java.util.List;
import java.util.function.IntToDoubleFunction;
import java.util.stream.IntStream;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.Lattice;
import org.isthmus.runtime.device.LatticeLead;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.Side;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.device.SourceRef;
import org.isthmus.runtime.device.WideBandLead;

/** Devices built by hand, without the language: sites 1 nm apart, hopping −1 eV. */
public final class TestDevices {
    private TestDevices() {}

    public static final Lattice PLAIN = new Lattice("Plain", List.of(), SiteTable.EMPTY, List.of(), List.of(), 1);

    private static double[] number(double re, double im) {
        return new double[] {re, im};
    }

    /** A strip of the square lattice between two leads of its own kind; on-site energies by site = x·width + y. */
    public static Device strip(int length, int width, IntToDoubleFunction onSite, double flux) {
        SiteTable.Builder sites = new SiteTable.Builder(length * width);
        HoppingTable.Builder bonds = new HoppingTable.Builder(2 * length * width);
        for (int x = 0; x < length; x++) {
            for (int y = 0; y < width; y++) {
                sites.add(x, y, 0, 0, 1, number(onSite.applyAsDouble(x * width + y), 0));
            }
        }
        for (int x = 0; x < length; x++) {
            for (int y = 0; y < width; y++) {
                if (x + 1 < length) {
                    bonds.add(x * width + y, (x + 1) * width + y, 1, 1, along(flux, y));
                }
                if (y + 1 < width) {
                    bonds.add(x * width + y, x * width + y + 1, 1, 1, number(-1, 0));
                }
            }
        }
        List<Lead> leads = new ArrayList<>();
        leads.add(lead("source", Side.LEFT, length, width, flux));
        leads.add(lead("drain", Side.RIGHT, length, width, flux));
        return device(sites.build(), bonds.build(), HoppingTable.EMPTY, leads);
    }

    /** Landau gauge along x: ⟨x|H|x + 1⟩ turns by 2π·flux·y. */
    private static double[] along(double flux, int y) {
        return number(-Math.cos(2 * Math.PI * flux * y), -Math.sin(2 * Math.PI * flux * y));
    }

    private static LatticeLead lead(String name, Side side, int length, int width, double flux) {
        int sign = side.sign();
        int edge = sign < 0 ? 0 : length - 1;
        SiteTable.Builder cell = new SiteTable.Builder(width);
        HoppingTable.Builder within = new HoppingTable.Builder(width);
        HoppingTable.Builder outward = new HoppingTable.Builder(width);
        HoppingTable.Builder contact = new HoppingTable.Builder(width);
        for (int y = 0; y < width; y++) {
            cell.add(edge + sign, y, 0, 0, 1, number(0, 0));
            double[] turned = along(flux, y);
            turned[1] *= sign;
            outward.add(y, y, 1, 1, turned);
            contact.add(edge * width + y, y, 1, 1, turned);
            if (y + 1 < width) {
                within.add(y, y + 1, 1, 1, number(-1, 0));
            }
        }
        return new LatticeLead(
                name,
                300,
                0,
                false,
                side,
                1,
                cell.build(),
                within.build(),
                outward.build(),
                contact.build(),
                HoppingTable.EMPTY,
                HoppingTable.EMPTY,
                HoppingTable.EMPTY,
                IntStream.range(edge * width, (edge + 1) * width).boxed().toList(),
                SourceRef.NONE);
    }

    /** A chain between leads of its own kind, with overlap s between neighbours. */
    public static Device overlapChain(int length, IntToDoubleFunction onSite, double s) {
        Device plain = strip(length, 1, onSite, 0);
        HoppingTable.Builder overlaps = new HoppingTable.Builder(length);
        for (int x = 0; x + 1 < length; x++) {
            overlaps.add(x, x + 1, 1, 1, number(s, 0));
        }
        List<Lead> leads = new ArrayList<>();
        for (Lead lead : plain.leads()) {
            LatticeLead l = (LatticeLead) lead;
            HoppingTable outward =
                    new HoppingTable.Builder(1).add(0, 0, 1, 1, number(s, 0)).build();
            HoppingTable contact = new HoppingTable.Builder(1)
                    .add(l.contactSites().get(0), 0, 1, 1, number(s, 0))
                    .build();
            leads.add(new LatticeLead(
                    l.name(),
                    l.temperature(),
                    l.mu(),
                    false,
                    l.side(),
                    1,
                    l.cell(),
                    l.within(),
                    l.outward(),
                    l.contact(),
                    HoppingTable.EMPTY,
                    outward,
                    contact,
                    l.contactSites(),
                    SourceRef.NONE));
        }
        return device(plain.sites(), plain.hoppings(), overlaps.build(), leads);
    }

    /** One level between two wide-band contacts. */
    public static Device level(double energy, double left, double right) {
        SiteTable.Builder sites = new SiteTable.Builder(1);
        sites.add(0, 0, 0, 0, 1, number(energy, 0));
        return device(
                sites.build(),
                HoppingTable.EMPTY,
                HoppingTable.EMPTY,
                List.of(wideBand("left", left, 0), wideBand("right", right, 0)));
    }

    public static WideBandLead wideBand(String name, double broadening, int site) {
        return new WideBandLead(name, 300, 0, false, List.of(site), List.of(broadening), SourceRef.NONE);
    }

    public static Device device(SiteTable sites, HoppingTable bonds, HoppingTable overlaps, List<Lead> leads) {
        return new Device("Test", PLAIN, sites, bonds, overlaps, leads, 0, List.of(), SourceRef.NONE);
    }
}
