package org.isthmus.runtime.solve;

import java.util.List;

/**
 * Solves one operating point at any energy. Safe for several threads; the answer depends on nothing but the arguments,
 * to the last bit.
 */
public interface Solver extends AutoCloseable {
    OperatingPoint operatingPoint();

    /**
     * Solves at a real energy.
     *
     * @param energy eV
     * @throws SolveFailure where no trustworthy answer was reached; its message names the energy and what was reached
     */
    EnergySolution solve(double energy, Needs needs);

    /**
     * Diagonal of G(z) S summed over each site's orbitals, for contour integrals of the density: Im z > 0.
     *
     * @return interleaved real and imaginary parts, 1/eV, length 2·sites
     */
    double[] siteGreens(double real, double imaginary);

    /** Energies at which the number of open modes of some lead changes, ascending, eV: break points of integrals. */
    List<Double> modeOpenings();

    /** Lowest and highest energy at which H has states, a bound, eV. */
    double[] spectrumBounds();

    @Override
    void close();
}
