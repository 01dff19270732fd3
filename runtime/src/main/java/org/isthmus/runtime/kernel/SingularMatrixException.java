package org.isthmus.runtime.kernel;

/** A matrix that has no inverse, exactly. */
public final class SingularMatrixException extends RuntimeException {
    private static final long serialVersionUID = 1;

    public SingularMatrixException(String message) {
        super(message);
    }
}
