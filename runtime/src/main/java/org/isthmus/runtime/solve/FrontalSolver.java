package org.isthmus.runtime.solve;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.ComplexMatrix;
import org.isthmus.runtime.kernel.Dense;
import org.isthmus.runtime.kernel.Op;
import org.isthmus.runtime.kernel.SingularMatrixException;
import org.isthmus.runtime.plan.SolvePlan;
import org.isthmus.runtime.selfenergy.Contact;
import org.isthmus.runtime.selfenergy.OutsideTableException;
import org.isthmus.runtime.solve.Elimination.Keep;
import org.isthmus.runtime.solve.Elimination.Remainder;

/** Executes a plan: everything that no lead touches is eliminated, then the leads are coupled to what is left. */
final class FrontalSolver implements Solver {
    /** A solution whose own equations are fulfilled no better than this is not given out. */
    private static final double TRUSTWORTHY = 1e-5;

    /** How often another energy is tried where leads are not defined at the one asked for. */
    private static final int TRIALS_BESIDE = 4;

    private final OperatingPoint point;
    private final SolvePlan plan;
    private final List<Contact> contacts;
    private final ComplexBackend backend;
    private final Entries entries;
    private final int[] siteOf;
    private final ThreadLocal<int[]> where;

    FrontalSolver(OperatingPoint point, SolvePlan plan, List<Contact> contacts, ComplexBackend backend) {
        this.point = point;
        this.plan = plan;
        this.contacts = List.copyOf(contacts);
        this.backend = backend;
        for (Contact contact : contacts) {
            for (int orbital : contact.orbitals()) {
                if (Arrays.binarySearch(plan.root().orbitals(), orbital) < 0) {
                    throw new IllegalArgumentException(
                            "orbital " + orbital + " is touched by a lead, but eliminated by the plan");
                }
            }
        }
        entries = new Entries(point, plan);
        SiteTable sites = point.device().sites();
        siteOf = new int[sites.orbitalCount()];
        for (int site = 0; site < sites.count(); site++) {
            Arrays.fill(siteOf, sites.firstOrbital(site), sites.firstOrbital(site + 1), site);
        }
        where = ThreadLocal.withInitial(() -> new int[plan.orbitals()]);
    }

    @Override
    public OperatingPoint operatingPoint() {
        return point;
    }

    @Override
    public EnergySolution solve(double energy, Needs needs) {
        Coupled coupled = couple(energy, 0, needs.sites() ? Keep.RIGHT : Keep.NOTHING);
        int n = contacts.size();
        ComplexMatrix[] broadening = new ComplexMatrix[n];
        for (int p = 0; p < n; p++) {
            broadening[p] = LeadTraces.broadening(coupled.sigmas[p].sigma());
        }
        LeadTraces traces = new LeadTraces(backend, coupled.green, coupled.places, broadening);
        double[][] transmissions = traces.transmissions();
        double[] spectralTraces = traces.spectralTraces();
        requireConservation(energy, transmissions, spectralTraces);
        double[][] byLead = null;
        double[] total = null;
        if (needs.sites()) {
            List<ComplexMatrix> values = new ArrayList<>();
            for (int p = 0; p < n; p++) {
                values.add(fed(coupled.green, coupled.places[p], broadening[p]));
            }
            values.add(LeadTraces.broadening(coupled.green));
            double[][] shares = sweep().shares(coupled.remainder, values);
            byLead = Arrays.copyOf(shares, n);
            total = shares[n];
            coupled = coupled.with(requireFed(coupled, byLead, total));
        }
        int[] modes = new int[n];
        for (int p = 0; p < n; p++) {
            modes[p] = coupled.sigmas[p].openModes();
        }
        return new CoherentSolution(
                energy,
                transmissions,
                spectralTraces,
                modes,
                needs.correlators() ? traces.correlators() : null,
                byLead,
                total,
                coupled.residual);
    }

    @Override
    public double[] siteGreens(double real, double imaginary) {
        if (!(imaginary > 0)) {
            throw new IllegalArgumentException("the contour lies above the real axis, not at " + imaginary + " eV");
        }
        Coupled coupled = couple(real, imaginary, Keep.ALL);
        return sweep().diagonal(coupled.remainder, coupled.green);
    }

