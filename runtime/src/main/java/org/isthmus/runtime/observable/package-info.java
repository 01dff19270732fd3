/**
 * What can be recorded, computed from solves at single energies.
 *
 * <p>Start at {@link org.isthmus.runtime.observable.Observable} and {@link org.isthmus.runtime.observable.Bench}. A
 * current is positive where it enters the device.
 *
 * <p>Invariant: an observable sees a device only through {@code EnergySolution}s; sums run in a fixed order.
 */
package org.isthmus.runtime.observable;
