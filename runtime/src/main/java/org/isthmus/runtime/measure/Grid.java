package org.isthmus.runtime.measure;

import java.util.ArrayList;
import java.util.List;
import org.isthmus.runtime.device.Measurement;
import org.isthmus.runtime.device.Measurement.Axis;
import org.isthmus.runtime.device.Measurement.BiasAxis;
import org.isthmus.runtime.device.Measurement.SweepAxis;

/** The sweeps and biases of a measurement, first outermost, and the points they make. */
final class Grid {
    private final List<Axis> axes;

    Grid(Measurement measurement) {
        axes = measurement.axes();
    }

    int axes() {
        return axes.size();
    }

    Axis axis(int k) {
        return axes.get(k);
    }

    int size(int k) {
        return axes.get(k).values().size();
    }

    /** The name by which positions and expectations know an axis. */
    String name(int k) {
        return axes.get(k) instanceof BiasAxis bias
                ? org.isthmus.runtime.device.AxisPosition.bias(bias.lead())
                : ((SweepAxis) axes.get(k)).parameter();
    }

    /** Place of an axis by name; −1 for none. */
    int indexOf(String name) {
        for (int k = 0; k < axes.size(); k++) {
            if (name(k).equals(name)) {
                return k;
            }
        }
        return -1;
    }

    /** Name and unit of the column of an axis. */
    String header(int k) {
        if (axes.get(k) instanceof SweepAxis sweep) {
            return sweep.unit().isEmpty() ? sweep.parameter() : sweep.parameter() + " (" + sweep.unit() + ")";
        }
        long biases = axes.stream().filter(BiasAxis.class::isInstance).count();
        return biases == 1 ? "bias (V)" : "bias " + ((BiasAxis) axes.get(k)).lead() + " (V)";
    }

    /** A value of an axis in the unit of its column. */
    double told(int k, double value) {
        return axes.get(k) instanceof SweepAxis sweep ? value / sweep.unitFactor() : value;
    }

    /**
     * All points, last axis fastest.
     *
     * @param fixed a value per axis that takes the place of the axis's own; not a number for a free axis
     */
    List<List<Double>> points(double[] fixed) {
        List<List<Double>> points = new ArrayList<>();
        points.add(List.of());
        for (int k = 0; k < axes.size(); k++) {
            List<Double> values = Double.isNaN(fixed[k]) ? axes.get(k).values() : List.of(fixed[k]);
            List<List<Double>> longer = new ArrayList<>(points.size() * values.size());
            for (List<Double> point : points) {
                for (double value : values) {
                    List<Double> extended = new ArrayList<>(point);
                    extended.add(value);
                    longer.add(List.copyOf(extended));
                }
            }
            points = longer;
        }
        return points;
    }
}
