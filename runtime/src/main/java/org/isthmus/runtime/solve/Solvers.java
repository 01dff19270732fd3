package org.isthmus.runtime.solve;

import java.util.ArrayList;
import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.plan.SolvePlan;
import org.isthmus.runtime.selfenergy.Contact;
import org.isthmus.runtime.selfenergy.Contacts;

/** Opens solvers. */
public final class Solvers {
    private Solvers() {}

    /** The contacts of a device, in the order of its leads; the same for every voltage, so they can be shared. */
    public static List<Contact> contacts(Device device, ComplexBackend backend) {
        List<Contact> contacts = new ArrayList<>();
        for (Lead lead : device.leads()) {
            contacts.add(Contacts.of(lead, device.sites(), backend));
        }
        return contacts;
    }

    /**
     * Opens a solver.
     *
     * @param plan of the point's device
     * @param contacts of the point's device
     */
    public static Solver open(OperatingPoint point, SolvePlan plan, List<Contact> contacts, ComplexBackend backend) {
        return new FrontalSolver(point, plan, contacts, backend);
    }
}
