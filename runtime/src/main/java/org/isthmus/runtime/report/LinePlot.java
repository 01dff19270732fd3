package org.isthmus.runtime.report;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;

/**
 * Curves over one axis, as SVG that scales with its place.
 *
 * @param title above the plot; may be empty
 * @param xLabel name and unit of the axis
 * @param yLabel name and unit of what the curves show
 */
public record LinePlot(String title, String xLabel, String yLabel, List<Curve> curves) {
    /** More curves than this share no legend that a person would read. */
    private static final int LEGEND = 12;

    private static final int WIDTH = 720;
    private static final int HEIGHT = 420;
    private static final int LEFT = 84;
    private static final int RIGHT = 24;
    private static final int TOP = 44;
    private static final int BOTTOM = 60;

    /** Colours that stay apart for colour-blind readers: Okabe and Ito, "Color Universal Design" (2008). */
    private static final List<String> COLOURS =
            List.of("#0072b2", "#d55e00", "#009e73", "#cc79a7", "#56b4e9", "#e69f00", "#000000");

    /** The colour of a thing by its number. */
    static String colour(int number) {
        return COLOURS.get(number % COLOURS.size());
    }

    public LinePlot {
        curves = List.copyOf(curves);
    }

    /**
     * A curve; points that are not finite interrupt it.
     *
     * @param error half the length of error bars; empty for none
     */
    public record Curve(String name, double[] x, double[] y, double[] error) {
        public Curve {
            x = x.clone();
            y = y.clone();
            error = error.clone();
            if (x.length != y.length || error.length != 0 && error.length != y.length) {
                throw new IllegalArgumentException(x.length + " abscissae, " + y.length + " values");
            }
        }

        public Curve(String name, double[] x, double[] y) {
            this(name, x, y, new double[0]);
        }
    }

    /** A complete {@code svg} element. */
    public String svg() {
        double[] across = bounds(true);
        double[] up = bounds(false);
        AxisScale x = AxisScale.covering(across[0], across[1], false);
        AxisScale y = AxisScale.covering(up[0], up[1], true);
        StringBuilder svg = new StringBuilder();
        svg.append(String.format(
                Locale.ROOT,
                "<svg xmlns=\"http://www.w3.org/2000/svg\" viewBox=\"0 0 %d %d\" role=\"img\" font-family=\"sans-serif\""
                        + " font-size=\"14\" fill=\"#222\">%n<title>%s</title>%n<rect width=\"%1$d\" height=\"%2$d\""
                        + " fill=\"#fff\"/>%n",
                WIDTH,
                HEIGHT + legendHeight(),
                escaped(title.isEmpty() ? yLabel : title)));
        grid(svg, x, y);
        for (int i = 0; i < curves.size(); i++) {
            curve(svg, curves.get(i), look(i), x, y);
        }
        legend(svg);
        svg.append("</svg>\n");
        return svg.toString().replace("\r\n", "\n");
    }

    /** Least and greatest finite value of all curves; 0 and 1 where there is none. */
    private double[] bounds(boolean horizontal) {
        double least = Double.POSITIVE_INFINITY;
        double greatest = Double.NEGATIVE_INFINITY;
        for (Curve curve : curves) {
            for (int i = 0; i < curve.x.length; i++) {
                if (Double.isFinite(curve.x[i]) && Double.isFinite(curve.y[i])) {
                    double value = horizontal ? curve.x[i] : curve.y[i];
                    double spread = horizontal || curve.error.length == 0 || !Double.isFinite(curve.error[i])
                            ? 0
                            : curve.error[i];
                    least = Math.min(least, value - spread);
                    greatest = Math.max(greatest, value + spread);
                }
            }
        }
        return least <= greatest ? new double[] {least, greatest} : new double[] {0, 1};
    }

    private void grid(StringBuilder svg, AxisScale x, AxisScale y) {
        svg.append("<g stroke=\"#ddd\" stroke-width=\"1\">\n");
        x.ticks().forEach(t -> line(svg, pixelX(x, t), TOP, pixelX(x, t), HEIGHT - BOTTOM));
        y.ticks().forEach(t -> line(svg, LEFT, pixelY(y, t), WIDTH - RIGHT, pixelY(y, t)));
        svg.append("</g>\n<g text-anchor=\"middle\">\n");
        x.ticks().forEach(t -> text(svg, pixelX(x, t), HEIGHT - BOTTOM + 20, x.label(t), ""));
        text(svg, (LEFT + WIDTH - RIGHT) / 2.0, HEIGHT - 14, xLabel, "");
        double middle = (TOP + HEIGHT - BOTTOM) / 2.0;
        text(svg, 20, middle, yLabel, String.format(Locale.ROOT, " transform=\"rotate(-90 20 %.1f)\"", middle));
        text(svg, (LEFT + WIDTH - RIGHT) / 2.0, 24, title, " font-weight=\"bold\"");
        svg.append("</g>\n<g text-anchor=\"end\">\n");
        y.ticks().forEach(t -> text(svg, LEFT - 8, pixelY(y, t) + 5, y.label(t), ""));
        svg.append("</g>\n");
        svg.append(String.format(
                Locale.ROOT,
                "<rect x=\"%d\" y=\"%d\" width=\"%d\" height=\"%d\" fill=\"none\" stroke=\"#888\"/>%n",
                LEFT,
                TOP,
                WIDTH - LEFT - RIGHT,
                HEIGHT - TOP - BOTTOM));
    }

