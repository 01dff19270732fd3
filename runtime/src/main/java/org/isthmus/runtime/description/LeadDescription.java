package org.isthmus.runtime.description;

import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.Collectors;
import org.isthmus.runtime.device.LatticeLead;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.device.TabulatedLead;
import org.isthmus.runtime.device.WideBandLead;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.selfenergy.Contact;
import org.isthmus.runtime.selfenergy.Contacts;
import org.isthmus.runtime.selfenergy.LeadBands;

/**
 * What a lead offers at its electrochemical potential.
 *
 * @param kind how it is made, as a phrase
 * @param bandEdges lowest and highest energy of its bands, eV; empty for a lead without bands
 * @param openModes waves that propagate at mu; −1 for a lead without bands
 * @param wavelength of the shortest of these waves, nm; empty where none propagates or the cell is too large to look
 * @param method how its self-energy is found, and why
 */
public record LeadDescription(
        Lead lead, String kind, Optional<Edges> bandEdges, int openModes, OptionalDouble wavelength, String method) {
    /** Orbitals per cell beyond which the bands are not scanned for wave lengths: a scan costs cell³. */
    private static final int LARGEST_CELL = 300;

    private static final int POINTS = 65;
    private static final int HALVINGS = 40;

    /** eV. */
    public record Edges(double lowest, double highest) {}

    static LeadDescription of(Lead lead, SiteTable body, ComplexBackend backend) {
        Contact contact = Contacts.of(lead, body, backend);
        if (lead instanceof LatticeLead lattice) {
            LeadBands bands = Contacts.bands(lattice, backend);
            double[] range = bands.range();
            return new LeadDescription(
                    lead,
                    "from " + lattice.side().word() + ", a cell of "
                            + counted(lattice.cell().orbitalCount(), "orbital") + " every "
                            + number(lattice.period()) + " nm",
                    Optional.of(new Edges(range[0], range[1])),
                    contact.at(lead.mu(), 0).openModes(),
                    lattice.cell().orbitalCount() > LARGEST_CELL
                            ? OptionalDouble.empty()
                            : shortestWave(bands, lead.mu(), lattice.period()),
                    contact.describe());
        }
        String kind = lead instanceof WideBandLead wide
                ? "wide band, broadening " + range(wide.broadening()) + " eV"
                : "self-energy from " + ((TabulatedLead) lead).table();
        return new LeadDescription(lead, kind, Optional.empty(), -1, OptionalDouble.empty(), contact.describe());
    }

    private static String range(List<Double> values) {
        double least = values.stream().mapToDouble(v -> v).min().orElse(0);
        double greatest = values.stream().mapToDouble(v -> v).max().orElse(0);
        return least == greatest ? number(least) : number(least) + " to " + number(greatest);
    }

    /** 2π·period/k for the largest k in (0, π] at which some band passes through the energy. */
    private static OptionalDouble shortestWave(LeadBands bands, double energy, double period) {
        double step = Math.PI / (POINTS - 1);
        double largest = Double.NaN;
        // bands of a lead in a magnetic field differ for k and −k
        for (int sign = -1; sign <= 1; sign += 2) {
            double[] above = bands.energies(sign * Math.PI);
            for (int p = POINTS - 2; p >= 0; p--) {
                double[] here = bands.energies(sign * p * step);
                double found = Double.NaN;
                for (int band = 0; band < here.length; band++) {
                    if ((here[band] - energy) * (above[band] - energy) <= 0 && here[band] != above[band]) {
                        double k = crossing(bands, band, energy, sign * p * step, sign * (p + 1) * step);
                        found = Double.isNaN(found) ? k : Math.max(found, k);
                    }
                }
                if (!Double.isNaN(found)) {
                    largest = Double.isNaN(largest) ? found : Math.max(largest, found);
                    break;
                }
                above = here;
            }
        }
        return largest > 0 ? OptionalDouble.of(2 * Math.PI * period / largest) : OptionalDouble.empty();
    }

    private static double crossing(LeadBands bands, int band, double energy, double from, double to) {
        double low = from;
        double high = to;
        boolean lowBelow = bands.energies(low)[band] < energy;
        for (int i = 0; i < HALVINGS; i++) {
            double middle = (low + high) / 2;
            if (bands.energies(middle)[band] < energy == lowBelow) {
                low = middle;
            } else {
                high = middle;
            }
        }
        return Math.abs(low + high) / 2;
    }

    List<String> lines(double spacing) {
        String contact = "lead " + lead.name() + " " + kind + "; touches "
                + counted(lead.contactSites().size(), "site")
                + "; temperature " + number(lead.temperature()) + " K, "
                + (lead.floating() ? "floating" : "mu " + number(lead.mu()) + " eV");
        if (bandEdges.isEmpty()) {
            return List.of(contact, "    no bands of its own; " + method);
        }
        String waves = openModes == 0
                ? "no open mode at mu"
                : counted(openModes, "open mode") + " at mu"
                        + (wavelength.isPresent()
                                ? ", shortest wave " + number(wavelength.getAsDouble()) + " nm = "
                                        + number(wavelength.getAsDouble() / spacing) + " spacings of the lattice"
                                : "");
        return List.of(
                contact,
                "    bands from " + number(bandEdges.get().lowest()) + " to "
                        + number(bandEdges.get().highest()) + " eV; " + waves,
                "    self-energy: " + method);
    }

    static String counted(long count, String what) {
        return count + " " + what + (count == 1 ? "" : "s");
    }

    /** Four digits are enough to look at. */
    static String number(double value) {
        String text = String.format(Locale.ROOT, "%.4g", value);
        if (text.contains("e")) {
            String mantissa = text.substring(0, text.indexOf('e'));
            return trimmed(mantissa) + text.substring(text.indexOf('e'));
        }
        return trimmed(text);
    }

    private static String trimmed(String text) {
        return text.contains(".") ? text.replaceAll("0+$", "").replaceAll("\\.$", "") : text;
    }

    static String list(List<String> parts) {
        return parts.stream().collect(Collectors.joining(", "));
    }
}
