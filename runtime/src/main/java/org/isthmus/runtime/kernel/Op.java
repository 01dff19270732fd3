package org.isthmus.runtime.kernel;

/** How a factor of a product is taken. */
public enum Op {
    /** As it is. */
    NONE,
    /** Conjugate transpose. */
    ADJOINT,
    /** Transpose. */
    TRANSPOSE
}
