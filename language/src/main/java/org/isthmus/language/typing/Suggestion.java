package org.isthmus.language.typing;

import java.util.Comparator;
import java.util.Locale;
import java.util.Optional;
import java.util.stream.Stream;

/** The known name that a misspelled one was probably meant to be. */
public final class Suggestion {
    private Suggestion() {}

    /** {@code  (did you mean 'height'?)}, or nothing where no name is near. */
    public static String phrase(String wrong, Stream<String> known) {
        return nearest(wrong, known)
                .map(name -> " (did you mean '" + name + "'?)")
                .orElse("");
    }

    /** The nearest of the known names, where it is near enough to be meant. */
    public static Optional<String> nearest(String wrong, Stream<String> known) {
        int limit = Math.max(1, wrong.length() / 3);
        return known.distinct()
                .filter(name -> !name.equals(wrong) && Math.abs(name.length() - wrong.length()) <= limit)
                .map(name ->
                        new Candidate(name, distance(wrong.toLowerCase(Locale.ROOT), name.toLowerCase(Locale.ROOT))))
                .filter(candidate -> candidate.distance <= limit)
                .min(Comparator.comparingInt(Candidate::distance).thenComparing(Candidate::name))
                .map(Candidate::name);
    }

    private record Candidate(String name, int distance) {}

    /** Insertions, deletions, replacements and exchanges of neighbours (restricted Damerau–Levenshtein). */
    private static int distance(String a, String b) {
        int[][] d = new int[a.length() + 1][b.length() + 1];
        for (int i = 0; i <= a.length(); i++) {
            for (int j = 0; j <= b.length(); j++) {
                if (i == 0 || j == 0) {
                    d[i][j] = i + j;
                    continue;
                }
                int cost = a.charAt(i - 1) == b.charAt(j - 1) ? 0 : 1;
                d[i][j] = Math.min(Math.min(d[i - 1][j] + 1, d[i][j - 1] + 1), d[i - 1][j - 1] + cost);
                if (i > 1 && j > 1 && a.charAt(i - 1) == b.charAt(j - 2) && a.charAt(i - 2) == b.charAt(j - 1)) {
                    d[i][j] = Math.min(d[i][j], d[i - 2][j - 2] + 1);
                }
            }
        }
        return d[a.length()][b.length()];
    }
}
