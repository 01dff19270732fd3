package org.isthmus.runtime.selfenergy;

import org.isthmus.runtime.kernel.ComplexMatrix;

/**
 * The end of a lead at one energy.
 *
 * @param green retarded Green's function of the first cell, on the orbitals asked for, 1/eV
 * @param openModes waves that propagate outward; at a complex energy 0
 * @param residual how well {@code green} fulfils Dyson's equation g = (M − τ g τ†)⁻¹, relative
 */
public record Surface(ComplexMatrix green, int openModes, double residual) {}
