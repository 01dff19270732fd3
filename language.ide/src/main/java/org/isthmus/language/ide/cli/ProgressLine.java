package org.isthmus.language.ide.cli;

import java.io.PrintStream;
import java.io.PrintWriter;
import java.time.Duration;
import java.util.function.LongSupplier;
import me.tongfei.progressbar.ConsoleProgressBarConsumer;
import me.tongfei.progressbar.ProgressBar;
import me.tongfei.progressbar.ProgressBarBuilder;
import me.tongfei.progressbar.ProgressBarStyle;
import org.isthmus.language.ide.pipeline.Progress;

/**
 * Shows how far a run has come: a bar on a terminal, a plain line now and then elsewhere, nothing for work that is done
 * at once.
 */
final class ProgressLine implements Progress, AutoCloseable {
    private static final long PATIENCE = Duration.ofSeconds(1).toNanos();
    private static final long BETWEEN_LINES = Duration.ofSeconds(10).toNanos();

    private final PrintWriter err;
    private final boolean terminal;
    private final LongSupplier nanoClock;

    private String current;
    private long started;
    private long lastLine;
    private ProgressBar bar;

    ProgressLine(PrintWriter err, boolean terminal, LongSupplier nanoClock) {
        this.err = err;
        this.terminal = terminal;
        this.nanoClock = nanoClock;
    }

    /** As the launcher found the standard error to be. */
    static boolean onTerminal() {
        return Boolean.getBoolean("isthmus.terminal");
    }

    @Override
    public synchronized void advanced(String what, long done, long total) {
        long now = nanoClock.getAsLong();
        if (!what.equals(current)) {
            close();
            current = what;
            started = now;
            lastLine = now;
        }
        if (now - started < PATIENCE) {
            return;
        }
        if (terminal) {
            if (bar == null) {
                bar = open(what, total);
            }
            bar.maxHint(total > 0 ? total : -1);
            bar.stepTo(done);
        } else if (now - lastLine >= BETWEEN_LINES) {
            lastLine = now;
            err.println(what + ": " + done + (total > 0 ? " of " + total + " points" : " points"));
            err.flush();
        }
    }

    private static ProgressBar open(String what, long total) {
        return new ProgressBarBuilder()
                .setTaskName(what)
                .setInitialMax(total > 0 ? total : -1)
                .setStyle(ProgressBarStyle.ASCII)
                .setUpdateIntervalMillis(250)
                .setConsumer(new ConsoleProgressBarConsumer(new PrintStream(System.err, true)))
                .build();
    }

    /** The work of the last call is over. */
    @Override
    public synchronized void close() {
        if (bar != null) {
            bar.close();
            bar = null;
        }
        current = null;
    }
}
