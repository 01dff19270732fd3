package org.isthmus.runtime.observable;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.isthmus.runtime.catalogue.Catalogue;
import org.isthmus.runtime.catalogue.ObservableEntry;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.LatticeLead;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.solve.Needs;
import org.isthmus.runtime.units.Dimension;
import org.isthmus.runtime.units.Units;

/** Something that can be recorded, and how it is computed. One class each, found as a service. */
public abstract class Observable implements ObservableEntry {
    private final ObservableEntry entry;
    private final Needs needs;

    /** Takes name, arguments, dimensions and documentation from the catalogue's list of all observables. */
    protected Observable(String name, Needs needs) {
        entry = Catalogue.described(name);
        this.needs = needs;
    }

    /** The observable with this name; empty where the solver has none. */
    public static Optional<Observable> named(String name) {
        return Catalogue.observable(name).filter(Observable.class::isInstance).map(Observable.class::cast);
    }

    @Override
    public final String name() {
        return entry.name();
    }

    @Override
    public final String documentation() {
        return entry.documentation();
    }

    @Override
    public final Arguments arguments() {
        return entry.arguments();
    }

    @Override
    public final Resolution resolution() {
        return entry.resolution();
    }

    @Override
    public final boolean perSite() {
        return entry.perSite();
    }

    @Override
    public final Dimension dimension(boolean resolved) {
        return entry.dimension(resolved);
    }

    @Override
    public final boolean available() {
        return true;
    }

    /** What a solve must give for it. */
    public final Needs needs() {
        return needs;
    }

    /** True where it has a value per energy in a measurement with or without an energy axis. */
    public final boolean resolved(boolean energyAxis) {
        return resolution() == Resolution.ENERGY || resolution() == Resolution.EITHER && energyAxis;
    }

    /** The calls that a recorded call stands for: one per column. Without leads it means all of them, or all pairs. */
    public List<ObservableCall> columns(ObservableCall call, Device device) {
        if (!call.leads().isEmpty() || arguments() == Arguments.NONE) {
            return List.of(call);
        }
        List<ObservableCall> calls = new ArrayList<>();
        for (Lead a : device.leads()) {
            if (arguments() == Arguments.LEAD_PAIR) {
                for (Lead b : device.leads()) {
                    if (a != b) {
                        calls.add(new ObservableCall(name(), a.name(), b.name()));
                    }
                }
            } else {
                calls.add(new ObservableCall(name(), a.name()));
            }
        }
        return calls;
    }

    /** Name and unit of a column. */
    public String header(ObservableCall column, boolean energyAxis) {
        String title = column.leads().isEmpty() ? name() : String.join(">", column.leads());
        String unit = Units.fitting(dimension(resolved(energyAxis))).symbol();
        return unit.isEmpty() ? title : title + " (" + unit + ")";
    }

    /** A value in internal units, in the unit of the column. */
    public double told(double value, boolean energyAxis) {
        return Units.fitting(dimension(resolved(energyAxis))).fromInternal(value);
    }

    /**
     * Computes one column.
     *
     * @param energy where it has a value per energy; otherwise not a number
     * @return one value, or one per site, in internal units; not a number where it is not defined
     */
    public abstract double[] values(Bench bench, ObservableCall column, double energy);

    /** Leads of a call that have bands, for observables that need them. */
    static List<ObservableCall> latticeLeads(String name, Device device) {
        return device.leads().stream()
                .filter(LatticeLead.class::isInstance)
                .map(lead -> new ObservableCall(name, lead.name()))
                .toList();
    }
}
