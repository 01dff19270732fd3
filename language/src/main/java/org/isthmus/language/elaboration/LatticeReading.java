package org.isthmus.language.elaboration;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.eclipse.emf.ecore.EObject;
import org.isthmus.language.elaboration.geometry.LatticeFrame;
import org.isthmus.language.evaluation.EvaluationFailure;
import org.isthmus.language.evaluation.Evaluator;
import org.isthmus.language.evaluation.Value;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.HoppingDeclaration;
import org.isthmus.language.isthmus.LatticeDeclaration;
import org.isthmus.language.isthmus.LatticeMember;
import org.isthmus.language.isthmus.OverlapDeclaration;
import org.isthmus.language.isthmus.Setting;
import org.isthmus.language.isthmus.SiteDeclaration;
import org.isthmus.language.isthmus.VectorDeclaration;
import org.isthmus.runtime.device.Lattice;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.device.bands.LatticeBands;

/** Reads one lattice with the values that names have in an environment, and finds what is wrong with it. */
final class LatticeReading {
    private static final double DEGENERACY = 2;
    private static final double[] NOWHERE = new double[3];

    private final LatticeDeclaration declaration;
    private final Evaluator evaluator;
    private final Findings findings;
    private final List<Lattice.Vector> vectors = new ArrayList<>();
    private final Map<SiteDeclaration, Integer> basisIndex = new LinkedHashMap<>();
    private final SiteTable.Builder basisBuilder = new SiteTable.Builder(4);
    private SiteTable basis;
    private LatticeFrame frame;

    private LatticeReading(LatticeDeclaration declaration, Evaluator evaluator, Findings findings) {
        this.declaration = declaration;
        this.evaluator = evaluator;
        this.findings = findings;
    }

    /** The lattice, or null after errors. */
    static Lattice read(LatticeDeclaration declaration, Evaluator evaluator, Findings findings) {
        LatticeReading reading = new LatticeReading(declaration, evaluator, findings);
        try {
            return reading.read();
        } catch (EvaluationFailure failure) {
            findings.add(failure);
            return null;
        }
    }

    private Lattice read() {
        if (!readVectors() || !readBasis()) {
            return null;
        }
        Lattice bare = new Lattice(declaration.getName(), vectors, basis, List.of(), List.of(), DEGENERACY);
        frame = LatticeFrame.of(bare, NOWHERE);
        int errors = findings.errors();
        sitesApart();
        List<Lattice.Bond> bonds = new ArrayList<>();
        List<Lattice.Bond> overlaps = new ArrayList<>();
        Map<List<Integer>, EObject> seenBonds = new HashMap<>();
        Map<List<Integer>, EObject> seenOverlaps = new HashMap<>();
        EObject firstOverlap = null;
        for (LatticeMember member : declaration.getMembers()) {
            if (member instanceof HoppingDeclaration h) {
                bond(h, h.getSource(), h.getTarget(), h.getTranslation(), h.getValue(), "Hopping", seenBonds, bonds);
            } else if (member instanceof OverlapDeclaration o) {
                firstOverlap = firstOverlap == null ? o : firstOverlap;
                bond(
                        o,
                        o.getSource(),
                        o.getTarget(),
                        o.getTranslation(),
                        o.getValue(),
                        "Overlap",
                        seenOverlaps,
                        overlaps);
            }
        }
        double degeneracy = degeneracy();
        if (findings.errors() > errors) {
            return null;
        }
        Lattice lattice = new Lattice(declaration.getName(), vectors, basis, bonds, overlaps, degeneracy);
        return overlapPositive(lattice, firstOverlap) ? lattice : null;
    }

    // ---- vectors

    private boolean readVectors() {
        for (LatticeMember member : declaration.getMembers()) {
            if (!(member instanceof VectorDeclaration vector)) {
                continue;
            }
            double[] v = point(vector.getValue(), "Vector '" + vector.getName() + "'");
            if (v == null) {
                return false;
            }
            vectors.add(new Lattice.Vector(v[0], v[1], v[2]));
            if (vectors.size() > 3 || !LatticeFrame.independent(vectors)) {
                findings.add(IssueCode.DEPENDENT_VECTORS, vector, dependence(vector));
                return false;
            }
        }
        if (vectors.isEmpty()) {
            findings.add(
                    IssueCode.INCOMPLETE_LATTICE,
                    declaration,
                    "Lattice '" + declaration.getName()
                            + "' has no vector: it needs one to three, such as vector u = (a, 0 nm);");
            return false;
        }
        return true;
    }

