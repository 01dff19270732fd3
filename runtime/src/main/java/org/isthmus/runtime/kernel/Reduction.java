package org.isthmus.runtime.kernel;

/** A square matrix A after its first unknowns (1) were eliminated from the others (2). */
public interface Reduction {
    /** The Schur complement A₂₂ − A₂₁A₁₁⁻¹A₁₂. */
    Dense complement();

    /** Adds the Schur complement into the rows and columns of another matrix with these numbers. */
    void addComplement(Dense to, int[] places);

    /** A₁₁⁻¹A₁₂. */
    Dense right();

    /** A₂₁A₁₁⁻¹. */
    Dense left();

    /** A₁₁⁻¹. */
    Dense inverse();

    /**
     * Largest part of an element of A₁₁⁻¹A₁₂; rounding errors of A₁₁ enter the complement multiplied by its square at most
     * (first-order perturbation of the Schur complement). Not a number where A₁₁ is singular to rounding.
     */
    double amplification();
}
