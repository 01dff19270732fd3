package org.isthmus.runtime.result;

import org.isthmus.runtime.device.SourceRef;

/**
 * What became of an expectation. Numbers are in the unit of the expectation.
 *
 * @param text the statement as written
 * @param measured left side, at the worst point where it must hold at several
 * @param expected right side there
 * @param difference measured − expected
 * @param at the worst point, empty where there is one value only
 * @param unit empty for plain numbers
 */
public record Verdict(
        String text,
        boolean held,
        double measured,
        double expected,
        double difference,
        String at,
        String unit,
        SourceRef place) {

    /** {@code held}, or {@code broken} with measured, expected and difference. */
    public String sentence() {
        String u = unit.isEmpty() ? "" : " " + unit;
        String where = at.isEmpty() ? "" : " at " + at;
        return (held ? "held: " : "broken: ") + text + " — measured " + measured + u + where + ", expected " + expected
                + u + ", difference " + difference + u;
    }
}
