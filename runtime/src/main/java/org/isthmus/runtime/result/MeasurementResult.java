package org.isthmus.runtime.result;

import java.util.List;
import java.util.Map;
import org.isthmus.runtime.device.Finding;

/**
 * Everything that a measurement gave.
 *
 * @param tables one per recorded observable
 * @param residual largest violation of current conservation, relative
 * @param equationResidual largest relative residual of any equation solved
 * @param deviceDigest SHA-256 of every elaborated device, in the order of the sweeps, combined
 * @param solves energies solved
 * @param seconds time per stage
 */
public record MeasurementResult(
        String device,
        String measurement,
        List<ResultTable> tables,
        List<Verdict> verdicts,
        List<Finding> findings,
        double residual,
        double equationResidual,
        String deviceDigest,
        long solves,
        Map<String, Double> seconds) {
    public MeasurementResult {
        tables = List.copyOf(tables);
        verdicts = List.copyOf(verdicts);
        findings = List.copyOf(findings);
        seconds = java.util.Collections.unmodifiableMap(new java.util.LinkedHashMap<>(seconds));
    }

    /** True where every expectation held. */
    public boolean held() {
        return verdicts.stream().allMatch(Verdict::held);
    }

    /** Name of its folder. */
    public String folder() {
        return device + "." + measurement;
    }
}
