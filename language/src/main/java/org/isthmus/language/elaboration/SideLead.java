package org.isthmus.language.elaboration;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeSet;
import org.isthmus.language.elaboration.geometry.BodySites;
import org.isthmus.language.elaboration.geometry.BondList;
import org.isthmus.language.elaboration.geometry.Gauge;
import org.isthmus.language.elaboration.geometry.LatticeFrame;
import org.isthmus.language.elaboration.geometry.LeadCells;
import org.isthmus.language.evaluation.Code.TruthNode;
import org.isthmus.language.evaluation.Site;
import org.isthmus.language.evaluation.Value;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.findings.Places;
import org.isthmus.language.isthmus.Across;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.LeadDeclaration;
import org.isthmus.language.isthmus.Setting;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.Lattice;
import org.isthmus.runtime.device.LatticeLead;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.Side;
import org.isthmus.runtime.device.SiteTable;

/**
 * A lead {@code from} a side. Two leads share a site where both continue the same site of an edge and bond to it; sites
 * beside an edge that only bond to a lead's first cell are touched, not continued.
 */
final class SideLead {
    private final Draft draft;
    private final LeadDeclaration lead;
    private final Map<Integer, String> owners;

    SideLead(Draft draft, LeadDeclaration lead, Map<Integer, String> owners) {
        this.draft = draft;
        this.lead = lead;
        this.owners = owners;
    }

    /** The lead, or null after a finding. */
    Lead attach(double temperature, double mu, boolean floating) {
        Side side = Arrays.stream(Side.values())
                .filter(s -> s.word().equals(lead.getSide()))
                .findFirst()
                .orElse(null);
        if (side == null) {
            draft.findings.add(
                    IssueCode.UNKNOWN_SIDE,
                    lead,
                    IsthmusPackage.Literals.LEAD_DECLARATION__SIDE,
                    "'" + lead.getSide() + "' is no side: there are left, right, bottom, top, back, front.");
            return null;
        }
        if (AttachLeads.misplaced(
                draft,
                lead,
                List.of("broadening", "selfenergy"),
                "the lattice goes on in it; write 'on CONDITION' for a contact without bands")) {
            return null;
        }
        LatticeFrame frame = draft.frame;
        BondList overlaps = BondList.of(draft.lattice.overlaps());
        Optional<int[]> period = LeadCells.period(frame, side, frame.bonds(), overlaps);
        if (period.isEmpty()) {
            draft.findings.add(
                    IssueCode.EDGE_NOT_PERIODIC,
                    lead,
                    IsthmusPackage.Literals.LEAD_DECLARATION__SIDE,
                    "The edge does not repeat along lead '" + lead.getName() + "': no vector of lattice '"
                            + draft.lattice.name() + "' lies along " + axis(side)
                            + "; turn the lattice so that one does, or take another side.");
            return null;
        }
        TruthNode across = across();
        Site site = new Site();
        BodySites body = draft.body;
        LeadCells cells =
                LeadCells.of(body, side, period.get(), i -> across.at(site.at(body.x(i), body.y(i), body.z(i), i)));
        if (cells.count() == 0) {
            AttachLeads.tell(draft, lead, IssueCode.LEAD_WITHOUT_SITE, noSite(side));
            return null;
        }
        return lead(cells, overlaps, temperature, mu, floating);
    }

    private TruthNode across() {
        return draft.evaluator.condition(lead.getSettings().stream()
                .filter(Across.class::isInstance)
                .map(s -> ((Across) s).getCondition())
                .findFirst()
                .orElse(null));
    }

    private static String axis(Side side) {
        return "xyz".substring(side.axis(), side.axis() + 1);
    }

    private String noSite(Side side) {
        return "Lead '" + lead.getName() + "' touches no site: the body ends at " + axis(side) + " = "
                + Told.nm(LeadCells.outermost(draft.body, side)) + " (" + extent(draft.body, side.axis())
                + "), and 'across' takes none of the sites there.";
    }

