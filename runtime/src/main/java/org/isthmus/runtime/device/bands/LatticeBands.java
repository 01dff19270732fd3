package org.isthmus.runtime.device.bands;

import java.util.Optional;
import java.util.OptionalDouble;
import org.isthmus.runtime.device.Lattice;
import org.isthmus.runtime.device.SiteTable;

/**
 * The bands E_m(θ) of an infinite lattice, with θ_i the phase from cell to cell along vector i, rad (common practice):
 * H(θ) = Σ block·exp(iθ·cell) + its adjoint + on-site terms, S(θ) alike, H c = E S c.
 */
public final class LatticeBands {
    private static final int[] GRID = {128, 32, 12};

    private final Lattice lattice;
    private final int dimension;
    private final int orbitals;

    public LatticeBands(Lattice lattice) {
        this.lattice = lattice;
        dimension = lattice.vectors().size();
        orbitals = lattice.basis().orbitalCount();
    }

    /** Number of bands. */
    public int count() {
        return orbitals;
    }

    /**
     * Energies, ascending, eV.
     *
     * @param theta one phase per lattice vector, rad
     * @throws ArithmeticException where the overlap is not positive definite
     */
    public double[] energies(double... theta) {
        double[][] hr = new double[orbitals][orbitals];
        double[][] hi = new double[orbitals][orbitals];
        SiteTable basis = lattice.basis();
        for (int site = 0; site < basis.count(); site++) {
            for (int i = 0; i < basis.orbitals(site); i++) {
                for (int j = 0; j < basis.orbitals(site); j++) {
                    hr[basis.firstOrbital(site) + i][basis.firstOrbital(site) + j] = basis.onSiteReal(site, i, j);
                    hi[basis.firstOrbital(site) + i][basis.firstOrbital(site) + j] = basis.onSiteImaginary(site, i, j);
                }
            }
        }
        lattice.bonds().forEach(bond -> add(bond, theta, hr, hi));
        if (lattice.overlaps().isEmpty()) {
            return HermitianEigenvalues.of(hr, hi);
        }
        double[][] sr = new double[orbitals][orbitals];
        double[][] si = new double[orbitals][orbitals];
        overlap(theta, sr, si);
        double[] values = HermitianEigenvalues.of(hr, hi, sr, si);
        if (values == null) {
            throw new ArithmeticException("the overlap of lattice '" + lattice.name() + "' is not positive definite");
        }
        return values;
    }

    private void overlap(double[] theta, double[][] sr, double[][] si) {
        for (int i = 0; i < orbitals; i++) {
            sr[i][i] = 1;
        }
        lattice.overlaps().forEach(bond -> add(bond, theta, sr, si));
    }

    private void add(Lattice.Bond bond, double[] theta, double[][] re, double[][] im) {
        SiteTable basis = lattice.basis();
        double phase = 0;
        for (int i = 0; i < dimension; i++) {
            phase += theta[i] * bond.cell().get(i);
        }
        double cos = Math.cos(phase);
        double sin = Math.sin(phase);
        int rows = basis.orbitals(bond.from());
        int columns = basis.orbitals(bond.to());
        for (int r = 0; r < rows; r++) {
            for (int c = 0; c < columns; c++) {
                double a = bond.block().get(2 * (r * columns + c));
                double b = bond.block().get(2 * (r * columns + c) + 1);
                int row = basis.firstOrbital(bond.from()) + r;
                int column = basis.firstOrbital(bond.to()) + c;
                double x = a * cos - b * sin;
                double y = a * sin + b * cos;
                re[row][column] += x;
                im[row][column] += y;
                re[column][row] += x;
                im[column][row] -= y;
            }
        }
    }

    /** Smallest eigenvalue of the overlap S(θ) over a grid of θ; 1 for an orthogonal basis. */
    public double smallestOverlap() {
        if (lattice.overlaps().isEmpty()) {
            return 1;
        }
        double[] smallest = {Double.POSITIVE_INFINITY};
        eachGridPoint(theta -> {
            double[][] sr = new double[orbitals][orbitals];
            double[][] si = new double[orbitals][orbitals];
            overlap(theta, sr, si);
            smallest[0] = Math.min(smallest[0], HermitianEigenvalues.of(sr, si)[0]);
        });
        return smallest[0];
    }

    /** Where the bands begin and end, eV. */
    public Edges edges() {
        Best best = new Best();
        eachGridPoint(theta -> {
            double[] values = energies(theta);
            best.take(theta, values[0], values[orbitals - 1]);
        });
        double low = refine(best.lowestAt, 0, 1);
        double high = -refine(best.highestAt, orbitals - 1, -1);
        return new Edges(low, high, best.lowestAt);
    }

    /**
     * Bottom of the lowest and top of the highest band.
     *
     * @param bottomAt the phases where the lowest band has its bottom, rad
     */
    public record Edges(double bottom, double top, double[] bottomAt) {}

    private static final class Best {
        private double lowest = Double.POSITIVE_INFINITY;
        private double highest = Double.NEGATIVE_INFINITY;
        private double[] lowestAt;
        private double[] highestAt;

        private void take(double[] theta, double low, double high) {
            if (low < lowest) {
                lowest = low;
                lowestAt = theta.clone();
            }
            if (high > highest) {
                highest = high;
                highestAt = theta.clone();
            }
        }
    }

    @FunctionalInterface
    private interface GridPoint {
        void at(double[] theta);
    }

