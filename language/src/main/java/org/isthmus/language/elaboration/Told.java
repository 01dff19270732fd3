package org.isthmus.language.elaboration;

import java.math.BigDecimal;
import java.math.MathContext;

/** Numbers and places in messages. */
final class Told {
    private static final MathContext SIX = new MathContext(6);

    private Told() {}

    /** Six digits at most, without idle zeros. */
    static String number(double value) {
        if (!Double.isFinite(value)) {
            return Double.isNaN(value) ? "not a number" : value > 0 ? "infinite" : "minus infinite";
        }
        if (value == 0) {
            return "0";
        }
        BigDecimal rounded = new BigDecimal(value).round(SIX).stripTrailingZeros();
        int magnitude = rounded.precision() - rounded.scale() - 1;
        return magnitude >= -5 && magnitude < 9
                ? rounded.toPlainString()
                : rounded.round(new MathContext(3))
                        .stripTrailingZeros()
                        .toString()
                        .replace("E+", "e")
                        .replace("E", "e");
    }

    static String nm(double value) {
        return number(tidy(value)) + " nm";
    }

    static String eV(double value) {
        return number(value) + " eV";
    }

    /** {@code x = 1 nm, y = 2 nm}; z only where it is not zero. */
    static String place(double x, double y, double z) {
        String text = "x = " + nm(x) + ", y = " + nm(y);
        return tidy(z) == 0 ? text : text + ", z = " + nm(z);
    }

    /** A whole number, rounded where it is large. */
    static String count(double value) {
        if (value < 1e6) {
            return String.valueOf((long) value);
        }
        return value < 1e300
                ? number(new BigDecimal(value).round(new MathContext(3)).doubleValue())
                : "1e300 or more";
    }

    /** {@code 1 site}, {@code 2 sites}. */
    static String count(int value, String noun) {
        return value + " " + noun + (value == 1 ? "" : "s");
    }

    /** The end of a message about the first of several. */
    static String others(int count, String noun) {
        return count <= 1 ? "" : " and at " + count(count - 1, "further " + noun);
    }

    /** Sums of lattice vectors end in rounding noise that is no news to the user. */
    private static double tidy(double length) {
        double rounded = Math.rint(length * 1e9) / 1e9;
        return Math.abs(length) < 1e6 ? rounded + 0.0 : length;
    }
}
