package org.isthmus.runtime.observable;

import java.util.ArrayList;
import java.util.List;
import java.util.function.DoubleFunction;
import org.apache.commons.math3.complex.Complex;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;
import org.isthmus.runtime.solve.OperatingPoint.LeadState;
import org.isthmus.runtime.units.PhysicalConstants;

/**
 * Electrons per site: the part in equilibrium with the lead of the lowest µ, −(g/π) Im ∫ f G dE, along a contour above the
 * real axis with the poles of f below it (Zeller, Deutz & Dederichs, Solid State Commun. 44, 993 (1982)), plus what the
 * other leads add, (g/2π) ∫ Σ_p (f_p − f_ref) A_p dE, on the real axis. States that no lead reaches are filled like the
 * first part.
 */
public final class ChargeDensity extends Observable {
    private static final double HEIGHT = 0.3;
    private static final int MOST_POLES = 40;
    private static final double BELOW = 20;
    private static final int ARC_PANELS = 4;

    public ChargeDensity() {
        super("density", new Needs(true, false));
    }

    @Override
    public double[] values(Bench bench, ObservableCall column, double energy) {
        int reference = 0;
        for (int p = 1; p < bench.leads(); p++) {
            if (bench.lead(p).mu() < bench.lead(reference).mu()) {
                reference = p;
            }
        }
        double[] values = equilibrium(bench, bench.lead(reference));
        if (!Current.inEquilibrium(bench)) {
            double[] window = bench.thermalWindow(Fermi.TAIL);
            LeadState state = bench.lead(reference);
            if (window[1] > window[0]) {
                double[] added = bench.integral(name(), window[0], window[1], e -> added(bench, state, e));
                for (int site = 0; site < values.length; site++) {
                    values[site] += added[site];
                }
            }
        }
        return values;
    }

    private static double[] added(Bench bench, LeadState reference, double energy) {
        EnergySolution solution = bench.at(energy);
        double[] sum = new double[bench.device().sites().count()];
        for (int p = 0; p < bench.leads(); p++) {
            double difference = Fermi.difference(bench.lead(p), reference, energy);
            if (difference != 0) {
                double[] fed = solution.siteSpectral(p);
                for (int site = 0; site < sum.length; site++) {
                    sum[site] += bench.degeneracy() * difference * fed[site] / (2 * Math.PI);
                }
            }
        }
        return sum;
    }

    private double[] equilibrium(Bench bench, LeadState lead) {
        double[] bounds = bench.solver().spectrumBounds();
        double bottom = bottom(bench, lead, bounds[0]);
        double kT = Fermi.kT(lead);
        int poles = kT == 0 ? 0 : (int) Math.max(1, Math.min(MOST_POLES, Math.ceil(HEIGHT / (2 * Math.PI * kT))));
        double height = 2 * Math.PI * kT * poles;
        double corner = lead.mu() - BELOW * kT;
        double[] sum = new double[bench.device().sites().count()];
        if (corner > bottom) {
            addArc(bench, lead, bottom, corner, height, sum);
        } else {
            corner = bottom;
            addLine(
                    bench,
                    sum,
                    y -> {
                        Complex z = new Complex(bottom, y);
                        return weighted(bench, z, fermi(lead, z).multiply(Complex.I));
                    },
                    0,
                    height);
        }
        if (height > 0) {
            double start = corner;
            addLine(
                    bench,
                    sum,
                    x -> {
                        Complex z = new Complex(x, height);
                        return weighted(bench, z, fermi(lead, z));
                    },
                    start,
                    lead.mu() + Fermi.TAIL * kT);
        }
        for (int n = 0; n < poles; n++) {
            // −2πi kT G(z_n) for every pole below the contour; its imaginary part is −2πkT Re G
            double[] green = bench.solver().siteGreens(lead.mu(), Math.PI * kT * (2 * n + 1));
            for (int site = 0; site < sum.length; site++) {
                sum[site] -= 2 * Math.PI * kT * green[2 * site];
            }
        }
        for (int site = 0; site < sum.length; site++) {
            sum[site] *= -bench.degeneracy() / Math.PI;
        }
        return sum;
    }

    /**
     * Start of the contour, below every state. A wide-band contact has a tail without end, ∝ 1/E²: the contour then starts
     * so far below that what is left out is less than the accuracy of a plot, 1e-6 electrons.
     */
    private static double bottom(Bench bench, LeadState lead, double lowest) {
        double margin = 0.5 + 20 * Fermi.kT(lead);
        double start = Math.min(lowest, lead.mu()) - margin;
        double broadening = bench.device().leads().stream()
                .filter(org.isthmus.runtime.device.WideBandLead.class::isInstance)
                .flatMap(l -> ((org.isthmus.runtime.device.WideBandLead) l).broadening().stream())
                .mapToDouble(b -> b)
                .sum();
        return broadening == 0 ? start : start - broadening * 1e6;
    }

    /** The circle about a point of the real axis from the bottom to the corner above the real axis. */
    private void addArc(Bench bench, LeadState lead, double bottom, double corner, double height, double[] sum) {
        double width = corner - bottom;
        double radius = (width * width + height * height) / (2 * width);
        double centre = bottom + radius;
        double end = Math.atan2(height, corner - centre);
        // far from the real axis G changes on the scale of the distance to the spectrum: equal steps of its logarithm
        addLine(
                bench,
                sum,
                s -> {
                    double angle = Math.PI + (end - Math.PI) * s;
                    Complex direction = new Complex(Math.cos(angle), Math.sin(angle));
                    Complex z = direction.multiply(radius).add(centre);
                    Complex step = direction.multiply(Complex.I).multiply(radius * (end - Math.PI));
                    return weighted(
                            bench,
                            new Complex(z.getReal(), Math.max(z.getImaginary(), Double.MIN_NORMAL)),
                            fermi(lead, z).multiply(step));
                },
                0,
                1);
    }

    private void addLine(Bench bench, double[] sum, DoubleFunction<double[]> integrand, double from, double to) {
        List<Double> breaks = new ArrayList<>();
        for (int k = 0; k <= ARC_PANELS; k++) {
            breaks.add(from + (to - from) * k / ARC_PANELS);
        }
        EnergyIntegral.Result result = EnergyIntegral.alongContour(breaks, integrand, bench.accuracy());
        bench.shortfall(name(), result.relativeError());
        for (int site = 0; site < sum.length; site++) {
            sum[site] += result.values()[site];
        }
    }

    /** Im[weight·G_ii(z)] per site. */
    private static double[] weighted(Bench bench, Complex z, Complex weight) {
        double[] green = bench.solver().siteGreens(z.getReal(), z.getImaginary());
        double[] values = new double[green.length / 2];
        for (int site = 0; site < values.length; site++) {
            values[site] = weight.getReal() * green[2 * site + 1] + weight.getImaginary() * green[2 * site];
        }
        return values;
    }

    private static Complex fermi(LeadState lead, Complex z) {
        if (lead.temperature() == 0) {
            return Complex.ONE;
        }
        double x = (z.getReal() - lead.mu()) / (PhysicalConstants.KB * lead.temperature());
        double y = z.getImaginary() / (PhysicalConstants.KB * lead.temperature());
        if (x > 0) {
            Complex small = new Complex(Math.exp(-x) * Math.cos(y), -Math.exp(-x) * Math.sin(y));
            return small.divide(small.add(1));
        }
        Complex small = new Complex(Math.exp(x) * Math.cos(y), Math.exp(x) * Math.sin(y));
        return small.add(1).reciprocal();
    }
}
