package org.isthmus.runtime.measure;

import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import org.isthmus.runtime.device.AxisPosition;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.observable.Observable;
import org.isthmus.runtime.solve.SolveFailure;

/** An observable that is wanted at points, and the samples that were taken of it. */
final class Request {
    private final ObservableCall call;
    private final Observable observable;
    private final double[] fixed;
    private final double energy;
    private final Map<List<Double>, Sample> samples = new HashMap<>();

    /**
     * A sample at one point.
     *
     * @param energies where values were taken; one that is not a number for an integrated value
     * @param values per energy, column by column, site by site
     * @param columns number of columns
     */
    record Sample(double[] energies, double[][] values, int columns) {}

    Request(ObservableCall call, List<AxisPosition> at, Grid grid) {
        this.call = call;
        if (!call.matrix().isEmpty()) {
            throw new SolveFailure("'" + call + "' is not solved yet: the flow of a quantity other than charge.");
        }
        observable = Observable.named(call.observable())
                .orElseThrow(() -> new SolveFailure("'" + call.observable() + "' is not solved yet."));
        fixed = new double[grid.axes()];
        Arrays.fill(fixed, Double.NaN);
        double chosen = Double.NaN;
        for (AxisPosition position : at) {
            if (position.axis().equals(AxisPosition.ENERGY)) {
                chosen = position.value();
            } else {
                int axis = grid.indexOf(position.axis());
                if (axis < 0) {
                    throw new SolveFailure("'" + position.axis() + "' is no axis of this measurement.");
                }
                fixed[axis] = position.value();
            }
        }
        energy = chosen;
    }

    ObservableCall call() {
        return call;
    }

    Observable observable() {
        return observable;
    }

    double[] fixed() {
        return fixed;
    }

    /** The one energy asked for; not a number where the energy axis says. */
    double energy() {
        return energy;
    }

    /** True where it has a value per energy. */
    boolean resolved(boolean energyAxis) {
        return observable.resolved(energyAxis || !Double.isNaN(energy));
    }

    /** Equal for requests that are taken at the same places. */
    List<Double> place() {
        List<Double> place =
                new java.util.ArrayList<>(Arrays.stream(fixed).boxed().toList());
        place.add(energy);
        return place;
    }

    void put(List<Double> point, Sample sample) {
        synchronized (samples) {
            samples.put(point, sample);
        }
    }

    Sample at(List<Double> point) {
        return samples.get(point);
    }
}
