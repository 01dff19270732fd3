package org.isthmus.language.elaboration;

import java.util.ArrayDeque;
import java.util.Deque;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.concurrent.CancellationException;
import java.util.function.BooleanSupplier;
import org.eclipse.emf.common.util.TreeIterator;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.emf.ecore.resource.Resource;
import org.eclipse.emf.ecore.util.EcoreUtil;
import org.isthmus.language.evaluation.Environment;
import org.isthmus.language.evaluation.EvaluationFailure;
import org.isthmus.language.evaluation.Evaluator;
import org.isthmus.language.findings.Places;
import org.isthmus.language.isthmus.DeviceDeclaration;
import org.isthmus.language.isthmus.LatticeDeclaration;
import org.isthmus.language.structure.DeviceStructure;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.DeviceFamily;
import org.isthmus.runtime.device.Finding;

/**
 * Makes devices from their text. Give it only devices whose expressions link and have no typing problem: what is left to
 * go wrong becomes findings.
 *
 * <p>A family is safe for several threads: names are resolved when it is made, and each elaboration has its own draft.
 */
public final class Elaborator implements DeviceFamily {
    private static final List<Pass> PASSES = List.of(
            new EvaluateParameters(),
            new RejectUnsolved(),
            new LayOutLattice(),
            new ExpandLattice(),
            new AddPotentials(),
            new ConnectHoppings(),
            new AttachLeads(),
            new VerifyDevice());

    private final DeviceStructure structure;

    private Elaborator(DeviceStructure structure) {
        this.structure = structure;
    }

    /** A device with its parameters still open. */
    public static Elaborator of(DeviceDeclaration device) {
        resolve(device);
        return new Elaborator(DeviceStructure.of(device));
    }

    /** What is wrong with a lattice at the values of its own header. */
    public static List<Finding> check(LatticeDeclaration lattice) {
        Findings findings = new Findings();
        LatticeReading.read(lattice, new Evaluator(Environment.ofText()), findings);
        return findings.list();
    }

    @Override
    public String name() {
        return structure.device().getName();
    }

    @Override
    public Elaborated elaborate(Map<String, Double> values) {
        return elaborate(values, () -> Thread.currentThread().isInterrupted());
    }

    /**
     * Elaborates, and ends early on a signal.
     *
     * @param cancelled asked often, from the calling thread
     * @throws CancellationException when cancelled
     */
    public Elaborated elaborate(Map<String, Double> values, BooleanSupplier cancelled) {
        Draft draft = new Draft(structure, values, cancelled);
        run(draft, new LinkedHashMap<>(), false);
        return new Elaborated(draft.findings.errors() > 0 ? null : device(draft), draft.findings.list());
    }

    /** The text that each pass leaves behind, by the pass's name, up to the first one with errors. */
    public Map<String, String> stages(Map<String, Double> values) {
        Map<String, String> texts = new LinkedHashMap<>();
        run(new Draft(structure, values, () -> false), texts, true);
        return texts;
    }

    /** Meaning that is missing in the solver does not keep the other passes from looking at the device. */
    private static void run(Draft draft, Map<String, String> texts, boolean tell) {
        for (Pass pass : PASSES) {
            stopIf(draft.cancelled);
            int errors = draft.findings.errors();
            try {
                pass.run(draft);
            } catch (EvaluationFailure failure) {
                draft.findings.add(failure);
            }
            if (draft.findings.errors() > errors && !(pass instanceof RejectUnsolved)) {
                return;
            }
            if (tell) {
                texts.put(pass.name(), pass.text(draft));
            }
        }
    }

    private static Device device(Draft draft) {
        return new Device(
                draft.structure.device().getName(),
                draft.lattice,
                draft.sites,
                draft.hoppings,
                draft.overlaps,
                draft.leads,
                draft.field,
                draft.parameters,
                Places.of(draft.structure.device()));
    }

    static void stopIf(BooleanSupplier cancelled) {
        if (cancelled.getAsBoolean()) {
            throw new CancellationException("elaboration cancelled");
        }
    }

    /** Resolves every name within reach of a device, so that elaboration changes nothing in the model. */
    private static void resolve(DeviceDeclaration device) {
        Set<Resource> seen = new LinkedHashSet<>();
        Deque<Resource> open = new ArrayDeque<>();
        if (device.eResource() != null) {
            open.add(device.eResource());
        }
        while (!open.isEmpty()) {
            Resource resource = open.remove();
            if (!seen.add(resource)) {
                continue;
            }
            EcoreUtil.resolveAll(resource);
            TreeIterator<EObject> contents = resource.getAllContents();
            while (contents.hasNext()) {
                for (EObject target : contents.next().eCrossReferences()) {
                    if (target.eResource() != null && !seen.contains(target.eResource())) {
                        open.add(target.eResource());
                    }
                }
            }
        }
    }
}
