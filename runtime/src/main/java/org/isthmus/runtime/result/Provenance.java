package org.isthmus.runtime.result;

import java.util.List;
import java.util.Map;

/**
 * Where a result comes from.
 *
 * @param tool name and version
 * @param device the device as elaborated, parameters resolved, as text
 * @param inputs path and SHA-256 of every input file
 * @param settings of the measurement and of the command, as text
 * @param backend linear algebra
 * @param threads worker threads
 */
public record Provenance(
        String tool,
        String device,
        Map<String, String> inputs,
        Map<String, String> settings,
        String backend,
        int threads) {
    /** What the model leaves out: printed with every result. */
    public static final List<String> CAUTIONS = List.of(
            "Electrons move independently of each other in the given potential: no charging, no correlation, no"
                    + " self-consistent field.",
            "The leads are reservoirs in equilibrium; nothing heats up, degrades or breaks down, so no current, voltage or"
                    + " temperature here is a limit of safe operation.",
            "Figures are those of the model. Decide by measurement, and by the rules that hold at your site.");

    public Provenance {
        inputs = java.util.Collections.unmodifiableMap(new java.util.LinkedHashMap<>(inputs));
        settings = java.util.Collections.unmodifiableMap(new java.util.LinkedHashMap<>(settings));
    }
}
