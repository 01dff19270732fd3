package org.isthmus.language.validation;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.OptionalDouble;
import org.eclipse.emf.ecore.EStructuralFeature;
import org.eclipse.xtext.EcoreUtil2;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.CatalogueEntry;
import org.isthmus.language.isthmus.DeviceDeclaration;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.LatticeDeclaration;
import org.isthmus.language.isthmus.LatticeUse;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.language.structure.DeviceStructure;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.LatticeLead;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.Measurement;
import org.isthmus.runtime.device.bands.LatticeBands;
import org.isthmus.runtime.device.bands.LeadSubbands;
import org.isthmus.runtime.units.PhysicalConstants;

/** Whether the energies of a measurement fit the bands of the device. */
final class WindowChecks {
    private static final double COARSE = 0.05;
    private static final double THERMAL = 5;
    private static final double OUTSIDE = 0.05;

    private final DeviceDeclaration declaration;
    private final Measurement measurement;
    private final Device device;
    private final List<WindowFinding> findings = new ArrayList<>();

    /** A finding at the energy axis, or at the measurement's name where there is none. */
    record WindowFinding(IssueCode code, boolean atEnergyAxis, String text) {
        EStructuralFeature feature() {
            return atEnergyAxis ? null : IsthmusPackage.Literals.DECLARATION__NAME;
        }
    }

    private record Window(double lowest, double highest) {}

    WindowChecks(DeviceDeclaration declaration, Measurement measurement, Device device) {
        this.declaration = declaration;
        this.measurement = measurement;
        this.device = device;
    }

    List<WindowFinding> findings() {
        boolean axis = !(measurement.energy() instanceof Measurement.NoEnergies);
        Window window = axis ? energies() : thermal();
        List<LatticeLead> leads = device.leads().stream()
                .filter(LatticeLead.class::isInstance)
                .map(LatticeLead.class::cast)
                .toList();
        if (window == null || leads.isEmpty()) {
            return findings;
        }
        Window bands = openModes(window, leads, axis);
        if (bands != null && findings.isEmpty()) {
            beyond(window, bands, axis);
            if (axis) {
                leavesOut(window, bands);
            }
        }
        if (findings.stream().noneMatch(f -> f.code() == IssueCode.BEYOND_BAND || f.code() == IssueCode.NO_OPEN_MODE)) {
            coarse(window, axis);
        }
        return findings;
    }

    private Window energies() {
        if (measurement.energy() instanceof Measurement.AdaptiveEnergies adaptive) {
            return new Window(adaptive.lower(), adaptive.upper());
        }
        List<Double> values = ((Measurement.EnergyPoints) measurement.energy()).values();
        return new Window(
                values.stream().mapToDouble(e -> e).min().orElse(0),
                values.stream().mapToDouble(e -> e).max().orElse(0));
    }

    /** Where some lead's Fermi function is neither full nor empty, voltages included. */
    private Window thermal() {
        double lowest = Double.POSITIVE_INFINITY;
        double highest = Double.NEGATIVE_INFINITY;
        for (Lead lead : device.leads()) {
            double mu = measurement.mu().orElse(lead.mu());
            double width =
                    THERMAL * PhysicalConstants.KB * measurement.temperature().orElse(lead.temperature());
            double least = 0;
            double most = 0;
            for (Measurement.Axis axis : measurement.axes()) {
                if (axis instanceof Measurement.BiasAxis bias && bias.lead().equals(lead.name())) {
                    least = bias.values().stream().mapToDouble(v -> v).min().orElse(0);
                    most = bias.values().stream().mapToDouble(v -> v).max().orElse(0);
                }
            }
            lowest = Math.min(lowest, mu - most - width);
            highest = Math.max(highest, mu - least + width);
        }
        return highest >= lowest ? new Window(lowest, highest) : null;
    }

