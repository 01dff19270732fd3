package org.isthmus.runtime.selfenergy;

import org.isthmus.runtime.kernel.ComplexMatrix;

/**
 * The end of a lead at one energy.
 *
 * @param green retarded Green's function of the first cell, on the orbitals asked for, 1/eV
 * @param openModes waves that propagate outward; at a complex energy 0
 * @param residual how well {@code green} fulfils Dyson's equation g = (M − τ g τ†)⁻¹, relative
 * @param beside how far from the energy asked for it was taken, eV: not 0 only where it is not defined there
 */
public record Surface(ComplexMatrix green, int openModes, double residual, double beside) {
    /** An end at the very energy. */
    public Surface(ComplexMatrix green, int openModes, double residual) {
        this(green, openModes, residual, 0);
    }
}
