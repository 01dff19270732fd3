package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.solve.Needs;
import org.isthmus.runtime.solve.OperatingPoint.LeadState;
import org.isthmus.runtime.solve.Solver;
import org.isthmus.runtime.units.PhysicalConstants;

/**
 * Electrons per site: what would be there in equilibrium with the first lead, and what the others add or take away at the
 * energies where they differ from it.
 *
 * <p>The equilibrium part is −g/π Im ∫ G S f dE with the path moved off the real axis, where G is smooth. With poles of f
 * at z_n = mu + iπkT(2n + 1) the path crosses the imaginary direction above the first M of them and then goes up to
 * infinity, where G → 1/z: n = ½·orbitals + 2kT Σ_n Re G(z_n) − (1/π)∫ Im[G f] dx along the crossing + (1/π)∫ Re G dy along
 * the way up (residue theorem). States that no lead reaches are included.
 */
final class Density implements Observable.Integrated {
    /** Height of the crossing that is aimed at, eV; with at most this many poles below it. */
    private static final double HEIGHT = 0.2;

    private static final int MOST_POLES = 20;

    @Override
    public String name() {
        return "density";
    }

    @Override
    public List<ObservableCall> all(Device device) {
        return Columns.single(name());
    }

    @Override
    public String column(ObservableCall call) {
        return name();
    }

    @Override
    public String unit(boolean resolved) {
        return "";
    }

    @Override
    public boolean perSite() {
        return true;
    }

    @Override
    public Integrand integrand(PointContext context, ObservableCall call) {
        int sites = context.device().sites().count();
        LeadState reference = context.leads().get(0);
        double factor = context.device().degeneracy() / (2 * Math.PI);
        return new Integrand(
                new Needs(true, false),
                context.equilibrium() ? Window.EMPTY : context.thermal(),
                sites,
                List.of(),
                (solution, values, first) -> {
                    double there = Occupation.fermi(solution.energy(), reference);
                    for (int lead = 1; lead < context.leads().size(); lead++) {
                        double more = Occupation.fermi(
                                        solution.energy(), context.leads().get(lead))
                                - there;
                        if (more != 0) {
                            double[] fed = solution.siteSpectral(lead);
                            for (int site = 0; site < sites; site++) {
                                values[first + site] += factor * more * fed[site];
                            }
                        }
                    }
                },
                (integrals, points) -> {
                    double[] density = equilibrium(context, reference);
                    for (int site = 0; site < sites; site++) {
                        density[site] += integrals[site];
                    }
                    return density;
                });
    }

    private static double[] equilibrium(PointContext context, LeadState lead) {
        Solver solver = context.solver();
        SiteTable sites = context.device().sites();
        int n = sites.count();
        double kt = PhysicalConstants.KB * lead.temperature();
        int poles = kt == 0 ? 0 : (int) Math.max(1, Math.min(MOST_POLES, Math.ceil(HEIGHT / (2 * Math.PI * kt))));
        double height = 2 * Math.PI * kt * poles;
        double left = lead.mu() - Occupation.REACH * kt;
        EnergyIntegral integral = new EnergyIntegral(context.workers(), context.accuracy());

        double[] density = new double[n];
        for (int site = 0; site < n; site++) {
            density[site] = 0.5 * sites.orbitals(site);
        }
        double[] bounds = solver.spectrumBounds();
        double scale = Math.max(1e-3, 0.25 * (bounds[1] - bounds[0]));
        // y = height + scale·u/(1 − u)
        add(density, 1 / Math.PI, integral.over(0, 1, List.of(), u -> {
            double rest = Math.max(1 - u, 1e-12);
            double[] green = solver.siteGreens(left, Math.max(height + scale * u / rest, Double.MIN_NORMAL));
            return parts(green, n, scale / (rest * rest), 0);
        }));
        if (poles > 0) {
            add(density, -1 / Math.PI, integral.over(left, lead.mu() + Occupation.REACH * kt, List.of(lead.mu()), x -> {
                // height is a whole multiple of 2πkT: there f is what it is on the real axis
                double[] green = solver.siteGreens(x, height);
                return parts(green, n, 0, Occupation.fermi(x, lead));
            }));
            for (int pole = 0; pole < poles; pole++) {
                double[] green = solver.siteGreens(lead.mu(), Math.PI * kt * (2 * pole + 1));
                add(density, 2 * kt, parts(green, n, 1, 0));
            }
        }
        for (int site = 0; site < n; site++) {
            density[site] *= context.device().degeneracy();
        }
        return density;
    }

    /** real·Re G + imaginary·Im G per site. */
    private static double[] parts(double[] green, int sites, double real, double imaginary) {
        double[] values = new double[sites];
        for (int site = 0; site < sites; site++) {
            values[site] = real * green[2 * site] + imaginary * green[2 * site + 1];
        }
        return values;
    }

    private static void add(double[] sum, double factor, double[] values) {
        for (int i = 0; i < sum.length; i++) {
            sum[i] += factor * values[i];
        }
    }
}
