package org.isthmus.runtime.device;

import java.nio.ByteBuffer;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;
import java.util.List;
import java.util.function.Function;
import java.util.function.IntConsumer;
import java.util.function.IntFunction;

/**
 * A device as stable text: equal devices give equal text and, for practical purposes, different ones different text. Long
 * tables show their first and last lines and a digest (SHA-256) of every number in them.
 *
 * <p>Lengths in nm, energies in eV, the field in T; matrices row by row. Places in source files are left out: they are no
 * physics.
 */
public final class DeviceText {
    private static final int HEAD = 20;
    private static final int TAIL = 4;

    private DeviceText() {}

    /** The whole device. */
    public static String of(Device device) {
        StringBuilder text = new StringBuilder("device " + device.name() + "\n");
        for (Device.ParameterValue parameter : device.parameters()) {
            text.append("parameter ")
                    .append(parameter.name())
                    .append(" = ")
                    .append(parameter.value() / parameter.unitFactor())
                    .append(parameter.unit().isEmpty() ? "" : " " + parameter.unit())
                    .append('\n');
        }
        text.append(lattice(device.lattice()));
        text.append("magnetic field ").append(device.magneticField() * 1e3).append(" T\n");
        text.append(sites(device.sites()));
        text.append("hoppings ").append(bonds(device.hoppings(), device.sites(), device.sites()));
        if (device.overlaps().count() > 0) {
            text.append("overlaps ").append(bonds(device.overlaps(), device.sites(), device.sites()));
        }
        device.leads().forEach(lead -> text.append(lead(lead, device.sites())));
        return text.toString();
    }

    /** A lattice. */
    public static String lattice(Lattice lattice) {
        StringBuilder text =
                new StringBuilder("lattice " + lattice.name() + ", degeneracy " + lattice.degeneracy() + "\n");
        for (Lattice.Vector v : lattice.vectors()) {
            text.append("  vector ").append(v.x() + " " + v.y() + " " + v.z()).append('\n');
        }
        SiteTable basis = lattice.basis();
        for (int site = 0; site < basis.count(); site++) {
            text.append("  basis ")
                    .append(site)
                    .append(" at ")
                    .append(site(basis, site))
                    .append('\n');
        }
        lattice.bonds()
                .forEach(bond -> text.append("  hopping ").append(bond(bond)).append('\n'));
        lattice.overlaps()
                .forEach(bond -> text.append("  overlap ").append(bond(bond)).append('\n'));
        return text.toString();
    }

    private static String bond(Lattice.Bond bond) {
        StringBuilder text = new StringBuilder(bond.from() + " -> " + bond.to() + " over");
        bond.cell().forEach(n -> text.append(' ').append(n));
        text.append(" =");
        for (int k = 0; k < bond.block().size(); k += 2) {
            text.append(' ').append(complex(bond.block().get(k), bond.block().get(k + 1)));
        }
        return text.toString();
    }

    /** A table of sites with their on-site blocks. */
    public static String sites(SiteTable sites) {
        String title = sites.count() + " sites, " + sites.orbitalCount() + " orbitals\n";
        return title
                + table(
                        sites.count(),
                        site -> site + " (" + sites.basis(site) + ") at " + site(sites, site),
                        digest -> site -> {
                            digest.put(sites.x(site));
                            digest.put(sites.y(site));
                            digest.put(sites.z(site));
                            digest.put(sites.basis(site));
                            for (int r = 0; r < sites.orbitals(site); r++) {
                                for (int c = 0; c < sites.orbitals(site); c++) {
                                    digest.put(sites.onSiteReal(site, r, c));
                                    digest.put(sites.onSiteImaginary(site, r, c));
                                }
                            }
                        });
    }

    private static String site(SiteTable sites, int site) {
        StringBuilder text = new StringBuilder(sites.x(site) + " " + sites.y(site) + " " + sites.z(site) + " energy");
        for (int r = 0; r < sites.orbitals(site); r++) {
            for (int c = 0; c < sites.orbitals(site); c++) {
                text.append(' ').append(complex(sites.onSiteReal(site, r, c), sites.onSiteImaginary(site, r, c)));
            }
        }
        return text.toString();
    }

