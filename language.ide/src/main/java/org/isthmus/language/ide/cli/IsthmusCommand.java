package org.isthmus.language.ide.cli;

import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Spec;

/** The command {@code isthmus}; what it can do are its sub-commands. */
@Command(
        name = "isthmus",
        description = "Checks, describes and runs quantum-transport models written in the Isthmus language.",
        subcommands = {CheckCommand.class, RunCommand.class, DescribeCommand.class, FormatCommand.class},
        mixinStandardHelpOptions = true,
        versionProvider = VersionText.class,
        synopsisSubcommandLabel = "COMMAND",
        exitCodeListHeading = "%nExit status:%n",
        exitCodeList = {
            " 0:fine",
            " 1:a finding of severity error, or a broken expectation",
            " 2:wrong usage",
            " 3:the run itself failed; what was solved stays on disk"
        })
final class IsthmusCommand implements Runnable {
    @Spec
    private CommandSpec spec;

    @Override
    public void run() {
        throw new ParameterException(spec.commandLine(), "a command is missing");
    }
}
