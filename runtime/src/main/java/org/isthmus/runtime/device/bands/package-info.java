/**
 * Bands of the infinite lattice.
 *
 * <p>Start at {@link org.isthmus.runtime.device.bands.LatticeBands}.
 *
 * <p>Invariant: depends on the lattice alone, not on a body, a potential or a field.
 */
package org.isthmus.runtime.device.bands;
