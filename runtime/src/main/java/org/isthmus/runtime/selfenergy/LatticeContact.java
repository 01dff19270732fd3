package org.isthmus.runtime.selfenergy;

import java.util.List;
import java.util.TreeSet;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.LatticeLead;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.ComplexMatrix;

/** Σ = τ g τ† with τ = E·S − H from the body to the first cell of the lead, and g the end of the lead. */
final class LatticeContact implements Contact {
    private final int[] orbitals;
    private final ComplexMatrix hopping;
    private final ComplexMatrix overlap;
    private final SurfaceMethod method;
    private final ComplexBackend backend;
    private final LeadBands bands;
    private List<Double> openings;

    LatticeContact(LatticeLead lead, SiteTable body, ComplexBackend backend) {
        this.backend = backend;
        SiteTable cell = lead.cell();
        LeadBlocks blocks = blocks(lead);
        TreeSet<Integer> bodySide = new TreeSet<>();
        TreeSet<Integer> leadSide = new TreeSet<>();
        collect(lead.contact(), body, cell, bodySide, leadSide);
        collect(lead.overlapContact(), body, cell, bodySide, leadSide);
        orbitals = bodySide.stream().mapToInt(i -> i).toArray();
        int[] touched = leadSide.stream().mapToInt(i -> i).toArray();
        hopping = contact(lead.contact(), body, cell, orbitals, touched);
        overlap = blocks.s00() == null ? null : contact(lead.overlapContact(), body, cell, orbitals, touched);
        SurfaceMethod separable = TransverseModes.of(blocks, touched, backend)
                .map(SurfaceMethod.class::cast)
                .orElse(null);
        method = separable != null ? separable : new BlochModes(blocks, touched, backend);
        bands = new LeadBands(blocks, backend);
    }

    private static void collect(
            HoppingTable bonds, SiteTable body, SiteTable cell, TreeSet<Integer> bodySide, TreeSet<Integer> leadSide) {
        for (int b = 0; b < bonds.count(); b++) {
            for (int o = 0; o < body.orbitals(bonds.from(b)); o++) {
                bodySide.add(body.firstOrbital(bonds.from(b)) + o);
            }
            for (int o = 0; o < cell.orbitals(bonds.to(b)); o++) {
                leadSide.add(cell.firstOrbital(bonds.to(b)) + o);
            }
        }
    }

    private static ComplexMatrix contact(
            HoppingTable bonds, SiteTable body, SiteTable cell, int[] rows, int[] columns) {
        ComplexMatrix matrix = ComplexMatrix.zeros(rows.length, columns.length);
        for (int b = 0; b < bonds.count(); b++) {
            int row = java.util.Arrays.binarySearch(rows, body.firstOrbital(bonds.from(b)));
            int column = java.util.Arrays.binarySearch(columns, cell.firstOrbital(bonds.to(b)));
            for (int i = 0; i < body.orbitals(bonds.from(b)); i++) {
                for (int j = 0; j < cell.orbitals(bonds.to(b)); j++) {
                    matrix.add(row + i, column + j, bonds.real(b, i, j), bonds.imaginary(b, i, j));
                }
            }
        }
        return matrix;
    }

    /** The lead's cells as matrices. */
    static LeadBlocks blocks(LatticeLead lead) {
        SiteTable cell = lead.cell();
        ComplexMatrix h00 = within(cell, lead.within());
        for (int site = 0; site < cell.count(); site++) {
            int first = cell.firstOrbital(site);
            for (int i = 0; i < cell.orbitals(site); i++) {
                for (int j = 0; j < cell.orbitals(site); j++) {
                    h00.add(first + i, first + j, cell.onSiteReal(site, i, j), cell.onSiteImaginary(site, i, j));
                }
            }
        }
        boolean orthogonal = lead.overlapWithin().count() == 0
                && lead.overlapOutward().count() == 0
                && lead.overlapContact().count() == 0;
        ComplexMatrix s00 = null;
        ComplexMatrix s01 = null;
        if (!orthogonal) {
            s00 = within(cell, lead.overlapWithin());
            s00.addScaled(ComplexMatrix.identity(cell.orbitalCount()), 1);
            s01 = outward(cell, lead.overlapOutward());
        }
        return new LeadBlocks(h00, outward(cell, lead.outward()), s00, s01);
    }

    private static ComplexMatrix within(SiteTable cell, HoppingTable bonds) {
        ComplexMatrix half = outward(cell, bonds);
        ComplexMatrix whole = half.adjoint();
        whole.addScaled(half, 1);
        return whole;
    }

    private static ComplexMatrix outward(SiteTable cell, HoppingTable bonds) {
        ComplexMatrix matrix = ComplexMatrix.zeros(cell.orbitalCount(), cell.orbitalCount());
        for (int b = 0; b < bonds.count(); b++) {
            int row = cell.firstOrbital(bonds.from(b));
            int column = cell.firstOrbital(bonds.to(b));
            for (int i = 0; i < cell.orbitals(bonds.from(b)); i++) {
                for (int j = 0; j < cell.orbitals(bonds.to(b)); j++) {
                    matrix.add(row + i, column + j, bonds.real(b, i, j), bonds.imaginary(b, i, j));
                }
            }
        }
        return matrix;
    }

    @Override
    public int[] orbitals() {
        return orbitals.clone();
    }

    @Override
    public SelfEnergy at(double real, double imaginary) {
        Surface surface = method.solve(real, imaginary);
        ComplexMatrix out = coupling(hopping, overlap, real, imaginary);
        ComplexMatrix back =
                overlap == null ? out.adjoint() : coupling(hopping.adjoint(), overlap.adjoint(), real, imaginary);
        return new SelfEnergy(
                backend.multiply(backend.multiply(out, surface.green()), back),
                surface.openModes(),
                surface.residual(),
                surface.beside());
    }

    private static ComplexMatrix coupling(ComplexMatrix h, ComplexMatrix s, double real, double imaginary) {
        ComplexMatrix tau = h.copy();
        tau.scale(-1, 0);
        if (s != null) {
            ComplexMatrix scaled = s.copy();
            scaled.scale(real, imaginary);
            tau.addScaled(scaled, 1);
        }
        return tau;
    }

    /** Found when first asked for: transmissions at given energies do without. */
    @Override
    public synchronized List<Double> modeOpenings() {
        if (openings == null) {
            openings = bands.extrema();
        }
        return openings;
    }

    @Override
    public double[] bandBounds() {
        return bands.bounds();
    }

    @Override
    public String describe() {
        return method.describe();
    }
}
