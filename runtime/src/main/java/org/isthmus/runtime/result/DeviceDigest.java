package org.isthmus.runtime.result;

import java.nio.ByteBuffer;
import java.nio.charset.StandardCharsets;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;
import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.LatticeLead;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.device.TabulatedLead;
import org.isthmus.runtime.device.WideBandLead;

/**
 * The physics of a device as a number: SHA-256 over every table and every lead. Names of the device and places in the text
 * do not enter, names of leads do, since results bear them.
 */
public final class DeviceDigest {
    private final MessageDigest digest;
    private final ByteBuffer buffer = ByteBuffer.allocate(1 << 14);

    private DeviceDigest() {
        digest = sha256();
    }

    /** SHA-256, which every Java has. */
    public static MessageDigest sha256() {
        try {
            return MessageDigest.getInstance("SHA-256");
        } catch (NoSuchAlgorithmException e) {
            throw new IllegalStateException("this Java has no SHA-256", e);
        }
    }

    /** The digest as hexadecimal text. */
    public static String of(Device device) {
        DeviceDigest digest = new DeviceDigest();
        digest.device(device);
        digest.flush();
        return HexFormat.of().formatHex(digest.digest.digest());
    }

    private void device(Device device) {
        add(device.degeneracy());
        add(device.magneticField());
        sites(device.sites());
        bonds(device.hoppings());
        bonds(device.overlaps());
        add(device.leads().size());
        device.leads().forEach(this::lead);
    }

    private void sites(SiteTable sites) {
        add(sites.count());
        for (int s = 0; s < sites.count(); s++) {
            add(sites.x(s));
            add(sites.y(s));
            add(sites.z(s));
            add(sites.orbitals(s));
            for (int i = 0; i < sites.orbitals(s); i++) {
                for (int j = 0; j < sites.orbitals(s); j++) {
                    add(sites.onSiteReal(s, i, j));
                    add(sites.onSiteImaginary(s, i, j));
                }
            }
        }
    }

    private void bonds(HoppingTable bonds) {
        add(bonds.count());
        for (int b = 0; b < bonds.count(); b++) {
            add(bonds.from(b));
            add(bonds.to(b));
            for (int i = 0; i < bonds.rows(b); i++) {
                for (int j = 0; j < bonds.columns(b); j++) {
                    add(bonds.real(b, i, j));
                    add(bonds.imaginary(b, i, j));
                }
            }
        }
    }

    private void lead(Lead lead) {
        add(lead.name());
        add(lead.temperature());
        add(lead.mu());
        add(lead.floating() ? 1 : 0);
        if (lead instanceof LatticeLead lattice) {
            add(1);
            sites(lattice.cell());
            bonds(lattice.within());
            bonds(lattice.outward());
            bonds(lattice.contact());
            bonds(lattice.overlapWithin());
            bonds(lattice.overlapOutward());
            bonds(lattice.overlapContact());
        } else if (lead instanceof WideBandLead wide) {
            add(2);
            integers(wide.contactSites());
            numbers(wide.broadening());
        } else if (lead instanceof TabulatedLead table) {
            add(3);
            integers(table.contactSites());
            numbers(table.energy());
            numbers(table.real());
            numbers(table.imaginary());
        }
    }

    private void integers(List<Integer> values) {
        add(values.size());
        values.forEach(this::add);
    }

    private void numbers(List<Double> values) {
        add(values.size());
        values.forEach(this::add);
    }

    private void add(double value) {
        room(8);
        buffer.putDouble(value == 0 ? 0.0 : value);
    }

    private void add(int value) {
        room(4);
        buffer.putInt(value);
    }

    private void add(String text) {
        byte[] bytes = text.getBytes(StandardCharsets.UTF_8);
        add(bytes.length);
        flush();
        digest.update(bytes);
    }

    private void room(int bytes) {
        if (buffer.remaining() < bytes) {
            flush();
        }
    }

    private void flush() {
        buffer.flip();
        digest.update(buffer);
        buffer.clear();
    }
}
