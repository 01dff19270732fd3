package org.isthmus.runtime.device;

import java.util.List;
import java.util.Map;

/** A device with its parameters still open: elaborates the device for given values. Safe for several threads. */
public interface DeviceFamily {
    String name();

    /**
     * Elaborates.
     *
     * @param values values in internal units of the parameters that differ from the text
     */
    Elaborated elaborate(Map<String, Double> values);

    /**
     * What an elaboration gives.
     *
     * @param device null where findings of severity error stand in its way
     */
    record Elaborated(Device device, List<Finding> findings) {
        public Elaborated {
            findings = List.copyOf(findings);
        }

        public boolean ok() {
            return device != null && findings.stream().noneMatch(f -> f.severity() == Severity.ERROR);
        }
    }
}