    /** {@code x from 0 nm to 25 nm, y from …}, of all axes along which a body extends. */
    static String extent(BodySites body) {
        return extent(body, -1);
    }

    private static String extent(BodySites body, int without) {
        StringBuilder text = new StringBuilder();
        for (int axis = 0; axis < 3; axis++) {
            if (axis == without) {
                continue;
            }
            double low = Double.POSITIVE_INFINITY;
            double high = Double.NEGATIVE_INFINITY;
            for (int site = 0; site < body.count(); site++) {
                low = Math.min(low, body.coordinate(site, axis));
                high = Math.max(high, body.coordinate(site, axis));
            }
            if (axis < 2 || high > low || low != 0) {
                String from = Told.nm(low);
                String to = Told.nm(high);
                text.append(text.isEmpty() ? "" : ", ")
                        .append("xyz".charAt(axis))
                        .append(from.equals(to) ? " = " + to : " from " + from.replace(" nm", "") + " to " + to);
            }
        }
        return text.toString();
    }

    // ---- tables

    private Lead lead(LeadCells cells, BondList overlaps, double temperature, double mu, boolean floating) {
        SiteTable table = cellTable(cells);
        if (table == null) {
            return null;
        }
        BondList bonds = draft.frame.bonds();
        List<Lattice.Bond> h = draft.lattice.bonds();
        List<Lattice.Bond> s = draft.lattice.overlaps();
        HoppingTable outward = outward(cells, bonds, h);
        HoppingTable contact = contact(cells, bonds, h);
        if (outward.count() == 0 || contact.count() == 0) {
            AttachLeads.tell(
                    draft,
                    lead,
                    IssueCode.EDGE_NOT_PERIODIC,
                    "The edge does not go on along lead '" + lead.getName() + "': its "
                            + Told.count(cells.count(), "site") + ", moved outward by the period "
                            + Told.nm(cells.periodLength())
                            + ", have no bond to the next cell; make the body at least that long along "
                            + axis(cells.side()) + ".");
            return null;
        }
        TreeSet<Integer> touched = new TreeSet<>();
        for (int bond = 0; bond < contact.count(); bond++) {
            touched.add(contact.from(bond));
        }
        if (shared(cells, touched)) {
            return null;
        }
        return new LatticeLead(
                lead.getName(),
                temperature,
                mu,
                floating,
                cells.side(),
                cells.periodLength(),
                table,
                within(cells, bonds, h),
                outward,
                contact,
                s.isEmpty() ? HoppingTable.EMPTY : within(cells, overlaps, s),
                s.isEmpty() ? HoppingTable.EMPTY : outward(cells, overlaps, s),
                s.isEmpty() ? HoppingTable.EMPTY : contact(cells, overlaps, s),
                List.copyOf(touched),
                Places.of(lead));
    }

    private boolean shared(LeadCells cells, TreeSet<Integer> touched) {
        int first = -1;
        int count = 0;
        for (int i = 0; i < cells.count(); i++) {
            int site = cells.edge(i);
            if (touched.contains(site) && owners.containsKey(site)) {
                first = first < 0 ? site : first;
                count++;
            }
        }
        if (first >= 0) {
            BodySites body = draft.body;
            AttachLeads.tell(
                    draft,
                    lead,
                    IssueCode.LEADS_SHARE_SITE,
                    "Leads '" + owners.get(first) + "' and '" + lead.getName() + "' share the site at "
                            + Told.place(body.x(first), body.y(first), body.z(first)) + Told.others(count, "site")
                            + ": give each its part of the edge by 'across'.");
            return true;
        }
        for (int i = 0; i < cells.count(); i++) {
            if (touched.contains(cells.edge(i))) {
                owners.put(cells.edge(i), lead.getName());
            }
        }
        return false;
    }