    /** Tr[Γ_p A] = Σ_q T_pq and T_pq ≥ 0: what self-energies that are not retarded, or lost digits, would break. */
    private void requireConservation(double energy, double[][] transmissions, double[] spectralTraces) {
        for (int p = 0; p < spectralTraces.length; p++) {
            double sum = 0;
            double least = 0;
            for (int q = 0; q < spectralTraces.length; q++) {
                sum += transmissions[q][p];
                least = Math.min(least, transmissions[q][p]);
            }
            double broken = Math.max(Math.abs(sum - spectralTraces[p]), -least) / Math.max(1, Math.abs(sum));
            if (!(broken < TRUSTWORTHY)) {
                throw new SolveFailure("At " + energy + " eV current at lead '"
                        + point.device().leads().get(p).name() + "' of device '"
                        + point.device().name() + "' is conserved to " + broken
                        + " only; move the energy a little, away from a band edge or a bound state.");
            }
        }
    }

    /**
     * A = Σ G Γ_p G† at every site, relative to the largest of A and G: on a long way down the tree, with many delayed pivots, digits
     * can be lost that the leads do not see.
     */
    private double requireFed(Coupled coupled, double[][] byLead, double[] total) {
        double largest = Dense.of(coupled.green).largest();
        double broken = 0;
        for (int site = 0; site < total.length; site++) {
            double fed = 0;
            for (double[] lead : byLead) {
                fed += lead[site];
            }
            largest = Math.max(largest, Math.abs(total[site]));
            broken = Math.max(broken, Math.abs(total[site] - fed));
        }
        double relative = broken == 0 ? 0 : broken / largest;
        if (!(relative < TRUSTWORTHY)) {
            throw new SolveFailure("At " + coupled.energy + " eV the states at the sites of device '"
                    + point.device().name() + "' are known to " + relative
                    + " only; move the energy a little, away from a band edge or a bound state.");
        }
        return relative;
    }

    /** G Γ G† for a Γ on some rows. */
    private ComplexMatrix fed(ComplexMatrix green, int[] places, ComplexMatrix broadening) {
        int[] all = IntStream.range(0, green.rows()).toArray();
        ComplexMatrix columns = green.select(all, places);
        return backend.multiply(Op.NONE, backend.multiply(columns, broadening), Op.ADJOINT, columns);
    }

    private SiteSweep sweep() {
        return new SiteSweep(plan, entries, point.device().sites(), backend, siteOf, where.get());
    }

    private record Coupled(
            double energy,
            Remainder remainder,
            ComplexMatrix green,
            Contact.SelfEnergy[] sigmas,
            int[][] places,
            double residual) {
        Coupled with(double another) {
            return new Coupled(energy, remainder, green, sigmas, places, Math.max(residual, another));
        }
    }

    private Coupled couple(double asked, double imaginary, Keep keep) {
        double real = asked;
        Contact.SelfEnergy[] sigmas = selfEnergies(real, imaginary);
        for (int trial = 0; trial < TRIALS_BESIDE && beside(sigmas) != 0; trial++) {
            // at a band edge: the limit from beside, of body and leads alike, so that they still match
            double step = beside(sigmas);
            real = asked + (trial % 2 == 0 ? step : -step);
            sigmas = selfEnergies(real, imaginary);
        }
        Remainder remainder = new Elimination(plan, entries, backend, real, imaginary, keep, where.get()).run();
        ComplexMatrix matrix = remainder.matrix().copy();
        int[] index = where.get();
        for (int i = 0; i < remainder.orbitals().length; i++) {
            index[remainder.orbitals()[i]] = i;
        }
        int[][] places = new int[contacts.size()][];
        double residual = remainder.rounding();
        for (int p = 0; p < sigmas.length; p++) {
            places[p] =
                    Arrays.stream(contacts.get(p).orbitals()).map(o -> index[o]).toArray();
            ComplexMatrix minus = sigmas[p].sigma().copy();
            minus.scale(-1, 0);
            matrix.scatterAdd(minus, places[p], places[p]);
            residual = Math.max(residual, sigmas[p].residual());
        }
        ComplexMatrix green;
        try {
            ContactGreen solved = ContactGreen.of(matrix, backend);
            green = solved.green();
            residual = Math.max(residual, solved.residual());
        } catch (ArithmeticException | SingularMatrixException e) {
            throw new SolveFailure(
                    "At " + real + " eV the equations of device '"
                            + point.device().name() + "' have no solution (" + e.getMessage()
                            + "); move the energy a little, away from a band edge or a bound state.",
                    e);
        }
        if (!(residual < TRUSTWORTHY) || !green.finite()) {
            throw new SolveFailure("At " + real + " eV the equations of device '"
                    + point.device().name() + "' are fulfilled to " + residual
                    + " only; move the energy a little, away from a band edge or a bound state.");
        }
        return new Coupled(asked, remainder, green, sigmas, places, residual);
    }

