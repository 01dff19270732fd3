package org.isthmus.runtime.device;

/**
 * A place in a user's file.
 *
 * @param file path as the user gave it, or empty for things that no file declares
 * @param line first line, counted from 1; 0 for a whole file
 * @param column first column, counted from 1; 0 for a whole file
 * @param offset first character, counted from 0
 * @param length number of characters
 */
public record SourceRef(String file, int line, int column, int offset, int length) {
    /** What no file declares. */
    public static final SourceRef NONE = new SourceRef("", 0, 0, 0, 0);

    /** A whole file. */
    public static SourceRef file(String file) {
        return new SourceRef(file, 0, 0, 0, 0);
    }

    @Override
    public String toString() {
        return line == 0 ? file : file + ":" + line + ":" + column;
    }
}
