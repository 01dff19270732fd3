/**
 * The back end without native code: EJML's complex dense matrices, and the eigenproblems that EJML lacks.
 *
 * <p>Start at {@link org.isthmus.runtime.kernel.ejml.PureBackend}.
 *
 * <p>Invariant: no EJML type leaves this package.
 */
package org.isthmus.runtime.kernel.ejml;
