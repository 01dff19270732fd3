/**
 * Green's functions of a device at one energy: executes a plan and answers in physical terms.
 *
 * <p>Start at {@link org.isthmus.runtime.solve.EnergySolution}, which everything above is computed from.
 *
 * <p>Invariant: matrices and kernels do not leave this package; what leaves it are traces and site values.
 */
package org.isthmus.runtime.solve;
