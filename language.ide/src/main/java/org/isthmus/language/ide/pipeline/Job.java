package org.isthmus.language.ide.pipeline;

import java.util.List;
import java.util.Map;
import org.isthmus.runtime.device.DeviceFamily;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.Measurement;

/**
 * A measurement ready to be run.
 *
 * @param file that declares it
 * @param inputs SHA-256 of every file that it may depend on, by the path shown to the user
 * @param given values of parameters from outside the text, as the user wrote them
 * @param findings of the check on its file, warnings and information
 * @param project that it comes from
 */
public record Job(
        SourceFile file,
        DeviceFamily family,
        Measurement measurement,
        Map<String, String> inputs,
        Map<String, String> given,
        List<Finding> findings,
        Project project) {
    public Job {
        inputs = java.util.Collections.unmodifiableMap(new java.util.LinkedHashMap<>(inputs));
        given = java.util.Collections.unmodifiableMap(new java.util.LinkedHashMap<>(given));
        findings = List.copyOf(findings);
    }

    /** {@code Spectrum of BarrierWire}. */
    public String title() {
        return measurement.name() + " of " + measurement.device();
    }

    /** Name of the folder of its results. */
    public String folder() {
        return measurement.device() + "." + measurement.name();
    }
}
