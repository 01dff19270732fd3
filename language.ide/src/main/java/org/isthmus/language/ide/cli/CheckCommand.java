package org.isthmus.language.ide.cli;

import java.nio.file.Path;
import java.util.List;
import java.util.concurrent.Callable;
import org.eclipse.xtext.util.CancelIndicator;
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

/** {@code isthmus check}. */
@Command(
        name = "check",
        description = "Tells every finding of the language, for files or all files of a folder.",
        mixinStandardHelpOptions = true,
        versionProvider = VersionText.class)
final class CheckCommand implements Callable<Integer> {
    @Parameters(paramLabel = "PATH", arity = "1..*", description = "A file (.isth) or a folder of them.")
    private List<Path> paths;

    @Option(
            names = "--format",
            paramLabel = "FORMAT",
            defaultValue = "text",
            description = "How findings are written: ${COMPLETION-CANDIDATES} (default: ${DEFAULT-VALUE}).")
    private FindingFormat format;

    @Option(names = "--strict", description = "Warnings count as errors for the exit status.")
    private boolean strict;

    @Spec
    private CommandSpec spec;

    @Override
    public Integer call() {
        Project project;
        Pipeline pipeline = new Pipeline(VersionText.full());
        try {
            project = pipeline.load(paths);
        } catch (MissingInput e) {
            throw new UsageException(e.getMessage());
        }
        List<Finding> findings = pipeline.check(project, CancelIndicator.NullImpl);
        FindingWriter.write(findings, format, spec.commandLine().getOut());
        if (format == FindingFormat.text) {
            int files = project.size();
            spec.commandLine()
                    .getErr()
                    .println(FindingWriter.summary(findings) + " in " + files + (files == 1 ? " file." : " files."));
        }
        boolean broken = FindingWriter.count(findings, Severity.ERROR) > 0
                || strict && FindingWriter.count(findings, Severity.WARNING) > 0;
        return broken ? ExitStatus.FINDINGS : ExitStatus.FINE;
    }
}
