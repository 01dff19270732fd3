package org.isthmus.language.typing;

import java.util.Optional;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.BinaryExpression;
import org.isthmus.language.isthmus.ComparisonExpression;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.UnaryExpression;
import org.isthmus.language.typing.Type.Matrix;
import org.isthmus.language.typing.Type.Point;
import org.isthmus.language.typing.Type.Scalar;
import org.isthmus.language.typing.Type.Truth;
import org.isthmus.runtime.units.Dimension;

/** Types of operators: what each side must be, and what comes out. */
final class OperatorTyping {
    private final Inference inference;

    OperatorTyping(Inference inference) {
        this.inference = inference;
    }

    Type binary(BinaryExpression binary) {
        Type left = inference.typeOf(binary.getLeft());
        Type right = inference.typeOf(binary.getRight());
        if (left == Type.UNKNOWN || right == Type.UNKNOWN) {
            return Type.UNKNOWN;
        }
        return switch (binary.getOperator()) {
            case "and", "or" -> logical(binary, left, right);
            case "+", "-" -> sum(binary, left, right);
            case "*" -> product(binary, left, right);
            case "/" -> quotient(binary, left, right);
            case "^" -> power(binary, left, right);
            default ->
                left instanceof Type.Shape && right instanceof Type.Shape
                        ? left
                        : inference.unfit(
                                left instanceof Type.Shape ? binary.getRight() : binary.getLeft(),
                                left instanceof Type.Shape ? right : left,
                                "'&' needs two shapes");
        };
    }

    Type unary(UnaryExpression unary) {
        Type operand = inference.typeOf(unary.getOperand());
        if (operand == Type.UNKNOWN) {
            return operand;
        }
        if (unary.getOperator().equals("not")) {
            return operand instanceof Truth
                    ? operand
                    : inference.unfit(unary.getOperand(), operand, "'not' needs a condition");
        }
        if (operand instanceof Scalar || operand instanceof Matrix || operand instanceof Point) {
            return operand;
        }
        return inference.unfit(unary.getOperand(), operand, "'" + unary.getOperator() + "' needs a quantity");
    }

    private Type logical(BinaryExpression binary, Type left, Type right) {
        String need = "'" + binary.getOperator() + "' needs a condition on both sides";
        if (!(left instanceof Truth)) {
            return inference.unfit(binary.getLeft(), left, need);
        }
        return right instanceof Truth ? right : inference.unfit(binary.getRight(), right, need);
    }

    private Type sum(BinaryExpression binary, Type left, Type right) {
        if (left instanceof Type.Shape && right instanceof Type.Shape) {
            return left;
        }
        Dimension leftDimension = Inference.dimension(left);
        Dimension rightDimension = Inference.dimension(right);
        if (leftDimension == null || rightDimension == null) {
            boolean leftWrong = leftDimension == null;
            return inference.unfit(
                    leftWrong ? binary.getLeft() : binary.getRight(),
                    leftWrong ? left : right,
                    "'" + binary.getOperator() + "' needs two quantities");
        }
        if (!leftDimension.equals(rightDimension)) {
            return inference.mismatch(
                    binary, binary.getOperator().equals("+") ? "added" : "subtracted", leftDimension, rightDimension);
        }
        if (left instanceof Scalar a && right instanceof Scalar b) {
            return new Scalar(leftDimension, a.complex() || b.complex());
        }
        if (left instanceof Matrix a && right instanceof Matrix b && a.size() == b.size()
                || left instanceof Point p && right instanceof Point r && p.components() == r.components()) {
            return left;
        }
        return inference.unfit(
                binary.getRight(),
                right,
                "'" + binary.getOperator() + "' after " + left.describe() + " needs the same");
    }

