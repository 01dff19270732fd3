package org.isthmus.runtime.units;

/**
 * Reads a unit as tables and command lines write it: symbols with whole powers, products, quotients and parentheses, such
 * as {@code cm^2/(V*s)}.
 */
public final class UnitText {
    private static final int DEEPEST = 20;

    private final String text;
    private int position;
    private int depth;

    private UnitText(String text) {
        this.text = text;
    }

    /**
     * Reads a unit.
     *
     * @param text empty means a plain number
     * @throws IllegalArgumentException with a sentence about what cannot be read
     */
    public static Unit parse(String text) {
        String trimmed = text.strip();
        if (trimmed.isEmpty() || trimmed.equals("1")) {
            return Units.fitting(Dimension.NUMBER);
        }
        UnitText reader = new UnitText(trimmed);
        Unit unit = reader.product();
        reader.skipSpace();
        if (reader.position < trimmed.length()) {
            throw reader.problem();
        }
        return new Unit(trimmed, unit.dimension(), unit.multiplier(), unit.divisor(), trimmed);
    }

    private Unit product() {
        Unit unit = power();
        while (true) {
            skipSpace();
            if (take('*')) {
                unit = times(unit, power());
            } else if (take('/')) {
                Unit below = power();
                unit = new Unit(
                        "",
                        unit.dimension().over(below.dimension()),
                        unit.multiplier() * below.divisor(),
                        unit.divisor() * below.multiplier(),
                        "");
            } else {
                return unit;
            }
        }
    }

    private static Unit times(Unit a, Unit b) {
        return new Unit(
                "", a.dimension().times(b.dimension()), a.multiplier() * b.multiplier(), a.divisor() * b.divisor(), "");
    }

    private Unit power() {
        Unit base = symbol();
        skipSpace();
        if (!take('^')) {
            return base;
        }
        int start = position;
        take('-');
        while (position < text.length() && Character.isDigit(text.charAt(position))) {
            position++;
        }
        int exponent;
        try {
            exponent = Integer.parseInt(text.substring(start, position));
        } catch (NumberFormatException e) {
            throw problem();
        }
        double multiplier = Math.pow(base.multiplier(), Math.abs(exponent));
        double divisor = Math.pow(base.divisor(), Math.abs(exponent));
        Dimension dimension = base.dimension().power(exponent);
        return exponent >= 0
                ? new Unit("", dimension, multiplier, divisor, "")
                : new Unit("", dimension, divisor, multiplier, "");
    }

    private Unit symbol() {
        skipSpace();
        if (take('(')) {
            if (++depth > DEEPEST) {
                throw problem();
            }
            Unit inside = product();
            skipSpace();
            if (!take(')')) {
                throw problem();
            }
            depth--;
            return inside;
        }
        if (take('1')) {
            return Units.fitting(Dimension.NUMBER);
        }
        int start = position;
        while (position < text.length() && Character.isLetter(text.charAt(position))) {
            position++;
        }
        String symbol = text.substring(start, position);
        return Units.bySymbol(symbol)
                .orElseThrow(() -> new IllegalArgumentException(
                        symbol.isEmpty() ? "'" + text + "' is not a unit" : "'" + symbol + "' is not a unit symbol"));
    }

    private IllegalArgumentException problem() {
        return new IllegalArgumentException("'" + text + "' is not a unit");
    }

    private void skipSpace() {
        while (position < text.length() && text.charAt(position) == ' ') {
            position++;
        }
    }

    private boolean take(char wanted) {
        if (position < text.length() && text.charAt(position) == wanted) {
            position++;
            return true;
        }
        return false;
    }
}
