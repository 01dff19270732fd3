package org.isthmus.runtime.report;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.ArrayList;
import java.util.List;

/**
 * An axis that covers some values with round ticks.
 *
 * @param lower where it begins
 * @param upper where it ends, above {@code lower}
 * @param step distance of ticks: 1, 2 or 5 times a power of ten
 */
record AxisScale(double lower, double upper, double step) {
    private static final int TICKS = 6;

    /** Covers values from the least to the greatest, both finite; up to the next ticks where {@code rounded}. */
    static AxisScale covering(double least, double greatest, boolean rounded) {
        double low = least;
        double high = greatest;
        double size = Math.max(Math.abs(low), Math.abs(high));
        if (high - low <= 1e-9 * size || high == low) {
            // a constant still wants room around it
            double room = size == 0 ? 1 : 0.1 * size;
            low -= room;
            high += room;
        }
        double step = niceStep((high - low) / TICKS);
        return rounded
                ? new AxisScale(step * Math.floor(low / step + 1e-9), step * Math.ceil(high / step - 1e-9), step)
                : new AxisScale(low, high, step);
    }

    private static double niceStep(double raw) {
        double power = Math.pow(10, Math.floor(Math.log10(raw)));
        double lead = raw / power;
        return power * (lead <= 1 ? 1 : lead <= 2 ? 2 : lead <= 5 ? 5 : 10);
    }

    /** Values of the ticks, ascending. */
    List<Double> ticks() {
        List<Double> ticks = new ArrayList<>();
        for (long n = (long) Math.ceil(lower / step - 1e-9); n * step <= upper + 1e-9 * step; n++) {
            ticks.add(n * step);
        }
        return ticks;
    }

    /** A tick's label: as many digits as the step needs. */
    String label(double tick) {
        int decimals = (int) -Math.floor(Math.log10(step) + 1e-9);
        double largest = Math.max(Math.abs(lower), Math.abs(upper));
        if (largest >= 1e5 || largest < 1e-3) {
            int exponent = (int) Math.floor(Math.log10(largest));
            BigDecimal mantissa = BigDecimal.valueOf(tick)
                    .movePointLeft(exponent)
                    .setScale(Math.max(0, decimals + exponent), RoundingMode.HALF_EVEN);
            return mantissa.signum() == 0 ? "0" : mantissa.toPlainString().replace('-', '−') + "e" + exponent;
        }
        BigDecimal value = BigDecimal.valueOf(tick).setScale(Math.max(0, decimals), RoundingMode.HALF_EVEN);
        return value.signum() == 0 ? "0" : value.toPlainString().replace('-', '−');
    }

    /** Where a value lies, 0 at the lower and 1 at the upper end. */
    double position(double value) {
        return (value - lower) / (upper - lower);
    }
}
