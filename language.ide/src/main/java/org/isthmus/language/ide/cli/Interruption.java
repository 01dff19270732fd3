package org.isthmus.language.ide.cli;

import java.util.concurrent.CountDownLatch;
import java.util.concurrent.TimeUnit;
import java.util.function.BooleanSupplier;

/**
 * Lets a run end in order when the user stops it: work asks {@link #getAsBoolean} now and then, gives up, and takes
 * away what it had begun to write, while the virtual machine waits. The exit status is the shell's for the signal (130
 * for Ctrl-C).
 */
final class Interruption implements BooleanSupplier, AutoCloseable {
    /** A solve that does not come to an end by then is left behind; it holds no file open. */
    private static final long PATIENCE_SECONDS = 20;

    private final CountDownLatch over = new CountDownLatch(1);
    private final Thread hook = new Thread(this::interrupted, "interruption");
    private volatile boolean requested;

    private Interruption() {}

    static Interruption listen() {
        Interruption interruption = new Interruption();
        Runtime.getRuntime().addShutdownHook(interruption.hook);
        return interruption;
    }

    private void interrupted() {
        requested = true;
        try {
            over.await(PATIENCE_SECONDS, TimeUnit.SECONDS);
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
        }
    }

    /** True once the user wants the run to stop. */
    @Override
    public boolean getAsBoolean() {
        return requested;
    }

    /** The run is over, and what it leaves is in order. */
    @Override
    public void close() {
        over.countDown();
        if (!requested) {
            try {
                Runtime.getRuntime().removeShutdownHook(hook);
            } catch (IllegalStateException e) {
                // the virtual machine is on its way down already; the hook has nothing to wait for any more
                requested = true;
            }
        }
    }
}
