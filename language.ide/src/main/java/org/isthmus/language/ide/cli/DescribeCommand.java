package org.isthmus.language.ide.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.concurrent.Callable;
import org.eclipse.xtext.util.CancelIndicator;
import org.isthmus.language.ide.pipeline.BadRequest;
import org.isthmus.language.ide.pipeline.MissingInput;
import org.isthmus.language.ide.pipeline.Pipeline;
import org.isthmus.language.ide.pipeline.Project;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.Severity;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** {@code isthmus describe}. */
@Command(
        name = "describe",
        description =
                "Tells what a device file means: sites, bands and open modes of the leads, and what a solve costs.",
        mixinStandardHelpOptions = true,
        versionProvider = VersionText.class)
final class DescribeCommand implements Callable<Integer> {
    @Parameters(paramLabel = "FILE", description = "A file (.isth) or a folder of them.")
    private Path path;

    @Option(
            names = "--device",
            paramLabel = "NAME",
            description = "Describes this device only; may be given several times.")
    private List<String> devices = new ArrayList<>();

    @Option(names = "--sites", description = "Lists the sites in the order of all tables instead.")
    private boolean sites;

    @Spec
    private CommandSpec spec;

    @Override
    public Integer call() {
        PrintWriter stdout = spec.commandLine().getOut();
        PrintWriter err = spec.commandLine().getErr();
        List<Pipeline.Described> described;
        try {
            Pipeline pipeline = new Pipeline(VersionText.full());
            Project project = pipeline.load(List.of(path));
            List<Finding> findings = pipeline.check(project, CancelIndicator.NullImpl);
            findings.stream()
                    .filter(f -> f.severity() == Severity.ERROR)
                    .forEach(f -> err.println(FindingWriter.line(f)));
            if (FindingWriter.count(findings, Severity.ERROR) > 0) {
                return ExitStatus.FINDINGS;
            }
            described = pipeline.describe(project, new LinkedHashSet<>(devices));
        } catch (MissingInput | BadRequest e) {
            throw new UsageException(e.getMessage());
        }
        int status = ExitStatus.FINE;
        for (Pipeline.Described device : described) {
            if (device.description().isEmpty()) {
                device.findings().forEach(f -> err.println(FindingWriter.line(f)));
                status = ExitStatus.FINDINGS;
                continue;
            }
            if (sites) {
                if (described.size() > 1) {
                    stdout.println("device " + device.name());
                }
                device.description().get().siteLines().forEach(stdout::println);
            } else {
                device.description().get().lines().forEach(stdout::println);
            }
        }
        return status;
    }
}
