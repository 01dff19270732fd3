package org.isthmus.runtime.measure;

/** Hears how far a run has come, from any thread. */
@FunctionalInterface
public interface RunListener {
    /** Says nothing. */
    RunListener NONE = (done, total) -> {};

    /**
     * A point is done.
     *
     * @param done points done so far
     * @param total points in all
     */
    void progress(long done, long total);
}
