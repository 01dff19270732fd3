package org.isthmus.runtime.selfenergy;

/** A way to find the end of a lead. Safe for several threads. */
public interface SurfaceMethod {
    /**
     * Solves at an energy, real or above the real axis.
     *
     * @param real eV
     * @param imaginary eV, not negative; 0 means the retarded limit
     */
    Surface solve(double real, double imaginary);

    /** Name and reason, for the plan. */
    String describe();
}
