package org.isthmus.runtime.plan;

import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.HoppingTable;

/** Which sites are bonded, by hopping or overlap: compressed neighbour lists. */
final class SiteGraph {
    private final int[] start;
    private final int[] neighbours;

    private SiteGraph(int[] start, int[] neighbours) {
        this.start = start;
        this.neighbours = neighbours;
    }

    static SiteGraph of(Device device) {
        int n = device.sites().count();
        int[] start = new int[n + 1];
        count(device.hoppings(), start);
        count(device.overlaps(), start);
        for (int i = 0; i < n; i++) {
            start[i + 1] += start[i];
        }
        int[] neighbours = new int[start[n]];
        int[] next = java.util.Arrays.copyOf(start, n);
        fill(device.hoppings(), next, neighbours);
        fill(device.overlaps(), next, neighbours);
        return new SiteGraph(start, neighbours);
    }

    private static void count(HoppingTable bonds, int[] start) {
        for (int b = 0; b < bonds.count(); b++) {
            start[bonds.from(b) + 1]++;
            start[bonds.to(b) + 1]++;
        }
    }

    private static void fill(HoppingTable bonds, int[] next, int[] neighbours) {
        for (int b = 0; b < bonds.count(); b++) {
            neighbours[next[bonds.from(b)]++] = bonds.to(b);
            neighbours[next[bonds.to(b)]++] = bonds.from(b);
        }
    }

    int count() {
        return start.length - 1;
    }

    int first(int site) {
        return start[site];
    }

    int end(int site) {
        return start[site + 1];
    }

    int neighbour(int at) {
        return neighbours[at];
    }
}
