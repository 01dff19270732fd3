package org.isthmus.language.ide.cli;

import java.util.concurrent.CountDownLatch;
import java.util.concurrent.TimeUnit;
import org.isthmus.runtime.result.ResultFolder;

/**
 * Lets a run end in order when the user stops it: the thread that runs is interrupted, and the virtual machine waits until
 * what had begun to be written is gone. The exit status is the shell's for the signal (130 for Ctrl-C).
 */
final class Interruption implements AutoCloseable {
    /** A solve that does not come to an end by then is left behind; it holds no file open. */
    private static final long PATIENCE_SECONDS = 10;

    private final CountDownLatch over = new CountDownLatch(1);
    private final Thread runner;
    private final Thread hook = new Thread(this::interrupted, "interruption");

    private Interruption(Thread runner) {
        this.runner = runner;
    }

    /** Guards what the calling thread does until {@link #close}. */
    static Interruption guard() {
        Interruption interruption = new Interruption(Thread.currentThread());
        Runtime.getRuntime().addShutdownHook(interruption.hook);
        return interruption;
    }

    private void interrupted() {
        runner.interrupt();
        try {
            over.await(PATIENCE_SECONDS, TimeUnit.SECONDS);
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
        }
        ResultFolder.removeUnfinished();
    }

    @Override
    public void close() {
        over.countDown();
        try {
            Runtime.getRuntime().removeShutdownHook(hook);
        } catch (IllegalStateException e) {
            // the virtual machine is on its way down; its hook has just been told not to wait any longer
            Thread.currentThread().interrupt();
        }
    }
}