    private String dependence(VectorDeclaration vector) {
        Lattice.Vector last = vectors.get(vectors.size() - 1);
        String what = "Vector '" + vector.getName() + "' of lattice '" + declaration.getName() + "'";
        if (vectors.size() > 3) {
            return what + " is one too many: a lattice has three vectors at most.";
        }
        if (last.length() == 0) {
            return what + " has no length.";
        }
        return what + " = (" + Told.nm(last.x()) + ", " + Told.nm(last.y()) + ", " + Told.nm(last.z())
                + ") is a combination of the others: it must point out of their "
                + (vectors.size() == 2 ? "line." : "plane.");
    }

    private double[] point(Expression expression, String what) {
        if (!(evaluator.evaluate(expression) instanceof Value.PointValue point)) {
            findings.add(IssueCode.KIND_MISMATCH, expression, what + " must be a point such as (1 nm, 0 nm).");
            return null;
        }
        double[] values = new double[3];
        for (int axis = 0; axis < 3; axis++) {
            values[axis] = point.component(axis);
            if (!Double.isFinite(values[axis])) {
                findings.add(
                        IssueCode.NOT_FINITE,
                        expression,
                        what + " has a component that is " + values[axis] + ", not a finite number.");
                return null;
            }
        }
        return values;
    }

    // ---- sites

    private boolean readBasis() {
        boolean fine = true;
        for (LatticeMember member : declaration.getMembers()) {
            if (!(member instanceof SiteDeclaration site)) {
                continue;
            }
            double[] at = point(site.getPosition(), "The position of site '" + site.getName() + "'");
            int orbitals = orbitals(site);
            double[] energy = orbitals < 1 ? null : energy(site, orbitals);
            if (at == null || energy == null) {
                fine = false;
                continue;
            }
            basisIndex.put(site, basisIndex.size());
            basisBuilder.add(at[0], at[1], at[2], basisIndex.get(site), orbitals, energy);
        }
        basis = basisBuilder.build();
        if (fine && basis.count() == 0) {
            findings.add(
                    IssueCode.INCOMPLETE_LATTICE,
                    declaration,
                    "Lattice '" + declaration.getName()
                            + "' has no site: it needs one, such as site s at (0 nm, 0 nm);");
            return false;
        }
        return fine;
    }

    private int orbitals(SiteDeclaration site) {
        Setting setting = setting(site.getSettings(), "orbitals");
        if (setting == null) {
            return 1;
        }
        double number = evaluator.real(setting.getValue());
        if (number < 1 || number > Blocks.MOST_ORBITALS || number != Math.rint(number)) {
            findings.add(
                    IssueCode.KIND_MISMATCH,
                    setting.getValue(),
                    "Site '" + site.getName() + "' has " + Told.number(number)
                            + " orbitals: it must be a whole number from 1 to " + Blocks.MOST_ORBITALS + ".");
            return 0;
        }
        return (int) number;
    }

    private double[] energy(SiteDeclaration site, int orbitals) {
        Setting setting = setting(site.getSettings(), "energy");
        if (setting == null) {
            return new double[2 * orbitals * orbitals];
        }
        return Blocks.hermitian(
                evaluator.evaluate(setting.getValue()),
                orbitals,
                setting.getValue(),
                "The energy of site '" + site.getName() + "'",
                findings);
    }

    static Setting setting(List<? extends EObject> settings, String name) {
        Setting found = null;
        for (EObject candidate : settings) {
            if (candidate instanceof Setting setting && name.equals(setting.getName())) {
                found = setting;
            }
        }
        return found;
    }

    private void sitesApart() {
        List<SiteDeclaration> sites = new ArrayList<>(basisIndex.keySet());
        for (int b = 1; b < sites.size(); b++) {
            for (int a = 0; a < b; a++) {
                double[] apart = {basis.x(b) - basis.x(a), basis.y(b) - basis.y(a), basis.z(b) - basis.z(a)};
                if (frame.cells(apart) != null) {
                    findings.add(
                            IssueCode.COINCIDING_SITES,
                            sites.get(b),
                            "Sites '" + sites.get(a).getName() + "' and '"
                                    + sites.get(b).getName() + "' of lattice '" + declaration.getName()
                                    + "' lie at one place"
                                    + (apart[0] == 0 && apart[1] == 0 && apart[2] == 0
                                            ? ", " + Told.place(basis.x(b), basis.y(b), basis.z(b))
                                            : " of different cells")
                                    + ": give one of them another position or more orbitals.");
                    return;
                }
            }
        }
    }

