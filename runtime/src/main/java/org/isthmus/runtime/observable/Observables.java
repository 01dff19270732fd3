package org.isthmus.runtime.observable;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;

/** Every observable that can be computed. */
public final class Observables {
    private static final Map<String, Observable> BY_NAME = new LinkedHashMap<>();

    static {
        for (Observable observable : List.of(
                new Transmission(),
                new Modes(),
                new DensityOfStates(),
                new LocalDensityOfStates(),
                new ResolvedFano(),
                new SpectralCurrent(),
                new ResolvedOccupation(),
                new Conductance(),
                new Current(),
                new Seebeck(),
                new HeatCurrent(),
                new Noise(),
                new Fano(),
                new Density(),
                new MeanOccupation())) {
            BY_NAME.put(key(observable.name(), observable instanceof Observable.Resolved), observable);
        }
    }

    private Observables() {}

    private static String key(String name, boolean resolved) {
        return name + (resolved ? " at an energy" : "");
    }

    /** Names of all observables that can be computed. */
    public static Set<String> names() {
        Set<String> names = new java.util.LinkedHashSet<>();
        BY_NAME.values().forEach(observable -> names.add(observable.name()));
        names.add(Residual.NAME);
        return names;
    }

    static Optional<Observable.Resolved> resolved(String name) {
        return Optional.ofNullable((Observable.Resolved) BY_NAME.get(key(name, true)));
    }

    static Optional<Observable.Integrated> integrated(String name) {
        return Optional.ofNullable((Observable.Integrated) BY_NAME.get(key(name, false)));
    }
}
