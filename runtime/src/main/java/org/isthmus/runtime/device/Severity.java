package org.isthmus.runtime.device;

/** How much a finding weighs: an error stops a run before it starts, the others are kept with the result. */
public enum Severity {
    ERROR,
    WARNING,
    INFORMATION;

    /** The word in messages. */
    public String word() {
        return name().toLowerCase(java.util.Locale.ROOT);
    }
}
