package org.isthmus.runtime.measure;

/** Hears how far a run has come, from any thread. */
@FunctionalInterface
public interface RunListener {
    /** Says nothing. */
    RunListener NONE = (done, total) -> {};

    /**
     * A step is done: an energy of a fixed axis, or all else at a point.
     *
     * @param done steps done so far
     * @param total steps in all
     */
    void progress(long done, long total);
}
