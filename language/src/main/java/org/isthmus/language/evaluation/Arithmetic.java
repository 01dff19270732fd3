package org.isthmus.language.evaluation;

import java.util.ArrayList;
import java.util.List;
import org.apache.commons.math3.complex.Complex;
import org.eclipse.emf.ecore.EObject;
import org.isthmus.language.evaluation.Code.ComplexCode;
import org.isthmus.language.evaluation.Code.ComplexNode;
import org.isthmus.language.evaluation.Code.Fixed;
import org.isthmus.language.evaluation.Code.MatrixCode;
import org.isthmus.language.evaluation.Code.MatrixNode;
import org.isthmus.language.evaluation.Code.RealCode;
import org.isthmus.language.evaluation.Code.RealNode;
import org.isthmus.language.evaluation.Value.MatrixValue;
import org.isthmus.language.evaluation.Value.PointValue;
import org.isthmus.language.evaluation.Value.Real;
import org.isthmus.language.evaluation.Value.ShapeValue;
import org.isthmus.language.findings.IssueCode;

/** {@code + - * / ^ &} on compiled operands of any sort. */
final class Arithmetic {
    private Arithmetic() {}

    static Code apply(String operator, Code left, Code right, EObject place) {
        if (left instanceof Fixed a && right instanceof Fixed b) {
            if (a.value() instanceof ShapeValue s && b.value() instanceof ShapeValue t) {
                return new Fixed(new ShapeValue(shape(operator, s.shape(), t.shape())));
            }
            if (a.value() instanceof PointValue || b.value() instanceof PointValue) {
                return new Fixed(point(operator, a.value(), b.value(), place));
            }
        }
        Code code;
        if (isReal(left) && isReal(right)) {
            code = real(operator, Evaluator.realNode(left, place), Evaluator.realNode(right, place));
        } else if (isMatrix(left) || isMatrix(right)) {
            code = matrix(operator, left, right, place);
        } else {
            code = complex(operator, complexNode(left, place), complexNode(right, place));
        }
        return left instanceof Fixed && right instanceof Fixed ? Evaluator.fold(left, code) : code;
    }

    static Code negate(Code operand, EObject place) {
        if (operand instanceof Fixed fixed && fixed.value() instanceof PointValue point) {
            return new Fixed(
                    new PointValue(point.components().stream().map(c -> -c).toList()));
        }
        if (isReal(operand)) {
            RealNode node = Evaluator.realNode(operand, place);
            return Evaluator.fold(operand, new RealCode(site -> -node.at(site)));
        }
        if (isMatrix(operand)) {
            MatrixNode node = matrixNode(operand, place);
            return Evaluator.fold(operand, new MatrixCode(site -> node.at(site).times(new Complex(-1))));
        }
        ComplexNode node = complexNode(operand, place);
        return Evaluator.fold(operand, new ComplexCode(site -> node.at(site).negate()));
    }

    private static boolean isReal(Code code) {
        return code instanceof RealCode || code instanceof Fixed fixed && fixed.value() instanceof Real;
    }

    private static boolean isMatrix(Code code) {
        return code instanceof MatrixCode || code instanceof Fixed fixed && fixed.value() instanceof MatrixValue;
    }

    private static Code real(String operator, RealNode a, RealNode b) {
        return new RealCode(
                switch (operator) {
                    case "+" -> site -> a.at(site) + b.at(site);
                    case "-" -> site -> a.at(site) - b.at(site);
                    case "*" -> site -> a.at(site) * b.at(site);
                    case "/" -> site -> a.at(site) / b.at(site);
                    default -> site -> power(a.at(site), b.at(site));
                });
    }

    /** Squares are by far the most frequent powers, and exact. */
    private static double power(double base, double exponent) {
        return exponent == 2 ? base * base : Math.pow(base, exponent);
    }

    private static Code complex(String operator, ComplexNode a, ComplexNode b) {
        return new ComplexCode(
                switch (operator) {
                    case "+" -> site -> a.at(site).add(b.at(site));
                    case "-" -> site -> a.at(site).subtract(b.at(site));
                    case "*" -> site -> a.at(site).multiply(b.at(site));
                    case "/" -> site -> a.at(site).divide(b.at(site));
                    default -> site -> power(a.at(site), b.at(site));
                });
    }

