package org.isthmus.runtime.units;

import java.util.LinkedHashMap;
import java.util.Map;

/**
 * What kind of quantity a number is: a product of powers of length, energy, time, charge and temperature. Powers count in
 * twelfths, so that square, cube and fourth roots stay exact. Angles are plain numbers.
 */
public record Dimension(int length, int energy, int time, int charge, int temperature) {
    /** A power of one. */
    private static final int WHOLE = 12;

    public static final Dimension NUMBER = new Dimension(0, 0, 0, 0, 0);
    public static final Dimension LENGTH = new Dimension(WHOLE, 0, 0, 0, 0);
    public static final Dimension ENERGY = new Dimension(0, WHOLE, 0, 0, 0);
    public static final Dimension TIME = new Dimension(0, 0, WHOLE, 0, 0);
    public static final Dimension CHARGE = new Dimension(0, 0, 0, WHOLE, 0);
    public static final Dimension TEMPERATURE = new Dimension(0, 0, 0, 0, WHOLE);
    public static final Dimension MASS = ENERGY.times(TIME.power(2)).over(LENGTH.power(2));
    public static final Dimension VOLTAGE = ENERGY.over(CHARGE);
    public static final Dimension CURRENT = CHARGE.over(TIME);
    public static final Dimension CONDUCTANCE = CURRENT.over(VOLTAGE);
    public static final Dimension RESISTANCE = VOLTAGE.over(CURRENT);
    public static final Dimension FIELD = VOLTAGE.times(TIME).over(LENGTH.power(2));
    public static final Dimension MOBILITY = LENGTH.power(2).over(VOLTAGE.times(TIME));
    public static final Dimension FREQUENCY = NUMBER.over(TIME);
    public static final Dimension CAPACITANCE = CHARGE.over(VOLTAGE);
    public static final Dimension POWER = ENERGY.over(TIME);

    /** Names for messages and for the kinds of parameters. */
    private static final Map<String, Dimension> NAMED = named();

    private static Map<String, Dimension> named() {
        Map<String, Dimension> names = new LinkedHashMap<>();
        names.put("number", NUMBER);
        names.put("integer", NUMBER);
        names.put("angle", NUMBER);
        names.put("length", LENGTH);
        names.put("area", LENGTH.power(2));
        names.put("volume", LENGTH.power(3));
        names.put("energy", ENERGY);
        names.put("time", TIME);
        names.put("temperature", TEMPERATURE);
        names.put("voltage", VOLTAGE);
        names.put("current", CURRENT);
        names.put("charge", CHARGE);
        names.put("mass", MASS);
        names.put("field", FIELD);
        names.put("resistance", RESISTANCE);
        names.put("conductance", CONDUCTANCE);
        names.put("mobility", MOBILITY);
        names.put("velocity", LENGTH.over(TIME));
        names.put("frequency", FREQUENCY);
        names.put("capacitance", CAPACITANCE);
        names.put("power", POWER);
        names.put("flux", FIELD.times(LENGTH.power(2)));
        return names;
    }

    /** The dimensions that have a name, in a fixed order. */
    public static Map<String, Dimension> names() {
        return java.util.Collections.unmodifiableMap(NAMED);
    }

    public Dimension times(Dimension other) {
        return new Dimension(
                length + other.length,
                energy + other.energy,
                time + other.time,
                charge + other.charge,
                temperature + other.temperature);
    }

    public Dimension over(Dimension other) {
        return times(other.power(-1));
    }

    /**
     * A power of this dimension.
     *
     * @throws ArithmeticException where the result is no multiple of a twelfth
     */
    public Dimension power(double exponent) {
        return new Dimension(
                scaled(length, exponent),
                scaled(energy, exponent),
                scaled(time, exponent),
                scaled(charge, exponent),
                scaled(temperature, exponent));
    }

    private static int scaled(int twelfths, double exponent) {
        double exact = twelfths * exponent;
        long rounded = Math.round(exact);
        if (Math.abs(exact - rounded) > 1e-9 || Math.abs(rounded) > 10_000) {
            throw new ArithmeticException("a power of " + exponent + " of this dimension is not defined");
        }
        return (int) rounded;
    }

    public boolean isNumber() {
        return equals(NUMBER);
    }

    /** {@code energy}, {@code length}, … or, for what has no name, its unit. */
    public String describe() {
        for (Map.Entry<String, Dimension> entry : NAMED.entrySet()) {
            if (entry.getValue().equals(this)) {
                return entry.getKey();
            }
        }
        return "quantity in " + Units.fitting(this).symbol();
    }

    /** With its article: {@code an energy}, {@code a length}, {@code a quantity in eV^2}. */
    public String withArticle() {
        String name = describe();
        return ("aeiou".indexOf(name.charAt(0)) >= 0 ? "an " : "a ") + name;
    }

    @Override
    public String toString() {
        return describe();
    }
}
