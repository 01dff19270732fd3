package org.isthmus.runtime.catalogue;

import static org.isthmus.runtime.units.Dimension.CHARGE;
import static org.isthmus.runtime.units.Dimension.CONDUCTANCE;
import static org.isthmus.runtime.units.Dimension.ENERGY;
import static org.isthmus.runtime.units.Dimension.FIELD;
import static org.isthmus.runtime.units.Dimension.LENGTH;
import static org.isthmus.runtime.units.Dimension.NUMBER;
import static org.isthmus.runtime.units.Dimension.RESISTANCE;
import static org.isthmus.runtime.units.Dimension.TEMPERATURE;
import static org.isthmus.runtime.units.Dimension.TIME;
import static org.isthmus.runtime.units.Dimension.VOLTAGE;

import java.util.ArrayList;
import java.util.List;
import org.isthmus.runtime.units.Dimension;
import org.isthmus.runtime.units.PhysicalConstants;
import org.isthmus.runtime.units.Unit;
import org.isthmus.runtime.units.Units;

/** Constants, and unit symbols as constants. */
final class ConstantEntries {
    private ConstantEntries() {}

    static List<ConstantEntry> all() {
        List<ConstantEntry> entries = new ArrayList<>();
        for (Unit unit : Units.all()) {
            entries.add(new ConstantEntry(
                    unit.symbol(),
                    unit.dimension(),
                    unit.toInternal(1),
                    true,
                    "The unit " + unit.name() + ", " + unit.dimension().withArticle() + "."));
        }
        entries.add(constant("pi", NUMBER, Math.PI, "π, the circumference of a circle over its diameter."));
        entries.add(constant("h", ENERGY.times(TIME), PhysicalConstants.H, "Planck constant; exact (SI 2019)."));
        entries.add(constant("hbar", ENERGY.times(TIME), PhysicalConstants.HBAR, "Reduced Planck constant h/2π."));
        entries.add(constant("q", CHARGE, 1, "Elementary charge, positive; exact (SI 2019). Electrons carry −q."));
        entries.add(
                constant("kB", ENERGY.over(TEMPERATURE), PhysicalConstants.KB, "Boltzmann constant; exact (SI 2019)."));
        entries.add(constant(
                "muB", ENERGY.over(FIELD), PhysicalConstants.BOHR_MAGNETON, "Bohr magneton qħ/2me (CODATA 2018)."));
        entries.add(constant(
                "eps0",
                CHARGE.over(VOLTAGE.times(LENGTH)),
                PhysicalConstants.ELECTRIC_CONSTANT,
                "Electric constant (CODATA 2018)."));
        entries.add(constant(
                "G0", CONDUCTANCE, PhysicalConstants.CONDUCTANCE_QUANTUM, "Conductance quantum 2q²/h, 77.48 µS."));
        entries.add(
                constant("RK", RESISTANCE, PhysicalConstants.RESISTANCE_QUANTUM, "Resistance quantum h/q², 25.81 kΩ."));
        return entries;
    }

    private static ConstantEntry constant(String name, Dimension dimension, double value, String documentation) {
        return new ConstantEntry(name, dimension, value, false, documentation);
    }

    static List<MatrixEntry> matrices() {
        return List.of(
                new MatrixEntry(
                        "sigma0", 2, List.of(1.0, 0.0, 0.0, 0.0, 0.0, 0.0, 1.0, 0.0), "Unit matrix of two orbitals."),
                new MatrixEntry("sigmaX", 2, List.of(0.0, 0.0, 1.0, 0.0, 1.0, 0.0, 0.0, 0.0), "Pauli matrix σx."),
                new MatrixEntry("sigmaY", 2, List.of(0.0, 0.0, 0.0, -1.0, 0.0, 1.0, 0.0, 0.0), "Pauli matrix σy."),
                new MatrixEntry("sigmaZ", 2, List.of(1.0, 0.0, 0.0, 0.0, 0.0, 0.0, -1.0, 0.0), "Pauli matrix σz."));
    }
}
