package org.isthmus.runtime.kernel;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.junit.jupiter.api.Test;

/** What every back end must do, by residuals; the bounds are those of Golub & Van Loan for backward stable methods. */
public abstract class BackendContract {
    private static final int[] SIZES = {1, 2, 3, 7, 16, 33, 64};

    protected abstract ComplexBackend backend();

    protected static ComplexMatrix random(Random random, int rows, int columns) {
        ComplexMatrix matrix = ComplexMatrix.zeros(rows, columns);
        for (int k = 0; k < matrix.data().length; k++) {
            matrix.data()[k] = random.nextGaussian();
        }
        return matrix;
    }

    private static double distance(ComplexMatrix a, ComplexMatrix b) {
        ComplexMatrix difference = a.copy();
        difference.addScaled(b, -1);
        return difference.frobenius() / Math.max(1, b.frobenius());
    }

    @Test
    void productsAreSumsOfProducts() {
        Random random = new Random(1);
        for (Op opA : Op.values()) {
            for (Op opB : Op.values()) {
                ComplexMatrix a = opA == Op.NONE ? random(random, 5, 7) : random(random, 7, 5);
                ComplexMatrix b = opB == Op.NONE ? random(random, 7, 4) : random(random, 4, 7);
                ComplexMatrix c = random(random, 5, 4);
                ComplexMatrix before = c.copy();
                backend().multiplyAdd(-2, opA, a, opB, b, c);
                for (int i = 0; i < 5; i++) {
                    for (int j = 0; j < 4; j++) {
                        double re = before.real(i, j);
                        double im = before.imaginary(i, j);
                        for (int k = 0; k < 7; k++) {
                            double[] x = element(opA, a, i, k);
                            double[] y = element(opB, b, k, j);
                            re -= 2 * (x[0] * y[0] - x[1] * y[1]);
                            im -= 2 * (x[0] * y[1] + x[1] * y[0]);
                        }
                        assertEquals(re, c.real(i, j), 1e-13);
                        assertEquals(im, c.imaginary(i, j), 1e-13);
                    }
                }
            }
        }
    }

    private static double[] element(Op op, ComplexMatrix m, int i, int j) {
        return switch (op) {
            case NONE -> new double[] {m.real(i, j), m.imaginary(i, j)};
            case ADJOINT -> new double[] {m.real(j, i), -m.imaginary(j, i)};
            case TRANSPOSE -> new double[] {m.real(j, i), m.imaginary(j, i)};
        };
    }

    @Test
    void solutionsFulfilTheirEquations() {
        Random random = new Random(2);
        for (int n : SIZES) {
            ComplexMatrix a = random(random, n, n);
            ComplexMatrix b = random(random, n, 3);
            ComplexMatrix x = backend().factor(a).solve(b);
            assertTrue(distance(backend().multiply(a, x), b) < 1e-11, "size " + n);
            assertTrue(distance(backend().multiply(a, backend().inverse(a)), ComplexMatrix.identity(n)) < 1e-11);
        }
    }

    @Test
    void theConditionIsEstimated() {
        ComplexMatrix a = ComplexMatrix.identity(4);
        assertEquals(1, backend().factor(a).reciprocalCondition(), 1e-12);
        a.set(2, 2, 1e-9, 0);
        assertEquals(1e-9, backend().factor(a).reciprocalCondition(), 1e-11);
    }

    @Test
    void aSingularMatrixIsTold() {
        ComplexMatrix a = ComplexMatrix.identity(3);
        a.set(1, 1, 0, 0);
        assertThrows(SingularMatrixException.class, () -> backend().factor(a));
    }

    @Test
    void hermitianEigenvectorsAreOrthonormalAndFulfilTheirEquation() {
        Random random = new Random(3);
        for (int n : SIZES) {
            ComplexMatrix a = random(random, n, n);
            a.addScaled(a.adjoint(), 1);
            ComplexBackend.HermitianEigen eigen = backend().hermitianEigen(a);
            ComplexMatrix v = eigen.vectors();
            assertTrue(distance(backend().multiply(Op.ADJOINT, v, Op.NONE, v), ComplexMatrix.identity(n)) < 1e-12);
            ComplexMatrix scaled = v.copy();
            for (int j = 0; j < n; j++) {
                assertTrue(j == 0 || eigen.values()[j] >= eigen.values()[j - 1]);
                for (int i = 0; i < n; i++) {
                    scaled.set(i, j, v.real(i, j) * eigen.values()[j], v.imaginary(i, j) * eigen.values()[j]);
                }
            }
            assertTrue(distance(backend().multiply(a, v), scaled) < 1e-12, "size " + n);
        }
    }

    @Test
    void degenerateHermitianMatricesToo() {
        ComplexBackend.HermitianEigen eigen = backend().hermitianEigen(ComplexMatrix.identity(5));
        assertArrayEquals(new double[] {1, 1, 1, 1, 1}, eigen.values(), 1e-15);
    }

