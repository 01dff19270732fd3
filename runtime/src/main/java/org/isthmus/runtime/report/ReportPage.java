package org.isthmus.runtime.report;

import java.util.List;

/**
 * A self-contained page: everything is in the one file, so that it can be mailed and kept.
 *
 * @param title of the page
 * @param sections in their order
 */
public record ReportPage(String title, List<Section> sections) {
    private static final String STYLE =
            """
            body { font: 16px/1.5 sans-serif; color: #222; max-width: 52rem; margin: 2rem auto; padding: 0 1rem; }
            h1 { font-size: 1.6rem; } h2 { font-size: 1.2rem; margin-top: 2rem; border-bottom: 1px solid #ccc; }
            table { border-collapse: collapse; } td, th { padding: .15rem .8rem .15rem 0; text-align: left; }
            td.number { text-align: right; font-variant-numeric: tabular-nums; }
            .held { color: #00734d; } .broken { color: #b30000; font-weight: bold; }
            svg { max-width: 100%; height: auto; } pre { background: #f5f5f5; padding: .8rem; overflow-x: auto; }
            """;

    public ReportPage {
        sections = List.copyOf(sections);
    }

    /** Part of a page. */
    public sealed interface Section permits Plots, Table, Text {
        String heading();
    }

    /** Plots as complete {@code svg} elements. */
    public record Plots(String heading, List<String> svg) implements Section {
        public Plots {
            svg = List.copyOf(svg);
        }
    }

    /** Rows of cells, the first one their names. */
    public record Table(String heading, List<List<String>> rows) implements Section {
        public Table {
            rows = rows.stream().map(List::copyOf).toList();
        }
    }

    /** Text as it is, such as the device's source. */
    public record Text(String heading, String text) implements Section {}

    /** The page as HTML. */
    public String html() {
        StringBuilder html =
                new StringBuilder("<!DOCTYPE html>\n<html lang=\"en\">\n<head>\n<meta charset=\"utf-8\">\n");
        html.append("<meta name=\"viewport\" content=\"width=device-width\">\n<title>")
                .append(LinePlot.escaped(title))
                .append("</title>\n<style>\n")
                .append(STYLE)
                .append("</style>\n</head>\n<body>\n<h1>")
                .append(LinePlot.escaped(title))
                .append("</h1>\n");
        for (Section section : sections) {
            html.append("<h2>").append(LinePlot.escaped(section.heading())).append("</h2>\n");
            if (section instanceof Plots plots) {
                plots.svg().forEach(svg -> html.append("<figure>\n").append(svg).append("</figure>\n"));
            } else if (section instanceof Table table) {
                table(html, table);
            } else if (section instanceof Text text) {
                html.append("<pre>").append(LinePlot.escaped(text.text())).append("</pre>\n");
            }
        }
        return html.append("</body>\n</html>\n").toString();
    }

    private static void table(StringBuilder html, Table table) {
        html.append("<table>\n");
        for (int row = 0; row < table.rows().size(); row++) {
            html.append("<tr>");
            String tag = row == 0 ? "th" : "td";
            for (String cell : table.rows().get(row)) {
                String kind = cell.equals("held") || cell.equals("broken")
                        ? " class=\"" + cell + "\""
                        : row > 0 && cell.matches("-?[0-9].*") ? " class=\"number\"" : "";
                html.append("<" + tag + kind + ">")
                        .append(LinePlot.escaped(cell))
                        .append("</" + tag + ">");
            }
            html.append("</tr>\n");
        }
        html.append("</table>\n");
    }
}
