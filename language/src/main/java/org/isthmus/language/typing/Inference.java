package org.isthmus.language.typing;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Collectors;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.emf.ecore.EStructuralFeature;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.BinaryExpression;
import org.isthmus.language.isthmus.ComparisonExpression;
import org.isthmus.language.isthmus.Constant;
import org.isthmus.language.isthmus.Declaration;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.HeaderParameter;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.ListLiteral;
import org.isthmus.language.isthmus.Parameter;
import org.isthmus.language.isthmus.PointLiteral;
import org.isthmus.language.isthmus.Quantity;
import org.isthmus.language.isthmus.QuantityLiteral;
import org.isthmus.language.isthmus.RangeExpression;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.language.isthmus.TextLiteral;
import org.isthmus.language.isthmus.UnaryExpression;
import org.isthmus.language.isthmus.VectorDeclaration;
import org.isthmus.language.typing.Type.ListOf;
import org.isthmus.language.typing.Type.Matrix;
import org.isthmus.language.typing.Type.Point;
import org.isthmus.language.typing.Type.Range;
import org.isthmus.language.typing.Type.Scalar;
import org.isthmus.language.typing.Type.Truth;
import org.isthmus.runtime.units.Dimension;
import org.isthmus.runtime.units.Unit;
import org.isthmus.runtime.units.Units;

/**
 * Types of expressions. Each expression and each declaration is looked at once; what was found wrong on the way is kept in
 * {@link #problems()}, in the order it was met.
 */
public final class Inference {
    private final Map<Expression, Type> types = new HashMap<>();
    private final Map<Declaration, Type> declarations = new HashMap<>();
    private final Set<Declaration> open = new LinkedHashSet<>();
    private final List<TypeProblem> problems = new ArrayList<>();
    private final ReferenceTyping references = new ReferenceTyping(this);

    /** What was found wrong so far. */
    public List<TypeProblem> problems() {
        return problems;
    }

    void report(EObject object, EStructuralFeature feature, IssueCode code, String message) {
        problems.add(new TypeProblem(object, feature, code, message));
    }

    /** The type of an expression; null, where a syntax error left a hole, is unknown. */
    public Type typeOf(Expression expression) {
        if (expression == null) {
            return Type.UNKNOWN;
        }
        Type known = types.get(expression);
        if (known == null) {
            known = infer(expression);
            types.put(expression, known);
        }
        return known;
    }

    /** The type of what a declaration stands for. */
    public Type typeOf(Declaration declaration) {
        Type known = declarations.get(declaration);
        if (known != null) {
            return known;
        }
        if (!open.add(declaration)) {
            reportCycle(declaration);
            return Type.UNKNOWN;
        }
        Type type = typeOf(valueOf(declaration));
        open.remove(declaration);
        declarations.putIfAbsent(declaration, type);
        return declarations.get(declaration);
    }

    /** A declaration about which something was told already: what uses it is not told again. */
    void forget(Declaration declaration) {
        declarations.put(declaration, Type.UNKNOWN);
    }

    private void reportCycle(Declaration declaration) {
        List<Declaration> ring = new ArrayList<>(open);
        ring = ring.subList(ring.indexOf(declaration), ring.size());
        String path = ring.stream().map(d -> "'" + d.getName() + "'").collect(Collectors.joining(" needs "));
        report(
                ring.get(0),
                IsthmusPackage.Literals.DECLARATION__NAME,
                IssueCode.CYCLE,
                path + " needs '" + declaration.getName() + "' again: one of them must be given without the others.");
        ring.forEach(member -> declarations.put(member, Type.UNKNOWN));
    }

    /** The expression that gives a declaration its value; null for what has none. */
    static Expression valueOf(Declaration declaration) {
        if (declaration instanceof Constant constant) {
            return constant.getValue();
        }
        if (declaration instanceof Parameter parameter) {
            return parameter.getValue();
        }
        if (declaration instanceof HeaderParameter parameter) {
            return parameter.getValue();
        }
        if (declaration instanceof Quantity quantity) {
            return quantity.getValue();
        }
        return declaration instanceof VectorDeclaration vector ? vector.getValue() : null;
    }

