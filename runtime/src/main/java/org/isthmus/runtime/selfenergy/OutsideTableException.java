package org.isthmus.runtime.selfenergy;

/** A tabulated self-energy asked for outside its table; the message is one sentence. */
public final class OutsideTableException extends RuntimeException {
    private static final long serialVersionUID = 1;

    OutsideTableException(String message) {
        super(message);
    }
}
