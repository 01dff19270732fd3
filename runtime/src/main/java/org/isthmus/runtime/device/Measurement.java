package org.isthmus.runtime.device;

import java.util.List;
import java.util.Map;
import java.util.OptionalDouble;

/**
 * What is asked of a device.
 *
 * @param settings values of device parameters for this measurement, internal units
 * @param axes sweeps in the order written, first outermost, then biases
 * @param averages names of swept parameters that the results are averaged over
 * @param temperature overrides every lead's, K
 * @param mu overrides every lead's, eV
 * @param accuracy relative accuracy of energy integrals
 */
public record Measurement(
        String name,
        String device,
        Map<String, Double> settings,
        List<Axis> axes,
        List<String> averages,
        EnergyAxis energy,
        OptionalDouble temperature,
        OptionalDouble mu,
        Drop drop,
        double accuracy,
        List<Recorded> records,
        List<Expectation> expectations,
        SourceRef source) {
    /** Relative accuracy of energy integrals where the user asks for none. */
    public static final double DEFAULT_ACCURACY = 1e-8;

    public Measurement {
        settings = Map.copyOf(settings);
        axes = List.copyOf(axes);
        averages = List.copyOf(averages);
        records = List.copyOf(records);
        expectations = List.copyOf(expectations);
    }

    /** How a bias falls over the body. */
    public enum Drop {
        /** The body stays where it is. */
        NONE,
        /** Linear along the line between the two leads, constant beyond them. */
        LINEAR,
        /** By the self-consistent field. */
        POISSON
    }

    /** Points of a sweep or of a bias. */
    public sealed interface Axis permits SweepAxis, BiasAxis {
        /** Values in internal units. */
        List<Double> values();

        SourceRef source();
    }

    /**
     * A device parameter takes one value after the other.
     *
     * @param unit the unit of the column in results, empty for a plain number; a column value is value / unitFactor
     */
    public record SweepAxis(String parameter, String unit, double unitFactor, List<Double> values, SourceRef source)
            implements Axis {
        public SweepAxis {
            values = List.copyOf(values);
        }
    }

    /** A lead's voltage takes one value after the other, V. */
    public record BiasAxis(String lead, List<Double> values, SourceRef source) implements Axis {
        public BiasAxis {
            values = List.copyOf(values);
        }
    }

    /** The energies at which energy-resolved observables are recorded, eV. */
    public sealed interface EnergyAxis permits NoEnergies, EnergyPoints, AdaptiveEnergies {}

    /** The measurement has no energy axis. */
    public record NoEnergies() implements EnergyAxis {}

    public record EnergyPoints(List<Double> values, SourceRef source) implements EnergyAxis {
        public EnergyPoints {
            values = List.copyOf(values);
        }
    }

    /**
     * Energies are added until linear interpolation between neighbours is good to the tolerance.
     *
     * @param tolerance of the recorded values, in the unit of each
     */
    public record AdaptiveEnergies(double lower, double upper, double tolerance, SourceRef source)
            implements EnergyAxis {}

    /**
     * An observable to be written down.
     *
     * @param at where it is recorded; empty for every point of the axes
     */
    public record Recorded(ObservableCall call, List<AxisPosition> at, SourceRef source) {
        public Recorded {
            at = List.copyOf(at);
        }
    }

    /** How the two sides of an expectation must compare. */
    public enum Comparator {
        EQUAL("=="),
        AT_MOST("<="),
        AT_LEAST(">="),
        LESS("<"),
        GREATER(">"),
        NOT_EQUAL("!=");

        private final String sign;

        Comparator(String sign) {
            this.sign = sign;
        }

        public String sign() {
            return sign;
        }
    }

    /**
     * What the user expects of the result.
     *
     * @param tolerance in internal units, or a fraction of the right side where {@code relative}; zero without
     *     {@code within}
     * @param unit the unit in which both sides are told, empty for a plain number; told value = value / unitFactor
     * @param text the statement as written
     */
    public record Expectation(
            ExpectedValue left,
            Comparator comparator,
            ExpectedValue right,
            double tolerance,
            boolean relative,
            String unit,
            double unitFactor,
            String text,
            SourceRef source) {}
}
