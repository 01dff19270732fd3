package org.isthmus.language.typing;

import java.util.Optional;
import org.isthmus.language.isthmus.BinaryExpression;
import org.isthmus.language.isthmus.Constant;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.QuantityLiteral;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.language.isthmus.UnaryExpression;

/** Plain numbers that are known from the text alone: exponents of quantities, where the unit of the result depends on it. */
final class StaticNumber {
    private static final int DEEPEST = 50;

    private StaticNumber() {}

    static Optional<Double> of(Expression expression) {
        return of(expression, 0);
    }

    private static Optional<Double> of(Expression expression, int depth) {
        if (depth > DEEPEST) {
            return Optional.empty();
        }
        if (expression instanceof QuantityLiteral literal && literal.getUnit() == null) {
            return Optional.of(Double.parseDouble(literal.getValue()));
        }
        if (expression instanceof UnaryExpression unary && !unary.getOperator().equals("not")) {
            return of(unary.getOperand(), depth + 1)
                    .map(v -> unary.getOperator().equals("-") ? -v : v);
        }
        if (expression instanceof Reference reference
                && !reference.isCall()
                && reference.getTarget() instanceof Constant constant) {
            return of(constant.getValue(), depth + 1);
        }
        if (expression instanceof BinaryExpression binary) {
            Optional<Double> left = of(binary.getLeft(), depth + 1);
            Optional<Double> right = of(binary.getRight(), depth + 1);
            if (left.isEmpty() || right.isEmpty()) {
                return Optional.empty();
            }
            return switch (binary.getOperator()) {
                case "+" -> Optional.of(left.get() + right.get());
                case "-" -> Optional.of(left.get() - right.get());
                case "*" -> Optional.of(left.get() * right.get());
                case "/" -> Optional.of(left.get() / right.get());
                default -> Optional.empty();
            };
        }
        return Optional.empty();
    }
}
