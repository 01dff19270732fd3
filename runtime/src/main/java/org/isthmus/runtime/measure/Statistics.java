package org.isthmus.runtime.measure;

/** Mean and standard error of few numbers. */
final class Statistics {
    private Statistics() {}

    static double mean(double[] values) {
        double sum = 0;
        for (double value : values) {
            sum += value;
        }
        return sum / values.length;
    }

    /** Sample deviation (n − 1) over √n; not defined for one value. */
    static double standardError(double[] values) {
        if (values.length < 2) {
            return Double.NaN;
        }
        double mean = mean(values);
        double squares = 0;
        for (double value : values) {
            squares += (value - mean) * (value - mean);
        }
        return Math.sqrt(squares / (values.length - 1) / values.length);
    }
}
