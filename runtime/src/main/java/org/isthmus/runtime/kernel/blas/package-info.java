/**
 * The native back end: OpenBLAS and its LAPACK through JavaCPP, one BLAS thread per caller.
 *
 * <p>Start at {@link org.isthmus.runtime.kernel.blas.NativeBackend}.
 *
 * <p>Invariant: no native type leaves this package.
 */
package org.isthmus.runtime.kernel.blas;