    private Type infer(Expression expression) {
        if (expression instanceof QuantityLiteral literal) {
            return literal(literal);
        }
        if (expression instanceof Reference reference) {
            return references.typeOf(reference);
        }
        if (expression instanceof BinaryExpression binary) {
            return binary(binary);
        }
        if (expression instanceof UnaryExpression unary) {
            return unary(unary);
        }
        if (expression instanceof ComparisonExpression comparison) {
            return comparison(comparison);
        }
        if (expression instanceof PointLiteral point) {
            return point(point);
        }
        if (expression instanceof ListLiteral list) {
            return list(list);
        }
        if (expression instanceof RangeExpression range) {
            return range(range);
        }
        return expression instanceof TextLiteral ? new Type.Text() : Type.UNKNOWN;
    }

    private Type literal(QuantityLiteral literal) {
        if (literal.getValue() != null && Double.isInfinite(Double.parseDouble(literal.getValue()))) {
            report(
                    literal,
                    IsthmusPackage.Literals.QUANTITY_LITERAL__VALUE,
                    IssueCode.NOT_FINITE,
                    literal.getValue() + " is greater than any number that is calculated with (1.8e308).");
            return Type.UNKNOWN;
        }
        if (literal.getUnit() == null) {
            return Type.real(Dimension.NUMBER);
        }
        if (literal.getUnit().equals("i")) {
            return new Scalar(Dimension.NUMBER, true);
        }
        Optional<Unit> unit = Units.bySymbol(literal.getUnit());
        if (unit.isEmpty()) {
            report(
                    literal,
                    IsthmusPackage.Literals.QUANTITY_LITERAL__UNIT,
                    IssueCode.UNKNOWN_UNIT,
                    "'" + literal.getUnit() + "' is not a unit symbol"
                            + Suggestion.phrase(
                                    literal.getUnit(), Units.all().stream().map(Unit::symbol)) + ".");
            return Type.UNKNOWN;
        }
        if (literal.getPower() == null) {
            return Type.real(unit.get().dimension());
        }
        double power = Double.parseDouble(literal.getPower());
        if (power != Math.rint(power) || Math.abs(power) > 24) {
            report(
                    literal,
                    IsthmusPackage.Literals.QUANTITY_LITERAL__POWER,
                    IssueCode.UNKNOWN_UNIT,
                    "The power of a unit is a whole number, not " + literal.getPower()
                            + "; put the number in parentheses to raise the quantity.");
            return Type.UNKNOWN;
        }
        return Type.real(unit.get().dimension().power(power));
    }

    private Type unary(UnaryExpression unary) {
        Type operand = typeOf(unary.getOperand());
        if (operand == Type.UNKNOWN) {
            return operand;
        }
        if (unary.getOperator().equals("not")) {
            return operand instanceof Truth ? operand : unfit(unary.getOperand(), operand, "'not' needs a condition");
        }
        if (operand instanceof Scalar || operand instanceof Matrix || operand instanceof Point) {
            return operand;
        }
        return unfit(unary.getOperand(), operand, "'" + unary.getOperator() + "' needs a quantity");
    }

    Type unfit(Expression expression, Type found, String need) {
        report(expression, null, IssueCode.KIND_MISMATCH, need + ", but this is " + found.describe() + ".");
        return Type.UNKNOWN;
    }

