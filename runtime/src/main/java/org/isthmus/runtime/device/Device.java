package org.isthmus.runtime.device;

import java.util.List;
import java.util.OptionalInt;

/**
 * A conductor ready to be solved.
 *
 * @param sites the body's sites; on-site blocks include every potential
 * @param hoppings the body's bonds, both ends in {@code sites}
 * @param overlaps overlaps of the body's orbitals; empty in an orthogonal basis
 * @param leads in the order of the text
 * @param magneticField along z, in V·fs/nm² (1 T is 1e-3); its phases are already in the hoppings
 * @param parameters name and value of every parameter, as resolved, for provenance
 */
public record Device(
        String name,
        Lattice lattice,
        SiteTable sites,
        HoppingTable hoppings,
        HoppingTable overlaps,
        List<Lead> leads,
        double magneticField,
        List<ParameterValue> parameters,
        SourceRef source) {
    public Device {
        leads = List.copyOf(leads);
        parameters = List.copyOf(parameters);
    }

    /**
     * A resolved parameter.
     *
     * @param value in internal units
     * @param unit the unit in which {@code value / unitFactor} is told to the user; empty for a plain number
     */
    public record ParameterValue(String name, double value, String unit, double unitFactor) {}

    public double degeneracy() {
        return lattice.degeneracy();
    }

    public Lead lead(String leadName) {
        return leads.get(leadIndex(leadName)
                .orElseThrow(
                        () -> new IllegalArgumentException("device '" + name + "' has no lead '" + leadName + "'")));
    }

    public OptionalInt leadIndex(String leadName) {
        for (int i = 0; i < leads.size(); i++) {
            if (leads.get(i).name().equals(leadName)) {
                return OptionalInt.of(i);
            }
        }
        return OptionalInt.empty();
    }
}
