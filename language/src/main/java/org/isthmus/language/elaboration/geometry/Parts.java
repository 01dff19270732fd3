package org.isthmus.language.elaboration.geometry;

/** Which sites hang together, by bonds. */
public final class Parts {
    private final int[] parent;
    private final int[] size;

    /** Sites that do not know each other yet. */
    public Parts(int count) {
        parent = new int[count];
        size = new int[count];
        for (int i = 0; i < count; i++) {
            parent[i] = i;
            size[i] = 1;
        }
    }

    /** Joins two sites by a bond. */
    public void join(int a, int b) {
        int p = root(a);
        int q = root(b);
        if (p != q) {
            // the smaller index leads, so that the answer does not depend on the order of the bonds
            int lead = Math.min(p, q);
            int follow = Math.max(p, q);
            parent[follow] = lead;
            size[lead] += size[follow];
        }
    }

    private int root(int site) {
        int at = site;
        while (parent[at] != at) {
            parent[at] = parent[parent[at]];
            at = parent[at];
        }
        return at;
    }

    /** The first site of the part that a site belongs to. */
    public int first(int site) {
        return root(site);
    }

    /** Number of sites in a site's part. */
    public int size(int site) {
        return size[root(site)];
    }
}
