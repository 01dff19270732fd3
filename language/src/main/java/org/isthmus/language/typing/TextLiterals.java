package org.isthmus.language.typing;

import org.isthmus.language.isthmus.TextLiteral;

/** What stands between the quotes of a text. */
public final class TextLiterals {
    private TextLiterals() {}

    /** The text itself; the parser has taken the quotes away already. */
    public static String text(TextLiteral literal) {
        return literal.getValue();
    }
}
