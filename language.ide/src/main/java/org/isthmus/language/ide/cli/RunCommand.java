package org.isthmus.language.ide.cli;

import java.io.IOException;
import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.Callable;
import org.eclipse.xtext.util.CancelIndicator;
import org.isthmus.language.ide.pipeline.BadRequest;
import org.isthmus.language.ide.pipeline.Job;
import org.isthmus.language.ide.pipeline.MissingInput;
import org.isthmus.language.ide.pipeline.Pipeline;
import org.isthmus.language.ide.pipeline.Project;
import org.isthmus.language.ide.pipeline.Selection;
import org.isthmus.language.ide.pipeline.StoredResult;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.Severity;
import org.isthmus.runtime.measure.RunFailure;
import org.isthmus.runtime.result.MeasurementResult;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** {@code isthmus run}. */
@Command(
        name = "run",
        description = "Runs the measurements of files and writes a folder of results for each.",
        mixinStandardHelpOptions = true,
        versionProvider = VersionText.class)
final class RunCommand implements Callable<Integer> {
    @Parameters(paramLabel = "FILE", arity = "1..*", description = "A file (.isth) or a folder of them.")
    private List<Path> paths;

    @Option(
            names = "--measurement",
            paramLabel = "NAME",
            description = "Runs this measurement only (NAME or DEVICE.NAME); may be given several times.")
    private List<String> measurements = new ArrayList<>();

    @Option(
            names = "--set",
            paramLabel = "NAME=VALUE",
            description =
                    "Gives a parameter of the device a value, with units as in the language: --set 'height=0.4 eV'.")
    private List<String> settings = new ArrayList<>();

    @Option(
            names = "--out",
            paramLabel = "DIR",
            defaultValue = "results",
            description = "Where the folders of results go (default: ${DEFAULT-VALUE}).")
    private Path out;

    @Option(
            names = "--threads",
            paramLabel = "N",
            description = "Number of threads (default: all processors). Results do not depend on it.")
    private Integer threads;

    @Option(
            names = "--resume",
            description = "Keeps a measurement whose results are in DIR already, for the same files and settings.")
    private boolean resume;

    @Spec
    private CommandSpec spec;

    @Override
    public Integer call() throws IOException {
        if (threads != null && threads < 1) {
            throw new UsageException("--threads needs a number from 1 on, not " + threads + ".");
        }
        Selection selection = new Selection(measurements, parsed(settings));
        PrintWriter err = spec.commandLine().getErr();
        Pipeline pipeline = new Pipeline(VersionText.full());
        Pipeline.Prepared prepared;
        try {
            Project project = pipeline.load(paths);
            List<Finding> findings = pipeline.check(project, CancelIndicator.NullImpl);
            findings.stream()
                    .filter(f -> f.severity() != Severity.INFORMATION)
                    .forEach(f -> err.println(FindingWriter.line(f)));
            if (FindingWriter.count(findings, Severity.ERROR) > 0) {
                err.println("isthmus: nothing was run, since the files have errors.");
                return ExitStatus.FINDINGS;
            }
            prepared = pipeline.prepare(project, selection, findings);
            prepared.notes().forEach(note -> err.println("isthmus: " + note));
            prepared.findings().forEach(f -> err.println(FindingWriter.line(f)));
            if (FindingWriter.count(prepared.findings(), Severity.ERROR) > 0) {
                err.println("isthmus: nothing was run, since the measurements have errors.");
                return ExitStatus.FINDINGS;
            }
        } catch (MissingInput | BadRequest e) {
            throw new UsageException(e.getMessage());
        }
        return run(pipeline, prepared.jobs());
    }

    private static Map<String, String> parsed(List<String> settings) {
        Map<String, String> parsed = new LinkedHashMap<>();
        for (String setting : settings) {
            int at = setting.indexOf('=');
            if (at <= 0 || at == setting.length() - 1) {
                throw new UsageException(
                        "--set needs NAME=VALUE, such as --set 'height=0.4 eV', not '" + setting + "'.");
            }
            String name = setting.substring(0, at).strip();
            if (parsed.put(name, setting.substring(at + 1).strip()) != null) {
                throw new UsageException("--set gives '" + name + "' twice.");
            }
        }
        return parsed;
    }

    private int run(Pipeline pipeline, List<Job> jobs) throws IOException {
        RunReport report =
                new RunReport(spec.commandLine().getOut(), spec.commandLine().getErr(), out);
        int workers = threads == null ? Runtime.getRuntime().availableProcessors() : threads;
        try (Interruption interruption = Interruption.guard();
                ProgressLine progress =
                        new ProgressLine(spec.commandLine().getErr(), ProgressLine.onTerminal(), System::nanoTime)) {
            for (Job job : jobs) {
                Optional<StoredResult> kept = resume ? pipeline.stored(out, job) : Optional.empty();
                if (kept.isPresent()) {
                    report.kept(job, kept.get());
                    continue;
                }
                try {
                    MeasurementResult result = pipeline.run(job, workers, progress);
                    progress.close();
                    report.finished(job, result, pipeline.write(out, job, result, workers));
                } catch (RunFailure e) {
                    progress.close();
                    report.failed(job, e);
                }
            }
            report.close();
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
            spec.commandLine().getErr().println("isthmus: stopped; the measurement under way left no results.");
            return ExitStatus.INTERRUPTED;
        }
        return report.status();
    }
}
