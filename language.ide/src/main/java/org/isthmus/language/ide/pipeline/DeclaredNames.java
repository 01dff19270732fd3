package org.isthmus.language.ide.pipeline;

import java.util.LinkedHashSet;
import java.util.Set;

/**
 * A quick look at a text: what it declares and what words it uses, without a parse. It may only err towards more.
 *
 * @param namespace empty where the file names none
 * @param declared names of the declarations at file level
 * @param words every identifier outside comments and strings
 */
record DeclaredNames(String namespace, Set<String> declared, Set<String> words) {
    private static final Set<String> KINDS = Set.of("let", "material", "lattice", "device", "measurement");

    static DeclaredNames scan(CharSequence text) {
        Set<String> declared = new LinkedHashSet<>();
        Set<String> words = new LinkedHashSet<>();
        StringBuilder namespace = new StringBuilder();
        boolean inNamespace = false;
        String before = "";
        int depth = 0;
        int i = 0;
        while (i < text.length()) {
            char c = text.charAt(i);
            if (startsWord(c)) {
                int end = i + 1;
                while (end < text.length() && continuesWord(text.charAt(end))) {
                    end++;
                }
                String word = text.subSequence(i, end).toString();
                if (inNamespace) {
                    namespace.append(word);
                } else if (depth == 0 && word.equals("namespace")) {
                    inNamespace = true;
                } else {
                    if (depth == 0 && KINDS.contains(before)) {
                        declared.add(word);
                    }
                    words.add(word);
                }
                before = word;
                i = end;
                continue;
            }
            int skipped = endOfCommentOrString(text, i);
            if (skipped > i) {
                i = skipped;
                continue;
            }
            if (c == '{') {
                depth++;
            } else if (c == '}') {
                depth--;
            } else if (c == ';') {
                inNamespace = false;
            } else if (c == '.' && inNamespace) {
                namespace.append(c);
            }
            if (!Character.isWhitespace(c)) {
                before = "";
            }
            i++;
        }
        return new DeclaredNames(namespace.toString(), declared, words);
    }

    /** True where a name that {@code other} declares may be meant by a word of this text. */
    boolean mayUse(DeclaredNames other) {
        for (String name : other.declared) {
            if (words.contains(name) && !(declared.contains(name) && namespace.equals(other.namespace))) {
                return true;
            }
        }
        return false;
    }

    /** Where the comment or string that starts here ends, or the start itself where none does. */
    static int endOfCommentOrString(CharSequence text, int start) {
        char c = text.charAt(start);
        if (c == '"') {
            return endOfString(text, start);
        }
        char next = c == '/' && start + 1 < text.length() ? text.charAt(start + 1) : 0;
        return next == '/' || next == '*' ? endOfComment(text, start) : start;
    }

    /** One that does not end is none to the lexer either. */
    private static int endOfComment(CharSequence text, int start) {
        boolean line = text.charAt(start + 1) == '/';
        for (int i = start + 2; i < text.length(); i++) {
            char c = text.charAt(i);
            if (line && (c == '\n' || c == '\r')) {
                return i;
            }
            if (!line && c == '/' && text.charAt(i - 1) == '*' && i > start + 2) {
                return i + 1;
            }
        }
        return line ? text.length() : start;
    }

    private static int endOfString(CharSequence text, int start) {
        for (int i = start + 1; i < text.length(); i++) {
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

    static boolean startsWord(char c) {
        return c >= 'a' && c <= 'z' || c >= 'A' && c <= 'Z' || c == '_';
    }

    static boolean continuesWord(char c) {
        return startsWord(c) || c >= '0' && c <= '9';
    }
}
