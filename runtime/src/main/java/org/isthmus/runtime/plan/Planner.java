package org.isthmus.runtime.plan;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.plan.SolveStep.CoupleContacts;
import org.isthmus.runtime.plan.SolveStep.Eliminate;

/** Decides how a device is solved. */
public final class Planner {
    /** Leaf sizes that are tried, in orbitals: small ones suit wires, large ones sheets. */
    private static final int[] LEAVES = {8, 24, 72, 144};

    /** Cost of a step beyond its arithmetic, in complex multiply-adds: calls, index work. */
    private static final double OVERHEAD = 4000;

    private Planner() {}

    /** The cheapest plan among slices, where the device has two leads, and nested dissections. */
    public static SolvePlan plan(Device device) {
        SiteGraph graph = SiteGraph.of(device);
        SolvePlan best = null;
        List<String> figures = new ArrayList<>();
        int chosen = 0;
        for (int leaf : LEAVES) {
            SolvePlan plan = nestedDissection(device, graph, leaf);
            chosen = best == null || cost(plan) < cost(best) ? figures.size() : chosen;
            best = chosen == figures.size() ? plan : best;
            figures.add(figures(plan));
        }
        if (device.leads().size() == 2) {
            SolvePlan plan = slices(device, graph);
            chosen = cost(plan) < cost(best) ? figures.size() : chosen;
            best = chosen == figures.size() ? plan : best;
            figures.add(figures(plan));
        }
        String own = figures.remove(chosen);
        return new SolvePlan(
                best.method(),
                "takes least time, a step counted as " + (int) OVERHEAD + " multiply-adds beside its own; " + own
                        + ", against " + String.join("; ", figures),
                best.steps(),
                best.orbitals());
    }

    private static double cost(SolvePlan plan) {
        return plan.flops() / 8 + OVERHEAD * plan.steps().size();
    }

    /** Slices: layers of the bond graph from the first lead on, a chain of fronts. */
    public static SolvePlan slices(Device device) {
        return slices(device, SiteGraph.of(device));
    }

    private static SolvePlan slices(Device device, SiteGraph graph) {
        int[] first = device.leads().isEmpty()
                ? new int[0]
                : device.leads().get(0).contactSites().stream().mapToInt(i -> i).toArray();
        return assemble(device, graph, Slices.of(graph, contact(device), first), "slices");
    }

    /**
     * Nested dissection.
     *
     * @param leaf orbitals of a region that is not divided further
     */
    public static SolvePlan nestedDissection(Device device, int leaf) {
        return nestedDissection(device, SiteGraph.of(device), leaf);
    }

    private static SolvePlan nestedDissection(Device device, SiteGraph graph, int leaf) {
        return assemble(
                device,
                graph,
                NestedDissection.of(graph, device.sites(), contact(device), leaf),
                "nested dissection, leaves of up to " + leaf + " orbitals");
    }

    /** Which sites some lead touches. */
    private static boolean[] contact(Device device) {
        boolean[] contact = new boolean[device.sites().count()];
        for (Lead lead : device.leads()) {
            lead.contactSites().forEach(site -> contact[site] = true);
        }
        return contact;
    }

    private static String figures(SolvePlan plan) {
        return String.format(
                Locale.ROOT,
                "%s: %d steps, %.3g Gflop, %.3g MiB",
                plan.method(),
                plan.steps().size(),
                plan.flops() / 1e9,
                plan.bytes() / 1048576.0);
    }

    private static SolvePlan assemble(Device device, SiteGraph graph, Partition partition, String method) {
        SiteTable sites = device.sites();
        int groups = partition.groups().size();
        int[] groupOf = new int[sites.count()];
        List<List<Integer>> children = new ArrayList<>();
        for (int g = 0; g < groups; g++) {
            children.add(new ArrayList<>());
            for (int site : partition.groups().get(g)) {
                groupOf[site] = g;
            }
        }
        for (int g = 0; g < groups - 1; g++) {
            int parent = partition.parents().get(g);
            children.get(parent < 0 ? groups - 1 : parent).add(g);
        }
        int[] stamp = new int[sites.count()];
        Arrays.fill(stamp, -1);
        int[][] borders = new int[groups][];
        int[] collected = new int[sites.count()];
        List<SolveStep> steps = new ArrayList<>(groups);
        for (int g = 0; g < groups - 1; g++) {
            int count = 0;
            for (int site : partition.groups().get(g)) {
                for (int at = graph.first(site); at < graph.end(site); at++) {
                    count = collect(graph.neighbour(at), g, groupOf, stamp, collected, count);
                }
            }
            for (int child : children.get(g)) {
                for (int site : borders[child]) {
                    count = collect(site, g, groupOf, stamp, collected, count);
                }
                borders[child] = null;
            }
            borders[g] = Arrays.copyOf(collected, count);
            Arrays.sort(borders[g]);
            steps.add(new Eliminate(
                    children.get(g), orbitals(sites, partition.groups().get(g)), orbitals(sites, borders[g])));
        }
        steps.add(new CoupleContacts(
                children.get(groups - 1), orbitals(sites, partition.groups().get(groups - 1))));
        return new SolvePlan(method, "", steps, sites.orbitalCount());
    }

    private static int collect(int site, int group, int[] groupOf, int[] stamp, int[] collected, int count) {
        if (groupOf[site] > group && stamp[site] != group) {
            stamp[site] = group;
            collected[count] = site;
            return count + 1;
        }
        return count;
    }

    private static int[] orbitals(SiteTable sites, int[] group) {
        int[] sorted = group.clone();
        Arrays.sort(sorted);
        int count = 0;
        for (int site : sorted) {
            count += sites.orbitals(site);
        }
        int[] orbitals = new int[count];
        int next = 0;
        for (int site : sorted) {
            for (int o = 0; o < sites.orbitals(site); o++) {
                orbitals[next++] = sites.firstOrbital(site) + o;
            }
        }
        return orbitals;
    }
}
