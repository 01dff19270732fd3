package org.isthmus.runtime.description;

import static org.isthmus.runtime.description.LeadDescription.counted;
import static org.isthmus.runtime.description.LeadDescription.number;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.Lattice;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.plan.SolvePlan;

/**
 * A device as it has been understood, for a person to look at before it is solved.
 *
 * @param spacing shortest bond, nm; of a lattice without bonds its shortest vector
 */
public record DeviceDescription(Device device, List<LeadDescription> leads, SolvePlan plan, double spacing) {
    /** What a core does in dense complex products of the sizes that occur; measured 10 to 90 on present machines. */
    private static final double FLOPS_PER_SECOND = 20e9;

    private static final double MIB = 1 << 20;

    public DeviceDescription {
        leads = List.copyOf(leads);
    }

    /** Describes a device and how it would be solved. */
    public static DeviceDescription of(Device device, SolvePlan plan, ComplexBackend backend) {
        return new DeviceDescription(
                device,
                device.leads().stream()
                        .map(lead -> LeadDescription.of(lead, device.sites(), backend))
                        .toList(),
                plan,
                spacing(device.lattice()));
    }

    private static double spacing(Lattice lattice) {
        double shortest = Double.POSITIVE_INFINITY;
        for (Lattice.Bond bond : lattice.bonds()) {
            double[] place = new double[3];
            for (int v = 0; v < lattice.vectors().size(); v++) {
                Lattice.Vector vector = lattice.vectors().get(v);
                place[0] += bond.cell().get(v) * vector.x();
                place[1] += bond.cell().get(v) * vector.y();
                place[2] += bond.cell().get(v) * vector.z();
            }
            SiteTable basis = lattice.basis();
            double dx = place[0] + basis.x(bond.to()) - basis.x(bond.from());
            double dy = place[1] + basis.y(bond.to()) - basis.y(bond.from());
            double dz = place[2] + basis.z(bond.to()) - basis.z(bond.from());
            shortest = Math.min(shortest, Math.sqrt(dx * dx + dy * dy + dz * dz));
        }
        return shortest < Double.POSITIVE_INFINITY
                ? shortest
                : lattice.vectors().stream()
                        .mapToDouble(Lattice.Vector::length)
                        .min()
                        .orElse(1);
    }

    /** All that is known, as lines of text without line ends. */
    public List<String> lines() {
        List<String> lines = new ArrayList<>(physicalLines());
        plan.toString().lines().forEach(line -> lines.add("  " + line));
        lines.add(String.format(
                Locale.ROOT,
                "  estimate per energy and core: %s ms at %.0f Gflop/s; %s MiB, with values per site %s MiB",
                number(plan.flops() / FLOPS_PER_SECOND * 1e3),
                FLOPS_PER_SECOND / 1e9,
                number(plan.bytes() / MIB),
                number(plan.bytesForSites() / MIB)));
        return lines;
    }

    /** What does not depend on how it is solved. */
    public List<String> physicalLines() {
        List<String> lines = new ArrayList<>();
        Lattice lattice = device.lattice();
        SiteTable sites = device.sites();
        lines.add("device " + device.name());
        lines.add("  lattice " + lattice.name() + ": "
                + counted(lattice.vectors().size(), "vector") + " of "
                + LeadDescription.list(
                        lattice.vectors().stream().map(v -> number(v.length())).toList())
                + " nm, " + counted(lattice.basis().count(), "site") + " in a cell, spacing " + number(spacing)
                + " nm, degeneracy " + number(lattice.degeneracy()));
        lines.add("  body: " + counted(sites.count(), "site") + ", " + counted(sites.orbitalCount(), "orbital") + ", "
                + counted(device.hoppings().count(), "bond") + "; " + extent(sites));
        if (!device.parameters().isEmpty()) {
            lines.add("  parameters: "
                    + LeadDescription.list(device.parameters().stream()
                            .map(p -> (p.name() + " = " + number(p.value() / p.unitFactor()) + " " + p.unit()).strip())
                            .toList()));
        }
        if (device.magneticField() != 0) {
            lines.add("  magnetic field " + number(device.magneticField() * 1e3) + " T along z");
        }
        for (LeadDescription lead : leads) {
            lead.lines(spacing).forEach(line -> lines.add("  " + line));
        }
        return lines;
    }

    /** The body's sites in table order, as a table with a header. */
    public List<String> siteLines() {
        SiteTable sites = device.sites();
        List<String> lines = new ArrayList<>(sites.count() + 1);
        lines.add("site,x (nm),y (nm),z (nm),basis,orbitals,energy (eV)");
        for (int site = 0; site < sites.count(); site++) {
            double trace = 0;
            for (int o = 0; o < sites.orbitals(site); o++) {
                trace += sites.onSiteReal(site, o, o);
            }
            lines.add(site + "," + plain(sites.x(site)) + "," + plain(sites.y(site)) + "," + plain(sites.z(site)) + ","
                    + sites.basis(site) + "," + sites.orbitals(site) + ","
                    + plain(trace / Math.max(1, sites.orbitals(site))));
        }
        return lines;
    }

    private static String plain(double value) {
        return value == 0 ? "0" : Double.toString(value).replaceAll("\\.0$", "");
    }

    private static String extent(SiteTable sites) {
        if (sites.count() == 0) {
            return "empty";
        }
        double[] low = {sites.x(0), sites.y(0), sites.z(0)};
        double[] high = low.clone();
        for (int site = 1; site < sites.count(); site++) {
            double[] at = {sites.x(site), sites.y(site), sites.z(site)};
            for (int axis = 0; axis < 3; axis++) {
                low[axis] = Math.min(low[axis], at[axis]);
                high[axis] = Math.max(high[axis], at[axis]);
            }
        }
        List<String> parts = new ArrayList<>();
        for (int axis = 0; axis < 3; axis++) {
            if (axis == 0 || low[axis] != high[axis]) {
                parts.add("xyz".charAt(axis) + " from " + number(low[axis]) + " to " + number(high[axis]) + " nm");
            }
        }
        return LeadDescription.list(parts);
    }
}
