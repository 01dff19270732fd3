package org.isthmus.language.elaboration;

import java.util.OptionalDouble;
import org.isthmus.language.elaboration.geometry.BodySites;
import org.isthmus.language.elaboration.geometry.Loops;
import org.isthmus.language.elaboration.geometry.Parts;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.LeadDeclaration;
import org.isthmus.language.isthmus.MagneticField;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.Lattice;
import org.isthmus.runtime.device.LatticeLead;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.SiteTable;

/** Looks at the finished device for what a user hardly wants: loose parts, steps at contacts, a field too strong. */
final class VerifyDevice implements Pass {
    private static final double MOST_FLUX = 0.1;

    /** Steps below this fraction of the largest hopping, and below this energy, pass: tails of smooth potentials. */
    private static final double STEP_OF_HOPPING = 0.01;

    private static final double STEP = 0.01;

    @Override
    public void run(Draft draft) {
        parts(draft);
        flux(draft);
        for (LeadDeclaration declaration : draft.structure.leads()) {
            draft.leads.stream()
                    .filter(lead -> lead.name().equals(declaration.getName()))
                    .findFirst()
                    .ifPresent(lead -> step(draft, declaration, lead));
        }
        size(draft);
    }

    // ---- parts

    private static void parts(Draft draft) {
        BodySites body = draft.body;
        int count = body.count();
        boolean[] bonded = new boolean[count];
        Parts parts = new Parts(count);
        join(draft.hoppings, draft.sites, parts, bonded);
        join(draft.overlaps, draft.sites, parts, bonded);
        for (Lead lead : draft.leads) {
            if (lead instanceof LatticeLead) {
                lead.contactSites().forEach(site -> bonded[site] = true);
            }
        }
        int lonely = -1;
        int lonelyCount = 0;
        int groups = 0;
        int largest = 0;
        int smallest = Integer.MAX_VALUE;
        int smallestAt = -1;
        for (int site = 0; site < count; site++) {
            if (!bonded[site]) {
                lonely = lonely < 0 ? site : lonely;
                lonelyCount++;
            } else if (parts.first(site) == site) {
                int size = parts.size(site);
                groups++;
                largest = Math.max(largest, size);
                if (size < smallest) {
                    smallest = size;
                    smallestAt = site;
                }
            }
        }
        if (lonely >= 0 && count > 1) {
            draft.findings.add(
                    IssueCode.LONELY_SITE,
                    draft.structure.body().orElseThrow().getShape(),
                    "The site at " + Told.place(body.x(lonely), body.y(lonely), body.z(lonely))
                            + " has no neighbour"
                            + (lonelyCount == 1 ? "" : ", like " + Told.count(lonelyCount - 1, "further site"))
                            + ": nothing flows through it; leave it out or close the gap.");
        }
        if (groups > 1) {
            draft.findings.add(
                    IssueCode.UNCONNECTED_PARTS,
                    draft.structure.body().orElseThrow().getShape(),
                    "The body has " + groups + " parts without a bond between them: the largest has "
                            + Told.count(largest, "site") + ", the smallest " + Told.count(smallest, "site")
                            + " and begins at "
                            + Told.place(body.x(smallestAt), body.y(smallestAt), body.z(smallestAt))
                            + "; close the gap if they belong together.");
        }
    }

    /** A hopping that a scale has made zero joins nothing. */
    private static void join(HoppingTable bonds, SiteTable sites, Parts parts, boolean[] bonded) {
        for (int bond = 0; bond < bonds.count(); bond++) {
            int from = bonds.from(bond);
            int to = bonds.to(bond);
            if (!zero(bonds, bond, sites.orbitals(from), sites.orbitals(to))) {
                parts.join(from, to);
                bonded[from] = true;
                bonded[to] = true;
            }
        }
    }

    private static boolean zero(HoppingTable bonds, int bond, int rows, int columns) {
        for (int r = 0; r < rows; r++) {
            for (int c = 0; c < columns; c++) {
                if (bonds.real(bond, r, c) != 0 || bonds.imaginary(bond, r, c) != 0) {
                    return false;
                }
            }
        }
        return true;
    }

    // ---- field