    /** From the lowest to the highest band of all leads; null where they were too large to look at. */
    private Window openModes(Window window, List<LatticeLead> leads, boolean axis) {
        double lowest = Double.POSITIVE_INFINITY;
        double highest = Double.NEGATIVE_INFINITY;
        for (LatticeLead lead : leads) {
            List<LeadSubbands.Band> bands = LeadSubbands.of(lead).orElse(null);
            if (bands == null) {
                return null;
            }
            double slack = 1e-9;
            boolean open = bands.stream()
                    .anyMatch(b -> b.bottom() <= window.highest() + slack && b.top() >= window.lowest() - slack);
            if (!open) {
                add(
                        IssueCode.NO_OPEN_MODE,
                        axis,
                        "Lead '" + lead.name() + "' has no propagating mode from " + told(window.lowest()) + " to "
                                + told(window.highest()) + ": its bands lie from "
                                + told(bands.get(0).bottom()) + " to "
                                + told(bands.get(bands.size() - 1).top())
                                + "; move the window or the lead's potential.");
            }
            lowest = Math.min(lowest, bands.get(0).bottom());
            highest = Math.max(highest, bands.get(bands.size() - 1).top());
        }
        return new Window(lowest, highest);
    }

    private void beyond(Window window, Window bands, boolean axis) {
        double length = window.highest() - window.lowest();
        double above = window.highest() - bands.highest();
        double below = bands.lowest() - window.lowest();
        if (axis && (above > 1e-9 || below > OUTSIDE * length)) {
            boolean top = above > 1e-9;
            add(
                    IssueCode.BEYOND_BAND,
                    true,
                    "The energies reach to " + told(top ? window.highest() : window.lowest())
                            + ", but the bands of the leads "
                            + (top ? "end at " + told(bands.highest()) : "begin at " + told(bands.lowest()))
                            + "; beyond them nothing propagates.");
        }
    }

    private void leavesOut(Window window, Window bands) {
        boolean current = measurement.records().stream()
                .anyMatch(r -> r.call().observable().equals("current"));
        Window wanted = thermal();
        if (!current || wanted == null) {
            return;
        }
        double lowest = Math.max(wanted.lowest(), bands.lowest());
        double highest = Math.min(wanted.highest(), bands.highest());
        if (highest > lowest && (window.lowest() > lowest + 1e-9 || window.highest() < highest - 1e-9)) {
            add(
                    IssueCode.THERMAL_WINDOW,
                    true,
                    "The energies leave out part of what carries current: the leads' thermal windows reach from "
                            + told(lowest) + " to " + told(highest)
                            + "; widen the axis, or record the current without one.");
        }
    }

    /** Only a lattice that stands for a continuum can be too coarse; a crystal's own lattice is what it is. */
    private void coarse(Window window, boolean axis) {
        LatticeUse use = DeviceStructure.of(declaration).lattice().orElse(null);
        if (use == null || !standsForContinuum(use.getLattice())) {
            return;
        }
        LatticeBands bands = new LatticeBands(device.lattice());
        OptionalDouble error = bands.dispersionError(window.highest());
        if (error.isEmpty() || error.getAsDouble() <= COARSE) {
            return;
        }
        OptionalDouble factor = bands.spacingFactor(window.highest(), COARSE);
        double spacing = device.lattice().vectors().stream()
                .mapToDouble(v -> v.length())
                .max()
                .orElse(0);
        String mend = factor.isPresent()
                ? String.format(Locale.ROOT, "; a spacing of %.3g nm would do", spacing * factor.getAsDouble())
                : "";
        add(
                IssueCode.COARSE_LATTICE,
                axis,
                String.format(
                                Locale.ROOT,
                                "At %s the lattice of spacing %.3g nm is off its effective-mass band by %.1f %%",
                                told(window.highest()),
                                spacing,
                                100 * error.getAsDouble())
                        + mend + ".");
    }

    /** A lattice whose hopping is made from a mass names ħ. */
    private static boolean standsForContinuum(LatticeDeclaration lattice) {
        return EcoreUtil2.getAllContentsOfType(lattice, Reference.class).stream()
                .anyMatch(r -> r.getTarget() instanceof CatalogueEntry entry
                        && entry.getName().equals("hbar"));
    }

    private void add(IssueCode code, boolean axis, String text) {
        findings.add(new WindowFinding(code, axis, text));
    }

    private static String told(double energy) {
        return String.format(Locale.ROOT, "%.4g eV", energy);
    }
}
