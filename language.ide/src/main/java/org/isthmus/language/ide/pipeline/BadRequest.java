package org.isthmus.language.ide.pipeline;

/** A request that the files cannot meet, such as a measurement that none of them has. The message is a sentence. */
public final class BadRequest extends Exception {
    private static final long serialVersionUID = 1;

    public BadRequest(String message) {
        super(message);
    }
}