    private static void curve(StringBuilder svg, Curve curve, String look, AxisScale x, AxisScale y) {
        List<String> runs = new ArrayList<>();
        StringBuilder points = new StringBuilder();
        int inRun = 0;
        for (int i = 0; i <= curve.x.length; i++) {
            boolean there = i < curve.x.length && Double.isFinite(curve.x[i]) && Double.isFinite(curve.y[i]);
            if (there) {
                points.append(String.format(Locale.ROOT, "%.2f,%.2f ", pixelX(x, curve.x[i]), pixelY(y, curve.y[i])));
                inRun++;
            } else if (inRun > 0) {
                runs.add(points.toString().strip());
                points.setLength(0);
                inRun = 0;
            }
        }
        svg.append("<g fill=\"none\" ").append(look).append(" stroke-width=\"1.8\">\n");
        for (String run : runs) {
            if (run.indexOf(' ') < 0) {
                String[] at = run.split(",");
                svg.append("<circle cx=\"" + at[0] + "\" cy=\"" + at[1] + "\" r=\"3\"/>\n");
            } else {
                svg.append("<polyline points=\"").append(run).append("\"/>\n");
            }
        }
        for (int i = 0; i < curve.error.length; i++) {
            if (Double.isFinite(curve.y[i]) && Double.isFinite(curve.error[i])) {
                double at = pixelX(x, curve.x[i]);
                line(svg, at, pixelY(y, curve.y[i] - curve.error[i]), at, pixelY(y, curve.y[i] + curve.error[i]));
            }
        }
        svg.append("</g>\n");
    }

    /** Colour and dashes: of curves that lie on each other the lower ones show through the gaps. */
    private static String look(int number) {
        String dashes =
                number % 3 == 1 ? " stroke-dasharray=\"7 5\"" : number % 3 == 2 ? " stroke-dasharray=\"2 4\"" : "";
        return "stroke=\"" + colour(number) + "\"" + dashes;
    }

    private boolean hasLegend() {
        return curves.size() > 1 && curves.size() <= LEGEND;
    }

    private int legendHeight() {
        return hasLegend() ? 20 * curves.size() + 8 : 0;
    }

    /** Below the plot, where it hides nothing. */
    private void legend(StringBuilder svg) {
        if (!hasLegend()) {
            return;
        }
        for (int i = 0; i < curves.size(); i++) {
            int at = HEIGHT + 12 + 20 * i;
            svg.append("<g ").append(look(i)).append(" stroke-width=\"2.5\">\n");
            line(svg, LEFT, at - 5, LEFT + 40, at - 5);
            svg.append("</g>\n");
            text(svg, LEFT + 50, at, curves.get(i).name(), "");
        }
    }

    private static double pixelX(AxisScale x, double value) {
        return LEFT + x.position(value) * (WIDTH - LEFT - RIGHT);
    }

    private static double pixelY(AxisScale y, double value) {
        return HEIGHT - BOTTOM - y.position(value) * (HEIGHT - TOP - BOTTOM);
    }

    private static void line(StringBuilder svg, double x1, double y1, double x2, double y2) {
        svg.append(String.format(
                Locale.ROOT, "<line x1=\"%.2f\" y1=\"%.2f\" x2=\"%.2f\" y2=\"%.2f\"/>%n", x1, y1, x2, y2));
    }

    private static void text(StringBuilder svg, double x, double y, String text, String attributes) {
        if (!text.isEmpty()) {
            svg.append(String.format(
                    Locale.ROOT, "<text x=\"%.1f\" y=\"%.1f\"%s>%s</text>%n", x, y, attributes, escaped(text)));
        }
    }

    static String escaped(String text) {
        return text.replace("&", "&amp;")
                .replace("<", "&lt;")
                .replace(">", "&gt;")
                .replace("\"", "&quot;");
    }
}
