package org.isthmus.runtime.catalogue;

import static org.isthmus.runtime.units.Dimension.CONDUCTANCE;
import static org.isthmus.runtime.units.Dimension.CURRENT;
import static org.isthmus.runtime.units.Dimension.ENERGY;
import static org.isthmus.runtime.units.Dimension.NUMBER;
import static org.isthmus.runtime.units.Dimension.POWER;
import static org.isthmus.runtime.units.Dimension.RESISTANCE;
import static org.isthmus.runtime.units.Dimension.TEMPERATURE;
import static org.isthmus.runtime.units.Dimension.TIME;
import static org.isthmus.runtime.units.Dimension.VOLTAGE;

import java.util.List;
import org.isthmus.runtime.catalogue.ObservableEntry.Arguments;
import org.isthmus.runtime.catalogue.ObservableEntry.Resolution;
import org.isthmus.runtime.device.ExpectedValue.Reduction;
import org.isthmus.runtime.units.Dimension;

/** Every observable of the language; what computes one replaces its entry here by a service. */
final class ObservableEntries {
    private static final Dimension PER_ENERGY = NUMBER.over(ENERGY);

    private ObservableEntries() {}

    static List<ObservableDescriptor> all() {
        return List.of(
                entry(
                        "transmission",
                        Arguments.LEAD_PAIR,
                        Resolution.ENERGY,
                        false,
                        NUMBER,
                        NUMBER,
                        "transmission(a, b): number of electron waves that pass from a to b at an energy; the"
                                + " phase-coherent part where there is dephasing."),
                entry(
                        "conductance",
                        Arguments.LEAD_PAIR,
                        Resolution.INTEGRATED,
                        false,
                        CONDUCTANCE,
                        CONDUCTANCE,
                        "conductance(a, b): current per voltage between two leads, in linear response."),
                entry(
                        "current",
                        Arguments.LEAD_AND_MATRIX,
                        Resolution.EITHER,
                        false,
                        CURRENT,
                        CURRENT.over(ENERGY),
                        "current(lead): electric current that enters the device at the lead, positive on positive bias;"
                                + " current(lead, Y): flow of the quantity Y that electrons carry in."),
                entry(
                        "dos",
                        Arguments.NONE,
                        Resolution.ENERGY,
                        false,
                        PER_ENERGY,
                        PER_ENERGY,
                        "Density of states of the whole body."),
                entry("density", Arguments.NONE, Resolution.INTEGRATED, true, NUMBER, NUMBER, "Electrons per site."),
                entry(
                        "ldos",
                        Arguments.NONE,
                        Resolution.ENERGY,
                        true,
                        PER_ENERGY,
                        PER_ENERGY,
                        "Density of states per site; `ldos at E` at one energy."),
                entry(
                        "occupation",
                        Arguments.NONE,
                        Resolution.EITHER,
                        true,
                        NUMBER,
                        NUMBER,
                        "Occupied part of the states per site, Gn/A."),
                entry(
                        "bondCurrent",
                        Arguments.NONE,
                        Resolution.EITHER,
                        true,
                        CURRENT,
                        CURRENT.over(ENERGY),
                        "Electric current along each bond."),
                entry(
                        "resistance",
                        Arguments.FOUR_LEADS,
                        Resolution.INTEGRATED,
                        false,
                        RESISTANCE,
                        RESISTANCE,
                        "resistance(i1, i2, v1, v2): voltage between v1 and v2 per current from i1 to i2, all others floating."),
                entry(
                        "mu",
                        Arguments.LEAD,
                        Resolution.INTEGRATED,
                        false,
                        ENERGY,
                        ENERGY,
                        "Electrochemical potential of a lead; that of a floating lead is found."),
                entry(
                        "noise",
                        Arguments.LEAD_PAIR,
                        Resolution.INTEGRATED,
                        false,
                        CURRENT.power(2).times(TIME),
                        CURRENT.power(2).times(TIME),
                        "noise(a, b): one-sided spectral density of the current fluctuations at zero frequency."),
                entry(
                        "fano",
                        Arguments.LEAD_PAIR,
                        Resolution.EITHER,
                        false,
                        NUMBER,
                        NUMBER,
                        "fano(a, b): shot noise relative to that of independent electrons."),
                entry(
                        "seebeck",
                        Arguments.LEAD_PAIR,
                        Resolution.INTEGRATED,
                        false,
                        VOLTAGE.over(TEMPERATURE),
                        VOLTAGE.over(TEMPERATURE),
                        "seebeck(a, b): thermovoltage per temperature difference; negative where electrons above mu pass better."),
                entry(
                        "heatCurrent",
                        Arguments.LEAD,
                        Resolution.INTEGRATED,
                        false,
                        POWER,
                        POWER,
                        "heatCurrent(lead): heat that electrons carry into the body at the lead."),
                entry("spinDensity", Arguments.NONE, Resolution.EITHER, true, NUMBER, NUMBER, "Spin per site."),
                entry(
                        "modes",
                        Arguments.LEAD,
                        Resolution.ENERGY,
                        false,
                        NUMBER,
                        NUMBER,
                        "modes(lead): waves that propagate in the lead at an energy."),
                entry(
                        "scatteringRate",
                        Arguments.NONE,
                        Resolution.ENERGY,
                        true,
                        Dimension.FREQUENCY,
                        Dimension.FREQUENCY,
                        "Rate of dephasing per site."),
                entry(
                        "residual",
                        Arguments.NONE,
                        Resolution.EITHER,
                        false,
                        NUMBER,
                        NUMBER,
                        "Largest violation of current conservation, relative to the largest lead current."));
    }

    private static ObservableDescriptor entry(
            String name,
            Arguments arguments,
            Resolution resolution,
            boolean perSite,
            Dimension integrated,
            Dimension resolved,
            String documentation) {
        return new ObservableDescriptor(
                name, arguments, resolution, perSite, integrated, resolved, false, documentation);
    }

    static List<ReductionEntry> reductions() {
        return List.of(
                new ReductionEntry("min", Reduction.MIN, "The least value over all points."),
                new ReductionEntry("max", Reduction.MAX, "The greatest value over all points."),
                new ReductionEntry("mean", Reduction.MEAN, "The mean over all points."),
                new ReductionEntry("argmin", Reduction.ARGMIN, "Where on the first axis the least value lies."),
                new ReductionEntry("argmax", Reduction.ARGMAX, "Where on the first axis the greatest value lies."),
                new ReductionEntry(
                        "slope",
                        Reduction.SLOPE,
                        "Slope of the straight line through all points over the first axis."));
    }
}
