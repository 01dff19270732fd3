package org.isthmus.language.ide.cli;

import java.io.FileDescriptor;
import java.io.FileOutputStream;
import java.io.PrintWriter;
import java.nio.charset.StandardCharsets;
import java.util.List;
import picocli.CommandLine;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.UnmatchedArgumentException;

/** Where the launcher enters. */
public final class Main {
    private Main() {}

    public static void main(String[] arguments) {
        ErrorLog log = new ErrorLog();
        log.captureLibraries();
        System.exit(execute(writer(FileDescriptor.out), writer(FileDescriptor.err), log, arguments));
    }

    /**
     * Runs a command.
     *
     * @return the exit status
     */
    static int execute(PrintWriter out, PrintWriter err, ErrorLog log, String... arguments) {
        CommandLine line = new CommandLine(new IsthmusCommand())
                .setOut(out)
                .setErr(err)
                .setCaseInsensitiveEnumValuesAllowed(true)
                .setUsageHelpAutoWidth(true)
                .setParameterExceptionHandler((e, given) -> wrongUsage(e, err))
                .setExecutionExceptionHandler((e, command, parsed) -> failed(e, err, log));
        int status;
        try {
            status = line.execute(arguments);
        } catch (OutOfMemoryError | StackOverflowError e) {
            status = failed(e, err, log);
        }
        out.flush();
        err.flush();
        return status;
    }

    private static int wrongUsage(ParameterException e, PrintWriter err) {
        String command = e.getCommandLine().getCommandSpec().qualifiedName();
        err.println(command + ": " + e.getMessage());
        if (e instanceof UnmatchedArgumentException unmatched) {
            List<String> suggestions = unmatched.getSuggestions();
            if (!suggestions.isEmpty()) {
                err.println("Did you mean " + String.join(" or ", suggestions) + "?");
            }
        }
        err.println("'" + command + " --help' tells what is possible.");
        return ExitStatus.USAGE;
    }

    private static int failed(Throwable e, PrintWriter err, ErrorLog log) {
        if (e instanceof UsageException) {
            err.println("isthmus: " + e.getMessage());
            return ExitStatus.USAGE;
        }
        if (e instanceof OutOfMemoryError || log.outOfMemory()) {
            err.println("isthmus: the memory did not suffice (Java may use "
                    + Runtime.getRuntime().maxMemory() / (1 << 20)
                    + " MiB here); give it more with ISTHMUS_JAVA_OPTIONS=-Xmx8g, or ask for fewer sites.");
            return ExitStatus.FAILED;
        }
        log.write("isthmus " + VersionText.number(), e);
        err.println("isthmus: internal error, which should not happen whatever the input"
                + log.file().map(f -> "; the details are in " + f).orElse("") + ".");
        return ExitStatus.FAILED;
    }

    private static PrintWriter writer(FileDescriptor descriptor) {
        return new PrintWriter(new FileOutputStream(descriptor), true, StandardCharsets.UTF_8);
    }
}
