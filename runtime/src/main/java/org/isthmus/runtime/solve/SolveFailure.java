package org.isthmus.runtime.solve;

/** A solve that did not reach a trustworthy answer. The message is one sentence for the user. */
public final class SolveFailure extends RuntimeException {
    private static final long serialVersionUID = 1;

    public SolveFailure(String message) {
        super(message);
    }

    public SolveFailure(String message, Throwable cause) {
        super(message, cause);
    }
}
