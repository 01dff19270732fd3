package org.isthmus.runtime.selfenergy;

import java.util.List;
import org.isthmus.runtime.kernel.ComplexMatrix;

/** A lead as the body feels it. Safe for several threads. */
public interface Contact {
    /** The orbitals of the body that it touches, ascending; rows and columns of its Σ. */
    int[] orbitals();

    /**
     * Σ at an energy, real or above the real axis.
     *
     * @param real eV, before the lead's bands are shifted
     * @param imaginary eV, not negative; 0 means the retarded limit
     * @throws OutsideTableException where a tabulated Σ is not defined
     */
    SelfEnergy at(double real, double imaginary);

    /**
     * Σ on the orbitals of a contact.
     *
     * @param sigma eV
     * @param openModes waves that propagate in the lead; −1 where it has none to count
     * @param residual of the lead's own equation, relative
     * @param beside how far from the energy asked for it was taken, eV: not 0 only at the very edge of a band
     */
    record SelfEnergy(ComplexMatrix sigma, int openModes, double residual, double beside) {}

    /** Energies where the number of open modes changes, ascending, eV; empty for a lead without bands. */
    List<Double> modeOpenings();

    /** Bounds of the lead's bands, eV; empty for a lead without bands. */
    double[] bandBounds();

    /** Method and reason, for the plan. */
    String describe();
}
