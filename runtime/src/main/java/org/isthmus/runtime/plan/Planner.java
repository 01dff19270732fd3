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
        boolean[] contact = new boolean[device.sites().count()];
        for (Lead lead : device.leads()) {
            lead.contactSites().forEach(site -> contact[site] = true);
        }
        SolvePlan best = null;
        List<String> rivals = new ArrayList<>();
        for (int leaf : LEAVES) {
            SolvePlan plan = assemble(
                    device,
                    graph,
                    NestedDissection.of(graph, device.sites(), contact, leaf),
                    "nested dissection, leaves of up to " + leaf + " orbitals");
            best = best == null || cost(plan) < cost(best) ? plan : best;
            rivals.add(rival(plan));
        }
        if (device.leads().size() == 2) {
            int[] first = device.leads().get(0).contactSites().stream()
                    .mapToInt(i -> i)
                    .toArray();
            SolvePlan plan = assemble(device, graph, Slices.of(graph, contact, first), "slices");
            best = cost(plan) < cost(best) ? plan : best;
            rivals.add(rival(plan));
        }
        return new SolvePlan(best.method(), "cheapest of " + String.join("; ", rivals), best.steps(), best.orbitals());
    }

    private static double cost(SolvePlan plan) {
        return plan.flops() / 8 + OVERHEAD * plan.steps().size();
    }

    private static String rival(SolvePlan plan) {
        return String.format(Locale.ROOT, "%s %.3g Gflop", plan.method(), plan.flops() / 1e9);
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
