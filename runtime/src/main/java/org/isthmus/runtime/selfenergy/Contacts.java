package org.isthmus.runtime.selfenergy;

import org.isthmus.runtime.device.LatticeLead;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.device.TabulatedLead;
import org.isthmus.runtime.device.WideBandLead;
import org.isthmus.runtime.kernel.ComplexBackend;

/** Makes contacts from leads. */
public final class Contacts {
    private Contacts() {}

    /** The contact that a lead makes with the body. */
    public static Contact of(Lead lead, SiteTable body, ComplexBackend backend) {
        if (lead instanceof LatticeLead lattice) {
            return new LatticeContact(lattice, body, backend);
        }
        return lead instanceof WideBandLead wide
                ? new SiteContact(wide, body)
                : new SiteContact((TabulatedLead) lead, body);
    }

    /** The band structure of a lead that has one. */
    public static LeadBands bands(LatticeLead lead, ComplexBackend backend) {
        return new LeadBands(LatticeContact.blocks(lead), backend);
    }
}
