package org.isthmus.runtime.solve;

import java.util.stream.IntStream;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.ComplexBackend.HermitianEigen;
import org.isthmus.runtime.kernel.ComplexMatrix;
import org.isthmus.runtime.kernel.Op;

/** Traces between leads, from G on the orbitals that they touch. */
final class LeadTraces {
    private static final double CLOSED = 1e-13;

    private final ComplexBackend backend;
    private final ComplexMatrix[] broadening;
    private final ComplexMatrix[][] green;

    /**
     * Reads G.
     *
     * @param places each lead's orbitals in the rows of G
     */
    LeadTraces(ComplexBackend backend, ComplexMatrix rootGreen, int[][] places, ComplexMatrix[] broadening) {
        this.backend = backend;
        this.broadening = broadening;
        int n = places.length;
        green = new ComplexMatrix[n][n];
        for (int a = 0; a < n; a++) {
            for (int b = 0; b < n; b++) {
                green[a][b] = rootGreen.select(places[a], places[b]);
            }
        }
    }

    int leads() {
        return broadening.length;
    }

    /** Γ = i(Σ − Σ†). */
    static ComplexMatrix broadening(ComplexMatrix sigma) {
        ComplexMatrix gamma = sigma.copy();
        gamma.addScaled(sigma.adjoint(), -1);
        gamma.scale(0, 1);
        return gamma;
    }

    /** Tr[Γ_to G Γ_from G†] for all pairs, [from][to]. */
    double[][] transmissions() {
        int n = leads();
        double[][] traces = new double[n][n];
        for (int from = 0; from < n; from++) {
            for (int to = 0; to < n; to++) {
                ComplexMatrix left = backend.multiply(broadening[to], green[to][from]);
                ComplexMatrix right = backend.multiply(green[to][from], broadening[from]);
                double sum = 0;
                for (int k = 0; k < left.data().length; k++) {
                    sum += left.data()[k] * right.data()[k];
                }
                traces[from][to] = sum;
            }
        }
        return traces;
    }

    /** Tr[Γ_p i(G − G†)] for all leads. */
    double[] spectralTraces() {
        double[] traces = new double[leads()];
        for (int p = 0; p < traces.length; p++) {
            ComplexMatrix gamma = broadening[p];
            ComplexMatrix g = green[p][p];
            double sum = 0;
            for (int j = 0; j < g.columns(); j++) {
                for (int i = 0; i < g.rows(); i++) {
                    // i·Γ_ji·G_ij + c.c., with Γ Hermitian
                    sum -= 2 * (gamma.real(j, i) * g.imaginary(i, j) + gamma.imaginary(j, i) * g.real(i, j));
                }
            }
            traces[p] = sum;
        }
        return traces;
    }

    /** Correlators between leads. */
    record Correlators(double[][] squares, double[][][][] noise) {}

    Correlators correlators() {
        int n = leads();
        ComplexMatrix[] root = new ComplexMatrix[n];
        for (int p = 0; p < n; p++) {
            root[p] = openRoot(broadening[p]);
        }
        ComplexMatrix[][] s = new ComplexMatrix[n][n];
        for (int a = 0; a < n; a++) {
            for (int b = 0; b < n; b++) {
                s[a][b] = backend.multiply(Op.ADJOINT, root[a], Op.NONE, backend.multiply(green[a][b], root[b]));
                s[a][b].scale(0, 1);
                if (a == b) {
                    s[a][b].addScaled(ComplexMatrix.identity(root[a].columns()), -1);
                }
            }
        }
        double[][] squares = new double[n][n];
        for (int from = 0; from < n; from++) {
            for (int to = 0; to < n; to++) {
                ComplexMatrix t = s[to][from].copy();
                if (from == to) {
                    t.addScaled(ComplexMatrix.identity(t.rows()), 1);
                }
                double size = backend.multiply(Op.NONE, t, Op.ADJOINT, t).frobenius();
                squares[from][to] = size * size;
            }
        }
        double[][][][] noise = new double[n][n][n][n];
        for (int a = 0; a < n; a++) {
            for (int b = 0; b < n; b++) {
                for (int c = 0; c < n; c++) {
                    for (int d = 0; d < n; d++) {
                        noise[a][b][c][d] = trace(current(s, a, c, d), current(s, b, d, c));
                    }
                }
            }
        }
        return new Correlators(squares, noise);
    }

    /** A_cd(a) = δ_ac δ_ad − s_ac† s_ad. */
    private ComplexMatrix current(ComplexMatrix[][] s, int a, int c, int d) {
        ComplexMatrix current = backend.multiply(Op.ADJOINT, s[a][c], Op.NONE, s[a][d]);
        current.scale(-1, 0);
        if (a == c && a == d) {
            current.addScaled(ComplexMatrix.identity(current.rows()), 1);
        }
        return current;
    }

    private static double trace(ComplexMatrix x, ComplexMatrix y) {
        double sum = 0;
        for (int i = 0; i < x.rows(); i++) {
            for (int j = 0; j < x.columns(); j++) {
                sum += x.real(i, j) * y.real(j, i) - x.imaginary(i, j) * y.imaginary(j, i);
            }
        }
        return sum;
    }

    /** Γ^½ as a factor with one column per open channel: Γ = RR†. */
    private ComplexMatrix openRoot(ComplexMatrix gamma) {
        HermitianEigen eigen = backend.hermitianEigen(gamma);
        double[] values = eigen.values();
        double largest = values.length == 0 ? 0 : values[values.length - 1];
        int[] open = IntStream.range(0, values.length)
                .filter(k -> values[k] > CLOSED * largest && values[k] > 0)
                .toArray();
        ComplexMatrix root =
                eigen.vectors().select(IntStream.range(0, gamma.rows()).toArray(), open);
        for (int j = 0; j < open.length; j++) {
            double factor = Math.sqrt(values[open[j]]);
            for (int i = 0; i < root.rows(); i++) {
                root.set(i, j, root.real(i, j) * factor, root.imaginary(i, j) * factor);
            }
        }
        return root;
    }
}
