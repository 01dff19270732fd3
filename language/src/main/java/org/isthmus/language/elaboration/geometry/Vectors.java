package org.isthmus.language.elaboration.geometry;

/** Three components. */
final class Vectors {
    private Vectors() {}

    static double dot(double[] a, double[] b) {
        return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
    }

    static double[] cross(double[] a, double[] b) {
        return new double[] {a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]};
    }

    static double length(double[] a) {
        return Math.sqrt(dot(a, a));
    }

    static double[] unit(double[] a) {
        double length = length(a);
        return new double[] {a[0] / length, a[1] / length, a[2] / length};
    }
}
