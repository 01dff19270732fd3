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
            if (Character.isJavaIdentifierStart(c)) {
                int end = i + 1;
                while (end < text.length() && Character.isJavaIdentifierPart(text.charAt(end))) {
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
            if (c == '/' && i + 1 < text.length() && (text.charAt(i + 1) == '/' || text.charAt(i + 1) == '*')) {
                i = endOfComment(text, i);
                continue;
            }
            if (c == '"') {
                i = endOfString(text, i);
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

    private static int endOfComment(CharSequence text, int start) {
        boolean line = text.charAt(start + 1) == '/';
        for (int i = start + 2; i < text.length(); i++) {
            if (line && text.charAt(i) == '\n') {
                return i;
            }
            if (!line && text.charAt(i) == '/' && text.charAt(i - 1) == '*' && i > start + 2) {
                return i + 1;
            }
        }
        return text.length();
    }

    private static int endOfString(CharSequence text, int start) {
        for (int i = start + 1; i < text.length(); i++) {
            char c = text.charAt(i);
            if (c == '\\') {
                i++;
            } else if (c == '"' || c == '\n') {
                return i + 1;
            }
        }
        return text.length();
    }
}
