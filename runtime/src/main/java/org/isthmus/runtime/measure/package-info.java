/**
 * Executes measurements: every point of the axes on its device, observables, averages, expectations.
 *
 * <p>Start at {@link org.isthmus.runtime.measure.MeasurementRunner}.
 *
 * <p>Invariant: the result depends on the measurement and the devices alone, not on threads or on the order in which points
 * are done.
 */
package org.isthmus.runtime.measure;
