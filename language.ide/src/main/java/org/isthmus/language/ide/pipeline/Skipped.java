package org.isthmus.language.ide.pipeline;

/** Comments and strings of a text, for looks at it that come before the parser; as the lexer sees them. */
final class Skipped {
    /** A longer string is looked into, so that the time stays linear however a text tries to prevent it. */
    private static final int LONGEST_STRING = 1000;

    private final String text;
    private final int lastCommentEnd;

    Skipped(String text) {
        this.text = text;
        lastCommentEnd = text.lastIndexOf("*/");
    }

    /** Where the comment or string that starts here ends; the start itself where none does. */
    int end(int start) {
        char c = text.charAt(start);
        if (c == '"') {
            return endOfString(start);
        }
        char next = c == '/' && start + 1 < text.length() ? text.charAt(start + 1) : 0;
        if (next == '*') {
            // one that never ends is no comment to the lexer either
            return start + 2 > lastCommentEnd ? start : text.indexOf("*/", start + 2) + 2;
        }
        return next == '/' ? endOfLine(start) : start;
    }

    private int endOfLine(int start) {
        int i = start;
        while (i < text.length() && text.charAt(i) != '\n' && text.charAt(i) != '\r') {
            i++;
        }
        return i;
    }

    private int endOfString(int start) {
        int last = Math.min(text.length(), start + LONGEST_STRING);
        for (int i = start + 1; i < last; i++) {
            char c = text.charAt(i);
            if (c == '\\') {
                i++;
            } else if (c == '"') {
                return i + 1;
            } else if (c == '\n' || c == '\r') {
                return start;
            }
        }
        return start;
    }
}
