package org.isthmus.runtime.plan;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.isthmus.runtime.device.SiteTable;

/**
 * Recursive bisection: a region is cut across its longest extent, the sites of one half that touch the other become the
 * separator, and both halves are done before it (George, SIAM J. Numer. Anal. 10, 345 (1973)). Works for any number of
 * leads and in any dimension.
 */
final class NestedDissection {
    private final SiteGraph graph;
    private final SiteTable sites;
    private final int leafOrbitals;
    private final byte[] half;
    private final Partition.Builder builder = new Partition.Builder();

    private NestedDissection(SiteGraph graph, SiteTable sites, int leafOrbitals) {
        this.graph = graph;
        this.sites = sites;
        this.leafOrbitals = leafOrbitals;
        half = new byte[sites.count()];
    }

    static Partition of(SiteGraph graph, SiteTable sites, boolean[] contact, int leafOrbitals) {
        NestedDissection dissection = new NestedDissection(graph, sites, leafOrbitals);
        int inner = 0;
        for (boolean touched : contact) {
            inner += touched ? 0 : 1;
        }
        int[] region = new int[inner];
        int[] root = new int[contact.length - inner];
        int r = 0;
        int c = 0;
        for (int site = 0; site < contact.length; site++) {
            if (contact[site]) {
                root[c++] = site;
            } else {
                region[r++] = site;
            }
        }
        List<Integer> top = region.length == 0 ? List.of() : dissection.dissect(region);
        dissection.builder.add(root, top);
        return dissection.builder.build();
    }

    /** Dissects a region; the groups that are left without a parent. */
    private List<Integer> dissect(int[] region) {
        if (orbitals(region) <= leafOrbitals || region.length < 3) {
            return List.of(builder.add(region, List.of()));
        }
        sortAlongLongest(region);
        int middle = region.length / 2;
        for (int i = 0; i < region.length; i++) {
            half[region[i]] = (byte) (i < middle ? 1 : 2);
        }
        int[] left = Arrays.copyOf(region, middle);
        int[] right = new int[region.length - middle];
        int[] separator = new int[region.length - middle];
        int rights = 0;
        int separators = 0;
        for (int i = middle; i < region.length; i++) {
            if (touches(region[i], (byte) 1)) {
                separator[separators++] = region[i];
            } else {
                right[rights++] = region[i];
            }
        }
        for (int site : region) {
            half[site] = 0;
        }
        List<Integer> children = new ArrayList<>(dissect(left));
        if (rights > 0) {
            children.addAll(dissect(Arrays.copyOf(right, rights)));
        }
        return separators == 0 ? children : List.of(builder.add(Arrays.copyOf(separator, separators), children));
    }

    private int orbitals(int[] region) {
        int orbitals = 0;
        for (int site : region) {
            orbitals += sites.orbitals(site);
        }
        return orbitals;
    }

    private boolean touches(int site, byte side) {
        for (int at = graph.first(site); at < graph.end(site); at++) {
            if (half[graph.neighbour(at)] == side) {
                return true;
            }
        }
        return false;
    }

    private double coordinate(int site, int axis) {
        return axis == 0 ? sites.x(site) : axis == 1 ? sites.y(site) : sites.z(site);
    }

    private void sortAlongLongest(int[] region) {
        int longest = 0;
        double extent = -1;
        for (int axis = 0; axis < 3; axis++) {
            double least = Double.POSITIVE_INFINITY;
            double greatest = Double.NEGATIVE_INFINITY;
            for (int site : region) {
                double c = coordinate(site, axis);
                least = Math.min(least, c);
                greatest = Math.max(greatest, c);
            }
            if (greatest - least > extent * (1 + 1e-9)) {
                extent = greatest - least;
                longest = axis;
            }
        }
        // sort by coordinate, then by number: long keys keep the order of rounded coordinates stable
        long[] keys = new long[region.length];
        double least = Double.POSITIVE_INFINITY;
        for (int site : region) {
            least = Math.min(least, coordinate(site, longest));
        }
        double unit = extent > 0 ? extent / (1 << 24) : 1;
        for (int i = 0; i < region.length; i++) {
            long place = Math.round((coordinate(region[i], longest) - least) / unit);
            keys[i] = (place << 32) | region[i];
        }
        Arrays.sort(keys);
        for (int i = 0; i < region.length; i++) {
            region[i] = (int) keys[i];
        }
    }
}