    @Test
    void theSchurFormIsTriangularAndGivesTheMatrixBack() {
        Random random = new Random(4);
        for (int n : SIZES) {
            ComplexMatrix a = random(random, n, n);
            Schur schur = backend().schur(a);
            assertSchur(a, schur);
            boolean[] chosen = new boolean[n];
            double[] wanted = new double[2];
            for (int k = 0; k < n; k++) {
                chosen[k] = schur.valueReal(k) > 0;
                wanted[0] += chosen[k] ? schur.valueReal(k) : 0;
                wanted[1] += chosen[k] ? schur.valueImaginary(k) : 0;
            }
            int front = schur.toFront(chosen);
            assertSchur(a, schur);
            for (int k = 0; k < front; k++) {
                wanted[0] -= schur.valueReal(k);
                wanted[1] -= schur.valueImaginary(k);
                assertTrue(schur.valueReal(k) > 0);
            }
            assertEquals(0, Math.hypot(wanted[0], wanted[1]), 1e-10);
            for (int k = 0; k < n; k++) {
                ComplexMatrix v = schur.eigenvector(k);
                ComplexMatrix image = backend().multiply(a, v);
                v.scale(schur.valueReal(k), schur.valueImaginary(k));
                assertTrue(distance(image, v) < 1e-9, "size " + n + " vector " + k);
            }
        }
    }

    @Test
    void aDefectiveMatrixHasASchurForm() {
        ComplexMatrix a = ComplexMatrix.zeros(4, 4);
        for (int i = 0; i < 3; i++) {
            a.set(i + 1, i, 1, 0);
        }
        assertSchur(a, backend().schur(a));
    }

    private void assertSchur(ComplexMatrix a, Schur schur) {
        int n = a.rows();
        ComplexMatrix z = schur.vectors();
        assertTrue(distance(backend().multiply(Op.ADJOINT, z, Op.NONE, z), ComplexMatrix.identity(n)) < 1e-12);
        ComplexMatrix back = backend().multiply(Op.NONE, backend().multiply(z, schur.triangle()), Op.ADJOINT, z);
        assertTrue(distance(back, a) < 1e-12, "size " + n);
        for (int j = 0; j < n; j++) {
            for (int i = j + 1; i < n; i++) {
                assertEquals(
                        0,
                        Math.hypot(schur.triangle().real(i, j), schur.triangle().imaginary(i, j)),
                        1e-13);
            }
        }
    }

    /** Against the same by products and inverses; in real arithmetic too where the back end has it. */
    @Test
    void eliminationLeavesTheSchurComplement() {
        Random random = new Random(21);
        for (boolean real : backend().realArithmetic() ? new boolean[] {false, true} : new boolean[] {false}) {
            for (int n : new int[] {1, 2, 3, 7, 16, 33, 151, 180}) {
                for (int count : new int[] {0, 1, n / 4, n / 2, n}) {
                    boolean hermitian = n % 2 == 1;
                    ComplexMatrix a = random(random, n, n);
                    if (hermitian) {
                        a.addScaled(a.adjoint(), 1);
                    }
                    if (real) {
                        a = Dense.realPart(a).complex();
                    }
                    Dense whole = real ? Dense.realPart(a) : Dense.of(a.copy());
                    Reduction reduction = backend().eliminate(whole, count, hermitian);
                    Dense parts = Dense.of(a);
                    ComplexMatrix inverse =
                            backend().inverse(parts.block(0, count, 0, count).complex());
                    ComplexMatrix above = parts.block(0, count, count, n).complex();
                    ComplexMatrix below = parts.block(count, n, 0, count).complex();
                    ComplexMatrix right = backend().multiply(inverse, above);
                    ComplexMatrix complement =
                            parts.block(count, n, count, n).complex().copy();
                    backend().multiplyAdd(-1, Op.NONE, below, Op.NONE, right, complement);
                    double tolerance = 1e-10;
                    assertEquals(0, distance(inverse, reduction.inverse().complex()), tolerance);
                    assertEquals(0, distance(right, reduction.right().complex()), tolerance);
                    assertEquals(
                            0,
                            distance(
                                    backend().multiply(below, inverse),
                                    reduction.left().complex()),
                            tolerance);
                    assertEquals(0, distance(complement, reduction.complement().complex()), tolerance);
                    assertEquals(real, reduction.complement().real());
                    assertEquals(
                            Dense.of(right).largest(), reduction.amplification(), tolerance * (1 + right.frobenius()));
                }
            }
        }
    }

    @Test
    void eliminationTellsASingularBlock() {
        assertThrows(SingularMatrixException.class, () -> backend().eliminate(Dense.zeros(4, 4, false), 2, true));
    }
}
