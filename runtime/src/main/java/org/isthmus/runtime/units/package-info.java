/**
 * Dimensions, units and physical constants.
 *
 * <p>Start at {@link org.isthmus.runtime.units.Dimension} and {@link org.isthmus.runtime.units.Units}.
 *
 * <p>Invariant: every number inside the program is in the coherent system of eV, nm, fs, K and elementary charges;
 * units appear where a number comes in and where it leaves.
 */
package org.isthmus.runtime.units;
