package org.isthmus.language.elaboration;

import org.apache.commons.math3.complex.Complex;
import org.eclipse.emf.ecore.EObject;
import org.isthmus.language.evaluation.Evaluator;
import org.isthmus.language.evaluation.SquareMatrix;
import org.isthmus.language.evaluation.Value;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.ListLiteral;

/** Matrices on the orbitals, interleaved real and imaginary parts row by row. */
final class Blocks {
    /** Largest number of orbitals of a site. */
    static final int MOST_ORBITALS = 64;

    /** |M − M†| relative to the largest element beyond which a matrix is not Hermitian: rounding of some products. */
    private static final double HERMITIAN = 1e-10;

    private Blocks() {}

    /** {@code scalar × identity}. */
    static double[] identity(int orbitals, double re, double im) {
        double[] block = new double[2 * orbitals * orbitals];
        for (int i = 0; i < orbitals; i++) {
            block[2 * (i * orbitals + i)] = re;
            block[2 * (i * orbitals + i) + 1] = im;
        }
        return block;
    }

    /** An on-site term: finite, of the right size and Hermitian; null after a finding. */
    static double[] hermitian(Value value, int orbitals, EObject place, String what, Findings findings) {
        double[] block = block(value, orbitals, orbitals, place, what, findings);
        if (block == null) {
            return null;
        }
        if (value instanceof Value.ComplexNumber number && number.value().getImaginary() != 0) {
            findings.add(
                    IssueCode.NOT_HERMITIAN,
                    place,
                    what + " is " + complex(number.value()) + ": an on-site term must be real or a Hermitian matrix.");
            return null;
        }
        if (value instanceof Value.MatrixValue matrix && !isHermitian(matrix.matrix())) {
            findings.add(
                    IssueCode.NOT_HERMITIAN,
                    place,
                    what + " is a matrix that is not Hermitian: it differs from its adjoint by "
                            + Told.number(100 * matrix.matrix().deviationFromHermitian())
                            + " % of its largest element.");
            return null;
        }
        return block;
    }

    static boolean isHermitian(SquareMatrix matrix) {
        return matrix.deviationFromHermitian() <= HERMITIAN;
    }

    private static String complex(Complex z) {
        return Told.number(z.getReal()) + (z.getImaginary() < 0 ? " - " : " + ")
                + Told.number(Math.abs(z.getImaginary())) + "i";
    }

    /** The matrix element of a bond; null after a finding. */
    static double[] bond(
            Evaluator evaluator, Expression expression, int rows, int columns, String what, Findings findings) {
        if (rows != columns && expression instanceof ListLiteral list) {
            return rectangle(evaluator, list, rows, columns, what, findings);
        }
        return block(evaluator.evaluate(expression), rows, columns, expression, what, findings);
    }

    private static double[] block(Value value, int rows, int columns, EObject place, String what, Findings findings) {
        double[] block;
        if (value instanceof Value.MatrixValue matrix) {
            if (matrix.matrix().size() != rows || rows != columns) {
                findings.add(
                        IssueCode.MATRIX_SIZE,
                        place,
                        what + " is a matrix of size " + matrix.matrix().size() + ", but "
                                + (rows == columns
                                        ? "the site has " + Told.count(rows, "orbital")
                                        : "the bond needs " + rows + " × " + columns)
                                + ".");
                return null;
            }
            block = matrix.matrix().interleaved();
        } else {
            Complex number = value instanceof Value.ComplexNumber c
                    ? c.value()
                    : value instanceof Value.Real real ? new Complex(real.value(), 0) : null;
            if (number == null) {
                findings.add(IssueCode.KIND_MISMATCH, place, what + " must be a number or a matrix.");
                return null;
            }
            if (rows != columns) {
                findings.add(
                        IssueCode.MATRIX_SIZE,
                        place,
                        what + " joins " + rows + " and " + columns + " orbitals: it needs a matrix of "
                                + Told.count(rows, "row") + " and " + Told.count(columns, "column")
                                + ", not a number.");
                return null;
            }
            block = identity(rows, number.getReal(), number.getImaginary());
        }
        return finite(block, place, what, findings) ? block : null;
    }

    private static boolean finite(double[] block, EObject place, String what, Findings findings) {
        for (double number : block) {
            if (!Double.isFinite(number)) {
                findings.add(IssueCode.NOT_FINITE, place, what + " is " + number + ", not a finite number.");
                return false;
            }
        }
        return true;
    }

    private static double[] rectangle(
            Evaluator evaluator, ListLiteral list, int rows, int columns, String what, Findings findings) {
        double[] block = new double[2 * rows * columns];
        boolean fits = list.getElements().size() == rows;
        for (int r = 0; fits && r < rows; r++) {
            fits = list.getElements().get(r) instanceof ListLiteral row
                    && row.getElements().size() == columns;
            for (int c = 0; fits && c < columns; c++) {
                Value value = evaluator.evaluate(
                        ((ListLiteral) list.getElements().get(r)).getElements().get(c));
                Complex number = value instanceof Value.ComplexNumber z
                        ? z.value()
                        : value instanceof Value.Real real ? new Complex(real.value(), 0) : Complex.NaN;
                block[2 * (r * columns + c)] = number.getReal();
                block[2 * (r * columns + c) + 1] = number.getImaginary();
            }
        }
        if (!fits) {
            findings.add(
                    IssueCode.MATRIX_SIZE,
                    list,
                    what + " needs a matrix of " + Told.count(rows, "row") + " and " + Told.count(columns, "column")
                            + ".");
            return null;
        }
        return finite(block, list, what, findings) ? block : null;
    }

    /** The adjoint of a block of {@code rows × columns}. */
    static double[] adjoint(double[] block, int rows, int columns) {
        double[] adjoint = new double[block.length];
        for (int r = 0; r < rows; r++) {
            for (int c = 0; c < columns; c++) {
                adjoint[2 * (c * rows + r)] = block[2 * (r * columns + c)];
                adjoint[2 * (c * rows + r) + 1] = -block[2 * (r * columns + c) + 1];
            }
        }
        return adjoint;
    }

    /** Multiplies by a real factor and a phase, in place; to the last bit the same on every machine. */
    static void turn(double[] block, double factor, double phase) {
        if (phase == 0) {
            for (int k = 0; factor != 1 && k < block.length; k++) {
                block[k] *= factor;
            }
            return;
        }
        double cos = factor * StrictMath.cos(phase);
        double sin = factor * StrictMath.sin(phase);
        for (int k = 0; k < block.length; k += 2) {
            double re = block[k];
            double im = block[k + 1];
            block[k] = re * cos - im * sin;
            block[k + 1] = re * sin + im * cos;
        }
    }
}
