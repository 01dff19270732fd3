package org.isthmus.runtime.device;

/**
 * A coordinate of a chosen point.
 *
 * @param axis {@code energy}, {@code bias LEAD} or the swept parameter
 * @param value in internal units
 * @param text value and unit as the user wrote them
 */
public record AxisPosition(String axis, double value, String text) {
    /** The name of the energy axis. */
    public static final String ENERGY = "energy";

    /** The name of a bias axis. */
    public static String bias(String lead) {
        return "bias " + lead;
    }
}
