package org.isthmus.runtime.device.bands;

import java.util.Arrays;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.EigenDecomposition;

/**
 * Eigenvalues of small complex Hermitian matrices H = A + iB by the real symmetric [[A, −B], [B, A]], which has each of
 * them twice (Golub & Van Loan, Matrix Computations, section 8.7).
 */
final class HermitianEigenvalues {
    private HermitianEigenvalues() {}

    /**
     * Eigenvalues, ascending.
     *
     * @param real n × n, symmetric
     * @param imaginary n × n, antisymmetric
     */
    static double[] of(double[][] real, double[][] imaginary) {
        int n = real.length;
        if (n == 1) {
            return new double[] {real[0][0]};
        }
        double[][] twice = new double[2 * n][2 * n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                twice[i][j] = real[i][j];
                twice[n + i][n + j] = real[i][j];
                twice[n + i][j] = imaginary[i][j];
                twice[i][n + j] = -imaginary[i][j];
            }
        }
        double[] all = new EigenDecomposition(new Array2DRowRealMatrix(twice, false)).getRealEigenvalues();
        Arrays.sort(all);
        double[] values = new double[n];
        for (int i = 0; i < n; i++) {
            values[i] = 0.5 * (all[2 * i] + all[2 * i + 1]);
        }
        return values;
    }

    /**
     * Eigenvalues of H c = E S c, ascending, by the Cholesky factor S = L L†: those of L⁻¹ H L⁻†. H and S are overwritten.
     *
     * @return null where S is not positive definite
     */
    static double[] of(double[][] hr, double[][] hi, double[][] sr, double[][] si) {
        int n = hr.length;
        if (!factorise(sr, si)) {
            return null;
        }
        solve(sr, si, hr, hi);
        adjoin(hr, hi);
        solve(sr, si, hr, hi);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < i; j++) {
                double re = 0.5 * (hr[i][j] + hr[j][i]);
                double im = 0.5 * (hi[i][j] - hi[j][i]);
                hr[i][j] = re;
                hr[j][i] = re;
                hi[i][j] = im;
                hi[j][i] = -im;
            }
            hi[i][i] = 0;
        }
        return of(hr, hi);
    }

    /** Cholesky: the lower triangle becomes L. */
    private static boolean factorise(double[][] re, double[][] im) {
        int n = re.length;
        for (int j = 0; j < n; j++) {
            double pivot = re[j][j];
            for (int k = 0; k < j; k++) {
                pivot -= re[j][k] * re[j][k] + im[j][k] * im[j][k];
            }
            if (!(pivot > 0)) {
                return false;
            }
            double root = Math.sqrt(pivot);
            re[j][j] = root;
            im[j][j] = 0;
            for (int i = j + 1; i < n; i++) {
                double a = re[i][j];
                double b = im[i][j];
                for (int k = 0; k < j; k++) {
                    a -= re[i][k] * re[j][k] + im[i][k] * im[j][k];
                    b -= im[i][k] * re[j][k] - re[i][k] * im[j][k];
                }
                re[i][j] = a / root;
                im[i][j] = b / root;
            }
        }
        return true;
    }

    /** X := L⁻¹ X. */
    private static void solve(double[][] lr, double[][] li, double[][] xr, double[][] xi) {
        int n = lr.length;
        for (int column = 0; column < n; column++) {
            for (int i = 0; i < n; i++) {
                double a = xr[i][column];
                double b = xi[i][column];
                for (int k = 0; k < i; k++) {
                    a -= lr[i][k] * xr[k][column] - li[i][k] * xi[k][column];
                    b -= lr[i][k] * xi[k][column] + li[i][k] * xr[k][column];
                }
                xr[i][column] = a / lr[i][i];
                xi[i][column] = b / lr[i][i];
            }
        }
    }

    private static void adjoin(double[][] re, double[][] im) {
        for (int i = 0; i < re.length; i++) {
            im[i][i] = -im[i][i];
            for (int j = 0; j < i; j++) {
                double a = re[i][j];
                re[i][j] = re[j][i];
                re[j][i] = a;
                double b = im[i][j];
                im[i][j] = -im[j][i];
                im[j][i] = -b;
            }
        }
    }
}
