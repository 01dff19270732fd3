package org.isthmus.runtime.benchmark;

import java.lang.management.ManagementFactory;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Random;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.selection.Backends;
import org.isthmus.runtime.plan.Planner;
import org.isthmus.runtime.plan.SolvePlan;
import org.isthmus.runtime.selfenergy.Contact;
import org.isthmus.runtime.solve.Needs;
import org.isthmus.runtime.solve.OperatingPoint;
import org.isthmus.runtime.solve.Solver;
import org.isthmus.runtime.solve.Solvers;
import org.isthmus.runtime.solve.TestDevices;

/**
 * Processor time per energy of disordered strips 200 sites long. A program, not a test: run {@code main} on the test class
 * path, with the widths as arguments (64, 128 and 256 without), on a machine that does nothing else.
 */
public final class StripBenchmark {
    private static final int LENGTH = 200;
    private static final int ENERGIES = 21;

    private StripBenchmark() {}

    /** Prints one line per width and kind. */
    public static void main(String[] arguments) {
        int[] widths = arguments.length == 0
                ? new int[] {64, 128, 256}
                : Arrays.stream(arguments).mapToInt(Integer::parseInt).toArray();
        for (int width : widths) {
            measure(width, 0, Needs.LEADS);
            measure(width, 0, new Needs(true, false));
            measure(width, 0.001, Needs.LEADS);
        }
    }

    private static void measure(int width, double flux, Needs needs) {
        double[] disorder = new Random(3).doubles(LENGTH * width, -1, 1).toArray();
        Device device = TestDevices.strip(LENGTH, width, site -> disorder[site], flux);
        ComplexBackend algebra = Backends.standard();
        SolvePlan plan = Planner.plan(device);
        List<Contact> contacts = Solvers.contacts(device, algebra);
        double[] whole = new double[ENERGIES];
        double[] leads = new double[ENERGIES];
        try (Solver solver = Solvers.open(OperatingPoint.unbiased(device), plan, contacts, algebra)) {
            for (int k = 0; k < ENERGIES; k++) {
                double energy = -1 + 0.01 * k;
                long start = processorTime();
                solver.solve(energy, needs);
                long middle = processorTime();
                contacts.forEach(contact -> contact.at(energy, 0));
                whole[k] = (middle - start) / 1e6;
                leads[k] = (processorTime() - middle) / 1e6;
            }
        }
        System.out.printf(
                Locale.ROOT,
                "%d x %d, %s, %s: %.1f ms per energy (least %.1f), of which leads %.1f; %.3g Gflop planned%n",
                LENGTH,
                width,
                flux == 0 ? "real" : "in a field",
                needs.sites() ? "with sites" : "leads only",
                median(whole),
                Arrays.stream(whole).min().orElse(0),
                median(leads),
                plan.flops() / 1e9);
    }

    private static long processorTime() {
        return ManagementFactory.getThreadMXBean().getCurrentThreadCpuTime();
    }

    private static double median(double[] values) {
        double[] sorted = values.clone();
        Arrays.sort(sorted);
        return sorted[sorted.length / 2];
    }
}
