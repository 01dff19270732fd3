package org.isthmus.runtime.plan;

import java.util.ArrayList;
import java.util.List;

/**
 * A tree of site groups in the order of their elimination: children before parents. The last group is the root, which
 * holds what is never eliminated: the sites that leads touch.
 *
 * @param groups sites of each group
 * @param parents index of each group's parent; −1 for the root
 */
record Partition(List<int[]> groups, List<Integer> parents) {
    /** Collects groups. */
    static final class Builder {
        private final List<int[]> groups = new ArrayList<>();
        private final List<Integer> parents = new ArrayList<>();

        /** Adds a group whose children are there already. */
        int add(int[] sites, List<Integer> children) {
            groups.add(sites);
            parents.add(-1);
            for (int child : children) {
                parents.set(child, groups.size() - 1);
            }
            return groups.size() - 1;
        }

        Partition build() {
            return new Partition(groups, parents);
        }
    }
}
