/**
 * What is measured on a device: observables from Green's functions, at every point of a measurement's axes.
 *
 * <p>Start at {@link org.isthmus.runtime.observable.MeasurementRunner}; {@link org.isthmus.runtime.observable.Observables}
 * lists what it can compute.
 *
 * <p>Invariant: equal input gives equal values, bit for bit, whatever the number of threads: points are shared out, sums
 * are formed in a fixed order.
 */
package org.isthmus.runtime.observable;
