package org.isthmus.language.ide.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.isthmus.language.ide.pipeline.Job;
import org.isthmus.language.ide.pipeline.StoredResult;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.Severity;
import org.isthmus.runtime.measure.RunFailure;
import org.isthmus.runtime.result.MeasurementResult;
import org.isthmus.runtime.result.ResultTable;
import org.isthmus.runtime.result.Verdict;

/** What a run tells as it goes, and what it comes to. */
final class RunReport {
    private final PrintWriter stdout;
    private final PrintWriter err;
    private final Path out;
    private int expectations;
    private int broken;
    private int failures;
    private int results;
    private boolean brokenDevice;

    RunReport(PrintWriter stdout, PrintWriter err, Path out) {
        this.stdout = stdout;
        this.err = err;
        this.out = out;
    }

    void finished(Job job, MeasurementResult result, Path folder) {
        results++;
        double seconds = result.seconds().values().stream().mapToDouble(s -> s).sum();
        stdout.println(job.title() + ": " + result.solves() + (result.solves() == 1 ? " energy" : " energies")
                + " solved in " + String.format(Locale.ROOT, "%.2f", seconds)
                + " s, residual of current conservation " + short3(result.residual()));
        verdicts(result.verdicts());
        for (Verdict verdict : result.verdicts()) {
            if (!verdict.held()) {
                err.println(FindingWriter.line(
                        new Finding("broken-expectation", Severity.ERROR, verdict.sentence(), verdict.place())));
            }
        }
        files(result.tables(), folder);
        stdout.flush();
    }

    private void verdicts(List<Verdict> verdicts) {
        List<String[]> rows = new ArrayList<>();
        for (Verdict verdict : verdicts) {
            expectations++;
            broken += verdict.held() ? 0 : 1;
            rows.add(new String[] {
                verdict.held() ? "held" : "broken",
                verdict.text(),
                "measured " + (short6(verdict.measured()) + " " + verdict.unit()).strip()
                        + (verdict.at().isEmpty() ? "" : " at " + verdict.at())
            });
        }
        int widest = rows.stream().mapToInt(r -> r[1].length()).max().orElse(0);
        for (String[] row : rows) {
            stdout.println(
                    String.format("  %-6s  %-" + Math.min(Math.max(widest, 1), 70) + "s  %s", row[0], row[1], row[2]));
        }
    }

    private void files(List<ResultTable> tables, Path folder) {
        stdout.println("  " + folder);
        for (ResultTable table : tables) {
            String keys = String.join(", ", table.headers().subList(0, table.keys()));
            List<String> values =
                    table.headers().subList(table.keys(), table.headers().size());
            stdout.println("    " + table.name() + ".csv: "
                    + (values.size() > 4
                            ? values.size() + " columns from " + values.get(0) + " to " + values.get(values.size() - 1)
                            : String.join(", ", values))
                    + (keys.isEmpty() ? "" : " over " + keys) + "; "
                    + table.rows().size() + (table.rows().size() == 1 ? " row" : " rows"));
        }
        stdout.println(
                "    report.html: the same as plots, with the device, the expectations and where all comes from");
    }

    void kept(Job job, StoredResult stored) {
        results++;
        expectations += stored.held() + stored.broken();
        broken += stored.broken();
        stdout.println(job.title() + ": kept from an earlier run with the same files and settings");
        stdout.println("  " + stored.folder());
    }

    void failed(Job job, RunFailure failure) {
        failures++;
        for (Finding finding : failure.findings()) {
            brokenDevice = true;
            err.println(FindingWriter.line(finding));
        }
        err.println("isthmus: " + failure.getMessage());
        stdout.println(job.title() + ": failed, no results were written");
    }

    /** The last lines. */
    void close() {
        if (expectations > 0) {
            stdout.println((expectations - broken) + " of " + expectations
                    + (expectations == 1 ? " expectation" : " expectations") + " held.");
        }
        if (results > 0) {
            stdout.println("Results lie in " + out + ".");
        }
    }

    int status() {
        if (failures > 0) {
            return brokenDevice ? ExitStatus.FINDINGS : ExitStatus.FAILED;
        }
        return broken > 0 ? ExitStatus.FINDINGS : ExitStatus.FINE;
    }

    private static String short3(double value) {
        return String.format(Locale.ROOT, "%.2e", value);
    }

    private static String short6(double value) {
        String text = String.format(Locale.ROOT, "%.6g", value);
        return text.contains("e") || !text.contains(".")
                ? text
                : text.replaceAll("0+$", "").replaceAll("\\.$", "");
    }
}
