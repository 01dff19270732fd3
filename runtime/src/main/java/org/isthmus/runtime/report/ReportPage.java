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
            :root { color-scheme: light dark; --paper: #fff; --ink: #222; --quiet: #666; --line: #ddd; --held: #00734d;
              --broken: #b30000; --block: #f5f5f5; }
            @media (prefers-color-scheme: dark) { :root { --paper: #16181c; --ink: #ddd; --quiet: #999; --line: #3a3d44;
              --held: #5fd0a5; --broken: #ff8a80; --block: #202329; } }
            body { font: 16px/1.5 sans-serif; color: var(--ink); background: var(--paper); max-width: 52rem;
              margin: 2rem auto; padding: 0 1rem; }
            h1 { font-size: 1.6rem; margin-bottom: .2rem; }
            h2 { font-size: 1.2rem; margin-top: 2rem; border-bottom: 1px solid var(--line); }
            table { border-collapse: collapse; } .wide { overflow-x: auto; }
            td, th { padding: .15rem .8rem .15rem 0; text-align: left; vertical-align: top; }
            td.number { text-align: right; font-variant-numeric: tabular-nums; }
            .held { color: var(--held); } .broken { color: var(--broken); font-weight: bold; }
            p.quiet, summary, figcaption { color: var(--quiet); }
            figure { margin: 1rem 0; } svg { max-width: 100%; height: auto; }
            svg text { fill: var(--ink); } svg [fill="#fff"] { fill: var(--paper); }
            svg [stroke="#ddd"] { stroke: var(--line); } svg [stroke="#000000"] { stroke: var(--ink); }
            pre { background: var(--block); padding: .8rem; overflow-x: auto; white-space: pre-wrap; }
            @media print { details { display: none; } }
            """;

    public ReportPage {
        sections = List.copyOf(sections);
    }

    /** Part of a page. */
    public sealed interface Section permits Plots, Table, Data, Items, Text {
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

    /** The numbers behind a plot: rows like those of a table, folded away until asked for. */
    public record Data(String heading, List<List<String>> rows) implements Section {
        public Data {
            rows = rows.stream().map(List::copyOf).toList();
        }
    }

    /** Sentences, one under the other. */
    public record Items(String heading, List<String> sentences) implements Section {
        public Items {
            sentences = List.copyOf(sentences);
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
            if (section instanceof Data data) {
                html.append("<details>\n<summary>")
                        .append(LinePlot.escaped(data.heading()))
                        .append("</summary>\n");
                table(html, data.rows());
                html.append("</details>\n");
                continue;
            }
            html.append("<h2>").append(LinePlot.escaped(section.heading())).append("</h2>\n");
            if (section instanceof Plots plots) {
                plots.svg().forEach(svg -> html.append("<figure>\n").append(svg).append("</figure>\n"));
            } else if (section instanceof Table table) {
                table(html, table.rows());
            } else if (section instanceof Items items) {
                html.append("<ul>\n");
                items.sentences()
                        .forEach(s ->
                                html.append("<li>").append(LinePlot.escaped(s)).append("</li>\n"));
                html.append("</ul>\n");
            } else if (section instanceof Text text) {
                html.append("<pre>").append(LinePlot.escaped(text.text())).append("</pre>\n");
            }
        }
        return html.append("</body>\n</html>\n").toString();
    }

    private static void table(StringBuilder html, List<List<String>> rows) {
        html.append("<div class=\"wide\"><table>\n");
        for (int row = 0; row < rows.size(); row++) {
            html.append("<tr>");
            String tag = row == 0 ? "th" : "td";
            for (String cell : rows.get(row)) {
                String kind = cell.equals("held") || cell.equals("broken")
                        ? " class=\"" + cell + "\""
                        : row > 0 && cell.matches("-?[0-9][0-9.eE+-]*") ? " class=\"number\"" : "";
                html.append("<" + tag + kind + ">")
                        .append(LinePlot.escaped(cell))
                        .append("</" + tag + ">");
            }
            html.append("</tr>\n");
        }
        html.append("</table></div>\n");
    }
}
