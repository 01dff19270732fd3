package org.isthmus.runtime.selfenergy;

import org.isthmus.runtime.kernel.ComplexMatrix;

/**
 * A periodic half-infinite lead as matrices, all of the size of a cell.
 *
 * @param h00 ⟨n|H|n⟩, eV
 * @param h01 ⟨n|H|n + 1⟩ with cells counted outward, eV
 * @param s00 ⟨n|S|n⟩; null in an orthogonal basis
 * @param s01 ⟨n|S|n + 1⟩; null in an orthogonal basis
 */
public record LeadBlocks(ComplexMatrix h00, ComplexMatrix h01, ComplexMatrix s00, ComplexMatrix s01) {
    public int size() {
        return h00.rows();
    }

    /** z·S − H inside a cell. */
    ComplexMatrix diagonal(double zr, double zi) {
        ComplexMatrix m = h00.copy();
        m.scale(-1, 0);
        if (s00 == null) {
            for (int i = 0; i < size(); i++) {
                m.add(i, i, zr, zi);
            }
        } else {
            ComplexMatrix s = s00.copy();
            s.scale(zr, zi);
            m.addScaled(s, 1);
        }
        return m;
    }

    /** H − z·S from a cell to the next. */
    ComplexMatrix outward(double zr, double zi) {
        return minus(h01, s01, zr, zi);
    }

    /** H − z·S from a cell to the one before. */
    ComplexMatrix inward(double zr, double zi) {
        return minus(h01.adjoint(), s01 == null ? null : s01.adjoint(), zr, zi);
    }

    private static ComplexMatrix minus(ComplexMatrix h, ComplexMatrix s, double zr, double zi) {
        ComplexMatrix t = h.copy();
        if (s != null) {
            ComplexMatrix scaled = s.copy();
            scaled.scale(zr, zi);
            t.addScaled(scaled, -1);
        }
        return t;
    }
}