    private Type product(BinaryExpression binary, Type left, Type right) {
        if (left instanceof Scalar a && right instanceof Scalar b) {
            return new Scalar(a.dimension().times(b.dimension()), a.complex() || b.complex());
        }
        if (left instanceof Scalar a && right instanceof Matrix b) {
            return new Matrix(b.size(), a.dimension().times(b.dimension()));
        }
        if (left instanceof Matrix a && right instanceof Scalar b) {
            return new Matrix(a.size(), a.dimension().times(b.dimension()));
        }
        if (left instanceof Matrix a && right instanceof Matrix b && a.size() == b.size()) {
            return new Matrix(a.size(), a.dimension().times(b.dimension()));
        }
        if (left instanceof Scalar a && !a.complex() && right instanceof Point b) {
            return new Point(b.components(), a.dimension().times(b.dimension()));
        }
        if (left instanceof Point a && right instanceof Scalar b && !b.complex()) {
            return new Point(a.components(), a.dimension().times(b.dimension()));
        }
        boolean leftWrong = Inference.dimension(left) == null;
        return inference.unfit(
                leftWrong ? binary.getLeft() : binary.getRight(),
                leftWrong ? left : right,
                "'*' needs two quantities that can be multiplied");
    }

    private Type quotient(BinaryExpression binary, Type left, Type right) {
        if (!(right instanceof Scalar below)) {
            return inference.unfit(binary.getRight(), right, "'/' needs a number or a quantity below");
        }
        if (left instanceof Scalar above) {
            return new Scalar(above.dimension().over(below.dimension()), above.complex() || below.complex());
        }
        if (left instanceof Matrix above) {
            return new Matrix(above.size(), above.dimension().over(below.dimension()));
        }
        if (left instanceof Point above && !below.complex()) {
            return new Point(above.components(), above.dimension().over(below.dimension()));
        }
        return inference.unfit(binary.getLeft(), left, "'/' needs a quantity above");
    }

    private Type power(BinaryExpression binary, Type left, Type right) {
        if (!(left instanceof Scalar base)) {
            return inference.unfit(binary.getLeft(), left, "'^' needs a number or a quantity below");
        }
        if (!(right instanceof Scalar exponent) || exponent.complex()) {
            return inference.unfit(binary.getRight(), right, "The exponent must be a real number");
        }
        if (!exponent.dimension().isNumber()) {
            inference.report(
                    binary.getRight(),
                    null,
                    IssueCode.DIMENSION_MISMATCH,
                    "An exponent is a plain number, but this is "
                            + exponent.dimension().withArticle() + "; "
                            + Inference.fittingUnit(exponent.dimension(), Dimension.NUMBER));
            return Type.UNKNOWN;
        }
        if (base.dimension().isNumber()) {
            return base;
        }
        Optional<Double> value = StaticNumber.of(binary.getRight());
        if (value.isEmpty()) {
            inference.report(
                    binary.getRight(),
                    null,
                    IssueCode.DIMENSION_MISMATCH,
                    "The exponent of " + base.dimension().withArticle()
                            + " must be written as a number, so that the unit of the result is known.");
            return Type.UNKNOWN;
        }
        try {
            return new Scalar(base.dimension().power(value.get()), base.complex());
        } catch (ArithmeticException e) {
            inference.report(
                    binary.getRight(),
                    null,
                    IssueCode.DIMENSION_MISMATCH,
                    Inference.capital(base.dimension().withArticle()) + " to the power " + value.get()
                            + " has no unit.");
            return Type.UNKNOWN;
        }
    }

    Type comparison(ComparisonExpression comparison) {
        Type first = null;
        for (Expression operand : comparison.getOperands()) {
            Type type = inference.typeOf(operand);
            if (type == Type.UNKNOWN) {
                continue;
            }
            if (!(type instanceof Scalar scalar)) {
                return inference.unfit(operand, type, "A comparison needs quantities");
            }
            if (scalar.complex()) {
                inference.report(
                        operand,
                        null,
                        IssueCode.NOT_REAL,
                        "Complex numbers have no order; compare abs(…), for example.");
                return Type.TRUTH;
            }
            if (first == null) {
                first = type;
            } else if (!scalar.dimension().equals(Inference.dimension(first))) {
                inference.mismatch(comparison, "compared", Inference.dimension(first), scalar.dimension());
                return Type.TRUTH;
            }
        }
        return Type.TRUTH;
    }
}
