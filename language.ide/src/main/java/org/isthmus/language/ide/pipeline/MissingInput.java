package org.isthmus.language.ide.pipeline;

/** What was asked for is not there or is no file of the language. The message is a sentence for the user. */
public final class MissingInput extends Exception {
    private static final long serialVersionUID = 1;

    public MissingInput(String message) {
        super(message);
    }
}