    /**
     * A table of bonds.
     *
     * @param from what their first ends count
     * @param to what their second ends count
     */
    public static String bonds(HoppingTable bonds, SiteTable from, SiteTable to) {
        return bonds.count()
                + "\n"
                + table(
                        bonds.count(),
                        bond -> {
                            StringBuilder text = new StringBuilder(bonds.from(bond) + " -> " + bonds.to(bond) + " =");
                            for (int r = 0; r < from.orbitals(bonds.from(bond)); r++) {
                                for (int c = 0; c < to.orbitals(bonds.to(bond)); c++) {
                                    text.append(' ')
                                            .append(complex(bonds.real(bond, r, c), bonds.imaginary(bond, r, c)));
                                }
                            }
                            return text.toString();
                        },
                        digest -> bond -> {
                            digest.put(bonds.from(bond));
                            digest.put(bonds.to(bond));
                            for (int r = 0; r < from.orbitals(bonds.from(bond)); r++) {
                                for (int c = 0; c < to.orbitals(bonds.to(bond)); c++) {
                                    digest.put(bonds.real(bond, r, c));
                                    digest.put(bonds.imaginary(bond, r, c));
                                }
                            }
                        });
    }

    /**
     * A lead.
     *
     * @param body the sites that it touches
     */
    public static String lead(Lead lead, SiteTable body) {
        StringBuilder text = new StringBuilder("lead " + lead.name() + ", " + lead.temperature() + " K, mu " + lead.mu()
                + " eV" + (lead.floating() ? ", floating" : "") + "\n");
        text.append("  touches ").append(numbers(lead.contactSites())).append('\n');
        if (lead instanceof LatticeLead side) {
            text.append("  from ")
                    .append(side.side().word())
                    .append(", period ")
                    .append(side.period())
                    .append('\n');
            text.append("  cell ").append(sites(side.cell()));
            text.append("  within ").append(bonds(side.within(), side.cell(), side.cell()));
            text.append("  outward ").append(bonds(side.outward(), side.cell(), side.cell()));
            text.append("  contact ").append(bonds(side.contact(), body, side.cell()));
            if (side.overlapOutward().count()
                            + side.overlapWithin().count()
                            + side.overlapContact().count()
                    > 0) {
                text.append("  overlap within ").append(bonds(side.overlapWithin(), side.cell(), side.cell()));
                text.append("  overlap outward ").append(bonds(side.overlapOutward(), side.cell(), side.cell()));
                text.append("  overlap contact ").append(bonds(side.overlapContact(), body, side.cell()));
            }
        } else if (lead instanceof WideBandLead wide) {
            text.append("  broadening ").append(numbers(wide.broadening())).append('\n');
        } else if (lead instanceof TabulatedLead tabulated) {
            text.append("  energy ").append(numbers(tabulated.energy())).append('\n');
            text.append("  real ").append(numbers(tabulated.real())).append('\n');
            text.append("  imaginary ").append(numbers(tabulated.imaginary())).append('\n');
        }
        return text.toString();
    }

    private static String numbers(List<? extends Number> values) {
        int shown = values.size() <= HEAD + TAIL ? values.size() : HEAD;
        StringBuilder text = new StringBuilder();
        for (int i = 0; i < shown; i++) {
            text.append(i == 0 ? "" : " ").append(values.get(i));
        }
        if (shown < values.size()) {
            Digest digest = new Digest();
            values.forEach(v -> digest.put(v.doubleValue()));
            text.append(" … ").append(values.size()).append(" in all, SHA-256 ").append(digest.hex());
        }
        return text.toString();
    }

    private static String complex(double re, double im) {
        if (im == 0) {
            return String.valueOf(re + 0.0);
        }
        return re + (im < 0 ? "-" : "+") + Math.abs(im) + "i";
    }

    private static String table(int count, IntFunction<String> line, Function<Digest, IntConsumer> feeder) {
        StringBuilder text = new StringBuilder();
        boolean whole = count <= HEAD + TAIL;
        for (int i = 0; i < (whole ? count : HEAD); i++) {
            text.append("    ").append(line.apply(i)).append('\n');
        }
        if (!whole) {
            Digest digest = new Digest();
            IntConsumer feed = feeder.apply(digest);
            for (int i = 0; i < count; i++) {
                feed.accept(i);
            }
            text.append("    … SHA-256 of all ").append(digest.hex()).append('\n');
            for (int i = count - TAIL; i < count; i++) {
                text.append("    ").append(line.apply(i)).append('\n');
            }
        }
        return text.toString();
    }

    private static final class Digest {
        private final MessageDigest digest;
        private final ByteBuffer buffer = ByteBuffer.allocate(1 << 13);

        Digest() {
            try {
                digest = MessageDigest.getInstance("SHA-256");
            } catch (NoSuchAlgorithmException e) {
                throw new IllegalStateException("every Java platform has SHA-256", e);
            }
        }

        void put(double value) {
            if (buffer.remaining() < Double.BYTES) {
                flush();
            }
            // the two zeros are one number
            buffer.putDouble(value + 0.0);
        }

        private void flush() {
            buffer.flip();
            digest.update(buffer);
            buffer.clear();
        }

        String hex() {
            flush();
            return HexFormat.of().formatHex(digest.digest());
        }
    }
}
