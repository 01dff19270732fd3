package org.isthmus.language.elaboration;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.eclipse.emf.ecore.EObject;
import org.isthmus.language.elaboration.geometry.BodySites;
import org.isthmus.language.evaluation.Code.RealNode;
import org.isthmus.language.evaluation.Code.TruthNode;
import org.isthmus.language.evaluation.Site;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.findings.Places;
import org.isthmus.language.isthmus.LeadDeclaration;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.language.isthmus.Setting;
import org.isthmus.language.isthmus.TextLiteral;
import org.isthmus.language.tables.Table;
import org.isthmus.language.tables.TableFailure;
import org.isthmus.language.tables.TableFiles;
import org.isthmus.language.typing.TextLiterals;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.TabulatedLead;
import org.isthmus.runtime.device.WideBandLead;
import org.isthmus.runtime.units.Dimension;

/** A lead {@code on} chosen sites: a wide-band contact, or a self-energy from a table. */
final class SiteLead {
    private static final List<String> COLUMNS = List.of("energy", "real", "imag");

    private final Draft draft;
    private final LeadDeclaration lead;
    private final BodySites body;

    SiteLead(Draft draft, LeadDeclaration lead) {
        this.draft = draft;
        this.lead = lead;
        body = draft.body;
    }

    /** The lead, or null after a finding. */
    Lead attach(double temperature, double mu, boolean floating) {
        Setting potential = LatticeReading.setting(lead.getSettings(), "potential");
        if (potential != null) {
            draft.findings.add(
                    IssueCode.LEAD_WITHOUT_BANDS,
                    potential,
                    "Lead '" + lead.getName()
                            + "' lies on sites and has no bands that a potential could shift: remove it, or take a lead from a side.");
            return null;
        }
        if (AttachLeads.misplaced(
                draft, lead, List.of("across"), "its sites are chosen by the condition behind 'on'")) {
            return null;
        }
        Setting broadening = LatticeReading.setting(lead.getSettings(), "broadening");
        Setting table = LatticeReading.setting(lead.getSettings(), "selfenergy");
        if (broadening != null && table != null) {
            AttachLeads.misplaced(draft, lead, List.of("selfenergy"), "it has a broadening already");
            return null;
        }
        if (broadening == null && table == null) {
            AttachLeads.tell(
                    draft,
                    lead,
                    IssueCode.INCOMPLETE_LEAD,
                    "Lead '" + lead.getName()
                            + "' says nothing of its strength: give it broadening = ENERGY; or selfenergy = table(\"file.csv\");");
            return null;
        }
        List<Integer> sites = sites();
        if (sites.isEmpty()) {
            AttachLeads.tell(
                    draft,
                    lead,
                    IssueCode.LEAD_WITHOUT_SITE,
                    "Lead '" + lead.getName() + "' touches no site: no site of the body meets its condition ("
                            + SideLead.extent(body) + ").");
            return null;
        }
        return broadening != null
                ? wideBand(temperature, mu, floating, sites, broadening)
                : tabulated(temperature, mu, floating, sites, table);
    }

    private List<Integer> sites() {
        TruthNode condition = draft.evaluator.condition(lead.getCondition());
        Site site = new Site();
        List<Integer> sites = new ArrayList<>();
        for (int i = 0; i < body.count(); i++) {
            if (condition.at(site.at(body.x(i), body.y(i), body.z(i), i))) {
                sites.add(i);
            }
        }
        return sites;
    }

    private Lead wideBand(double temperature, double mu, boolean floating, List<Integer> sites, Setting setting) {
        RealNode field = draft.evaluator.field(setting.getValue());
        Site site = new Site();
        List<Double> widths = new ArrayList<>();
        for (int i : sites) {
            double width = field.at(site.at(body.x(i), body.y(i), body.z(i), i));
            String place = Told.place(body.x(i), body.y(i), body.z(i));
            if (!Double.isFinite(width)) {
                draft.findings.add(
                        IssueCode.NOT_FINITE,
                        setting.getValue(),
                        "The broadening of lead '" + lead.getName() + "' is " + Told.number(width)
                                + ", not a finite energy, at " + place + ".");
                return null;
            }
            if (width < 0) {
                draft.findings.add(
                        IssueCode.NEGATIVE_BROADENING,
                        setting.getValue(),
                        "The broadening of lead '" + lead.getName() + "' is " + Told.eV(width) + " at " + place
                                + ": it must not be negative.");
                return null;
            }
            widths.add(width);
        }
        return new WideBandLead(lead.getName(), temperature, mu, floating, sites, widths, Places.of(lead));
    }

    private Lead tabulated(double temperature, double mu, boolean floating, List<Integer> sites, Setting setting) {
        if (!(setting.getValue() instanceof Reference call)
                || call.getArguments().size() != 1
                || !(call.getArguments().get(0) instanceof TextLiteral path)) {
            draft.findings.add(
                    IssueCode.KIND_MISMATCH,
                    setting.getValue(),
                    "'selfenergy' must be a table, as in table(\"contact.csv\").");
            return null;
        }
        String written = TextLiterals.text(path);
        try {
            Table table = TableFiles.read(lead.eResource(), written);
            if (!fits(table, path)) {
                return null;
            }
            TableFiles.ascending(table);
            double[] imaginary = table.columns().get(2).values();
            for (int row = 0; row < table.rows(); row++) {
                if (imaginary[row] > 0) {
                    draft.findings.add(
                            IssueCode.NEGATIVE_BROADENING,
                            path,
                            "Table " + written + " has a self-energy with the imaginary part "
                                    + Told.eV(imaginary[row]) + " at "
                                    + Told.eV(table.columns().get(0).values()[row])
                                    + ": it must not be positive.");
                    return null;
                }
            }
            return new TabulatedLead(
                    lead.getName(),
                    temperature,
                    mu,
                    floating,
                    sites,
                    list(table, 0),
                    list(table, 1),
                    list(table, 2),
                    written,
                    Places.of(lead));
        } catch (TableFailure failure) {
            draft.findings.add(failure.code(), path, failure.getMessage());
            return null;
        }
    }

    private boolean fits(Table table, EObject path) {
        boolean fits = table.columns().stream().map(Table.Column::name).toList().equals(COLUMNS)
                && table.columns().stream().allMatch(c -> c.dimension().equals(Dimension.ENERGY));
        if (!fits) {
            draft.findings.add(
                    IssueCode.TABLE_PROBLEM,
                    path,
                    "Table " + table.path()
                            + ", line 1, column 1: the header of a self-energy reads energy (eV),real (eV),imag (eV).");
        }
        return fits;
    }

    private static List<Double> list(Table table, int column) {
        return Arrays.stream(table.columns().get(column).values(), 0, table.rows())
                .boxed()
                .toList();
    }
}
