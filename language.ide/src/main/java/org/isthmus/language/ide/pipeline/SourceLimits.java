package org.isthmus.language.ide.pipeline;

import java.util.ArrayDeque;
import java.util.Deque;
import java.util.Optional;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.Severity;
import org.isthmus.runtime.device.SourceRef;

/**
 * Bounds on a text that is worth parsing, far beyond what a person or a generator of device files writes. A parser and
 * whatever walks its tree recurse as deep as expressions nest, so hostile text has to be told apart before.
 */
final class SourceLimits {
    /** Bytes of a file. */
    static final long LARGEST_FILE = 1L << 18;

    /** Brackets of any kind inside each other. */
    static final int DEEPEST_NESTING = 200;

    /** Operators in one expression, those outside the brackets around it included. */
    static final int LONGEST_EXPRESSION = 1000;

    private final String shown;
    private final String text;
    private final Deque<Integer> operatorsOutside = new ArrayDeque<>();
    private int operators;
    private int outside;

    private SourceLimits(String shown, String text) {
        this.shown = shown;
        this.text = text;
    }

    /** The finding on a file that is too large to be read at all. */
    static Optional<Finding> ofSize(SourceFile file, long bytes) {
        return bytes <= LARGEST_FILE
                ? Optional.empty()
                : Optional.of(new Finding(
                        IssueCode.UNREADABLE_TEXT.id(),
                        Severity.ERROR,
                        "The file has " + bytes + " bytes, a device file may have " + LARGEST_FILE
                                + "; tables of numbers belong into CSV files.",
                        new SourceRef(file.shown(), 1, 1, 0, 0)));
    }

    /** The first finding that keeps a text from being parsed. */
    static Optional<Finding> ofText(SourceFile file, String text) {
        return new SourceLimits(file.shown(), text).scan();
    }

    private Optional<Finding> scan() {
        Skipped comments = new Skipped(text);
        boolean spaced = true;
        for (int i = 0; i < text.length(); i++) {
            char c = text.charAt(i);
            int skipped = comments.end(i);
            if (skipped > i) {
                i = skipped - 1;
                spaced = true;
                continue;
            }
            switch (c) {
                case '(', '[', '{' -> {
                    operatorsOutside.push(operators);
                    outside += operators;
                    operators = 0;
                    if (operatorsOutside.size() > DEEPEST_NESTING) {
                        return finding(
                                "Brackets stand " + operatorsOutside.size() + " deep here, at most " + DEEPEST_NESTING
                                        + " are read; name inner parts with 'let'.",
                                i);
                    }
                }
                case ')', ']', '}' -> {
                    operators = operatorsOutside.isEmpty() ? 0 : operatorsOutside.pop();
                    outside -= operators;
                }
                case ',', ';' -> operators = 0;
                case '+', '-', '*', '/', '^', '=', '<', '>', '&', '!' -> operators++;
                default -> {
                    // words that are operators
                    if (spaced && (startsWord(i, "or") || startsWord(i, "and") || startsWord(i, "not"))) {
                        operators++;
                    }
                }
            }
            spaced = !DeclaredNames.continuesWord(c);
            if (outside + operators > LONGEST_EXPRESSION) {
                return finding(
                        "This expression has more than " + LONGEST_EXPRESSION
                                + " operators; name parts of it with 'let', or use a table.",
                        i);
            }
        }
        return Optional.empty();
    }

    private boolean startsWord(int start, String word) {
        int end = start + word.length();
        return end <= text.length()
                && text.startsWith(word, start)
                && (end == text.length() || !DeclaredNames.continuesWord(text.charAt(end)));
    }

    private Optional<Finding> finding(String message, int offset) {
        int line = 1;
        int start = 0;
        for (int i = 0; i < offset; i++) {
            if (text.charAt(i) == '\n') {
                line++;
                start = i + 1;
            }
        }
        SourceRef place = new SourceRef(shown, line, offset - start + 1, offset, 1);
        return Optional.of(new Finding(IssueCode.UNREADABLE_TEXT.id(), Severity.ERROR, message, place));
    }
}
