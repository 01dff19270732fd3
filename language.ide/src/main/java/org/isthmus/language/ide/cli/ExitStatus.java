package org.isthmus.language.ide.cli;

/** What a command's end tells the shell. */
final class ExitStatus {
    static final int FINE = 0;
    /** A finding of severity error, a broken expectation. */
    static final int FINDINGS = 1;

    static final int USAGE = 2;
    /** The run itself failed. */
    static final int FAILED = 3;

    /** Stopped by Ctrl-C: 128 and the number of the signal, as shells have it. */
    static final int INTERRUPTED = 130;

    private ExitStatus() {}
}
