package org.isthmus.runtime.plan;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * Layers of equal distance, in bonds, from the first lead: a block-tridiagonal matrix, eliminated from the first layer on.
 * Sites that no path reaches from a lead form layers of their own, first.
 */
final class Slices {
    private Slices() {}

    static Partition of(SiteGraph graph, boolean[] contact, int[] firstLead) {
        int n = graph.count();
        int[] layer = new int[n];
        Arrays.fill(layer, -1);
        int[] queue = new int[n];
        int head = 0;
        int tail = 0;
        for (int site : firstLead) {
            layer[site] = 0;
            queue[tail++] = site;
        }
        int seed = 0;
        while (true) {
            while (head < tail) {
                int site = queue[head++];
                for (int at = graph.first(site); at < graph.end(site); at++) {
                    int next = graph.neighbour(at);
                    if (layer[next] < 0) {
                        layer[next] = layer[site] + 1;
                        queue[tail++] = next;
                    }
                }
            }
            while (seed < n && layer[seed] >= 0) {
                seed++;
            }
            if (seed == n) {
                break;
            }
            layer[seed] = 0;
            queue[tail++] = seed;
        }
        int layers = Arrays.stream(layer).max().orElse(0) + 1;
        int[] size = new int[layers];
        int roots = 0;
        for (int site = 0; site < n; site++) {
            if (contact[site]) {
                roots++;
            } else {
                size[layer[site]]++;
            }
        }
        int[][] groups = new int[layers][];
        for (int k = 0; k < layers; k++) {
            groups[k] = new int[size[k]];
        }
        int[] root = new int[roots];
        int[] filled = new int[layers];
        int r = 0;
        for (int site = 0; site < n; site++) {
            if (contact[site]) {
                root[r++] = site;
            } else {
                groups[layer[site]][filled[layer[site]]++] = site;
            }
        }
        Partition.Builder builder = new Partition.Builder();
        List<Integer> last = new ArrayList<>();
        for (int[] group : groups) {
            if (group.length > 0) {
                last = List.of(builder.add(group, last));
            }
        }
        builder.add(root, last);
        return builder.build();
    }
}
