package org.isthmus.language.elaboration;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.function.BooleanSupplier;
import org.isthmus.language.elaboration.geometry.BodySites;
import org.isthmus.language.elaboration.geometry.Gauge;
import org.isthmus.language.elaboration.geometry.LatticeFrame;
import org.isthmus.language.evaluation.Environment;
import org.isthmus.language.evaluation.Evaluator;
import org.isthmus.language.structure.DeviceStructure;
import org.isthmus.runtime.device.Device.ParameterValue;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.Lattice;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.SiteTable;

/** A device in the making; each pass fills in what the next ones need. */
final class Draft {
    final DeviceStructure structure;
    /** Parameters given from outside, internal units. */
    final Map<String, Double> given;

    final BooleanSupplier cancelled;
    final Findings findings = new Findings();

    // EvaluateParameters
    Environment environment;
    List<ParameterValue> parameters = List.of();

    // LayOutLattice
    Lattice lattice;
    LatticeFrame frame;
    /** Evaluates with the tolerance of positions. */
    Evaluator evaluator;

    // ExpandLattice
    BodySites body;

    // AddPotentials
    SiteTable sites;

    // ConnectHoppings
    double field;
    Gauge gauge = Gauge.NONE;
    HoppingTable hoppings = HoppingTable.EMPTY;
    HoppingTable overlaps = HoppingTable.EMPTY;

    // AttachLeads
    final List<Lead> leads = new ArrayList<>();

    Draft(DeviceStructure structure, Map<String, Double> given, BooleanSupplier cancelled) {
        this.structure = structure;
        this.given = Map.copyOf(given);
        this.cancelled = cancelled;
    }
}
