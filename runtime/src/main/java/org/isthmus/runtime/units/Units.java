package org.isthmus.runtime.units;

import static org.isthmus.runtime.units.PhysicalConstants.ELECTRON_MASS;
import static org.isthmus.runtime.units.PhysicalConstants.ELEMENTARY_CHARGE_SI;

import java.util.Collection;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Optional;

/** The unit symbols of device files, and the unit in which each dimension leaves the program. */
public final class Units {
    private static final Map<String, Unit> BY_SYMBOL = new LinkedHashMap<>();
    private static final Map<Dimension, Unit> CANONICAL = new LinkedHashMap<>();

    static {
        decimal("m", Dimension.LENGTH, 1e9, 1, "metre");
        decimal("cm", Dimension.LENGTH, 1e7, 1, "centimetre");
        decimal("mm", Dimension.LENGTH, 1e6, 1, "millimetre");
        decimal("um", Dimension.LENGTH, 1e3, 1, "micrometre");
        decimal("nm", Dimension.LENGTH, 1, 1, "nanometre");
        decimal("angstrom", Dimension.LENGTH, 1, 10, "ångström, 0.1 nm");
        decimal("s", Dimension.TIME, 1e15, 1, "second");
        decimal("ms", Dimension.TIME, 1e12, 1, "millisecond");
        decimal("us", Dimension.TIME, 1e9, 1, "microsecond");
        decimal("ns", Dimension.TIME, 1e6, 1, "nanosecond");
        decimal("ps", Dimension.TIME, 1e3, 1, "picosecond");
        decimal("fs", Dimension.TIME, 1, 1, "femtosecond");
        decimal("eV", Dimension.ENERGY, 1, 1, "electronvolt");
        decimal("meV", Dimension.ENERGY, 1, 1e3, "millielectronvolt");
        decimal("J", Dimension.ENERGY, 1, ELEMENTARY_CHARGE_SI, "joule");
        decimal("K", Dimension.TEMPERATURE, 1, 1, "kelvin");
        decimal("mK", Dimension.TEMPERATURE, 1, 1e3, "millikelvin");
        decimal("V", Dimension.VOLTAGE, 1, 1, "volt");
        decimal("mV", Dimension.VOLTAGE, 1, 1e3, "millivolt");
        decimal("A", Dimension.CURRENT, 1, ELEMENTARY_CHARGE_SI * 1e15, "ampere");
        decimal("mA", Dimension.CURRENT, 1, ELEMENTARY_CHARGE_SI * 1e18, "milliampere");
        decimal("uA", Dimension.CURRENT, 1, ELEMENTARY_CHARGE_SI * 1e21, "microampere");
        decimal("nA", Dimension.CURRENT, 1, ELEMENTARY_CHARGE_SI * 1e24, "nanoampere");
        decimal("S", Dimension.CONDUCTANCE, 1, ELEMENTARY_CHARGE_SI * 1e15, "siemens");
        decimal("mS", Dimension.CONDUCTANCE, 1, ELEMENTARY_CHARGE_SI * 1e18, "millisiemens");
        decimal("uS", Dimension.CONDUCTANCE, 1, ELEMENTARY_CHARGE_SI * 1e21, "microsiemens");
        decimal("Ohm", Dimension.RESISTANCE, ELEMENTARY_CHARGE_SI * 1e15, 1, "ohm");
        decimal("kOhm", Dimension.RESISTANCE, ELEMENTARY_CHARGE_SI * 1e18, 1, "kiloohm");
        decimal("T", Dimension.FIELD, 1, 1e3, "tesla");
        decimal("mT", Dimension.FIELD, 1, 1e6, "millitesla");
        decimal("kg", Dimension.MASS, 1e12, ELEMENTARY_CHARGE_SI, "kilogram");
        decimal("me", Dimension.MASS, ELECTRON_MASS, 1, "electron mass");
        decimal("rad", Dimension.NUMBER, 1, 1, "radian");
        decimal("deg", Dimension.NUMBER, Math.PI, 180, "degree");
        decimal("F", Dimension.CAPACITANCE, 1, ELEMENTARY_CHARGE_SI, "farad");
        decimal("Hz", Dimension.FREQUENCY, 1, 1e15, "hertz");

        CANONICAL.put(Dimension.NUMBER, new Unit("", Dimension.NUMBER, 1, 1, "number"));
        for (String symbol : new String[] {"nm", "eV", "fs", "K", "V", "A", "S", "Ohm", "T", "me", "F", "Hz"}) {
            canonical(BY_SYMBOL.get(symbol));
        }
        canonical(new Unit("cm^2/(V*s)", Dimension.MOBILITY, 1e14, 1e15, "mobility"));
        canonical(new Unit("W", Dimension.POWER, 1, ELEMENTARY_CHARGE_SI * 1e15, "watt"));
        canonical(new Unit("m/s", Dimension.LENGTH.over(Dimension.TIME), 1, 1e6, "metre per second"));
        canonical(new Unit("V/K", Dimension.VOLTAGE.over(Dimension.TEMPERATURE), 1, 1, "volt per kelvin"));
        canonical(new Unit("A/eV", Dimension.CURRENT.over(Dimension.ENERGY), 1, ELEMENTARY_CHARGE_SI * 1e15, ""));
        canonical(new Unit(
                "A^2/Hz",
                Dimension.CURRENT.power(2).times(Dimension.TIME),
                1,
                ELEMENTARY_CHARGE_SI * ELEMENTARY_CHARGE_SI * 1e15,
                "square ampere per hertz"));
    }

