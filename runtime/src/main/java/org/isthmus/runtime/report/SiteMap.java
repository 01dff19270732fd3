package org.isthmus.runtime.report;

import java.util.Locale;

/**
 * Values on the sites of a body, seen from +z, as SVG: a dot per site, or the mean over a small square where there are
 * more sites than dots can be told apart.
 */
record SiteMap(String title, String label, double[] x, double[] y, double[] values) {
    private static final int WIDTH = 720;
    private static final int INNER = 520;
    private static final int TALLEST = 520;
    private static final int LEFT = 60;
    private static final int TOP = 44;
    private static final int CELLS = 160;

    /** Dark to bright, even in grey: anchor colours of the published map "viridis" (van der Walt and Smith, 2015). */
    private static final int[][] COLOURS = {{68, 1, 84}, {59, 82, 139}, {33, 145, 140}, {94, 201, 98}, {253, 231, 37}};

    String svg() {
        Span across = Span.of(x);
        Span up = Span.of(y);
        Span shown = Span.of(values);
        double scale = Math.min(INNER / Math.max(across.size(), 1e-9), TALLEST / Math.max(up.size(), 1e-9));
        int innerWidth = (int) Math.max(20, Math.round(scale * across.size()));
        int innerHeight = (int) Math.max(20, Math.round(scale * up.size()));
        int total = TOP + innerHeight + 60;
        StringBuilder svg = new StringBuilder(String.format(
                Locale.ROOT,
                "<svg xmlns=\"http://www.w3.org/2000/svg\" viewBox=\"0 0 %d %d\" role=\"img\" font-family=\"sans-serif\""
                        + " font-size=\"14\" fill=\"#222\">\n<title>%s</title>\n<rect width=\"%1$d\" height=\"%2$d\""
                        + " fill=\"#fff\"/>\n<text x=\"%d\" y=\"24\" font-weight=\"bold\">%3$s</text>\n",
                WIDTH,
                total,
                LinePlot.escaped(title),
                LEFT));
        dots(svg, across, up, shown, innerWidth, innerHeight);
        text(svg, LEFT, TOP + innerHeight + 30, number(across.low), "middle");
        text(svg, LEFT + innerWidth, TOP + innerHeight + 30, number(across.high) + " nm", "middle");
        text(svg, LEFT - 12, TOP + innerHeight + 5, number(up.low), "end");
        text(svg, LEFT - 12, TOP + 5, number(up.high), "end");
        bar(svg, shown);
        return svg.append("</svg>\n").toString();
    }

    private void dots(StringBuilder svg, Span across, Span up, Span shown, int innerWidth, int innerHeight) {
        int columns = Math.min(CELLS, innerWidth);
        int rows = Math.max(1, Math.round((float) columns * innerHeight / innerWidth));
        boolean cells = values.length > columns * rows / 2;
        double radius = Math.max(1.2, Math.min(9, 0.5 * Math.sqrt((double) innerWidth * innerHeight / values.length)));
        if (!cells) {
            for (int i = 0; i < values.length; i++) {
                if (!Double.isFinite(values[i])) {
                    continue;
                }
                svg.append(String.format(
                        Locale.ROOT,
                        "<circle cx=\"%.1f\" cy=\"%.1f\" r=\"%.1f\" fill=\"%s\"/>\n",
                        LEFT + innerWidth * across.part(x[i]),
                        TOP + innerHeight * (1 - up.part(y[i])),
                        radius,
                        colour(shown.part(values[i]))));
            }
            return;
        }
        double[] sums = new double[columns * rows];
        int[] counts = new int[columns * rows];
        for (int i = 0; i < values.length; i++) {
            if (!Double.isFinite(values[i])) {
                continue;
            }
            int column = (int) Math.min(columns - 1, columns * across.part(x[i]));
            int row = (int) Math.min(rows - 1, rows * (1 - up.part(y[i])));
            sums[row * columns + column] += values[i];
            counts[row * columns + column]++;
        }
        double cellWidth = (double) innerWidth / columns;
        double cellHeight = (double) innerHeight / rows;
        for (int cell = 0; cell < sums.length; cell++) {
            if (counts[cell] > 0) {
                svg.append(String.format(
                        Locale.ROOT,
                        "<rect x=\"%.1f\" y=\"%.1f\" width=\"%.2f\" height=\"%.2f\" fill=\"%s\"/>\n",
                        LEFT + cell % columns * cellWidth,
                        TOP + cell / columns * cellHeight,
                        cellWidth + 0.2,
                        cellHeight + 0.2,
                        colour(shown.part(sums[cell] / counts[cell]))));
            }
        }
    }

    private void bar(StringBuilder svg, Span shown) {
        int left = LEFT + INNER + 30;
        for (int i = 0; i < 50; i++) {
            svg.append(String.format(
                    Locale.ROOT,
                    "<rect x=\"%d\" y=\"%.1f\" width=\"16\" height=\"4.3\" fill=\"%s\"/>\n",
                    left,
                    TOP + 200 - 4.0 * (i + 1),
                    colour(i / 49.0)));
        }
        text(svg, left + 22, TOP + 12, number(shown.high), "start");
        text(svg, left + 22, TOP + 200, number(shown.low), "start");
        text(svg, left, TOP + 224, label, "start");
    }

    private static String number(double value) {
        return String.format(Locale.ROOT, "%.3g", value);
    }

    static String colour(double share) {
        double at = Math.max(0, Math.min(1, share)) * (COLOURS.length - 1);
        int lower = (int) Math.max(0, Math.min(COLOURS.length - 2, Math.floor(at)));
        double part = at - lower;
        StringBuilder text = new StringBuilder("#");
        for (int c = 0; c < 3; c++) {
            text.append(String.format(
                    "%02x", Math.round(COLOURS[lower][c] + part * (COLOURS[lower + 1][c] - COLOURS[lower][c]))));
        }
        return text.toString();
    }

    /** What some values cover. */
    private record Span(double low, double high) {
        static Span of(double[] values) {
            double least = Double.POSITIVE_INFINITY;
            double greatest = Double.NEGATIVE_INFINITY;
            for (double value : values) {
                if (!Double.isFinite(value)) {
                    continue;
                }
                least = Math.min(least, value);
                greatest = Math.max(greatest, value);
            }
            return least <= greatest ? new Span(least, greatest) : new Span(0, 0);
        }

        double size() {
            return high - low;
        }

        /** 0 at the lower and 1 at the upper end. */
        double part(double value) {
            return high > low ? (value - low) / (high - low) : 0.5;
        }
    }

    private static void text(StringBuilder svg, double x, double y, String text, String anchor) {
        svg.append(String.format(
                Locale.ROOT,
                "<text x=\"%.1f\" y=\"%.1f\" text-anchor=\"%s\">%s</text>\n",
                x,
                y,
                anchor,
                LinePlot.escaped(text)));
    }
}
