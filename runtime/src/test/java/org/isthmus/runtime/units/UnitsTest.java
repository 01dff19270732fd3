package org.isthmus.runtime.units;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.Random;
import org.junit.jupiter.api.Test;

/** Against the SI brochure (9th ed., BIPM 2019) and CODATA 2018 (Rev. Mod. Phys. 93, 025010). */
class UnitsTest {
    private static double internal(String symbol, double value) {
        return Units.bySymbol(symbol).orElseThrow().toInternal(value);
    }

    @Test
    void decimalPrefixesAreExact() {
        assertEquals(0.25, internal("nm", 0.25));
        assertEquals(0.1, internal("eV", 0.1));
        assertEquals(0.3, internal("V", 0.3));
        assertEquals(0.005, internal("meV", 5));
        assertEquals(0.0123, internal("mV", 12.3));
        assertEquals(0.3, internal("angstrom", 3));
        assertEquals(300, internal("K", 300));
    }

    @Test
    void derivedUnitsAreCoherent() {
        // 1 V/A = 1 Ohm, 1 J = 1 C V, 1 kg m²/s² = 1 J, 1 T m² = 1 V s, 1 F = 1 C/V (SI brochure, table 4)
        assertEquals(1, internal("V", 1) / internal("A", 1) / internal("Ohm", 1), 1e-15);
        assertEquals(1, internal("A", 1) * internal("s", 1) * internal("V", 1) / internal("J", 1), 1e-15);
        assertEquals(1, internal("kg", 1) * Math.pow(internal("m", 1) / internal("s", 1), 2) / internal("J", 1), 1e-15);
        assertEquals(
                1, internal("T", 1) * Math.pow(internal("m", 1), 2) / (internal("V", 1) * internal("s", 1)), 1e-15);
        assertEquals(1, internal("F", 1) * internal("V", 1) / (internal("A", 1) * internal("s", 1)), 1e-15);
    }

    @Test
    void constantsHaveTheirPublishedValues() {
        // CODATA 2018: G0 = 7.748091729e-5 S, R_K = 25812.80745 Ohm, k = 8.617333262e-5 eV/K, muB = 5.7883818060e-5
        // eV/T
        assertEquals(
                7.748091729e-5,
                Units.fitting(Dimension.CONDUCTANCE).fromInternal(PhysicalConstants.CONDUCTANCE_QUANTUM),
                1e-14);
        assertEquals(
                25812.80745,
                Units.fitting(Dimension.RESISTANCE).fromInternal(PhysicalConstants.RESISTANCE_QUANTUM),
                1e-5);
        assertEquals(8.617333262e-5, PhysicalConstants.KB, 1e-14);
        assertEquals(5.7883818060e-5, PhysicalConstants.BOHR_MAGNETON * internal("T", 1), 1e-14);
        // ħ²/me = 0.0761996423 eV nm², from the CODATA 2018 values
        assertEquals(
                0.0761996423, PhysicalConstants.HBAR * PhysicalConstants.HBAR / PhysicalConstants.ELECTRON_MASS, 1e-10);
        // 1 eV = 1.602176634e-19 J exactly
        assertEquals(1, internal("J", 1.602176634e-19), 1e-15);
    }

    @Test
    void dimensionsFormAGroup() {
        Random random = new Random(11);
        for (int i = 0; i < 200; i++) {
            Dimension a = any(random);
            Dimension b = any(random);
            assertEquals(a, a.times(b).over(b));
            assertEquals(a.times(b), b.times(a));
            assertEquals(a, a.power(2).power(0.5));
            assertEquals(Dimension.NUMBER, a.times(a.power(-1)));
        }
    }

    private static Dimension any(Random random) {
        Dimension[] base = {Dimension.LENGTH, Dimension.ENERGY, Dimension.TIME, Dimension.CHARGE, Dimension.TEMPERATURE
        };
        Dimension dimension = Dimension.NUMBER;
        for (Dimension factor : base) {
            dimension = dimension.times(factor.power(random.nextInt(7) - 3));
        }
        return dimension;
    }

    @Test
    void everyDimensionHasAUnitThatReadsBack() {
        Random random = new Random(12);
        for (int i = 0; i < 200; i++) {
            Dimension dimension = any(random);
            Unit unit = Units.fitting(dimension);
            if (!unit.symbol().equals("W")) {
                Unit read = UnitText.parse(unit.symbol());
                assertEquals(dimension, read.dimension(), unit.symbol());
                assertEquals(unit.factor(), read.factor(), 1e-12 * unit.factor(), unit.symbol());
            }
        }
    }

    @Test
    void compositeUnitsReadAndNonsenseIsRefused() {
        assertEquals(Dimension.MOBILITY, UnitText.parse("cm^2/(V*s)").dimension());
        assertEquals(0.1, UnitText.parse("cm^2/(V*s)").toInternal(1), 1e-16);
        assertEquals(Dimension.ENERGY.power(2), UnitText.parse("eV^2").dimension());
        for (String wrong : new String[] {"eV^", "furlong", "(eV", "eV)", "eV**nm", "eV^x", "*"}) {
            assertThrows(IllegalArgumentException.class, () -> UnitText.parse(wrong), wrong);
        }
    }
}
