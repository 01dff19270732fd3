package org.isthmus.runtime.measure;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.Measurement.Drop;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.device.WideBandLead;
import org.isthmus.runtime.solve.OperatingPoint;
import org.isthmus.runtime.solve.OperatingPoint.LeadState;
import org.isthmus.runtime.solve.SolveFailure;

/**
 * What voltages do to a device: a voltage V on a lead moves its µ and its bands by −qV (a wide-band contact has
 * none to move); the body
 * follows as {@code drop} says.
 */
final class Voltages {
    private Voltages() {}

    static OperatingPoint apply(Device device, Map<String, Double> voltages, Drop drop) {
        List<LeadState> states = new ArrayList<>();
        boolean any = false;
        for (Lead lead : device.leads()) {
            double volts = voltages.getOrDefault(lead.name(), 0.0);
            any |= volts != 0;
            states.add(new LeadState(
                    lead.mu() - volts, lead.temperature(), lead instanceof WideBandLead ? 0 : 0.0 - volts));
        }
        if (any && drop == Drop.POISSON) {
            throw new SolveFailure("'drop = poisson' is not solved yet.");
        }
        double[] shift = any && drop == Drop.LINEAR ? linear(device, voltages) : new double[0];
        return new OperatingPoint(device, states, shift);
    }

    /** Linear between the mean positions of the sites that the two leads touch, constant beyond. */
    private static double[] linear(Device device, Map<String, Double> voltages) {
        List<Lead> given = device.leads().stream().filter(l -> !l.floating()).toList();
        if (given.size() != 2) {
            throw new SolveFailure("a linear drop lies between two leads, but device '" + device.name() + "' has "
                    + given.size() + " with a given electrochemical potential.");
        }
        SiteTable sites = device.sites();
        double[] a = mean(sites, given.get(0));
        double[] b = mean(sites, given.get(1));
        double[] line = {b[0] - a[0], b[1] - a[1], b[2] - a[2]};
        double length2 = line[0] * line[0] + line[1] * line[1] + line[2] * line[2];
        double first = voltages.getOrDefault(given.get(0).name(), 0.0);
        double second = voltages.getOrDefault(given.get(1).name(), 0.0);
        double[] shift = new double[sites.count()];
        for (int site = 0; site < shift.length; site++) {
            double along = (sites.x(site) - a[0]) * line[0]
                    + (sites.y(site) - a[1]) * line[1]
                    + (sites.z(site) - a[2]) * line[2];
            double part = length2 == 0 ? 0.5 : Math.max(0, Math.min(1, along / length2));
            shift[site] = -(first + (second - first) * part);
        }
        return shift;
    }

    private static double[] mean(SiteTable sites, Lead lead) {
        double[] mean = new double[3];
        for (int site : lead.contactSites()) {
            mean[0] += sites.x(site);
            mean[1] += sites.y(site);
            mean[2] += sites.z(site);
        }
        for (int k = 0; k < 3; k++) {
            mean[k] /= lead.contactSites().size();
        }
        return mean;
    }
}
