package org.isthmus.language.ide.pipeline;

import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;

/**
 * A quick look at a text: what it declares and what words it uses, without a parse. It may only err towards more.
 *
 * @param namespace empty where the file names none
 * @param declared names of the declarations at file level that other files may use
 * @param words every identifier outside comments and strings
 */
record DeclaredNames(String namespace, Set<String> declared, Set<String> words) {
    private static final Set<String> KINDS = Set.of("let", "material", "lattice", "device");

    static DeclaredNames scan(String text) {
        Set<String> declared = new LinkedHashSet<>();
        Set<String> words = new LinkedHashSet<>();
        StringBuilder namespace = new StringBuilder();
        Skipped comments = new Skipped(text);
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
                String word = text.substring(i, end);
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
            int skipped = comments.end(i);
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
        return sees(other) && other.declared.stream().anyMatch(name -> words.contains(name) && !isOwn(name, other));
    }

    /** A name without a namespace is seen from everywhere, others where an import or a qualified name spells theirs. */
    private boolean sees(DeclaredNames other) {
        return other.namespace.isEmpty()
                || other.namespace.equals(namespace)
                || words.containsAll(List.of(other.namespace.split("\\.")));
    }

    /** A file's own declaration comes before another's of the same full name. */
    private boolean isOwn(String name, DeclaredNames other) {
        return declared.contains(name) && namespace.equals(other.namespace);
    }

    static boolean startsWord(char c) {
        return c >= 'a' && c <= 'z' || c >= 'A' && c <= 'Z' || c == '_';
    }

    static boolean continuesWord(char c) {
        return startsWord(c) || c >= '0' && c <= '9';
    }
}
