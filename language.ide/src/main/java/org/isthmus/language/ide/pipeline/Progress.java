package org.isthmus.language.ide.pipeline;

/** Hears how far long work has come. Called from any thread, often; implementations must be quick and safe. */
public interface Progress {
    /** Nobody listens. */
    Progress SILENT = (what, done, total) -> {};

    /**
     * Work has come on.
     *
     * @param what the work, such as {@code Spectrum of BarrierWire}
     * @param done finished parts
     * @param total all parts, as far as known; 0 where unknown
     */
    void advanced(String what, long done, long total);
}