    /** A grid that holds 0 and π of every phase; coarser where the matrices are large. */
    private void eachGridPoint(GridPoint visitor) {
        int points = GRID[dimension - 1];
        while (points > 4 && Math.pow(points, dimension) * Math.pow(2.0 * orbitals, 3) > 2e9) {
            points /= 2;
        }
        int total = (int) Math.pow(points, dimension);
        double[] theta = new double[dimension];
        for (int index = 0; index < total; index++) {
            int rest = index;
            for (int i = 0; i < dimension; i++) {
                int k = rest % points;
                // from 0 outward on both sides, so that of equal minima the one at 0 comes first
                theta[i] = 2 * Math.PI / points * (k % 2 == 0 ? k / 2 : -(k + 1) / 2);
                rest /= points;
            }
            visitor.at(theta);
        }
    }

    /** Goes downhill from a grid point with ever smaller steps; {@code theta} is moved. */
    private double refine(double[] theta, int band, int sign) {
        double value = sign * energies(theta)[band];
        for (double step = Math.PI / GRID[dimension - 1]; step > 1e-7; step /= 2) {
            boolean moved = true;
            for (int round = 0; moved && round < 8; round++) {
                moved = false;
                for (int i = 0; i < dimension; i++) {
                    for (int way = -1; way <= 1; way += 2) {
                        theta[i] += way * step;
                        double next = sign * energies(theta)[band];
                        if (next < value - 1e-15 * Math.abs(value)) {
                            value = next;
                            moved = true;
                        } else {
                            theta[i] -= way * step;
                        }
                    }
                }
            }
        }
        return value;
    }

    /**
     * How far the lattice's lowest band is off the parabola that it has at its bottom, which it stands for where the
     * lattice replaces a continuum: |E_parabola(k) − E(k)|/E_parabola(k) at the k where the band reaches the energy, both
     * counted from the bottom; the largest along the lattice vectors. For E = 2t(1 − cos ka) it is 1 − 2(1 − cos ka)/(ka)².
     * Where the band ends below the energy it is the error at the band's top.
     *
     * @param energy eV
     * @return none at or below the bottom
     */
    public OptionalDouble dispersionError(double energy) {
        return dispersion(energy).map(d -> OptionalDouble.of(d.error)).orElse(OptionalDouble.empty());
    }

    /**
     * By what factor the lattice's spacing must shrink for the error at an energy to fall to a bound: hoppings grow with
     * the inverse square of the spacing.
     *
     * @param energy eV
     * @param bound of the error, such as 0.05
     * @return none where the error is below the bound already
     */
    public OptionalDouble spacingFactor(double energy, double bound) {
        Dispersion worst = dispersion(energy).orElse(null);
        if (worst == null || worst.error <= bound) {
            return OptionalDouble.empty();
        }
        double low = 1e-3;
        double high = Math.PI;
        for (int step = 0; step < 60; step++) {
            double middle = 0.5 * (low + high);
            if (errorAt(worst, middle) > bound) {
                high = middle;
            } else {
                low = middle;
            }
        }
        double reached = 0.5 * worst.curvature * low * low * (1 - bound);
        return OptionalDouble.of(Math.sqrt(reached / (energy - worst.bottom)));
    }

    private record Dispersion(int vector, int way, double[] start, double bottom, double curvature, double error) {}

    private Optional<Dispersion> dispersion(double energy) {
        Edges edges = edges();
        if (energy <= edges.bottom()) {
            return Optional.empty();
        }
        Dispersion worst = null;
        double[] curvatures = new double[dimension];
        double steepest = 0;
        for (int i = 0; i < dimension; i++) {
            curvatures[i] = curvature(edges, i);
            steepest = Math.max(steepest, curvatures[i]);
        }
        for (int i = 0; i < dimension; i++) {
            if (curvatures[i] <= 1e-3 * steepest) {
                continue;
            }
            int way = edges.bottomAt()[i] < -1e-6 ? -1 : 1;
            Dispersion along = new Dispersion(i, way, edges.bottomAt(), edges.bottom(), curvatures[i], 0);
            double error = errorAt(along, reach(along, energy));
            if (worst == null || error > worst.error) {
                worst = new Dispersion(i, way, edges.bottomAt(), edges.bottom(), curvatures[i], error);
            }
        }
        return Optional.ofNullable(worst);
    }

    private double curvature(Edges edges, int vector) {
        double step = 1e-3;
        double[] theta = edges.bottomAt().clone();
        theta[vector] += step;
        double above = energies(theta)[0];
        theta[vector] -= 2 * step;
        double below = energies(theta)[0];
        return (above + below - 2 * edges.bottom()) / (step * step);
    }

    private double lowestAt(Dispersion along, double distance) {
        double[] theta = along.start.clone();
        theta[along.vector] += along.way * distance;
        return energies(theta)[0];
    }

    /** The first phase at which the band reaches the energy, or where it turns back. */
    private double reach(Dispersion along, double energy) {
        int steps = 256;
        double before = along.bottom;
        for (int k = 1; k <= steps; k++) {
            double at = Math.PI * k / steps;
            double value = lowestAt(along, at);
            if (value >= energy) {
                double low = Math.PI * (k - 1) / steps;
                double high = at;
                for (int round = 0; round < 50; round++) {
                    double middle = 0.5 * (low + high);
                    if (lowestAt(along, middle) >= energy) {
                        high = middle;
                    } else {
                        low = middle;
                    }
                }
                return high;
            }
            if (value < before) {
                return Math.PI * (k - 1) / steps;
            }
            before = value;
        }
        return Math.PI;
    }

    private double errorAt(Dispersion along, double distance) {
        double parabola = 0.5 * along.curvature * distance * distance;
        return Math.abs(parabola - (lowestAt(along, distance) - along.bottom)) / parabola;
    }
}
