package org.isthmus.runtime.measure;

import java.util.List;
import org.isthmus.runtime.device.Finding;

/** A run that could not be finished: a point whose device has errors, or a solve that failed. */
public final class RunFailure extends Exception {
    private static final long serialVersionUID = 1;

    private final transient List<Finding> findings;

    public RunFailure(String message, List<Finding> findings, Throwable cause) {
        super(message, cause);
        this.findings = List.copyOf(findings);
    }

    /** Errors of the device at the point; empty where a solve failed. */
    public List<Finding> findings() {
        return findings;
    }
}
