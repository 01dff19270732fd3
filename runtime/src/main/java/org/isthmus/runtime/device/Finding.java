package org.isthmus.runtime.device;

/**
 * Something that a check or a run has to say to the user.
 *
 * @param code stable name of the rule, such as {@code dimension-mismatch}
 * @param text one sentence: what is wrong, by how much, what would mend it
 */
public record Finding(String code, Severity severity, String text, SourceRef place) {
    /** {@code file:line:column: error CODE: text}. */
    @Override
    public String toString() {
        return place + ": " + severity.word() + " " + code + ": " + text;
    }
}
