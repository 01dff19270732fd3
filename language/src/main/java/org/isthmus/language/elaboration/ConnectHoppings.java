package org.isthmus.language.elaboration;

import java.util.ArrayList;
import java.util.List;
import org.isthmus.language.elaboration.geometry.BodySites;
import org.isthmus.language.elaboration.geometry.BondList;
import org.isthmus.language.elaboration.geometry.Gauge;
import org.isthmus.language.evaluation.Code.RealNode;
import org.isthmus.language.evaluation.Code.TruthNode;
import org.isthmus.language.evaluation.EvaluationFailure;
import org.isthmus.language.evaluation.Site;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.HoppingScale;
import org.isthmus.language.isthmus.MagneticField;
import org.isthmus.runtime.device.DeviceText;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.Lattice;

/**
 * Joins the body's sites by the lattice's bonds, scaled where the text says so and turned by the phases of the magnetic
 * field. Overlaps take the same phases and no scale. Random numbers of a scale belong to the bond: its number in the
 * table of hoppings, apart from the numbers of sites.
 */
final class ConnectHoppings implements Pass {
    /** Numbers of bonds begin here, where no site's number reaches. */
    private static final long FIRST_BOND_NUMBER = 1L << 40;

    @Override
    public void run(Draft draft) {
        MagneticField statement = draft.structure.field().orElse(null);
        List<Scale> scales = new ArrayList<>();
        try {
            if (statement != null) {
                draft.field = draft.evaluator.real(statement.getValue());
                draft.gauge = Gauge.of(draft.field);
            }
            for (HoppingScale scale : draft.structure.hoppingScales()) {
                scales.add(new Scale(
                        scale,
                        draft.evaluator.field(scale.getFactor()),
                        draft.evaluator.condition(scale.getCondition())));
            }
        } catch (EvaluationFailure failure) {
            draft.findings.add(failure);
            return;
        }
        draft.hoppings = table(draft, draft.frame.bonds(), draft.lattice.bonds(), scales);
        draft.overlaps = table(draft, BondList.of(draft.lattice.overlaps()), draft.lattice.overlaps(), List.of());
        scales.forEach(scale -> scale.tell(draft));
    }

    private static HoppingTable table(Draft draft, BondList bonds, List<Lattice.Bond> source, List<Scale> scales) {
        if (source.isEmpty()) {
            return HoppingTable.EMPTY;
        }
        BodySites body = draft.body;
        double[][] blocks = blocks(source);
        HoppingTable.Builder table = new HoppingTable.Builder(body.count() * bonds.count() / draft.frame.basisCount());
        Site middle = new Site();
        long[] number = {FIRST_BOND_NUMBER};
        double[][] scratch = new double[blocks.length][];
        for (int b = 0; b < blocks.length; b++) {
            scratch[b] = blocks[b].clone();
        }
        boolean plain = draft.gauge.none() && scales.isEmpty();
        body.eachBond(bonds, (bond, from, to) -> {
            if ((from & 0xfff) == 0) {
                Elaborator.stopIf(draft.cancelled);
            }
            double[] block = blocks[bond];
            if (!plain) {
                block = scratch[bond];
                System.arraycopy(blocks[bond], 0, block, 0, block.length);
                double factor = 1;
                if (!scales.isEmpty()) {
                    middle.at(
                            (body.x(from) + body.x(to)) / 2,
                            (body.y(from) + body.y(to)) / 2,
                            (body.z(from) + body.z(to)) / 2,
                            number[0]++);
                    for (Scale scale : scales) {
                        factor *= scale.at(middle, from, to);
                    }
                }
                Blocks.turn(block, factor, draft.gauge.phase(body.x(from), body.y(from), body.x(to), body.y(to)));
            }
            int rows = draft.lattice.basis().orbitals(source.get(bond).from());
            int columns = draft.lattice.basis().orbitals(source.get(bond).to());
            table.add(from, to, rows, columns, block);
        });
        return table.build();
    }

    /** The blocks of bonds as arrays. */
    static double[][] blocks(List<Lattice.Bond> bonds) {
        return bonds.stream()
                .map(bond -> bond.block().stream().mapToDouble(v -> v).toArray())
                .toArray(double[][]::new);
    }

    /** One {@code hopping … scaled}, and the first bond where it is not a finite number. */
    private static final class Scale {
        private final HoppingScale declaration;
        private final RealNode factor;
        private final TruthNode condition;
        private double trouble;
        private int from = -1;
        private int to;
        private int count;

        private Scale(HoppingScale declaration, RealNode factor, TruthNode condition) {
            this.declaration = declaration;
            this.factor = factor;
            this.condition = condition;
        }

        double at(Site middle, int fromSite, int toSite) {
            if (!condition.at(middle)) {
                return 1;
            }
            double value = factor.at(middle);
            if (!Double.isFinite(value)) {
                if (from < 0) {
                    trouble = value;
                    from = fromSite;
                    to = toSite;
                }
                count++;
                return 1;
            }
            return value;
        }

        void tell(Draft draft) {
            if (from < 0) {
                return;
            }
            BodySites body = draft.body;
            draft.findings.add(
                    IssueCode.NOT_FINITE,
                    declaration.getFactor(),
                    "The factor of hopping '" + declaration.getName() + "' is " + Told.number(trouble)
                            + ", not a finite number, in the middle of a bond at "
                            + Told.place(
                                    (body.x(from) + body.x(to)) / 2,
                                    (body.y(from) + body.y(to)) / 2,
                                    (body.z(from) + body.z(to)) / 2)
                            + Told.others(count, "bond") + ".");
        }
    }

    @Override
    public String text(Draft draft) {
        String overlaps = draft.overlaps.count() == 0
                ? ""
                : "overlaps\n" + DeviceText.bonds(draft.overlaps, draft.sites, draft.sites);
        return DeviceText.bonds(draft.hoppings, draft.sites, draft.sites) + overlaps;
    }
}
