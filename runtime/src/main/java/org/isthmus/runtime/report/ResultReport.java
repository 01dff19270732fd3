package org.isthmus.runtime.report;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.result.CsvText;
import org.isthmus.runtime.result.MeasurementResult;
import org.isthmus.runtime.result.Provenance;
import org.isthmus.runtime.result.ResultTable;
import org.isthmus.runtime.result.Verdict;

/**
 * {@code report.html}: how a result was judged, its plots with their numbers, the device drawn, findings, where it comes
 * from, and what the model leaves out. The page needs nothing but itself.
 */
public final class ResultReport {
    /** More rows than this are for the table's own file. */
    private static final int ROWS = 400;

    private ResultReport() {}

    /**
     * The page.
     *
     * @param device to be drawn, such as the one at the first point; may be missing
     */
    public static String html(MeasurementResult result, Provenance provenance, Optional<Device> device) {
        List<ReportPage.Section> sections = new ArrayList<>();
        sections.add(summary(result));
        if (!result.verdicts().isEmpty()) {
            sections.add(new ReportPage.Table("Expectations", verdicts(result.verdicts())));
        }
        for (ResultTable table : result.tables()) {
            plots(table, sections);
        }
        device.ifPresent(d -> sections.add(new ReportPage.Plots("Device", List.of(new DeviceDrawing(d).svg()))));
        if (!result.findings().isEmpty()) {
            sections.add(new ReportPage.Table("Findings", findings(result.findings())));
        }
        sections.add(new ReportPage.Items("What the model leaves out", Provenance.CAUTIONS));
        sections.add(provenance(result, provenance));
        if (!provenance.device().isBlank()) {
            sections.add(new ReportPage.Text("The device as elaborated", provenance.device()));
        }
        return new ReportPage(result.measurement() + " of " + result.device(), sections).html();
    }

    private static ReportPage.Section summary(MeasurementResult result) {
        List<String> sentences = new ArrayList<>();
        long held = result.verdicts().stream().filter(Verdict::held).count();
        int all = result.verdicts().size();
        sentences.add(
                all == 0
                        ? "Nothing was expected of this measurement."
                        : held == all
                                ? "All expectations held (" + all + ")."
                                : (all - held) + " of " + all + " expectations did not hold.");
        sentences.add("Largest violation of current conservation: " + number(result.residual()) + " of the current.");
        for (ResultTable table : result.tables()) {
            sentences.add(table.name() + ".csv: " + table.rows().size()
                    + (table.rows().size() == 1 ? " row of " : " rows of ")
                    + String.join(", ", table.headers()) + ".");
        }
        return new ReportPage.Items("Summary", sentences);
    }

    private static List<List<String>> verdicts(List<Verdict> verdicts) {
        List<List<String>> rows = new ArrayList<>();
        rows.add(List.of("verdict", "expectation", "measured", "wanted", "difference", "unit", "worst at"));
        for (Verdict verdict : verdicts) {
            rows.add(List.of(
                    verdict.held() ? "held" : "broken",
                    verdict.text(),
                    number(verdict.measured()),
                    number(verdict.expected()),
                    number(verdict.difference()),
                    verdict.unit(),
                    verdict.at()));
        }
        return rows;
    }

    private static void plots(ResultTable table, List<ReportPage.Section> sections) {
        if (table.rows().isEmpty() || table.keys() == table.headers().size()) {
            return;
        }
        CsvTable columns = columns(table);
        List<String> plots = TablePlots.svg(columns, table.name());
        if (plots.isEmpty()) {
            sections.add(new ReportPage.Table(table.name(), rows(table)));
        } else {
            sections.add(new ReportPage.Plots(table.name(), plots));
            sections.add(new ReportPage.Data(
                    table.rows().size() > ROWS
                            ? "The first " + ROWS + " of " + table.rows().size() + " rows; " + table.name()
                                    + ".csv has them all"
                            : "The numbers",
                    rows(table)));
        }
    }

    private static CsvTable columns(ResultTable table) {
        List<double[]> columns = new ArrayList<>();
        for (int k = 0; k < table.headers().size(); k++) {
            int column = k;
            columns.add(table.rows().stream().mapToDouble(row -> row[column]).toArray());
        }
        return new CsvTable(table.name(), table.headers(), columns);
    }

    private static List<List<String>> rows(ResultTable table) {
        List<List<String>> rows = new ArrayList<>();
        rows.add(table.headers());
        for (double[] row : table.rows().subList(0, Math.min(ROWS, table.rows().size()))) {
            List<String> cells = new ArrayList<>();
            for (double value : row) {
                cells.add(CsvText.number(value));
            }
            rows.add(cells);
        }
        return rows;
    }

    private static List<List<String>> findings(List<Finding> findings) {
        List<List<String>> rows = new ArrayList<>();
        rows.add(List.of("place", "severity", "code", "text"));
        for (Finding finding : findings) {
            rows.add(List.of(finding.place().toString(), finding.severity().word(), finding.code(), finding.text()));
        }
        return rows;
    }

    private static ReportPage.Section provenance(MeasurementResult result, Provenance provenance) {
        List<List<String>> rows = new ArrayList<>();
        rows.add(List.of("what", "value"));
        rows.add(List.of("tool", provenance.tool()));
        rows.add(List.of("linear algebra", provenance.backend()));
        rows.add(List.of("device, SHA-256", result.deviceDigest()));
        provenance.inputs().forEach((path, digest) -> rows.add(List.of(path + ", SHA-256", digest)));
        provenance.settings().forEach((name, value) -> rows.add(List.of("setting " + name, value)));
        rows.add(List.of("energies solved", Long.toString(result.solves())));
        return new ReportPage.Table("Where it comes from", rows);
    }

    /** Six digits are enough to read; the files have them all. */
    private static String number(double value) {
        if (!Double.isFinite(value)) {
            return "not defined";
        }
        String text = CsvText.number(value);
        return text.length() <= 9 ? text : String.format(java.util.Locale.ROOT, "%.6g", value);
    }
}
