package org.isthmus.language.formatting;

import java.util.ArrayDeque;
import java.util.Deque;
import java.util.Set;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.xtext.GrammarUtil;
import org.eclipse.xtext.Keyword;
import org.eclipse.xtext.formatting2.AbstractJavaFormatter;
import org.eclipse.xtext.formatting2.IFormattableDocument;
import org.eclipse.xtext.formatting2.IHiddenRegionFormatter;
import org.eclipse.xtext.formatting2.regionaccess.IHiddenRegion;
import org.eclipse.xtext.formatting2.regionaccess.ISemanticRegion;
import org.eclipse.xtext.xbase.lib.Procedures.Procedure1;
import org.isthmus.language.isthmus.Constant;
import org.isthmus.language.isthmus.Import;
import org.isthmus.language.isthmus.QuantityLiteral;
import org.isthmus.language.isthmus.SourceFile;
import org.isthmus.language.isthmus.UnaryExpression;

/**
 * Lays a file out token by token: what stands between two neighbours follows from the two alone and from the block they
 * stand in, so a new statement needs no new rule.
 *
 * <p>A block written on one line stays on one line; every other block has a line per statement. One blank line between
 * statements is kept, more are not; a blank line sets off every declaration of a file that has a block.
 */
public class IsthmusFormatter extends AbstractJavaFormatter {
    private static final Set<String> TIGHT_OPERATORS = Set.of("*", "/", "^");
    private static final Set<String> GROUPING = Set.of("Primary", "AxisPoint");
    private static final Set<String> NOTHING_BEFORE = Set.of(",", ";", ")", "]");
    private static final Set<String> NOTHING_AFTER = Set.of("(", "[");

    private static final Procedure1<IHiddenRegionFormatter> NOTHING = IHiddenRegionFormatter::noSpace;
    private static final Procedure1<IHiddenRegionFormatter> SPACE = IHiddenRegionFormatter::oneSpace;
    private static final Procedure1<IHiddenRegionFormatter> LINE = f -> f.setNewLines(1, 1, 2);
    private static final Procedure1<IHiddenRegionFormatter> FIRST_LINE = f -> f.setNewLines(1, 1, 1);
    private static final Procedure1<IHiddenRegionFormatter> PARAGRAPH = f -> f.setNewLines(2, 2, 2);

    /** Lays out a file. */
    protected void format(SourceFile file, IFormattableDocument document) {
        Deque<Block> open = new ArrayDeque<>();
        ISemanticRegion left = null;
        for (ISemanticRegion right : textRegionExtensions.allSemanticRegions(file)) {
            if (left == null) {
                document.prepend(right, f -> f.setNewLines(0, 0, 0));
            } else {
                document.append(left, between(left, right, open, document));
            }
            left = right;
        }
        if (left != null) {
            document.append(left, f -> f.setNewLines(1, 1, 1));
        }
    }

    private Procedure1<IHiddenRegionFormatter> between(
            ISemanticRegion left, ISemanticRegion right, Deque<Block> open, IFormattableDocument document) {
        if (isKeyword(left, "{")) {
            Block block = Block.from(left);
            open.push(block);
            if (isKeyword(right, "}")) {
                open.pop();
                return SPACE;
            }
            if (block.severalLines()) {
                document.interior(left, block.close(), IHiddenRegionFormatter::indent);
            }
            return block.severalLines() ? FIRST_LINE : SPACE;
        }
        if (isKeyword(right, "}")) {
            Block block = open.pop();
            return block.severalLines() ? FIRST_LINE : SPACE;
        }
        if (isKeyword(left, "}") || isKeyword(left, ";")) {
            if (open.isEmpty()) {
                return betweenDeclarations(left, right);
            }
            return open.peek().severalLines() ? LINE : SPACE;
        }
        return withinStatement(left, right);
    }

    /** Imports and constants may stand close; everything with a block is set off. */
    private static Procedure1<IHiddenRegionFormatter> betweenDeclarations(ISemanticRegion left, ISemanticRegion right) {
        EObject before = left.getSemanticElement();
        EObject after = right.getSemanticElement();
        boolean alike = isKeyword(left, ";")
                && (before instanceof Import && after instanceof Import
                        || before instanceof Constant && after instanceof Constant);
        return alike ? LINE : PARAGRAPH;
    }

    private static Procedure1<IHiddenRegionFormatter> withinStatement(ISemanticRegion left, ISemanticRegion right) {
        String before = left.getText();
        String after = right.getText();
        if (isKeyword(right) && NOTHING_BEFORE.contains(after) || isKeyword(left) && NOTHING_AFTER.contains(before)) {
            return NOTHING;
        }
        if (isKeyword(right, "(") && opensArguments(right)) {
            return NOTHING;
        }
        if (left.getSemanticElement() instanceof QuantityLiteral quantity
                && left.getSemanticElement() == right.getSemanticElement()) {
            boolean tight = before.equals("^") || after.equals("^") || "i".equals(quantity.getUnit());
            return tight ? NOTHING : SPACE;
        }
        if (left.getSemanticElement() instanceof UnaryExpression && !before.equals("not")) {
            return NOTHING;
        }
        if (isKeyword(left) && TIGHT_OPERATORS.contains(before)
                || isKeyword(right) && TIGHT_OPERATORS.contains(after)) {
            return NOTHING;
        }
        return SPACE;
    }

    /** By rule, since the parenthesis of a grouping belongs to whatever object comes first inside it. */
    private static boolean opensArguments(ISemanticRegion parenthesis) {
        return !GROUPING.contains(
                GrammarUtil.containingRule(parenthesis.getGrammarElement()).getName());
    }

    private static boolean isKeyword(ISemanticRegion region) {
        return region.getGrammarElement() instanceof Keyword;
    }

    private static boolean isKeyword(ISemanticRegion region, String text) {
        return region.getGrammarElement() instanceof Keyword && region.getText().equals(text);
    }

    /** A pair of braces. */
    private record Block(ISemanticRegion close, boolean severalLines) {
        static Block from(ISemanticRegion openBrace) {
            int depth = 0;
            boolean severalLines = false;
            ISemanticRegion region = openBrace;
            while (region != null) {
                if (isKeyword(region, "{")) {
                    depth++;
                } else if (isKeyword(region, "}") && --depth == 0) {
                    return new Block(region, severalLines);
                }
                IHiddenRegion gap = region.getNextHiddenRegion();
                severalLines |= gap.isMultiline();
                region = region.getNextSemanticRegion();
            }
            return new Block(openBrace, true);
        }
    }
}