    private SiteTable cellTable(LeadCells cells) {
        SiteTable basis = draft.lattice.basis();
        Setting setting = LatticeReading.setting(lead.getSettings(), "potential");
        Value potential = setting == null ? null : draft.evaluator.evaluate(setting.getValue());
        double[][] own = new double[basis.count()][];
        SiteTable.Builder table = new SiteTable.Builder(cells.count());
        for (int i = 0; i < cells.count(); i++) {
            int b = draft.body.basis(cells.edge(i));
            if (own[b] == null) {
                own[b] = AddPotentials.onSite(basis, b);
                if (potential != null) {
                    double[] shift = Blocks.hermitian(
                            potential,
                            basis.orbitals(b),
                            setting.getValue(),
                            "The potential of lead '" + lead.getName() + "'",
                            draft.findings);
                    if (shift == null) {
                        return null;
                    }
                    for (int k = 0; k < shift.length; k++) {
                        own[b][k] += shift[k];
                    }
                }
            }
            table.add(
                    cells.coordinate(i, 1, 0),
                    cells.coordinate(i, 1, 1),
                    cells.coordinate(i, 1, 2),
                    b,
                    basis.orbitals(b),
                    own[b]);
        }
        return table.build();
    }

    private HoppingTable within(LeadCells cells, BondList bonds, List<Lattice.Bond> source) {
        Collector collector = new Collector(source);
        cells.eachWithin(bonds, fromFirstCell(cells, collector, 1));
        return collector.table();
    }

    private HoppingTable outward(LeadCells cells, BondList bonds, List<Lattice.Bond> source) {
        Collector collector = new Collector(source);
        cells.eachOutward(bonds, fromFirstCell(cells, collector, 2));
        return collector.table();
    }

    /** Collects bonds from cell 1 to the given cell, each with the phase of the field. */
    private LeadCells.BondTaker fromFirstCell(LeadCells cells, Collector collector, int toCell) {
        Gauge gauge = draft.gauge;
        return (bond, from, to, reversed) -> collector.take(
                bond,
                from,
                to,
                reversed,
                gauge.phase(
                        cells.side(),
                        cells.coordinate(from, 1, 0),
                        cells.coordinate(from, 1, 1),
                        cells.coordinate(to, toCell, 0),
                        cells.coordinate(to, toCell, 1)));
    }

    private HoppingTable contact(LeadCells cells, BondList bonds, List<Lattice.Bond> source) {
        Collector collector = new Collector(source);
        Gauge gauge = draft.gauge;
        BodySites body = draft.body;
        cells.eachContact(bonds, (bond, from, to, reversed) -> {
            double x = cells.coordinate(to, 1, 0);
            double y = cells.coordinate(to, 1, 1);
            double phase = gauge.phase(body.x(from), body.y(from), x, y) + gauge.turned(cells.side(), x, y);
            collector.take(bond, from, to, reversed, phase);
        });
        return collector.table();
    }

    private record Entry(int from, int to, int rows, int columns, double[] block) {}

    /** Bonds of a lead, sorted by their ends. */
    private final class Collector {
        private final List<Lattice.Bond> source;
        private final double[][] blocks;
        private final List<Entry> entries = new ArrayList<>();

        Collector(List<Lattice.Bond> source) {
            this.source = source;
            blocks = ConnectHoppings.blocks(source);
        }

        void take(int bond, int from, int to, boolean reversed, double phase) {
            int first = draft.lattice.basis().orbitals(source.get(bond).from());
            int second = draft.lattice.basis().orbitals(source.get(bond).to());
            double[] block = reversed ? Blocks.adjoint(blocks[bond], first, second) : blocks[bond].clone();
            Blocks.turn(block, 1, phase);
            entries.add(new Entry(from, to, reversed ? second : first, reversed ? first : second, block));
        }

        HoppingTable table() {
            entries.sort(Comparator.comparingInt(Entry::from).thenComparingInt(Entry::to));
            HoppingTable.Builder table = new HoppingTable.Builder(entries.size());
            entries.forEach(e -> table.add(e.from(), e.to(), e.rows(), e.columns(), e.block()));
            return table.build();
        }
    }
}
