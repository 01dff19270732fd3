package org.isthmus.runtime.observable;

import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.CancellationException;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import java.util.function.BooleanSupplier;
import java.util.function.Function;

/** Shares independent work out to threads and hands the answers back in the order of the questions. */
final class Workers implements AutoCloseable {
    private final ExecutorService pool;
    private final BooleanSupplier cancelled;

    /**
     * Makes workers.
     *
     * @param threads 1 means that the calling thread does the work
     */
    Workers(int threads, BooleanSupplier cancelled) {
        pool = threads <= 1
                ? null
                : Executors.newFixedThreadPool(threads, task -> {
                    Thread thread = new Thread(null, task, "solve", 16L << 20);
                    thread.setDaemon(true);
                    return thread;
                });
        this.cancelled = cancelled;
    }

    /** The calling thread alone, under the same signal. */
    Workers alone() {
        return new Workers(1, cancelled);
    }

    /**
     * Answers all questions.
     *
     * @throws CancellationException once the user wants no more
     */
    <Q, A> List<A> map(List<Q> questions, Function<Q, A> work) {
        List<A> answers = new ArrayList<>(questions.size());
        if (pool == null || questions.size() == 1) {
            for (Q question : questions) {
                answers.add(guarded(question, work));
            }
            return answers;
        }
        List<Future<A>> open = new ArrayList<>(questions.size());
        for (Q question : questions) {
            open.add(pool.submit(() -> guarded(question, work)));
        }
        try {
            for (Future<A> future : open) {
                answers.add(future.get());
            }
            return answers;
        } catch (ExecutionException e) {
            throw rethrown(e.getCause());
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
            throw new CancellationException("interrupted");
        } finally {
            open.forEach(future -> future.cancel(false));
        }
    }

    private <Q, A> A guarded(Q question, Function<Q, A> work) {
        if (cancelled.getAsBoolean()) {
            throw new CancellationException("cancelled");
        }
        return work.apply(question);
    }

    private static RuntimeException rethrown(Throwable cause) {
        if (cause instanceof Error error) {
            throw error;
        }
        return cause instanceof RuntimeException runtime ? runtime : new IllegalStateException(cause);
    }

    @Override
    public void close() {
        if (pool != null) {
            pool.shutdownNow();
        }
    }
}
