/**
 * How a device will be solved: in which order its orbitals are eliminated, at what cost, and why so.
 *
 * <p>Start at {@link org.isthmus.runtime.plan.Planner}; the result is a {@link org.isthmus.runtime.plan.SolvePlan}.
 *
 * <p>Invariant: the planner decides, the executor obeys. A plan depends on the device's structure alone, not on energies
 * or voltages, and prints as stable text.
 */
package org.isthmus.runtime.plan;
