package org.isthmus.language.ide.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.io.PrintWriter;
import java.io.StringWriter;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.atomic.AtomicLong;
import org.junit.jupiter.api.Test;

class ProgressLineTest {
    @Test
    void elsewhereThanOnATerminalAPlainLineNowAndThen() {
        StringWriter err = new StringWriter();
        AtomicLong clock = new AtomicLong();
        try (ProgressLine line = new ProgressLine(new PrintWriter(err), false, clock::get)) {
            for (int done = 0; done <= 25; done++) {
                line.advanced("Spectrum of Wire", done, 100);
                clock.addAndGet(TimeUnit.SECONDS.toNanos(1));
            }
        }
        assertEquals(
                "Spectrum of Wire: 10 of 100 points\nSpectrum of Wire: 20 of 100 points\n",
                err.toString().replace(System.lineSeparator(), "\n"));
    }
}
