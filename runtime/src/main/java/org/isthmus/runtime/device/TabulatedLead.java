package org.isthmus.runtime.device;

import java.util.List;

/**
 * A contact whose self-energy is data: Σ(E), a number on every orbital of its sites, linear between the rows. Outside
 * the rows it is not defined.
 *
 * @param energy ascending, eV, at least two
 * @param real Re Σ at these energies, eV
 * @param imaginary Im Σ at these energies, eV, not positive
 * @param table path of the data as the user wrote it
 */
public record TabulatedLead(
        String name,
        double temperature,
        double mu,
        boolean floating,
        List<Integer> contactSites,
        List<Double> energy,
        List<Double> real,
        List<Double> imaginary,
        String table,
        SourceRef source)
        implements Lead {
    public TabulatedLead {
        contactSites = List.copyOf(contactSites);
        energy = List.copyOf(energy);
        real = List.copyOf(real);
        imaginary = List.copyOf(imaginary);
    }

    @Override
    public TabulatedLead with(double newTemperature, double newMu) {
        return new TabulatedLead(
                name, newTemperature, newMu, floating, contactSites, energy, real, imaginary, table, source);
    }
}
