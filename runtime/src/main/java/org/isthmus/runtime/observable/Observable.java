package org.isthmus.runtime.observable;

import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.EnergySolution;
import org.isthmus.runtime.solve.Needs;

/** Something that can be recorded. A new one is a class, listed in {@link Observables}. */
interface Observable {
    /** As in the catalogue. */
    String name();

    /** Calls that a record without arguments stands for. */
    List<ObservableCall> all(Device device);

    /** What a column of values is called, without its unit. */
    String column(ObservableCall call);

    /**
     * Unit of its values, as units are written in the language; empty for plain numbers.
     *
     * @param resolved one value per energy
     */
    String unit(boolean resolved);

    /** True where it has a value per site. */
    default boolean perSite() {
        return false;
    }

    /** An observable with a value at each energy. */
    interface Resolved extends Observable {
        Needs needs();

        /**
         * Its value at an energy, in internal units; one per site where {@link #perSite}.
         */
        double[] at(PointContext context, ObservableCall call, EnergySolution solution);
    }

    /** An observable that is integrated over energy. */
    interface Integrated extends Observable {
        /** What has to be integrated at an operating point. */
        Integrand integrand(PointContext context, ObservableCall call);
    }

    /**
     * Functions of energy whose integrals give an observable.
     *
     * @param size number of functions
     * @param points energies at which solutions are wanted beside the integral: what a Fermi function's derivative
     *     becomes at zero temperature
     */
    record Integrand(Needs needs, Window window, int size, List<Double> points, Functions functions, Finish finish) {
        public Integrand {
            points = List.copyOf(points);
        }
    }

    /** Values of the functions at an energy. */
    interface Functions {
        void at(EnergySolution solution, double[] values, int first);
    }

    /** From the integrals, and the solutions at the wanted points, to values in internal units. */
    interface Finish {
        double[] values(double[] integrals, List<EnergySolution> points);
    }

    /** Energies beyond which nothing contributes, eV; empty where {@code upper} is not above {@code lower}. */
    record Window(double lower, double upper) {
        static final Window EMPTY = new Window(0, 0);

        boolean empty() {
            return !(upper > lower);
        }

        Window and(Window other) {
            return empty()
                    ? other
                    : other.empty() ? this : new Window(Math.min(lower, other.lower), Math.max(upper, other.upper));
        }
    }
}