    private static Complex power(Complex base, Complex exponent) {
        double n = exponent.getReal();
        if (exponent.getImaginary() == 0 && n == Math.rint(n) && Math.abs(n) <= 64) {
            Complex result = Complex.ONE;
            for (int k = 0; k < Math.abs(n); k++) {
                result = result.multiply(base);
            }
            return n < 0 ? result.reciprocal() : result;
        }
        return base.pow(exponent);
    }

    private static Code matrix(String operator, Code left, Code right, EObject place) {
        if (isMatrix(left) && isMatrix(right)) {
            MatrixNode a = matrixNode(left, place);
            MatrixNode b = matrixNode(right, place);
            return new MatrixCode(
                    switch (operator) {
                        case "+" -> site -> a.at(site).plus(b.at(site));
                        case "-" -> site -> a.at(site).minus(b.at(site));
                        case "*" -> site -> a.at(site).times(b.at(site));
                        default -> throw unfit(operator, place);
                    });
        }
        MatrixNode m = matrixNode(isMatrix(left) ? left : right, place);
        ComplexNode c = complexNode(isMatrix(left) ? right : left, place);
        if (operator.equals("*")) {
            return new MatrixCode(site -> m.at(site).times(c.at(site)));
        }
        if (operator.equals("/") && isMatrix(left)) {
            return new MatrixCode(site -> m.at(site).over(c.at(site)));
        }
        throw unfit(operator, place);
    }

    private static EvaluationFailure unfit(String operator, EObject place) {
        return new EvaluationFailure(place, IssueCode.KIND_MISMATCH, "'" + operator + "' does not fit these operands.");
    }

    private static Value point(String operator, Value left, Value right, EObject place) {
        if (left instanceof PointValue a
                && right instanceof PointValue b
                && (operator.equals("+") || operator.equals("-"))) {
            List<Double> sum = new ArrayList<>();
            for (int k = 0; k < Math.max(a.components().size(), b.components().size()); k++) {
                sum.add(operator.equals("+") ? a.component(k) + b.component(k) : a.component(k) - b.component(k));
            }
            return new PointValue(sum);
        }
        if (operator.equals("*") && left instanceof Real factor && right instanceof PointValue b) {
            return scale(b, factor.value());
        }
        if (operator.equals("*") && right instanceof Real factor && left instanceof PointValue a) {
            return scale(a, factor.value());
        }
        if (operator.equals("/") && right instanceof Real divisor && left instanceof PointValue a) {
            return new PointValue(
                    a.components().stream().map(c -> c / divisor.value()).toList());
        }
        throw unfit(operator, place);
    }

    private static PointValue scale(PointValue point, double factor) {
        return new PointValue(point.components().stream().map(c -> c * factor).toList());
    }

    private static Shape shape(String operator, Shape left, Shape right) {
        return switch (operator) {
            case "+" -> new Shape.Union(left, right);
            case "-" -> new Shape.Difference(left, right);
            default -> new Shape.Intersection(left, right);
        };
    }

    static ComplexNode complexNode(Code code, EObject place) {
        if (code instanceof ComplexCode complex) {
            return complex.node();
        }
        if (code instanceof Fixed fixed && fixed.value() instanceof Value.ComplexNumber number) {
            Complex value = number.value();
            return site -> value;
        }
        RealNode real = Evaluator.realNode(code, place);
        return site -> new Complex(real.at(site));
    }

    static MatrixNode matrixNode(Code code, EObject place) {
        if (code instanceof MatrixCode matrix) {
            return matrix.node();
        }
        if (code instanceof Fixed fixed && fixed.value() instanceof MatrixValue matrix) {
            SquareMatrix value = matrix.matrix();
            return site -> value;
        }
        throw new EvaluationFailure(place, IssueCode.KIND_MISMATCH, "This must be a matrix.");
    }
}
