package org.isthmus.runtime.observable;

import java.util.ArrayList;
import java.util.List;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.ObservableCall;

/** The calls that a record without arguments stands for, and what their columns are called. */
final class Columns {
    private Columns() {}

    static List<ObservableCall> leads(String name, Device device) {
        return device.leads().stream()
                .map(lead -> new ObservableCall(name, lead.name()))
                .toList();
    }

    /** Ordered pairs; {@code equal} ones too where a lead has something to do with itself. */
    static List<ObservableCall> pairs(String name, Device device, boolean equal) {
        List<ObservableCall> calls = new ArrayList<>();
        for (Lead a : device.leads()) {
            for (Lead b : device.leads()) {
                if (equal || a != b) {
                    calls.add(new ObservableCall(name, a.name(), b.name()));
                }
            }
        }
        return calls;
    }

    static List<ObservableCall> single(String name) {
        return List.of(new ObservableCall(name));
    }

    static String ofLeads(ObservableCall call) {
        return String.join(">", call.leads());
    }
}
