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
import org.isthmus.language.isthmus.Declaration;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.ListLiteral;
import org.isthmus.language.isthmus.PointLiteral;
import org.isthmus.language.isthmus.QuantityLiteral;
import org.isthmus.language.isthmus.RangeExpression;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.language.isthmus.TextLiteral;
import org.isthmus.language.isthmus.UnaryExpression;
import org.isthmus.language.structure.WrittenValue;
import org.isthmus.language.typing.Type.ListOf;
import org.isthmus.language.typing.Type.Matrix;
import org.isthmus.language.typing.Type.Point;
import org.isthmus.language.typing.Type.Range;
import org.isthmus.language.typing.Type.Scalar;
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
    private final OperatorTyping operators = new OperatorTyping(this);

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
        Type type = typeOf(WrittenValue.of(declaration));
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

    private Type infer(Expression expression) {
        if (expression instanceof QuantityLiteral literal) {
            return literal(literal);
        }
        if (expression instanceof Reference reference) {
            return references.typeOf(reference);
        }
        if (expression instanceof BinaryExpression binary) {
            return operators.binary(binary);
        }
        if (expression instanceof UnaryExpression unary) {
            return operators.unary(unary);
        }
        if (expression instanceof ComparisonExpression comparison) {
            return operators.comparison(comparison);
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

    Type unfit(Expression expression, Type found, String need) {
        report(expression, null, IssueCode.KIND_MISMATCH, need + ", but this is " + found.describe() + ".");
        return Type.UNKNOWN;
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
