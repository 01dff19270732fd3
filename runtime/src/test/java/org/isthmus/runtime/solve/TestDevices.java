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

    /**
     * A square of the square lattice with a lead on each of its four sides (left, right, bottom, top), which share the
     * corners. The gauge is along x in the body and turns in the leads, by exp(i·2π·flux·x·(y − nearest row of the body)),
     * such that each is periodic; every loop, also across the contacts, carries −flux.
     */
    public static Device cross(int width, IntToDoubleFunction onSite, double flux) {
        Device strip = strip(width, width, onSite, flux);
        List<Lead> leads = new ArrayList<>(strip.leads());
        leads.add(across("bottom", Side.BOTTOM, width, flux));
        leads.add(across("top", Side.TOP, width, flux));
        return device(strip.sites(), strip.hoppings(), HoppingTable.EMPTY, leads);
    }

    private static LatticeLead across(String name, Side side, int width, double flux) {
        int row = side.sign() < 0 ? 0 : width - 1;
        SiteTable.Builder cell = new SiteTable.Builder(width);
        HoppingTable.Builder within = new HoppingTable.Builder(width);
        HoppingTable.Builder outward = new HoppingTable.Builder(width);
        HoppingTable.Builder contact = new HoppingTable.Builder(width);
        for (int x = 0; x < width; x++) {
            double turn = -side.sign() * 2 * Math.PI * flux * x;
            double[] step = number(-Math.cos(turn), -Math.sin(turn));
            cell.add(x, row + side.sign(), 0, 0, 1, number(0, 0));
            outward.add(x, x, 1, 1, step);
            contact.add(x * width + row, x, 1, 1, step);
            if (x + 1 < width) {
                within.add(x, x + 1, 1, 1, along(flux, row));
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
                IntStream.range(0, width).map(x -> x * width + row).boxed().toList(),
                SourceRef.NONE);
    }

    /**
     * A ribbon of the honeycomb with zigzag edges, drawn as bricks: all bonds along x, every other one along y. The cells of
     * its leads are two columns long, and only one of the two touches the next cell, so that their coupling is singular.
     *
     * @param length columns, even
     * @param chains zigzag chains across
     */
    public static Device honeycombRibbon(int length, int chains, IntToDoubleFunction onSite) {
        SiteTable.Builder sites = new SiteTable.Builder(length * chains);
        HoppingTable.Builder bonds = new HoppingTable.Builder(2 * length * chains);
        for (int x = 0; x < length; x++) {
            for (int y = 0; y < chains; y++) {
                sites.add(x, y, 0, 0, 1, number(onSite.applyAsDouble(x * chains + y), 0));
                if (x > 0) {
                    bonds.add((x - 1) * chains + y, x * chains + y, 1, 1, number(-1, 0));
                }
                if (y > 0 && (x + y) % 2 == 0) {
                    bonds.add(x * chains + y - 1, x * chains + y, 1, 1, number(-1, 0));
                }
            }
        }
        List<Lead> leads = new ArrayList<>();
        for (Side side : List.of(Side.LEFT, Side.RIGHT)) {
            int edge = side.sign() < 0 ? 0 : length - 1;
            SiteTable.Builder cell = new SiteTable.Builder(2 * chains);
            HoppingTable.Builder within = new HoppingTable.Builder(3 * chains);
            HoppingTable.Builder outward = new HoppingTable.Builder(chains);
            HoppingTable.Builder contact = new HoppingTable.Builder(chains);
            for (int column = 0; column < 2; column++) {
                for (int y = 0; y < chains; y++) {
                    int x = edge + side.sign() * (column + 1);
                    cell.add(x, y, 0, 0, 1, number(0, 0));
                    if (y > 0 && Math.floorMod(x + y, 2) == 0) {
                        within.add(column * chains + y - 1, column * chains + y, 1, 1, number(-1, 0));
                    }
                    if (column == 0) {
                        within.add(y, chains + y, 1, 1, number(-1, 0));
                        outward.add(chains + y, y, 1, 1, number(-1, 0));
                        contact.add(edge * chains + y, y, 1, 1, number(-1, 0));
                    }
                }
            }
            leads.add(new LatticeLead(
                    side.name(),
                    300,
                    0,
                    false,
                    side,
                    2,
                    cell.build(),
                    within.build(),
                    outward.build(),
                    contact.build(),
                    HoppingTable.EMPTY,
                    HoppingTable.EMPTY,
                    HoppingTable.EMPTY,
                    IntStream.range(edge * chains, (edge + 1) * chains).boxed().toList(),
                    SourceRef.NONE));
        }
        return device(sites.build(), bonds.build(), HoppingTable.EMPTY, leads);
    }

    /** Another device with more sites of one orbital, bonded among themselves or to the old ones. */
    public static Device with(Device device, double[] moreOnSite, int[][] moreBonds) {
        SiteTable old = device.sites();
        SiteTable.Builder sites = new SiteTable.Builder(old.count() + moreOnSite.length);
        for (int i = 0; i < old.count(); i++) {
            sites.add(
                    old.x(i), old.y(i), old.z(i), 0, 1, number(old.onSiteReal(i, 0, 0), old.onSiteImaginary(i, 0, 0)));
        }
        for (int i = 0; i < moreOnSite.length; i++) {
            sites.add(i, -3, 0, 0, 1, number(moreOnSite[i], 0));
        }
        HoppingTable.Builder bonds = new HoppingTable.Builder(device.hoppings().count() + moreBonds.length);
        for (int b = 0; b < device.hoppings().count(); b++) {
            bonds.add(
                    device.hoppings().from(b),
                    device.hoppings().to(b),
                    1,
                    1,
                    number(device.hoppings().real(b, 0, 0), device.hoppings().imaginary(b, 0, 0)));
        }
        for (int[] bond : moreBonds) {
            bonds.add(bond[0], bond[1], 1, 1, number(-1, 0));
        }
        return device(sites.build(), bonds.build(), device.overlaps(), device.leads());
    }
}
