package org.isthmus.language.elaboration.geometry;

import java.util.List;
import java.util.stream.IntStream;
import org.isthmus.runtime.device.Lattice;

/** A lattice's bonds by whole numbers: from a basis site of the zero cell to a basis site of the cell n1, n2, n3. */
public final class BondList {
    private final int[] from;
    private final int[] to;
    private final int[][] cell;

    BondList(List<Lattice.Bond> bonds) {
        int count = bonds.size();
        from = new int[count];
        to = new int[count];
        cell = new int[3][count];
        for (int b = 0; b < count; b++) {
            Lattice.Bond bond = bonds.get(b);
            from[b] = bond.from();
            to[b] = bond.to();
            for (int i = 0; i < bond.cell().size(); i++) {
                cell[i][b] = bond.cell().get(i);
            }
        }
    }

    /** The bonds of a lattice, in its order. */
    public static BondList of(List<Lattice.Bond> bonds) {
        return new BondList(bonds);
    }

    public int count() {
        return from.length;
    }

    public int from(int bond) {
        return from[bond];
    }

    public int to(int bond) {
        return to[bond];
    }

    public int n1(int bond) {
        return cell[0][bond];
    }

    public int n2(int bond) {
        return cell[1][bond];
    }

    public int n3(int bond) {
        return cell[2][bond];
    }

    /** For every basis site the bonds that it is the first end of. */
    int[][] leaving(int basisCount) {
        return byEnd(from, basisCount);
    }

    /** For every basis site the bonds that it is the second end of. */
    int[][] arriving(int basisCount) {
        return byEnd(to, basisCount);
    }

    private static int[][] byEnd(int[] end, int basisCount) {
        int[][] lists = new int[basisCount][];
        for (int site = 0; site < basisCount; site++) {
            int wanted = site;
            lists[site] = IntStream.range(0, end.length)
                    .filter(bond -> end[bond] == wanted)
                    .toArray();
        }
        return lists;
    }
}
