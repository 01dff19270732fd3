package org.isthmus.language.typing;

import org.isthmus.language.isthmus.TextLiteral;

/** What stands between the quotes of a text. */
public final class TextLiterals {
    private TextLiterals() {}

    /** The text itself: a backslash makes the next character mean itself. */
    public static String text(TextLiteral literal) {
        String quoted = literal.getValue();
        StringBuilder text = new StringBuilder();
        for (int i = 1; i < quoted.length() - 1; i++) {
            if (quoted.charAt(i) == '\\' && i + 1 < quoted.length() - 1) {
                i++;
            }
            text.append(quoted.charAt(i));
        }
        return text.toString();
    }
}