    private Type binary(BinaryExpression binary) {
        Type left = typeOf(binary.getLeft());
        Type right = typeOf(binary.getRight());
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
                        : unfit(
                                left instanceof Type.Shape ? binary.getRight() : binary.getLeft(),
                                left instanceof Type.Shape ? right : left,
                                "'&' needs two shapes");
        };
    }

    private Type logical(BinaryExpression binary, Type left, Type right) {
        String need = "'" + binary.getOperator() + "' needs a condition on both sides";
        if (!(left instanceof Truth)) {
            return unfit(binary.getLeft(), left, need);
        }
        return right instanceof Truth ? right : unfit(binary.getRight(), right, need);
    }

    private Type sum(BinaryExpression binary, Type left, Type right) {
        if (left instanceof Type.Shape && right instanceof Type.Shape) {
            return left;
        }
        Dimension leftDimension = dimension(left);
        Dimension rightDimension = dimension(right);
        if (leftDimension == null || rightDimension == null) {
            boolean leftWrong = leftDimension == null;
            return unfit(
                    leftWrong ? binary.getLeft() : binary.getRight(),
                    leftWrong ? left : right,
                    "'" + binary.getOperator() + "' needs two quantities");
        }
        if (!leftDimension.equals(rightDimension)) {
            return mismatch(
                    binary, binary.getOperator().equals("+") ? "added" : "subtracted", leftDimension, rightDimension);
        }
        if (left instanceof Scalar a && right instanceof Scalar b) {
            return new Scalar(leftDimension, a.complex() || b.complex());
        }
        if (left instanceof Matrix a && right instanceof Matrix b && a.size() == b.size()
                || left instanceof Point p && right instanceof Point r && p.components() == r.components()) {
            return left;
        }
        return unfit(
                binary.getRight(),
                right,
                "'" + binary.getOperator() + "' after " + left.describe() + " needs the same");
    }

    Type mismatch(EObject where, String verb, Dimension left, Dimension right) {
        report(
                where,
                null,
                IssueCode.DIMENSION_MISMATCH,
                capital(left.withArticle()) + " and " + right.withArticle() + " cannot be " + verb + "; "
                        + fittingUnit(right, left));
        return Type.UNKNOWN;
    }

    /** What a value of the wrong dimension should have been written in. */
    static String fittingUnit(Dimension found, Dimension wanted) {
        if (wanted.isNumber()) {
            return "divide it by a unit, such as " + Units.fitting(found).symbol() + ", to get a plain number.";
        }
        String unit = Units.fitting(wanted).symbol();
        return wanted.describe().contains(unit)
                ? "write it in " + unit + "."
                : "write it in a unit of " + wanted.describe() + ", such as " + unit + ".";
    }

    static String capital(String text) {
        return Character.toUpperCase(text.charAt(0)) + text.substring(1);
    }

    static Dimension dimension(Type type) {
        if (type instanceof Scalar scalar) {
            return scalar.dimension();
        }
        if (type instanceof Matrix matrix) {
            return matrix.dimension();
        }
        return type instanceof Point point ? point.dimension() : null;
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
        boolean leftWrong = dimension(left) == null;
        return unfit(
                leftWrong ? binary.getLeft() : binary.getRight(),
                leftWrong ? left : right,
                "'*' needs two quantities that can be multiplied");
    }

    private Type quotient(BinaryExpression binary, Type left, Type right) {
        if (!(right instanceof Scalar below)) {
            return unfit(binary.getRight(), right, "'/' needs a number or a quantity below");
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
        return unfit(binary.getLeft(), left, "'/' needs a quantity above");
    }

    private Type power(BinaryExpression binary, Type left, Type right) {
        if (!(left instanceof Scalar base)) {
            return unfit(binary.getLeft(), left, "'^' needs a number or a quantity below");
        }
        if (!(right instanceof Scalar exponent) || exponent.complex()) {
            return unfit(binary.getRight(), right, "The exponent must be a real number");
        }
        if (!exponent.dimension().isNumber()) {
            report(
                    binary.getRight(),
                    null,
                    IssueCode.DIMENSION_MISMATCH,
                    "An exponent is a plain number, but this is "
                            + exponent.dimension().withArticle() + "; "
                            + fittingUnit(exponent.dimension(), Dimension.NUMBER));
            return Type.UNKNOWN;
        }
        if (base.dimension().isNumber()) {
            return base;
        }
        Optional<Double> value = StaticNumber.of(binary.getRight());
        if (value.isEmpty()) {
            report(
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
            report(
                    binary.getRight(),
                    null,
                    IssueCode.DIMENSION_MISMATCH,
                    capital(base.dimension().withArticle()) + " to the power " + value.get() + " has no unit.");
            return Type.UNKNOWN;
        }
    }

    private Type comparison(ComparisonExpression comparison) {
        Type first = null;
        for (Expression operand : comparison.getOperands()) {
            Type type = typeOf(operand);
            if (type == Type.UNKNOWN) {
                continue;
            }
            if (!(type instanceof Scalar scalar)) {
                return unfit(operand, type, "A comparison needs quantities");
            }
            if (scalar.complex()) {
                report(
                        operand,
                        null,
                        IssueCode.NOT_REAL,
                        "Complex numbers have no order; compare abs(…), for example.");
                return Type.TRUTH;
            }
            if (first == null) {
                first = type;
            } else if (!scalar.dimension().equals(dimension(first))) {
                mismatch(comparison, "compared", dimension(first), scalar.dimension());
                return Type.TRUTH;
            }
        }
        return Type.TRUTH;
    }

    private Type point(PointLiteral point) {
        if (point.getCoordinates().size() > 3) {
            report(
                    point,
                    null,
                    IssueCode.WRONG_ARGUMENTS,
                    "A point has two or three coordinates, not "
                            + point.getCoordinates().size() + ".");
            return Type.UNKNOWN;
        }
        Dimension dimension = sameReal(
                point.getCoordinates(), "A coordinate must be a real quantity", "used as coordinates of one point");
        return dimension == null
                ? Type.UNKNOWN
                : new Point(point.getCoordinates().size(), dimension);
    }

    /** The one dimension of real quantities; null, after a report, where there is none. */
    private Dimension sameReal(List<Expression> elements, String need, String verb) {
        Dimension dimension = null;
        boolean known = true;
        for (Expression element : elements) {
            Type type = typeOf(element);
            if (type == Type.UNKNOWN) {
                known = false;
            } else if (!(type instanceof Scalar scalar) || scalar.complex()) {
                unfit(element, type, need);
                return null;
            } else if (dimension == null) {
                dimension = scalar.dimension();
            } else if (!dimension.equals(scalar.dimension())) {
                mismatch(element, verb, dimension, scalar.dimension());
                return null;
            }
        }
        return known ? dimension : null;
    }

    private Type list(ListLiteral list) {
        if (list.getElements().isEmpty()) {
            report(list, null, IssueCode.WRONG_ARGUMENTS, "A list needs at least one element.");
            return Type.UNKNOWN;
        }
        if (list.getElements().get(0) instanceof ListLiteral) {
            return matrix(list);
        }
        Dimension dimension = null;
        boolean complex = false;
        for (Expression element : list.getElements()) {
            Type type = typeOf(element);
            if (type == Type.UNKNOWN) {
                return type;
            }
            if (!(type instanceof Scalar scalar)) {
                return unfit(element, type, "An element of a list must be a quantity");
            }
            if (dimension != null && !dimension.equals(scalar.dimension())) {
                return mismatch(element, "in one list", dimension, scalar.dimension());
            }
            dimension = scalar.dimension();
            complex |= scalar.complex();
        }
        return new ListOf(new Scalar(dimension, complex));
    }

    private Type matrix(ListLiteral rows) {
        int size = rows.getElements().size();
        Dimension dimension = null;
        for (Expression row : rows.getElements()) {
            Type type = typeOf(row);
            if (type == Type.UNKNOWN) {
                return type;
            }
            if (!(type instanceof ListOf list) || !(list.element() instanceof Scalar element)) {
                return unfit(row, type, "A row of a matrix must be a list");
            }
            if (((ListLiteral) row).getElements().size() != size) {
                report(
                        row,
                        null,
                        IssueCode.MATRIX_SIZE,
                        "A matrix is square, but this row has "
                                + ((ListLiteral) row).getElements().size() + " elements and there are " + size
                                + " rows.");
                return Type.UNKNOWN;
            }
            if (dimension != null && !dimension.equals(element.dimension())) {
                return mismatch(row, "in one matrix", dimension, element.dimension());
            }
            dimension = element.dimension();
        }
        return new Matrix(size, dimension);
    }

    private Type range(RangeExpression range) {
        Dimension dimension = sameReal(
                List.of(range.getLower(), range.getUpper()),
                "An end of a range must be a real quantity",
                "ends of one range");
        return dimension == null ? Type.UNKNOWN : new Range(dimension);
    }
}
