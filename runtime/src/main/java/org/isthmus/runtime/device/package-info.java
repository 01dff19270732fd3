/**
 * The device model: plain, immutable tables of sites, hoppings and leads, and the measurements asked of them.
 *
 * <p>Start at {@link org.isthmus.runtime.device.Device} and {@link org.isthmus.runtime.device.Measurement}. Units are
 * eV, nm, fs, K and elementary charges throughout.
 *
 * <p>Invariant: a {@code Device} is complete. Solving it needs no look at the text it came from; {@link
 * org.isthmus.runtime.device.SourceRef}s only say where a thing was written.
 */
package org.isthmus.runtime.device;
