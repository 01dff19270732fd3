package org.isthmus.runtime.report;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.List;
import java.util.Locale;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.LatticeLead;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.result.CsvText;

/**
 * A device seen from +z, as SVG: sites shaded by their on-site energy, bonds, and the sites that each lead touches in the
 * lead's colour. A chain is drawn as its on-site energy along x, since there is nothing to see from above.
 */
final class DeviceDrawing {
    private static final int WIDTH = 720;
    private static final int INNER = 620;
    private static final int TALLEST = 480;
    private static final int MARGIN = 50;
    private static final int TOP = 36;

    /** More sites than this are drawn as a map of areas. */
    private static final int MOST_SITES = 4000;

    private final Device device;
    private final SiteTable sites;
    private final double[] energies;

    DeviceDrawing(Device device) {
        this.device = device;
        sites = device.sites();
        energies = new double[sites.count()];
        for (int site = 0; site < energies.length; site++) {
            for (int i = 0; i < sites.orbitals(site); i++) {
                energies[site] += sites.onSiteReal(site, i, i) / sites.orbitals(site);
            }
        }
    }

    String svg() {
        double[] x = new double[sites.count()];
        double[] y = new double[sites.count()];
        for (int site = 0; site < x.length; site++) {
            x[site] = sites.x(site);
            y[site] = sites.y(site);
        }
        double[] across = range(x);
        double[] up = range(y);
        String title = "Device " + device.name() + ": on-site energy";
        if (up[1] - up[0] < 1e-9 && across[1] > across[0]) {
            return new LinePlot(title, "x (nm)", "on-site energy (eV)", List.of(new LinePlot.Curve("", x, energies)))
                    .svg();
        }
        if (sites.count() > MOST_SITES) {
            return new SiteMap(title, "eV", x, y, energies).svg();
        }
        return drawn(title, x, y, across, up);
    }

    private String drawn(String title, double[] x, double[] y, double[] across, double[] up) {
        double scale = Math.min(INNER / Math.max(across[1] - across[0], 1e-9), TALLEST / Math.max(up[1] - up[0], 1e-9));
        double height = Math.max(20, scale * (up[1] - up[0]));
        double[] px = new double[x.length];
        double[] py = new double[y.length];
        for (int site = 0; site < x.length; site++) {
            px[site] = MARGIN + scale * (x[site] - across[0]);
            py[site] = TOP + 20 + height - scale * (y[site] - up[0]);
        }
        int legend = (int) (TOP + height + 60);
        StringBuilder svg = new StringBuilder(String.format(
                Locale.ROOT,
                "<svg xmlns=\"http://www.w3.org/2000/svg\" viewBox=\"0 0 %d %d\" role=\"img\" font-family=\"sans-serif\""
                        + " font-size=\"14\" fill=\"#222\">\n<title>%s</title>\n<rect width=\"%1$d\" height=\"%2$d\""
                        + " fill=\"#fff\"/>\n<text x=\"%d\" y=\"24\" font-weight=\"bold\">%3$s</text>\n",
                WIDTH,
                legend + 46 + 20 * device.leads().size(),
                LinePlot.escaped(title),
                MARGIN));
        bonds(svg, px, py);
        double[] span = range(energies);
        double radius =
                Math.max(1.2, Math.min(7, 0.3 * Math.sqrt(Math.max(1, INNER * height) / Math.max(1, x.length))));
        for (int site = 0; site < x.length; site++) {
            double share = span[1] > span[0] ? (energies[site] - span[0]) / (span[1] - span[0]) : 0.5;
            circle(svg, px[site], py[site], radius, "fill=\"" + SiteMap.colour(share) + "\"");
        }
        for (int p = 0; p < device.leads().size(); p++) {
            String colour = LinePlot.colour(p + 1);
            for (int site : device.leads().get(p).contactSites()) {
                circle(
                        svg,
                        px[site],
                        py[site],
                        radius + 1.5,
                        "fill=\"none\" stroke=\"" + colour + "\" stroke-width=\"1.8\"");
            }
            int at = legend + 20 * p;
            circle(svg, MARGIN, at - 5, 5, "fill=\"none\" stroke=\"" + colour + "\" stroke-width=\"1.8\"");
            text(svg, MARGIN + 14, at, caption(device.leads().get(p)));
        }
        int below = legend + 20 * device.leads().size();
        text(svg, MARGIN, below, extent("x from ", across, " nm, ") + extent("y from ", up, " nm"));
        text(
                svg,
                MARGIN,
                below + 20,
                extent("on-site energy from ", span, " eV (bright)").replace(" to ", " (dark) to "));
        return svg.append("</svg>\n").toString();
    }

    private void bonds(StringBuilder svg, double[] px, double[] py) {
        HoppingTable bonds = device.hoppings();
        svg.append("<g stroke=\"#ddd\" stroke-width=\"1\">\n");
        for (int b = 0; b < bonds.count(); b++) {
            svg.append(String.format(
                    Locale.ROOT,
                    "<line x1=\"%.1f\" y1=\"%.1f\" x2=\"%.1f\" y2=\"%.1f\"/>\n",
                    px[bonds.from(b)],
                    py[bonds.from(b)],
                    px[bonds.to(b)],
                    py[bonds.to(b)]));
        }
        svg.append("</g>\n");
    }

    private static String extent(String what, double[] range, String unit) {
        return what + rounded(range[0]) + " to " + rounded(range[1]) + unit;
    }

    private static String rounded(double value) {
        return CsvText.number(new BigDecimal(value).round(new MathContext(6)).doubleValue());
    }

    private static String caption(Lead lead) {
        String kind = lead instanceof LatticeLead lattice
                ? "from " + lattice.side().word()
                : "on " + lead.contactSites().size() + " sites";
        return "lead " + lead.name() + " " + kind + ", " + CsvText.number(lead.temperature()) + " K, µ = "
                + CsvText.number(lead.mu()) + " eV";
    }

    private static double[] range(double[] values) {
        double least = Double.POSITIVE_INFINITY;
        double greatest = Double.NEGATIVE_INFINITY;
        for (double value : values) {
            least = Math.min(least, value);
            greatest = Math.max(greatest, value);
        }
        return new double[] {least, greatest};
    }

    private static void circle(StringBuilder svg, double x, double y, double radius, String look) {
        svg.append(String.format(Locale.ROOT, "<circle cx=\"%.1f\" cy=\"%.1f\" r=\"%.1f\" %s/>\n", x, y, radius, look));
    }

    private static void text(StringBuilder svg, double x, double y, String text) {
        svg.append(String.format(Locale.ROOT, "<text x=\"%.1f\" y=\"%.1f\">%s</text>\n", x, y, LinePlot.escaped(text)));
    }
}
