package org.isthmus.language.evaluation;

import java.util.List;

/** A region of space. Borders belong to it, within a tolerance. */
public sealed interface Shape {
    /** True inside and on the border. */
    boolean contains(double x, double y, double z, double tolerance);

    /** Least and greatest x, y, z, in this order; infinite where there is no end. */
    double[] bounds();

    /** A box; infinite ends where an axis has no range. */
    record Box(double[] ends) implements Shape {
        @Override
        public boolean contains(double x, double y, double z, double tolerance) {
            return ends[0] - tolerance <= x
                    && x <= ends[1] + tolerance
                    && ends[2] - tolerance <= y
                    && y <= ends[3] + tolerance
                    && ends[4] - tolerance <= z
                    && z <= ends[5] + tolerance;
        }

        @Override
        public double[] bounds() {
            return ends.clone();
        }
    }

    /**
     * What lies between two radii about a centre: in the plane for a centre of two components, without end along z; in
     * space for three.
     */
    record Ring(List<Double> centre, double inner, double outer) implements Shape {
        public Ring {
            centre = List.copyOf(centre);
        }

        @Override
        public boolean contains(double x, double y, double z, double tolerance) {
            double dx = x - centre.get(0);
            double dy = y - centre.get(1);
            double dz = centre.size() > 2 ? z - centre.get(2) : 0;
            double distance = Math.sqrt(dx * dx + dy * dy + dz * dz);
            return inner - tolerance <= distance && distance <= outer + tolerance;
        }

        @Override
        public double[] bounds() {
            boolean space = centre.size() > 2;
            return new double[] {
                centre.get(0) - outer,
                centre.get(0) + outer,
                centre.get(1) - outer,
                centre.get(1) + outer,
                space ? centre.get(2) - outer : Double.NEGATIVE_INFINITY,
                space ? centre.get(2) + outer : Double.POSITIVE_INFINITY
            };
        }
    }

    /** A polygon in the plane, without end along z; where its border crosses itself, the even–odd rule holds. */
    record Polygon(List<Double> xs, List<Double> ys) implements Shape {
        public Polygon {
            xs = List.copyOf(xs);
            ys = List.copyOf(ys);
        }

        @Override
        public boolean contains(double x, double y, double z, double tolerance) {
            boolean inside = false;
            for (int i = 0, j = xs.size() - 1; i < xs.size(); j = i++) {
                if (distanceToEdge(x, y, j, i) <= tolerance) {
                    return true;
                }
                boolean crosses = ys.get(i) > y != ys.get(j) > y
                        && x < (xs.get(j) - xs.get(i)) * (y - ys.get(i)) / (ys.get(j) - ys.get(i)) + xs.get(i);
                inside ^= crosses;
            }
            return inside;
        }

        private double distanceToEdge(double x, double y, int from, int to) {
            double ex = xs.get(to) - xs.get(from);
            double ey = ys.get(to) - ys.get(from);
            double length2 = ex * ex + ey * ey;
            double along = length2 == 0
                    ? 0
                    : Math.max(0, Math.min(1, ((x - xs.get(from)) * ex + (y - ys.get(from)) * ey) / length2));
            return Math.hypot(x - xs.get(from) - along * ex, y - ys.get(from) - along * ey);
        }

        @Override
        public double[] bounds() {
            return new double[] {
                xs.stream().mapToDouble(v -> v).min().orElse(0),
                xs.stream().mapToDouble(v -> v).max().orElse(0),
                ys.stream().mapToDouble(v -> v).min().orElse(0),
                ys.stream().mapToDouble(v -> v).max().orElse(0),
                Double.NEGATIVE_INFINITY,
                Double.POSITIVE_INFINITY
            };
        }
    }

    /** In either. */
    record Union(Shape left, Shape right) implements Shape {
        @Override
        public boolean contains(double x, double y, double z, double tolerance) {
            return left.contains(x, y, z, tolerance) || right.contains(x, y, z, tolerance);
        }

        @Override
        public double[] bounds() {
            return merge(left.bounds(), right.bounds(), true);
        }
    }

    /** In the first and not in the second, whose border is its own. */
    record Difference(Shape left, Shape right) implements Shape {
        @Override
        public boolean contains(double x, double y, double z, double tolerance) {
            return left.contains(x, y, z, tolerance) && !right.contains(x, y, z, tolerance);
        }

        @Override
        public double[] bounds() {
            return left.bounds();
        }
    }

    /** In both. */
    record Intersection(Shape left, Shape right) implements Shape {
        @Override
        public boolean contains(double x, double y, double z, double tolerance) {
            return left.contains(x, y, z, tolerance) && right.contains(x, y, z, tolerance);
        }

        @Override
        public double[] bounds() {
            return merge(left.bounds(), right.bounds(), false);
        }
    }

    private static double[] merge(double[] a, double[] b, boolean outer) {
        double[] merged = new double[6];
        for (int k = 0; k < 6; k++) {
            merged[k] = (k % 2 == 0) == outer ? Math.min(a[k], b[k]) : Math.max(a[k], b[k]);
        }
        return merged;
    }
}