    // ---- bonds

    private void bond(
            EObject place,
            SiteDeclaration source,
            SiteDeclaration target,
            Expression over,
            Expression value,
            String kind,
            Map<List<Integer>, EObject> seen,
            List<Lattice.Bond> bonds) {
        Integer from = basisIndex.get(source);
        Integer to = basisIndex.get(target);
        if (from == null || to == null) {
            // an unknown name is told by the linker
            return;
        }
        String name = kind + " " + source.getName() + " -> " + target.getName();
        int[] cells = new int[3];
        if (over != null) {
            double[] translation = point(over, "The translation of " + name);
            if (translation == null) {
                return;
            }
            cells = frame.cells(translation);
            if (cells == null) {
                findings.add(
                        IssueCode.NOT_A_TRANSLATION,
                        over,
                        name + " goes over (" + Told.nm(translation[0]) + ", " + Told.nm(translation[1]) + ", "
                                + Told.nm(translation[2])
                                + "), which is no whole combination of the vectors of lattice '"
                                + declaration.getName() + "'.");
                return;
            }
        }
        if (from.equals(to) && cells[0] == 0 && cells[1] == 0 && cells[2] == 0) {
            findings.add(
                    IssueCode.BOND_TWICE,
                    place,
                    name + " joins a site to itself" + (kind.equals("Hopping") ? ": write it as its energy." : "."));
            return;
        }
        if (!fresh(place, name, from, to, cells, seen)) {
            return;
        }
        double[] block = Blocks.bond(evaluator, value, basis.orbitals(from), basis.orbitals(to), name, findings);
        if (block != null) {
            List<Double> numbers = new ArrayList<>(block.length);
            for (double number : block) {
                numbers.add(number);
            }
            bonds.add(new Lattice.Bond(from, to, List.of(cells[0], cells[1], cells[2]), numbers));
        }
    }

    private boolean fresh(EObject place, String name, int from, int to, int[] cells, Map<List<Integer>, EObject> seen) {
        if (seen.containsKey(List.of(from, to, cells[0], cells[1], cells[2]))) {
            findings.add(IssueCode.BOND_TWICE, place, name + over(cells) + " is given twice: remove one of the two.");
            return false;
        }
        if (seen.containsKey(List.of(to, from, -cells[0], -cells[1], -cells[2]))) {
            findings.add(
                    IssueCode.BOND_TWICE,
                    place,
                    name + over(cells)
                            + " is the partner of a bond given before, seen from its other end: it is implied, remove it.");
            return false;
        }
        seen.put(List.of(from, to, cells[0], cells[1], cells[2]), place);
        return true;
    }

    private String over(int[] cells) {
        List<String> names = declaration.getMembers().stream()
                .filter(VectorDeclaration.class::isInstance)
                .map(m -> ((VectorDeclaration) m).getName())
                .toList();
        StringBuilder text = new StringBuilder();
        for (int i = 0; i < names.size(); i++) {
            if (cells[i] != 0) {
                text.append(text.isEmpty() ? cells[i] < 0 ? "-" : "" : cells[i] < 0 ? " - " : " + ");
                text.append(Math.abs(cells[i]) == 1 ? "" : Math.abs(cells[i]) + "*")
                        .append(names.get(i));
            }
        }
        return text.isEmpty() ? "" : " over " + text;
    }

    // ---- the rest

    private double degeneracy() {
        Setting setting = setting(declaration.getMembers(), "degeneracy");
        if (setting == null) {
            return DEGENERACY;
        }
        double value = evaluator.real(setting.getValue());
        if (!(value > 0)) {
            findings.add(
                    IssueCode.OUT_OF_RANGE,
                    setting.getValue(),
                    "The degeneracy of lattice '" + declaration.getName() + "' is " + Told.number(value)
                            + ": it must be positive.");
        }
        return value;
    }

    /** Overlaps of a body are a part of the lattice's, whose least eigenvalue is no larger (Cauchy's interlacing). */
    private boolean overlapPositive(Lattice lattice, EObject place) {
        double smallest = new LatticeBands(lattice).smallestOverlap();
        if (smallest > 0) {
            return true;
        }
        findings.add(
                IssueCode.OVERLAP_NOT_POSITIVE,
                place,
                "The overlaps of lattice '" + declaration.getName() + "' give a state the norm " + Told.number(smallest)
                        + ", which must be positive: make them smaller.");
        return false;
    }
}
