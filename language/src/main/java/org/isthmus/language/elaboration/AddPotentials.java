package org.isthmus.language.elaboration;

import java.util.ArrayList;
import java.util.List;
import org.isthmus.language.elaboration.geometry.BodySites;
import org.isthmus.language.evaluation.Code;
import org.isthmus.language.evaluation.Code.MatrixNode;
import org.isthmus.language.evaluation.Code.RealNode;
import org.isthmus.language.evaluation.Code.TruthNode;
import org.isthmus.language.evaluation.EvaluationFailure;
import org.isthmus.language.evaluation.Site;
import org.isthmus.language.evaluation.SquareMatrix;
import org.isthmus.language.evaluation.Value;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.PotentialDeclaration;
import org.isthmus.runtime.device.DeviceText;
import org.isthmus.runtime.device.SiteTable;

/** Sums the on-site terms: the lattice's own and every potential, in the order of the text. */
final class AddPotentials implements Pass {
    @Override
    public void run(Draft draft) {
        int errors = draft.findings.errors();
        List<Term> terms = new ArrayList<>();
        for (PotentialDeclaration potential : draft.structure.potentials()) {
            try {
                terms.add(Term.of(draft, potential));
            } catch (EvaluationFailure failure) {
                draft.findings.add(failure);
            }
        }
        if (draft.findings.errors() > errors) {
            return;
        }
        BodySites body = draft.body;
        SiteTable basis = draft.lattice.basis();
        SiteTable.Builder table = new SiteTable.Builder(body.count());
        double[][] own = new double[basis.count()][];
        for (int b = 0; b < own.length; b++) {
            own[b] = onSite(basis, b);
        }
        Site site = new Site();
        for (int i = 0; i < body.count(); i++) {
            if ((i & 0xfff) == 0) {
                Elaborator.stopIf(draft.cancelled);
            }
            int b = body.basis(i);
            int orbitals = basis.orbitals(b);
            double[] block = own[b];
            site.at(body.x(i), body.y(i), body.z(i), i);
            for (Term term : terms) {
                if (block == own[b]) {
                    block = own[b].clone();
                }
                term.add(site, i, orbitals, block);
            }
            table.add(body.x(i), body.y(i), body.z(i), b, orbitals, block);
        }
        terms.forEach(term -> term.tell(draft));
        draft.sites = table.build();
    }

    /** The on-site block of a site. */
    static double[] onSite(SiteTable table, int site) {
        int orbitals = table.orbitals(site);
        double[] block = new double[2 * orbitals * orbitals];
        for (int r = 0; r < orbitals; r++) {
            for (int c = 0; c < orbitals; c++) {
                block[2 * (r * orbitals + c)] = table.onSiteReal(site, r, c);
                block[2 * (r * orbitals + c) + 1] = table.onSiteImaginary(site, r, c);
            }
        }
        return block;
    }

    /** One potential, and what goes wrong with it: the first site and how many. */
    private static final class Term {
        private final PotentialDeclaration declaration;
        private final TruthNode condition;
        private final RealNode scalar;
        private final MatrixNode matrix;
        private final boolean fixed;
        private Trouble trouble;

        private Term(
                PotentialDeclaration declaration,
                TruthNode condition,
                RealNode scalar,
                MatrixNode matrix,
                boolean fixed) {
            this.declaration = declaration;
            this.condition = condition;
            this.scalar = scalar;
            this.matrix = matrix;
            this.fixed = fixed;
        }

        static Term of(Draft draft, PotentialDeclaration declaration) {
            Expression expression = declaration.getValue();
            Code code = draft.evaluator.compile(expression);
            TruthNode condition = draft.evaluator.condition(declaration.getCondition());
            if (code instanceof Code.MatrixCode matrix) {
                return new Term(declaration, condition, null, matrix.node(), false);
            }
            if (code instanceof Code.Fixed fixed && fixed.value() instanceof Value.MatrixValue value) {
                SquareMatrix constant = value.matrix();
                return new Term(declaration, condition, null, site -> constant, true);
            }
            return new Term(declaration, condition, draft.evaluator.field(expression), null, false);
        }

        void add(Site site, int index, int orbitals, double[] block) {
            if (!condition.at(site)) {
                return;
            }
            if (scalar != null) {
                double value = scalar.at(site);
                if (!Double.isFinite(value)) {
                    note(IssueCode.NOT_FINITE, index, "is " + Told.number(value) + ", not a finite energy,");
                    return;
                }
                for (int o = 0; o < orbitals; o++) {
                    block[2 * (o * orbitals + o)] += value;
                }
                return;
            }
            SquareMatrix value = matrix.at(site);
            if (value.size() != orbitals) {
                note(
                        IssueCode.MATRIX_SIZE,
                        index,
                        "is a matrix of size " + value.size() + ", but there "
                                + (orbitals == 1 ? "is 1 orbital" : "are " + orbitals + " orbitals"));
                return;
            }
            double[] parts = value.interleaved();
            for (int k = 0; k < parts.length; k++) {
                if (!Double.isFinite(parts[k])) {
                    note(IssueCode.NOT_FINITE, index, "has an element that is not a finite energy");
                    return;
                }
                block[k] += parts[k];
            }
            if ((!fixed || trouble == null) && !Blocks.isHermitian(value)) {
                note(IssueCode.NOT_HERMITIAN, index, "is a matrix that is not Hermitian");
            }
        }

        private void note(IssueCode code, int site, String what) {
            if (trouble == null) {
                trouble = new Trouble(code, site, what);
            }
            if (trouble.code == code) {
                trouble.count++;
            }
        }

        void tell(Draft draft) {
            if (trouble != null) {
                draft.findings.add(
                        trouble.code,
                        declaration.getValue(),
                        "Potential '" + declaration.getName() + "' " + trouble.what + " at "
                                + Told.place(
                                        draft.body.x(trouble.site),
                                        draft.body.y(trouble.site),
                                        draft.body.z(trouble.site))
                                + Told.others(trouble.count, "site") + ".");
            }
        }
    }

    private static final class Trouble {
        private final IssueCode code;
        private final int site;
        private final String what;
        private int count;

        private Trouble(IssueCode code, int site, String what) {
            this.code = code;
            this.site = site;
            this.what = what;
        }
    }

    @Override
    public String text(Draft draft) {
        return DeviceText.sites(draft.sites);
    }
}
