/**
 * Dense complex linear algebra, behind one interface.
 *
 * <p>Start at {@link org.isthmus.runtime.kernel.ComplexBackend}; {@code selection.Backends} chooses one.
 *
 * <p>Invariant: nothing here knows physics, decides by size or keeps state between calls; equal arguments give equal bits.
 */
package org.isthmus.runtime.kernel;
