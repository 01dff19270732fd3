package org.isthmus.runtime.catalogue;

import static org.isthmus.runtime.units.Dimension.ENERGY;
import static org.isthmus.runtime.units.Dimension.NUMBER;
import static org.isthmus.runtime.units.Dimension.TEMPERATURE;

import java.util.List;
import org.isthmus.runtime.catalogue.SettingEntry.Block;
import org.isthmus.runtime.catalogue.SettingEntry.Value;
import org.isthmus.runtime.units.Dimension;

/** Settings of blocks, words that they may have as values, kinds of dephasing, quantities of materials. */
final class SettingEntries {
    private SettingEntries() {}

    static List<SettingEntry> all() {
        return List.of(
                new SettingEntry(
                        "orbitals", Block.SITE, Value.COUNT, NUMBER, "Number of orbitals on the site; 1 unless said."),
                new SettingEntry(
                        "energy",
                        Block.SITE,
                        Value.QUANTITY_OR_MATRIX,
                        ENERGY,
                        "On-site term; a scalar stands for scalar × identity."),
                new SettingEntry(
                        "degeneracy",
                        Block.LATTICE,
                        Value.QUANTITY,
                        NUMBER,
                        "Multiplies currents and densities (spin); 2 unless said."),
                new SettingEntry(
                        "temperature",
                        Block.LEAD,
                        Value.QUANTITY,
                        TEMPERATURE,
                        "Temperature of the lead; 300 K unless said."),
                new SettingEntry(
                        "mu",
                        Block.LEAD,
                        Value.QUANTITY,
                        ENERGY,
                        "Electrochemical potential at zero bias; 0 eV unless said."),
                new SettingEntry(
                        "potential",
                        Block.LEAD,
                        Value.QUANTITY_OR_MATRIX,
                        ENERGY,
                        "Shift of the lead's own bands, exchange splitting included."),
                new SettingEntry(
                        "broadening",
                        Block.LEAD,
                        Value.QUANTITY,
                        ENERGY,
                        "Wide-band contact: Σ = −i·broadening/2 on each chosen site."),
                new SettingEntry(
                        "selfenergy",
                        Block.LEAD,
                        Value.TABLE,
                        ENERGY,
                        "Σ(E) as data: table(\"file.csv\") with energy, real and imag in eV."),
                new SettingEntry(
                        "strength",
                        Block.DEPHASING,
                        Value.QUANTITY,
                        ENERGY.power(2),
                        "Strength of D, an energy squared."),
                new SettingEntry(
                        "spin", Block.DEPHASING, Value.CHOICE, null, "Whether dephasing conserves or relaxes spin."),
                new SettingEntry(
                        "energy",
                        Block.MEASUREMENT,
                        Value.AXIS,
                        ENERGY,
                        "Energies at which energy-resolved observables are recorded."),
                new SettingEntry(
                        "temperature", Block.MEASUREMENT, Value.QUANTITY, TEMPERATURE, "Temperature of every lead."),
                new SettingEntry(
                        "mu",
                        Block.MEASUREMENT,
                        Value.QUANTITY,
                        ENERGY,
                        "Electrochemical potential of every lead at zero bias."),
                new SettingEntry("drop", Block.MEASUREMENT, Value.CHOICE, null, "How a bias falls over the body."),
                new SettingEntry(
                        "accuracy",
                        Block.MEASUREMENT,
                        Value.QUANTITY,
                        NUMBER,
                        "Relative accuracy of integrals over energy; 1e-8 unless said."),
                new SettingEntry("permittivity", Block.REGION, Value.QUANTITY, NUMBER, "Relative permittivity."),
                new SettingEntry(
                        "doping",
                        Block.REGION,
                        Value.QUANTITY,
                        NUMBER.over(Dimension.LENGTH.power(3)),
                        "Donors minus acceptors per volume."),
                new SettingEntry("voltage", Block.GATE, Value.QUANTITY, Dimension.VOLTAGE, "Voltage of the gate."),
                new SettingEntry(
                        "workfunction", Block.GATE, Value.QUANTITY, ENERGY, "Work function of the gate's metal."));
    }

    static List<ChoiceEntry> choices() {
        return List.of(
                new ChoiceEntry("none", "drop", "The body stays where it is."),
                new ChoiceEntry("linear", "drop", "The bias falls evenly along the line between the two leads."),
                new ChoiceEntry("poisson", "drop", "The bias falls as the self-consistent field says."),
                new ChoiceEntry("conserving", "spin", "Dephasing keeps the spin."),
                new ChoiceEntry("relaxing", "spin", "Dephasing relaxes the spin."));
    }

    static List<DephasingKind> dephasingKinds() {
        return List.of(
                new DephasingKind("local", false, "D_ij = strength·δ_ij: relaxes phase and momentum."),
                new DephasingKind("uniform", false, "D_ij = strength for all pairs: relaxes phase, keeps momentum."),
                new DephasingKind("correlated", true, "strength × an expression of distance, x1 y1 z1, x2 y2 z2."),
                new DephasingKind("table", true, "A full matrix from a file."));
    }

    static List<MaterialQuantity> materialQuantities() {
        return List.of(
                new MaterialQuantity("mass", Dimension.MASS, "Effective mass."),
                new MaterialQuantity("permittivity", NUMBER, "Relative permittivity."),
                new MaterialQuantity("bandEdge", ENERGY, "Energy of the band edge."),
                new MaterialQuantity("g", NUMBER, "Effective g factor."),
                new MaterialQuantity("rashba", ENERGY.times(Dimension.LENGTH), "Rashba parameter."),
                new MaterialQuantity("affinity", ENERGY, "Electron affinity."));
    }
}
