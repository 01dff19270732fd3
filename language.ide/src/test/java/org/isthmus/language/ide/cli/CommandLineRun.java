package org.isthmus.language.ide.cli;

import java.io.PrintWriter;
import java.io.StringWriter;
import java.util.List;

/** A command run in this process, with what it printed. */
record CommandLineRun(int status, String out, String err) {
    static CommandLineRun of(Object... arguments) {
        StringWriter out = new StringWriter();
        StringWriter err = new StringWriter();
        String[] texts =
                java.util.Arrays.stream(arguments).map(Object::toString).toArray(String[]::new);
        int status = Main.execute(new PrintWriter(out), new PrintWriter(err), new ErrorLog(), texts);
        return new CommandLineRun(status, out.toString(), err.toString());
    }

    List<String> lines() {
        return out.lines().toList();
    }
}
