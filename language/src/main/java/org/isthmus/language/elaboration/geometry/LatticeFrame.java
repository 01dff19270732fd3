package org.isthmus.language.elaboration.geometry;

import java.util.List;
import org.isthmus.runtime.device.Lattice;

/**
 * A lattice laid into space: positions of its sites by cell numbers, and the dual vectors that give the numbers back.
 *
 * <p>A lattice of one or two vectors is completed to three by unit vectors at right angles to them, along which the cell
 * number is always zero. Lengths in nm.
 */
public final class LatticeFrame {
    /** Borders of a body count as inside within this fraction of the shortest bond (LANGUAGE, body). */
    public static final double BORDER = 1e-6;

    /** Vectors are dependent where the volume they span is below this fraction of the product of their lengths. */
    private static final double DEPENDENT = 1e-9;

    private final int dimension;
    private final double[][] vectors;
    private final double[][] duals;
    private final double[][] basis;
    private final double[] origin;
    private final BondList bonds;
    private final double shortestBond;

    private LatticeFrame(Lattice lattice, double[] origin) {
        dimension = lattice.vectors().size();
        vectors = completed(lattice.vectors());
        duals = duals(vectors);
        basis = new double[lattice.basis().count()][];
        for (int b = 0; b < basis.length; b++) {
            basis[b] = new double[] {
                lattice.basis().x(b), lattice.basis().y(b), lattice.basis().z(b)
            };
        }
        this.origin = origin.clone();
        bonds = new BondList(lattice.bonds());
        shortestBond = findShortestBond();
    }

    /**
     * Lays a lattice out.
     *
     * @param origin where the zero cell is, three components
     * @throws IllegalArgumentException where the vectors are dependent
     */
    public static LatticeFrame of(Lattice lattice, double... origin) {
        if (!independent(lattice.vectors())) {
            throw new IllegalArgumentException("the vectors of lattice '" + lattice.name() + "' are dependent");
        }
        return new LatticeFrame(lattice, origin);
    }

    /** True where the vectors span a line, an area or a volume. */
    public static boolean independent(List<Lattice.Vector> given) {
        double[][] v =
                given.stream().map(a -> new double[] {a.x(), a.y(), a.z()}).toArray(double[][]::new);
        double product = 1;
        for (double[] a : v) {
            product *= Vectors.length(a);
        }
        double size =
                switch (v.length) {
                    case 1 -> product;
                    case 2 -> Vectors.length(Vectors.cross(v[0], v[1]));
                    case 3 -> Math.abs(Vectors.dot(v[0], Vectors.cross(v[1], v[2])));
                    default -> 0;
                };
        return product > 0 && size > DEPENDENT * product;
    }

    private static double[][] completed(List<Lattice.Vector> given) {
        double[][] v = new double[3][];
        for (int i = 0; i < given.size(); i++) {
            v[i] = new double[] {
                given.get(i).x(), given.get(i).y(), given.get(i).z()
            };
        }
        if (v[1] == null) {
            int least = 0;
            for (int axis = 1; axis < 3; axis++) {
                if (Math.abs(v[0][axis]) < Math.abs(v[0][least])) {
                    least = axis;
                }
            }
            double[] unit = new double[3];
            unit[least] = 1;
            v[1] = Vectors.unit(Vectors.cross(v[0], unit));
        }
        if (v[2] == null) {
            v[2] = Vectors.unit(Vectors.cross(v[0], v[1]));
        }
        return v;
    }

    private static double[][] duals(double[][] v) {
        double volume = Vectors.dot(v[0], Vectors.cross(v[1], v[2]));
        double[][] g = {Vectors.cross(v[1], v[2]), Vectors.cross(v[2], v[0]), Vectors.cross(v[0], v[1])};
        for (double[] row : g) {
            for (int axis = 0; axis < 3; axis++) {
                row[axis] /= volume;
            }
        }
        return g;
    }

    private double findShortestBond() {
        double shortest = Double.POSITIVE_INFINITY;
        for (int bond = 0; bond < bonds.count(); bond++) {
            double length = Vectors.length(displacement(bonds, bond));
            if (length > 0) {
                shortest = Math.min(shortest, length);
            }
        }
        if (Double.isInfinite(shortest)) {
            for (int i = 0; i < dimension; i++) {
                shortest = Math.min(shortest, Vectors.length(vectors[i]));
            }
        }
        return shortest;
    }

    /** Number of lattice vectors, 1 to 3. */
    public int dimension() {
        return dimension;
    }

    public int basisCount() {
        return basis.length;
    }

    /** The lattice's hoppings. */
    public BondList bonds() {
        return bonds;
    }

    /** Length of the shortest bond, nm; of the shortest vector where there is no bond. */
    public double shortestBond() {
        return shortestBond;
    }

    /** Distance within which a position counts as on a border, nm. */
    public double tolerance() {
        return BORDER * shortestBond;
    }

    /** Component of a lattice vector, or of the unit vectors that complete the frame. */
    double vector(int index, int axis) {
        return vectors[index][axis];
    }

    double[] dual(int index) {
        return duals[index];
    }

    double basis(int site, int axis) {
        return basis[site][axis];
    }

    /** Coordinate of the zero cell, nm. */
    public double origin(int axis) {
        return origin[axis];
    }

    /** Coordinate of a site, nm. */
    public double coordinate(int n1, int n2, int n3, int basisSite, int axis) {
        double along = n1 * vectors[0][axis];
        if (dimension > 1) {
            along += n2 * vectors[1][axis];
        }
        if (dimension > 2) {
            along += n3 * vectors[2][axis];
        }
        return origin[axis] + basis[basisSite][axis] + along;
    }

    /** From the first to the second site of a bond, nm. */
    public double[] displacement(BondList list, int bond) {
        double[] d = new double[3];
        for (int axis = 0; axis < 3; axis++) {
            d[axis] = coordinate(list.n1(bond), list.n2(bond), list.n3(bond), list.to(bond), axis)
                    - coordinate(0, 0, 0, list.from(bond), axis);
        }
        return d;
    }

    /** A lattice vector as a displacement, nm. */
    public double[] translation(int[] cells) {
        double[] d = new double[3];
        for (int axis = 0; axis < 3; axis++) {
            for (int i = 0; i < dimension; i++) {
                d[axis] += cells[i] * vectors[i][axis];
            }
        }
        return d;
    }

    /** The whole numbers of lattice vectors that make a displacement, within the border tolerance; null where none do. */
    public int[] cells(double[] displacement) {
        int[] cells = new int[3];
        for (int i = 0; i < dimension; i++) {
            double number = Math.rint(Vectors.dot(duals[i], displacement));
            if (!(Math.abs(number) < 1e6)) {
                return null;
            }
            cells[i] = (int) number;
        }
        double[] made = translation(cells);
        for (int axis = 0; axis < 3; axis++) {
            made[axis] -= displacement[axis];
        }
        return Vectors.length(made) <= tolerance() ? cells : null;
    }
}
