package org.isthmus.language.elaboration;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.isthmus.language.elaboration.geometry.BodySites;
import org.isthmus.language.elaboration.geometry.Extent;
import org.isthmus.language.elaboration.geometry.LatticeFrame;
import org.isthmus.language.evaluation.Shape;
import org.isthmus.runtime.device.Lattice;
import org.isthmus.runtime.device.SiteTable;
import org.junit.jupiter.api.Test;

/** Jumping from border to border finds the same sites as looking at every one. */
class ShapeChooserTest {
    @Test
    void randomShapesOnRandomLattices() {
        Random random = new Random(11);
        int sites = 0;
        for (int round = 0; round < 300; round++) {
            LatticeFrame frame = lattice(random);
            Shape shape = shape(random, 3);
            Extent box = new Extent(new double[] {-6, -6, -1}, new double[] {6, 6, 1});
            ShapeChooser chooser = new ShapeChooser(shape, frame.tolerance(), null);
            List<String> quick = found(frame, box, chooser);
            List<String> slow = found(frame, box, chooser::inside);
            assertEquals(slow, quick, shape.toString());
            sites += slow.size();
        }
        assertTrue(sites > 10_000, sites + " sites");
    }

    private static List<String> found(LatticeFrame frame, Extent box, BodySites.Chooser chooser) {
        BodySites sites =
                ((BodySites.Found) BodySites.search(frame, box, chooser, 1_000_000, 1_000_000, () -> false)).sites();
        List<String> list = new ArrayList<>();
        for (int site = 0; site < sites.count(); site++) {
            list.add(sites.n1(site) + " " + sites.n2(site) + " " + sites.basis(site));
        }
        return list;
    }

    /** Half of the lattices are square with spacings that put sites exactly on borders. */
    private static LatticeFrame lattice(Random random) {
        boolean even = random.nextBoolean();
        SiteTable.Builder basis = new SiteTable.Builder(2);
        basis.add(0, 0, 0, 0, 1, new double[2]);
        basis.add(even ? 0.25 : 0.2 * random.nextDouble(), 0.125, 0, 1, 1, new double[2]);
        List<Lattice.Vector> vectors = even
                ? List.of(new Lattice.Vector(0.5, 0, 0), new Lattice.Vector(0, 0.5, 0))
                : List.of(
                        new Lattice.Vector(0.4 + 0.2 * random.nextDouble(), 0.3 * random.nextGaussian(), 0),
                        new Lattice.Vector(0.2 * random.nextGaussian(), 0.5, 0));
        return LatticeFrame.of(
                new Lattice(
                        "random",
                        vectors,
                        basis.build(),
                        List.of(new Lattice.Bond(0, 1, List.of(0, 0, 0), List.of(1.0, 0.0))),
                        List.of(),
                        1),
                0,
                0,
                0);
    }

    private static double even(Random random) {
        return 0.25 * (random.nextInt(33) - 16);
    }

    private static Shape shape(Random random, int depth) {
        switch (random.nextInt(depth > 0 ? 6 : 3)) {
            case 0 -> {
                double x = even(random);
                double y = even(random);
                return new Shape.Box(new double[] {
                    x,
                    x + random.nextInt(5),
                    y,
                    y + 3 * random.nextDouble(),
                    Double.NEGATIVE_INFINITY,
                    Double.POSITIVE_INFINITY
                });
            }
            case 1 -> {
                double inner = random.nextBoolean() ? 0 : 0.5 * random.nextInt(4);
                return new Shape.Ring(List.of(even(random), even(random)), inner, inner + 0.25 * random.nextInt(9));
            }
            case 2 -> {
                List<Double> xs = new ArrayList<>();
                List<Double> ys = new ArrayList<>();
                for (int corner = 0; corner < 3 + random.nextInt(4); corner++) {
                    xs.add(even(random));
                    ys.add(even(random));
                }
                return new Shape.Polygon(xs, ys);
            }
            case 3 -> {
                return new Shape.Union(shape(random, depth - 1), shape(random, depth - 1));
            }
            case 4 -> {
                return new Shape.Difference(shape(random, depth - 1), shape(random, depth - 1));
            }
            default -> {
                return new Shape.Intersection(shape(random, depth - 1), shape(random, depth - 1));
            }
        }
    }
}
