package org.isthmus.language.elaboration.geometry;

import java.util.ArrayList;
import java.util.List;
import org.isthmus.runtime.device.Lattice;
import org.isthmus.runtime.device.SiteTable;

/** Lattices of one orbital per site, by numbers. */
final class SomeLattices {
    private final String name;
    private final List<Lattice.Vector> vectors = new ArrayList<>();
    private final SiteTable.Builder basis = new SiteTable.Builder(4);
    private final List<Lattice.Bond> bonds = new ArrayList<>();

    private SomeLattices(String name) {
        this.name = name;
    }

    static SomeLattices named(String name) {
        return new SomeLattices(name);
    }

    SomeLattices vector(double x, double y, double z) {
        vectors.add(new Lattice.Vector(x, y, z));
        return this;
    }

    SomeLattices site(double x, double y, double z) {
        basis.add(x, y, z, basis.build().count(), 1, new double[] {0, 0});
        return this;
    }

    SomeLattices bond(int from, int to, Integer... cell) {
        bonds.add(new Lattice.Bond(from, to, List.of(cell), List.of(-1.0, 0.0)));
        return this;
    }

    Lattice lattice() {
        return new Lattice(name, vectors, basis.build(), bonds, List.of(), 2);
    }

    LatticeFrame frame(double... origin) {
        return LatticeFrame.of(lattice(), origin.length == 0 ? new double[3] : origin);
    }

    static SomeLattices chain(double a) {
        return named("chain").vector(a, 0, 0).site(0, 0, 0).bond(0, 0, 1, 0, 0);
    }

    static SomeLattices square(double a) {
        return named("square")
                .vector(a, 0, 0)
                .vector(0, a, 0)
                .site(0, 0, 0)
                .bond(0, 0, 1, 0, 0)
                .bond(0, 0, 0, 1, 0);
    }

    static SomeLattices cubic(double a) {
        return named("cubic")
                .vector(a, 0, 0)
                .vector(0, a, 0)
                .vector(0, 0, a)
                .site(0, 0, 0)
                .bond(0, 0, 1, 0, 0)
                .bond(0, 0, 0, 1, 0)
                .bond(0, 0, 0, 0, 1);
    }

    static SomeLattices triangular(double a) {
        return named("triangular")
                .vector(a, 0, 0)
                .vector(a / 2, a * Math.sqrt(3) / 2, 0)
                .site(0, 0, 0)
                .bond(0, 0, 1, 0, 0)
                .bond(0, 0, 0, 1, 0)
                .bond(0, 0, 1, -1, 0);
    }

    static SomeLattices honeycomb(double a) {
        return named("honeycomb")
                .vector(a, 0, 0)
                .vector(a / 2, a * Math.sqrt(3) / 2, 0)
                .site(0, 0, 0)
                .site(0, a / Math.sqrt(3), 0)
                .bond(0, 1, 0, 0, 0)
                .bond(0, 1, 0, -1, 0)
                .bond(0, 1, 1, -1, 0);
    }

    /** Body-centred cubic by primitive vectors, bonds to the eight neighbours. */
    static SomeLattices bodyCentred(double a) {
        double h = a / 2;
        return named("body-centred")
                .vector(-h, h, h)
                .vector(h, -h, h)
                .vector(h, h, -h)
                .site(0, 0, 0)
                .bond(0, 0, 1, 0, 0)
                .bond(0, 0, 0, 1, 0)
                .bond(0, 0, 0, 0, 1)
                .bond(0, 0, 1, 1, 1);
    }

    /** Every site of a box, up to a number. */
    static BodySites inBox(LatticeFrame frame, double... bounds) {
        Extent box = Extent.of(bounds);
        double margin = frame.tolerance();
        BodySites.Search search = BodySites.search(
                frame,
                box,
                (x, y, z) -> inside(box, 0, x, margin) && inside(box, 1, y, margin) && inside(box, 2, z, margin),
                2_000_000,
                2_000_000,
                () -> false);
        return ((BodySites.Found) search).sites();
    }

    private static boolean inside(Extent box, int axis, double value, double margin) {
        return value >= box.lower()[axis] - margin && value <= box.upper()[axis] + margin;
    }
}
