package org.isthmus.language.ide.cli;

import java.io.IOException;
import java.io.PrintWriter;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Optional;
import org.apache.log4j.AppenderSkeleton;
import org.apache.log4j.Level;
import org.apache.log4j.LogManager;
import org.apache.log4j.Logger;
import org.apache.log4j.spi.LoggingEvent;

/**
 * Where internal errors go in full, so that the terminal needs to show a sentence only. The file comes into being with
 * the first of them.
 */
final class ErrorLog {
    private Path file;
    private boolean outOfMemory;

    /** Sends what the libraries log as an error here, and lets them say nothing else. */
    void captureLibraries() {
        LogManager.resetConfiguration();
        Logger root = Logger.getRootLogger();
        root.setLevel(Level.ERROR);
        root.addAppender(new AppenderSkeleton() {
            @Override
            protected void append(LoggingEvent event) {
                Throwable cause = event.getThrowableInformation() == null
                        ? null
                        : event.getThrowableInformation().getThrowable();
                write(event.getLoggerName() + ": " + event.getRenderedMessage(), cause);
            }

            @Override
            public boolean requiresLayout() {
                return false;
            }

            @Override
            public void close() {}
        });
        java.util.logging.LogManager.getLogManager().reset();
    }

    /** Adds an entry; {@code cause} may be null. */
    synchronized void write(String text, Throwable cause) {
        for (Throwable at = cause; at != null; at = at.getCause()) {
            outOfMemory |= at instanceof OutOfMemoryError;
        }
        try {
            if (file == null) {
                file = Files.createTempFile("isthmus-", ".log");
            }
            try (PrintWriter log = new PrintWriter(Files.newBufferedWriter(
                    file,
                    StandardCharsets.UTF_8,
                    java.nio.file.StandardOpenOption.CREATE,
                    java.nio.file.StandardOpenOption.APPEND))) {
                log.println(text);
                if (cause != null) {
                    cause.printStackTrace(log);
                }
            }
        } catch (IOException e) {
            // no place for a log: the sentence on the terminal is all there is
            file = null;
        }
    }

    /** True once a library has run out of memory and carried on. */
    synchronized boolean outOfMemory() {
        return outOfMemory;
    }

    /** The file, once there is something in it. */
    synchronized Optional<Path> file() {
        return Optional.ofNullable(file);
    }
}
