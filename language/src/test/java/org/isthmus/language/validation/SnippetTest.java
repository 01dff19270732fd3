package org.isthmus.language.validation;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.google.inject.Injector;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.eclipse.emf.common.util.URI;
import org.eclipse.xtext.diagnostics.Severity;
import org.eclipse.xtext.resource.XtextResourceSet;
import org.eclipse.xtext.util.CancelIndicator;
import org.eclipse.xtext.validation.CheckMode;
import org.eclipse.xtext.validation.IResourceValidator;
import org.eclipse.xtext.validation.Issue;
import org.isthmus.language.IsthmusStandaloneSetup;
import org.isthmus.language.findings.IssueCode;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/**
 * Every code has a snippet that fires it and a twin that is silent. In the first, carets under a line mark what the finding
 * is about, with the code beside them; whatever is not marked must be silent, so that false alarms fail too. With
 * -Disthmus.snippets.write=true the marks are written anew, for a person to read the difference.
 */
class SnippetTest {
    private static final Path REFERENCE = Path.of("src/main/resources/org/isthmus/language/reference");
    private static final Injector INJECTOR = new IsthmusStandaloneSetup().createInjectorAndDoEMFRegistration();

    /** Told before parsing, by what reads files: tested there. */
    private static final Set<IssueCode> BEFORE_PARSING = Set.of(IssueCode.UNREADABLE_TEXT);

    @TempDir
    private Path folder;

    static Stream<String> codes() {
        return Stream.of(IssueCode.values())
                .filter(code -> !BEFORE_PARSING.contains(code))
                .map(IssueCode::id);
    }

    private List<Issue> issues(String name, String text) throws IOException {
        Path file = Files.writeString(folder.resolve(name + ".isth"), text);
        XtextResourceSet resources = INJECTOR.getInstance(XtextResourceSet.class);
        return INJECTOR.getInstance(IResourceValidator.class)
                .validate(
                        resources.getResource(URI.createFileURI(file.toString()), true),
                        CheckMode.ALL,
                        CancelIndicator.NullImpl);
    }

    private static boolean isMark(String line) {
        return line.matches("//\\s*\\^+ [a-z-]+");
    }

    @ParameterizedTest
    @MethodSource("codes")
    void theSnippetFiresWhereItIsMarked(String code) throws IOException {
        Path file = REFERENCE.resolve("fires").resolve(code + ".isth");
        String marked = Files.readString(file);
        String text = marked.lines().filter(l -> !isMark(l)).collect(Collectors.joining("\n", "", "\n"));
        List<Issue> issues = issues(code, text).stream()
                .filter(i -> i.getSeverity() != Severity.INFO || code.equals(i.getCode()))
                .toList();
        String found = marked(text, issues);
        if (Boolean.getBoolean("isthmus.snippets.write")) {
            Files.writeString(file, found);
        } else {
            assertEquals(marked, found, () -> messages(issues));
        }
        assertTrue(
                issues.stream().anyMatch(i -> code.equals(i.getCode())),
                () -> code + " does not fire: " + messages(issues));
    }

    private static String messages(List<Issue> issues) {
        return issues.stream().map(i -> i.getCode() + ": " + i.getMessage()).collect(Collectors.joining("\n"));
    }

    /** The text with its marks: carets under the part of the first line that an issue is about. */
    private static String marked(String text, List<Issue> issues) {
        List<String> lines = new ArrayList<>(text.lines().toList());
        StringBuilder result = new StringBuilder();
        for (int k = 0; k < lines.size(); k++) {
            result.append(lines.get(k)).append('\n');
            int line = k + 1;
            String source = lines.get(k);
            issues.stream()
                    .filter(i -> i.getLineNumber() == line)
                    .map(i -> mark(source, i))
                    .sorted()
                    .distinct()
                    .forEach(m -> result.append(m).append('\n'));
        }
        return result.toString();
    }

    private static String mark(String source, Issue issue) {
        int column = Math.max(issue.getColumn(), 3);
        int length = Math.max(1, Math.min(issue.getLength(), source.length() - issue.getColumn() + 1));
        if (issue.getColumn() < 3) {
            length = Math.max(1, length - (column - issue.getColumn()));
        }
        return "//" + " ".repeat(column - 3) + "^".repeat(length) + " " + issue.getCode();
    }

    @ParameterizedTest
    @MethodSource("codes")
    void theTwinIsSilent(String code) throws IOException {
        String text = Files.readString(REFERENCE.resolve("silent").resolve(code + ".isth"));
        List<Issue> issues = issues(code, text).stream()
                .filter(i -> i.getSeverity() != Severity.INFO)
                .toList();
        assertEquals(List.of(), issues, () -> messages(issues));
    }

    @Test
    void noSnippetIsOfAnotherTime() throws IOException {
        for (String kind : List.of("fires", "silent")) {
            try (Stream<Path> files = Files.list(REFERENCE.resolve(kind))) {
                Set<String> names = files.map(f -> f.getFileName().toString().replace(".isth", ""))
                        .collect(Collectors.toSet());
                assertEquals(codes().collect(Collectors.toSet()), names);
            }
        }
    }
}
