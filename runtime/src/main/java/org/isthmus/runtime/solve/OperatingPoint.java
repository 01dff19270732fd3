package org.isthmus.runtime.solve;

import java.util.Arrays;
import java.util.List;
import org.isthmus.runtime.device.Device;

/**
 * A device with voltages applied: where its leads and its sites have moved to.
 *
 * @param leads one per lead of the device, in its order
 * @param siteShift added to the on-site energy of each site, eV; empty while the body stays where it is
 */
public record OperatingPoint(Device device, List<LeadState> leads, double[] siteShift) {
    public OperatingPoint {
        leads = List.copyOf(leads);
        siteShift = siteShift.clone();
        if (siteShift.length != 0 && siteShift.length != device.sites().count()) {
            throw new IllegalArgumentException(
                    siteShift.length + " shifts for " + device.sites().count() + " sites");
        }
    }

    /**
     * A lead at its voltage.
     *
     * @param mu electrochemical potential, eV
     * @param temperature K
     * @param bandShift how far the lead's own bands have moved, eV
     */
    public record LeadState(double mu, double temperature, double bandShift) {}

    /** The device as its text says, no voltage anywhere. */
    public static OperatingPoint unbiased(Device device) {
        return new OperatingPoint(
                device,
                device.leads().stream()
                        .map(l -> new LeadState(l.mu(), l.temperature(), 0))
                        .toList(),
                new double[0]);
    }

    /** Shift of one site, eV. */
    public double shift(int site) {
        return siteShift.length == 0 ? 0 : siteShift[site];
    }

    @Override
    public boolean equals(Object other) {
        return other instanceof OperatingPoint o
                && device == o.device
                && leads.equals(o.leads)
                && Arrays.equals(siteShift, o.siteShift);
    }

    @Override
    public int hashCode() {
        return 31 * leads.hashCode() + Arrays.hashCode(siteShift);
    }
}