    private static void flux(Draft draft) {
        MagneticField statement = draft.structure.field().orElse(null);
        if (statement == null || draft.gauge.none()) {
            return;
        }
        OptionalDouble area = Loops.smallestArea(draft.frame);
        if (area.isEmpty()) {
            return;
        }
        double flux = Math.abs(draft.gauge.fluxQuanta(area.getAsDouble()));
        if (flux > MOST_FLUX) {
            draft.findings.add(
                    IssueCode.STRONG_FIELD,
                    statement.getValue(),
                    "A field of " + Told.number(draft.field * 1e3) + " T puts " + Told.number(flux)
                            + " flux quanta h/q through the smallest loop of lattice '" + draft.lattice.name() + "' ("
                            + Told.number(area.getAsDouble()) + " nm^2): above " + MOST_FLUX
                            + " the lattice no longer stands for a continuum; take a spacing shorter by "
                            + Told.number(Math.ceil(100 * (1 - Math.sqrt(MOST_FLUX / flux)))) + " %.");
        }
    }

    // ---- steps at contacts

    /**
     * The body's potential at a contact site, which is what its on-site term has more than the lattice's, against the
     * lead's own: the largest element of the difference.
     */
    private static void step(Draft draft, LeadDeclaration declaration, Lead lead) {
        if (!(lead instanceof LatticeLead side)) {
            return;
        }
        SiteTable sites = draft.sites;
        SiteTable basis = draft.lattice.basis();
        double[][] shift = new double[basis.count()][];
        for (int i = 0; i < side.cell().count(); i++) {
            int b = side.cell().basis(i);
            if (shift[b] == null) {
                shift[b] = difference(AddPotentials.onSite(side.cell(), i), AddPotentials.onSite(basis, b));
            }
        }
        double worst = 0;
        int at = -1;
        for (int site : side.contactSites()) {
            int b = sites.basis(site);
            double[] step = difference(AddPotentials.onSite(sites, site), AddPotentials.onSite(basis, b));
            if (shift[b] != null) {
                step = difference(step, shift[b]);
            }
            for (double element : step) {
                if (Math.abs(element) > Math.abs(worst)) {
                    worst = element;
                    at = site;
                }
            }
        }
        if (Math.abs(worst) > Math.min(STEP, STEP_OF_HOPPING * largestHopping(draft.lattice))) {
            draft.findings.add(
                    IssueCode.CONTACT_STEP,
                    declaration,
                    IsthmusPackage.Literals.DECLARATION__NAME,
                    "The potential steps by " + Told.eV(worst) + " from lead '" + lead.name() + "' to the body at "
                            + Told.place(sites.x(at), sites.y(at), sites.z(at))
                            + ": carriers are reflected there; let the potential end inside the body, or give the lead potential = "
                            + Told.eV(worst) + ".");
        }
    }

    private static double[] difference(double[] a, double[] b) {
        double[] difference = new double[a.length];
        for (int k = 0; k < a.length; k++) {
            difference[k] = a[k] - b[k];
        }
        return difference;
    }

    private static double largestHopping(Lattice lattice) {
        return lattice.bonds().stream()
                .flatMap(bond -> bond.block().stream())
                .mapToDouble(Math::abs)
                .max()
                .orElse(0);
    }

    // ---- size

    private static void size(Draft draft) {
        int orbitals = draft.sites.orbitalCount();
        // nested dissection: separators of M^(1 − 1/d) orbitals, flops of their cube (George, SIAM J. Numer. Anal. 10,
        // 345 (1973))
        int dimension = draft.frame.dimension();
        double power = dimension == 1 ? 1 : dimension == 2 ? 1.5 : 2;
        double flops = 100 * Math.pow(orbitals, power);
        draft.findings.add(
                IssueCode.SITE_COUNT,
                draft.structure.body().orElseThrow().getShape(),
                "The body has " + Told.count(draft.sites.count(), "site") + ", " + Told.count(orbitals, "orbital")
                        + " and " + Told.count(draft.hoppings.count(), "bond") + "; a solve at one energy takes about "
                        + Told.number(Math.pow(10, Math.rint(Math.log10(flops)))) + " operations.");
    }

    @Override
    public String text(Draft draft) {
        StringBuilder text = new StringBuilder();
        draft.findings.list().forEach(f -> text.append(f.severity().word())
                .append(' ')
                .append(f.code())
                .append(": ")
                .append(f.text())
                .append('\n'));
        return text.toString();
    }
}
