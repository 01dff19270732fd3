/**
 * Measurements as the solver takes them: axes as numbers, observables with their arguments, expectations as trees.
 *
 * <p>Start at {@link org.isthmus.language.measurement.MeasurementLowering}.
 *
 * <p>Invariant: only measurements without errors are lowered; what only values can show, such as an empty range, comes back
 * as findings.
 */
package org.isthmus.language.measurement;
