package org.isthmus.runtime.solve;

/**
 * What the observables ask of a solve beyond the traces between leads.
 *
 * @param sites values per site
 * @param correlators {@link EnergySolution#noiseTrace} and {@link EnergySolution#transmissionSquared}
 */
public record Needs(boolean sites, boolean correlators) {
    public static final Needs LEADS = new Needs(false, false);

    public Needs and(Needs other) {
        return new Needs(sites || other.sites, correlators || other.correlators);
    }
}
