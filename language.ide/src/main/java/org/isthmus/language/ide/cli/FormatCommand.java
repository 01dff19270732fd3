package org.isthmus.language.ide.cli;

import java.io.IOException;
import java.io.PrintWriter;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import org.isthmus.language.ide.pipeline.MissingInput;
import org.isthmus.language.ide.pipeline.Pipeline;
import org.isthmus.language.ide.pipeline.Project;
import org.isthmus.language.ide.pipeline.SourceFile;
import org.isthmus.runtime.device.Finding;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** {@code isthmus format}. */
@Command(
        name = "format",
        description = "Rewrites files in the canonical layout.",
        mixinStandardHelpOptions = true,
        versionProvider = VersionText.class)
final class FormatCommand implements Callable<Integer> {
    @Parameters(paramLabel = "FILE", arity = "1..*", description = "A file (.isth) or a folder of them.")
    private List<Path> paths;

    @Option(names = "--check", description = "Changes nothing, and only tells which files are laid out otherwise.")
    private boolean check;

    @Spec
    private CommandSpec spec;

    @Override
    public Integer call() throws IOException {
        PrintWriter out = spec.commandLine().getOut();
        Pipeline pipeline = new Pipeline(VersionText.full());
        Project project;
        try {
            project = pipeline.load(paths);
        } catch (MissingInput e) {
            throw new UsageException(e.getMessage());
        }
        List<Finding> unread = project.unread();
        unread.forEach(f -> spec.commandLine().getErr().println(FindingWriter.line(f)));
        int status = unread.isEmpty() ? ExitStatus.FINE : ExitStatus.FINDINGS;
        for (SourceFile file : project.parsed()) {
            List<Finding> errors = pipeline.syntaxErrors(project, file);
            if (!errors.isEmpty()) {
                errors.forEach(f -> spec.commandLine().getErr().println(FindingWriter.line(f)));
                status = ExitStatus.FINDINGS;
                continue;
            }
            Optional<String> text = pipeline.relaidOut(project, file);
            if (text.isPresent() && check) {
                out.println(file.shown() + ": not in the canonical layout");
                status = ExitStatus.FINDINGS;
            } else if (text.isPresent()) {
                replace(file.path(), text.get());
                out.println(file.shown() + ": laid out");
            }
        }
        return status;
    }

    /** Whole or not at all. */
    private static void replace(Path file, String text) throws IOException {
        Path real = file.toRealPath();
        Path aside = Files.createTempFile(real.getParent(), "." + real.getFileName(), "");
        try {
            Files.writeString(aside, text, StandardCharsets.UTF_8);
            if (Files.getFileStore(real).supportsFileAttributeView("posix")) {
                Files.setPosixFilePermissions(aside, Files.getPosixFilePermissions(real));
            }
            Files.move(aside, real, java.nio.file.StandardCopyOption.ATOMIC_MOVE);
        } finally {
            Files.deleteIfExists(aside);
        }
    }
}
