package org.isthmus.language.ide.pipeline;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/**
 * Which measurements are wanted, and with which parameters.
 *
 * @param measurements {@code NAME} or {@code DEVICE.NAME}; empty for all
 * @param settings text of values by name of parameter
 */
public record Selection(List<String> measurements, Map<String, String> settings) {
    /** Everything as it is written. */
    public static final Selection ALL = new Selection(List.of(), Map.of());

    public Selection {
        measurements = List.copyOf(measurements);
        settings = java.util.Collections.unmodifiableMap(new LinkedHashMap<>(settings));
    }

    boolean wants(String device, String measurement) {
        return measurements.isEmpty()
                || measurements.contains(measurement)
                || measurements.contains(device + "." + measurement);
    }
}
