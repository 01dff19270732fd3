package org.isthmus.language.messages;

import java.util.regex.Matcher;
import java.util.regex.Pattern;
import org.eclipse.xtext.nodemodel.SyntaxErrorMessage;
import org.eclipse.xtext.parser.antlr.SyntaxErrorMessageProvider;
import org.isthmus.language.findings.IssueCode;

/** Says in words what the parser did not expect. */
public class SyntaxMessages extends SyntaxErrorMessageProvider {
    private static final Pattern MISSING = Pattern.compile("missing (.+) at '(.*)'", Pattern.DOTALL);
    private static final Pattern MISMATCHED =
            Pattern.compile("(?:mismatched|extraneous) input '(.*)' expecting (.+)", Pattern.DOTALL);
    private static final Pattern NOT_VIABLE =
            Pattern.compile("(?:no viable alternative at|required .* at) input '(.*)'", Pattern.DOTALL);
    private static final Pattern NOT_CLOSED =
            Pattern.compile("mismatched character '.*' expecting (.+)", Pattern.DOTALL);
    private static final int LONGEST = 40;

    @Override
    public SyntaxErrorMessage getSyntaxErrorMessage(IParserErrorContext context) {
        return new SyntaxErrorMessage(sentence(context.getDefaultMessage()), IssueCode.SYNTAX.id());
    }

    static String sentence(String raw) {
        int control = raw.codePoints()
                .filter(c -> Character.isISOControl(c) && !Character.isWhitespace(c))
                .findFirst()
                .orElse(-1);
        if (control >= 0) {
            return String.format("The file holds a control character (U+%04X), which no text has; remove it.", control);
        }
        Matcher missing = MISSING.matcher(raw);
        if (missing.matches()) {
            return "Expected " + token(missing.group(1)) + " before " + found(missing.group(2)) + ".";
        }
        Matcher mismatched = MISMATCHED.matcher(raw);
        if (mismatched.matches()) {
            return "Expected " + token(mismatched.group(2)) + ", but found " + found(mismatched.group(1)) + ".";
        }
        Matcher notViable = NOT_VIABLE.matcher(raw);
        if (notViable.matches()) {
            return Character.toUpperCase(found(notViable.group(1)).charAt(0))
                    + found(notViable.group(1)).substring(1) + " does not fit here.";
        }
        Matcher notClosed = NOT_CLOSED.matcher(raw);
        if (notClosed.matches()) {
            return notClosed.group(1).contains("\"")
                    ? "This text has no closing quote on its line."
                    : "This comment is not closed; end it with '*/'.";
        }
        return "This cannot be read: " + raw + ".";
    }

    private static String token(String name) {
        return switch (name) {
            case "RULE_ID" -> "a name";
            case "RULE_NUMBER" -> "a number";
            case "RULE_STRING" -> "a text in quotes";
            case "EOF" -> "the end of the file";
            default -> name.startsWith("'") ? name : "'" + name + "'";
        };
    }

    private static String found(String text) {
        if (text.equals("<EOF>")) {
            return "the end of the file";
        }
        if (text.codePointCount(0, text.length()) == 1 && text.codePointAt(0) > 0x7E) {
            return String.format("the character '%s' (U+%04X)", text, text.codePointAt(0));
        }
        String printable = text.codePoints()
                .map(c -> Character.isISOControl(c) ? '\uFFFD' : c)
                .collect(StringBuilder::new, StringBuilder::appendCodePoint, StringBuilder::append)
                .toString();
        return "'" + (printable.length() > LONGEST ? printable.substring(0, LONGEST) + "…" : printable) + "'";
    }
}