    private Units() {}

    private static void decimal(String symbol, Dimension dimension, double multiplier, double divisor, String name) {
        BY_SYMBOL.put(symbol, new Unit(symbol, dimension, multiplier, divisor, name));
    }

    private static void canonical(Unit unit) {
        CANONICAL.put(unit.dimension(), unit);
    }

    /** The unit with this symbol in device files. */
    public static Optional<Unit> bySymbol(String symbol) {
        return Optional.ofNullable(BY_SYMBOL.get(symbol));
    }

    /** All unit symbols of device files, in the order of the reference. */
    public static Collection<Unit> all() {
        return Collections.unmodifiableCollection(BY_SYMBOL.values());
    }

    /**
     * The unit in which a quantity is told: result columns, messages. Its symbol is an expression of device files, except
     * for watts; empty for a plain number.
     */
    public static Unit fitting(Dimension dimension) {
        Unit known = CANONICAL.get(dimension);
        return known != null ? known : composite(dimension);
    }

    /** Voltages come in where charges do, since the charge itself has no symbol of its own. */
    private static Unit composite(Dimension dimension) {
        Dimension rest = dimension.times(Dimension.VOLTAGE.power(dimension.charge() / 12.0));
        StringBuilder above = new StringBuilder();
        StringBuilder below = new StringBuilder();
        append(above, below, "eV", rest.energy());
        append(above, below, "nm", rest.length());
        append(above, below, "fs", rest.time());
        append(above, below, "K", rest.temperature());
        append(above, below, "V", -dimension.charge());
        String symbol = above.isEmpty() ? "1" : above.toString();
        if (!below.isEmpty()) {
            symbol += "/" + (below.indexOf("*") >= 0 ? "(" + below + ")" : below.toString());
        }
        return new Unit(symbol, dimension, 1, 1, "");
    }

    private static void append(StringBuilder above, StringBuilder below, String symbol, int twelfths) {
        if (twelfths == 0) {
            return;
        }
        StringBuilder side = twelfths > 0 ? above : below;
        int size = Math.abs(twelfths);
        String power = size == 12 ? "" : size % 12 == 0 ? "^" + size / 12 : "^(" + fraction(size) + ")";
        side.append(side.isEmpty() ? "" : "*").append(symbol).append(power);
    }

    private static String fraction(int twelfths) {
        int divisor = java.math.BigInteger.valueOf(twelfths)
                .gcd(java.math.BigInteger.valueOf(12))
                .intValue();
        return twelfths / divisor + "/" + 12 / divisor;
    }
}