    private Contact.SelfEnergy[] selfEnergies(double real, double imaginary) {
        Contact.SelfEnergy[] sigmas = new Contact.SelfEnergy[contacts.size()];
        for (int p = 0; p < sigmas.length; p++) {
            sigmas[p] = selfEnergy(p, real, imaginary);
        }
        return sigmas;
    }

    /** The largest step that a lead has taken from the energy asked for, eV; 0 where none had to. */
    private static double beside(Contact.SelfEnergy[] sigmas) {
        double largest = 0;
        for (Contact.SelfEnergy sigma : sigmas) {
            largest = Math.abs(sigma.beside()) > Math.abs(largest) ? sigma.beside() : largest;
        }
        return largest;
    }

    private Contact.SelfEnergy selfEnergy(int lead, double real, double imaginary) {
        try {
            return contacts.get(lead).at(real - point.leads().get(lead).bandShift(), imaginary);
        } catch (OutsideTableException e) {
            throw new SolveFailure(e.getMessage(), e);
        } catch (ArithmeticException | SingularMatrixException e) {
            throw new SolveFailure(
                    "The self-energy of lead '"
                            + point.device().leads().get(lead).name() + "' was not found at " + real + " eV: "
                            + e.getMessage() + ".",
                    e);
        }
    }

    @Override
    public List<Double> modeOpenings() {
        List<Double> openings = new ArrayList<>();
        for (int p = 0; p < contacts.size(); p++) {
            double shift = point.leads().get(p).bandShift();
            contacts.get(p).modeOpenings().forEach(e -> openings.add(e + shift));
        }
        openings.sort(Double::compare);
        List<Double> distinct = new ArrayList<>();
        for (double e : openings) {
            if (distinct.isEmpty() || e - distinct.get(distinct.size() - 1) > 1e-9) {
                distinct.add(e);
            }
        }
        return distinct;
    }

    @Override
    public double[] spectrumBounds() {
        double[] bounds = bodyBounds();
        for (int p = 0; p < contacts.size(); p++) {
            double[] bands = contacts.get(p).bandBounds();
            if (bands.length == 2) {
                double shift = point.leads().get(p).bandShift();
                bounds[0] = Math.min(bounds[0], bands[0] + shift);
                bounds[1] = Math.max(bounds[1], bands[1] + shift);
            }
        }
        return bounds;
    }

    /** Gershgorin's circles of the body. */
    private double[] bodyBounds() {
        Device device = point.device();
        SiteTable sites = device.sites();
        double[] radius = new double[sites.orbitalCount()];
        HoppingTable bonds = device.hoppings();
        for (int b = 0; b < bonds.count(); b++) {
            for (int i = 0; i < sites.orbitals(bonds.from(b)); i++) {
                for (int j = 0; j < sites.orbitals(bonds.to(b)); j++) {
                    double size = Math.hypot(bonds.real(b, i, j), bonds.imaginary(b, i, j));
                    radius[sites.firstOrbital(bonds.from(b)) + i] += size;
                    radius[sites.firstOrbital(bonds.to(b)) + j] += size;
                }
            }
        }
        double[] bounds = {Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY};
        for (int site = 0; site < sites.count(); site++) {
            for (int i = 0; i < sites.orbitals(site); i++) {
                double r = radius[sites.firstOrbital(site) + i];
                for (int j = 0; j < sites.orbitals(site); j++) {
                    r += i == j ? 0 : Math.hypot(sites.onSiteReal(site, i, j), sites.onSiteImaginary(site, i, j));
                }
                double centre = sites.onSiteReal(site, i, i) + point.shift(site);
                bounds[0] = Math.min(bounds[0], centre - r);
                bounds[1] = Math.max(bounds[1], centre + r);
            }
        }
        return bounds;
    }

    @Override
    public void close() {
        where.remove();
    }
}
