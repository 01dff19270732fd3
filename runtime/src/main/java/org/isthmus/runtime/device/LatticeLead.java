package org.isthmus.runtime.device;

import java.util.List;

/**
 * A lead in which the lattice goes on periodically, to infinity, outward from a side of the body.
 *
 * <p>Cells are counted outward from 1. H is periodic in the cell number, also in a magnetic field (the gauge is chosen
 * so), and holds the lead's own potential but none of the body's.
 *
 * @param period length of the outward lattice vector from cell n to cell n + 1, nm
 * @param cell sites of cell 1 at their true positions, with on-site blocks
 * @param within bonds inside a cell; both ends count sites of {@code cell}
 * @param outward bonds from a site of cell n to a site of cell n + 1; none reaches further
 * @param contact bonds from a site of the body to a site of cell 1; none reaches deeper
 * @param overlapWithin overlaps for the same pairs as {@code within}; empty in an orthogonal basis, like the next two
 */
public record LatticeLead(
        String name,
        double temperature,
        double mu,
        boolean floating,
        Side side,
        double period,
        SiteTable cell,
        HoppingTable within,
        HoppingTable outward,
        HoppingTable contact,
        HoppingTable overlapWithin,
        HoppingTable overlapOutward,
        HoppingTable overlapContact,
        List<Integer> contactSites,
        SourceRef source)
        implements Lead {
    public LatticeLead {
        contactSites = List.copyOf(contactSites);
    }

    @Override
    public LatticeLead with(double newTemperature, double newMu) {
        return new LatticeLead(
                name,
                newTemperature,
                newMu,
                floating,
                side,
                period,
                cell,
                within,
                outward,
                contact,
                overlapWithin,
                overlapOutward,
                overlapContact,
                contactSites,
                source);
    }
}
