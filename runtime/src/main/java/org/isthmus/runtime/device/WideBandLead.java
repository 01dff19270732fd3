package org.isthmus.runtime.device;

import java.util.List;

/**
 * A contact with a band so wide that its self-energy does not depend on energy: Σ = −i·broadening/2 on every orbital of
 * its sites.
 *
 * @param broadening Γ per contact site, eV, in the order of {@code contactSites}
 */
public record WideBandLead(
        String name,
        double temperature,
        double mu,
        boolean floating,
        List<Integer> contactSites,
        List<Double> broadening,
        SourceRef source)
        implements Lead {
    public WideBandLead {
        contactSites = List.copyOf(contactSites);
        broadening = List.copyOf(broadening);
    }

    @Override
    public WideBandLead with(double newTemperature, double newMu) {
        return new WideBandLead(name, newTemperature, newMu, floating, contactSites, broadening, source);
    }
}
