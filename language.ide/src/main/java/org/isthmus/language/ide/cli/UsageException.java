package org.isthmus.language.ide.cli;

/** A request that cannot be met as it was put. The message is a sentence for the user. */
final class UsageException extends RuntimeException {
    private static final long serialVersionUID = 1;

    UsageException(String message) {
        super(message);
    }
}
