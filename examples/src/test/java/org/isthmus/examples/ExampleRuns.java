package org.isthmus.examples;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import org.eclipse.xtext.util.CancelIndicator;
import org.isthmus.language.ide.pipeline.Job;
import org.isthmus.language.ide.pipeline.Pipeline;
import org.isthmus.language.ide.pipeline.Progress;
import org.isthmus.language.ide.pipeline.Project;
import org.isthmus.language.ide.pipeline.Selection;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.Severity;
import org.isthmus.runtime.result.MeasurementResult;
import org.isthmus.runtime.result.ResultTable;

/** Device files checked and run as a user runs them, by the façade. */
final class ExampleRuns {
    static final int THREADS = 2;

    private ExampleRuns() {}

    /** Errors and warnings of the check. */
    static List<Finding> complaints(Path... paths) throws Exception {
        Pipeline pipeline = new Pipeline("tests");
        Project project = pipeline.load(List.of(paths));
        List<Finding> all = new ArrayList<>(project.unread());
        all.addAll(pipeline.check(project, CancelIndicator.NullImpl));
        return all.stream().filter(f -> f.severity() != Severity.INFORMATION).toList();
    }

    /** Results of all measurements of a file, in its order. */
    static List<MeasurementResult> run(Path file) throws Exception {
        Pipeline pipeline = new Pipeline("tests");
        Project project = pipeline.load(List.of(file));
        List<Finding> found = pipeline.check(project, CancelIndicator.NullImpl);
        if (found.stream().anyMatch(f -> f.severity() == Severity.ERROR)) {
            throw new AssertionError(file + " has errors: " + found);
        }
        List<MeasurementResult> results = new ArrayList<>();
        for (Job job : pipeline.prepare(project, Selection.ALL, found).jobs()) {
            results.add(pipeline.run(job, THREADS, Progress.SILENT));
        }
        return results;
    }

    /** The result of one measurement, {@code Device.Measurement}. */
    static MeasurementResult result(List<MeasurementResult> results, String folder) {
        return results.stream()
                .filter(r -> r.folder().equals(folder))
                .findFirst()
                .orElseThrow(() -> new AssertionError("no result " + folder));
    }

    static ResultTable table(MeasurementResult result, String name) {
        return result.tables().stream()
                .filter(t -> t.name().equals(name))
                .findFirst()
                .orElseThrow(() -> new AssertionError(result.folder() + " has no " + name));
    }

    /** A column by its whole header. */
    static double[] column(ResultTable table, String header) {
        int k = table.headers().indexOf(header);
        if (k < 0) {
            throw new AssertionError("no column '" + header + "' among " + table.headers());
        }
        return table.rows().stream().mapToDouble(r -> r[k]).toArray();
    }
}
