package org.isthmus.runtime.plan;

import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.TreeMap;
import org.isthmus.runtime.plan.SolveStep.CoupleContacts;
import org.isthmus.runtime.plan.SolveStep.Eliminate;

/**
 * The order of elimination of a device, with its cost per energy.
 *
 * @param method {@code nested dissection} or {@code slices}
 * @param reason why this one, with the figures compared
 * @param steps children before parents; the last couples the contacts
 * @param orbitals dimension of the Hamiltonian
 */
public record SolvePlan(String method, String reason, List<SolveStep> steps, int orbitals) {
    public SolvePlan {
        steps = List.copyOf(steps);
    }

    public CoupleContacts root() {
        return (CoupleContacts) steps.get(steps.size() - 1);
    }

    /** Real floating-point operations per energy for transmissions; a complex multiply-add counts as 8. */
    public double flops() {
        return 8 * steps.stream().mapToDouble(SolveStep::work).sum();
    }

    /** Bytes of the front at work, twice, and of those that wait with their Schur complements, at the most, per energy. */
    public long bytes() {
        long waiting = 0;
        long most = 0;
        for (SolveStep step : steps) {
            long front = square(step instanceof Eliminate e ? e.front() : root().orbitals().length);
            most = Math.max(most, waiting + 2 * front);
            for (int child : step.children()) {
                waiting -= square(((Eliminate) steps.get(child)).front());
            }
            waiting += front;
        }
        return 16 * most;
    }

    private static long square(long n) {
        return n * n;
    }

    /** Bytes per energy where values per site are asked for: the factors of every step are kept. */
    public long bytesForSites() {
        long kept = 0;
        for (SolveStep step : steps) {
            if (step instanceof Eliminate e) {
                kept += (long) e.eliminated().length * (e.eliminated().length + 2L * e.border().length);
            }
        }
        return 16 * kept + bytes();
    }

    /** Largest dense front. */
    public int largestFront() {
        return steps.stream()
                .mapToInt(s -> s instanceof Eliminate e ? e.front() : ((CoupleContacts) s).orbitals().length)
                .max()
                .orElse(0);
    }

    /** As text, like a database explains a query: one line per size class of fronts, largest first. */
    @Override
    public String toString() {
        StringBuilder text = new StringBuilder();
        text.append(String.format(
                Locale.ROOT,
                "plan: %s, %d orbitals, %d steps, %.3g Gflop and %.3g MiB per energy%n",
                method,
                orbitals,
                steps.size(),
                flops() / 1e9,
                bytes() / 1048576.0));
        text.append("  because: ").append(reason).append(System.lineSeparator());
        text.append(String.format(Locale.ROOT, "  couple %d contact orbitals%n", root().orbitals().length));
        Map<Integer, int[]> classes = new TreeMap<>(java.util.Comparator.reverseOrder());
        Map<Integer, Double> work = new TreeMap<>();
        for (SolveStep step : steps) {
            if (step instanceof Eliminate e) {
                int size = Integer.highestOneBit(Math.max(1, e.front()));
                classes.computeIfAbsent(size, k -> new int[1])[0]++;
                work.merge(size, 8 * e.work(), Double::sum);
            }
        }
        classes.forEach((size, count) -> text.append(String.format(
                Locale.ROOT,
                "  eliminate %d fronts of %d to %d orbitals, %.3g Gflop%n",
                count[0],
                size,
                2 * size - 1,
                work.get(size) / 1e9)));
        return text.toString().replace(System.lineSeparator(), "\n");
    }
}
