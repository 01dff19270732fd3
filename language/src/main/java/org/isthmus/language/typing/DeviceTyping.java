package org.isthmus.language.typing;

import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.Across;
import org.isthmus.language.isthmus.Body;
import org.isthmus.language.isthmus.Calibration;
import org.isthmus.language.isthmus.Constant;
import org.isthmus.language.isthmus.DephasingDeclaration;
import org.isthmus.language.isthmus.DephasingSetting;
import org.isthmus.language.isthmus.DeviceMember;
import org.isthmus.language.isthmus.Electrostatics;
import org.isthmus.language.isthmus.ElectrostaticsMember;
import org.isthmus.language.isthmus.HoppingScale;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.Kind;
import org.isthmus.language.isthmus.KindFactor;
import org.isthmus.language.isthmus.LatticeUse;
import org.isthmus.language.isthmus.LeadDeclaration;
import org.isthmus.language.isthmus.LeadSetting;
import org.isthmus.language.isthmus.MagneticField;
import org.isthmus.language.isthmus.NamedMember;
import org.isthmus.language.isthmus.Origin;
import org.isthmus.language.isthmus.Parameter;
import org.isthmus.language.isthmus.ParameterOverride;
import org.isthmus.language.isthmus.PotentialDeclaration;
import org.isthmus.language.isthmus.Region;
import org.isthmus.language.isthmus.Replacement;
import org.isthmus.language.isthmus.Setting;
import org.isthmus.language.isthmus.Within;
import org.isthmus.language.typing.Dependence.Place;
import org.isthmus.language.typing.Type.Range;
import org.isthmus.language.typing.Type.Scalar;
import org.isthmus.runtime.catalogue.Catalogue;
import org.isthmus.runtime.catalogue.DephasingKind;
import org.isthmus.runtime.catalogue.SettingEntry;
import org.isthmus.runtime.units.Dimension;

/** What the members of a device need of their expressions. */
final class DeviceTyping {
    private final FileTyping file;
    private final Inference inference;

    DeviceTyping(FileTyping file) {
        this.file = file;
        inference = file.inference();
    }

    void member(DeviceMember member) {
        if (member instanceof Parameter parameter) {
            parameter(parameter);
        } else if (member instanceof Constant constant) {
            file.constant(constant);
        } else if (member instanceof ParameterOverride override) {
            override(override);
        } else if (member instanceof LatticeUse use) {
            file.use(use);
        } else if (member instanceof Body body) {
            body(body);
        } else if (member instanceof Origin origin) {
            file.point(origin.getPosition(), "The origin");
        } else if (member instanceof MagneticField field) {
            file.real(field.getValue(), Dimension.FIELD, "The magnetic field", Place.NOWHERE);
        } else if (member instanceof Replacement replacement) {
            named(replacement.getMember());
        } else if (member instanceof Electrostatics electrostatics) {
            electrostatics.getMembers().forEach(this::electrostatics);
        } else if (member instanceof NamedMember named) {
            named(named);
        }
    }

    private void parameter(Parameter parameter) {
        Type type = inference.typeOf(parameter);
        file.place(parameter.getValue(), Place.NOWHERE);
        if (type != Type.UNKNOWN && (!(type instanceof Scalar scalar) || scalar.complex())) {
            inference.unfit(parameter.getValue(), type, "A parameter must be a real quantity");
            return;
        }
        Dimension kind = kind(parameter.getKind());
        if (kind != null && type instanceof Scalar scalar && !scalar.dimension().equals(kind)) {
            inference.report(
                    parameter.getValue(),
                    null,
                    IssueCode.DIMENSION_MISMATCH,
                    "Parameter '" + parameter.getName() + "' is declared as " + kind.withArticle()
                            + ", but its value is " + scalar.dimension().withArticle() + "; "
                            + Inference.fittingUnit(scalar.dimension(), kind));
            inference.forget(parameter);
            return;
        }
        if (parameter.getRange() == null) {
            return;
        }
        Type range = inference.typeOf(parameter.getRange());
        file.place(parameter.getRange(), Place.NOWHERE);
        if (range == Type.UNKNOWN || !(type instanceof Scalar scalar)) {
            return;
        }
        if (!(range instanceof Range bounds)) {
            inference.unfit(
                    parameter.getRange(), range, "What stands behind 'in' must be a range such as 0 eV .. 1 eV");
        } else if (!bounds.dimension().equals(scalar.dimension())) {
            inference.report(
                    parameter.getRange(),
                    null,
                    IssueCode.DIMENSION_MISMATCH,
                    "Parameter '" + parameter.getName() + "' is "
                            + scalar.dimension().withArticle() + ", but its range is of "
                            + bounds.dimension().describe() + "; "
                            + Inference.fittingUnit(bounds.dimension(), scalar.dimension()));
        }
    }

    /** The dimension that a kind names; null for none, or after a report. */
    private Dimension kind(Kind kind) {
        if (kind == null) {
            return null;
        }
        Dimension dimension = Dimension.NUMBER;
        for (int i = 0; i < kind.getFactors().size(); i++) {
            KindFactor factor = kind.getFactors().get(i);
            Dimension named = Dimension.names().get(factor.getName());
            if (named == null) {
                inference.report(
                        factor,
                        IsthmusPackage.Literals.KIND_FACTOR__NAME,
                        IssueCode.UNKNOWN_NAME,
                        "'" + factor.getName() + "' is no kind of quantity"
                                + Suggestion.phrase(factor.getName(), Dimension.names().keySet().stream()) + ".");
                return null;
            }
            double power = factor.getPower() == null ? 1 : Double.parseDouble(factor.getPower());
            boolean below = i > 0 && kind.getOperators().get(i - 1).equals("/");
            try {
                dimension = dimension.times(named.power(below ? -power : power));
            } catch (ArithmeticException e) {
                inference.report(factor, null, IssueCode.UNKNOWN_NAME, "This power makes no kind of quantity.");
                return null;
            }
        }
        return dimension;
    }

    private void override(ParameterOverride override) {
        Type type = inference.typeOf(override.getValue());
        file.place(override.getValue(), Place.NOWHERE);
        if (override.getParameter() == null
                || override.getParameter().eIsProxy()
                || type == Type.UNKNOWN
                || !(inference.typeOf(override.getParameter()) instanceof Scalar wanted)) {
            return;
        }
        file.real(
                override.getValue(),
                wanted.dimension(),
                "Parameter '" + override.getParameter().getName() + "'",
                Place.NOWHERE);
    }

    private void body(Body body) {
        Type type = inference.typeOf(body.getShape());
        file.place(body.getShape(), Place.NOWHERE);
        if (type != Type.UNKNOWN && !(type instanceof Type.Shape)) {
            inference.unfit(body.getShape(), type, "A body must be a shape such as box(0 nm .. 10 nm)");
        }
        file.truth(body.getCondition(), "What stands behind 'where'", Place.SITE);
    }

    private void named(NamedMember member) {
        if (member instanceof PotentialDeclaration potential) {
            file.scalarOrMatrix(potential.getValue(), Dimension.ENERGY, "A potential", Place.SITE, false);
            file.truth(potential.getCondition(), "What stands behind 'where'", Place.SITE);
        } else if (member instanceof HoppingScale scale) {
            file.real(scale.getFactor(), Dimension.NUMBER, "The factor of a hopping", Place.SITE);
            file.truth(scale.getCondition(), "What stands behind 'where'", Place.SITE);
        } else if (member instanceof LeadDeclaration lead) {
            file.truth(lead.getCondition(), "What stands behind 'on'", Place.SITE);
            lead.getSettings().forEach(this::lead);
        } else if (member instanceof DephasingDeclaration dephasing) {
            dephasing(dephasing);
        }
    }

    private void lead(LeadSetting setting) {
        if (setting instanceof Across across) {
            file.truth(across.getCondition(), "What stands behind 'across'", Place.SITE);
        } else if (setting instanceof Setting plain) {
            file.setting(
                    plain, SettingEntry.Block.LEAD, "broadening".equals(plain.getName()) ? Place.SITE : Place.NOWHERE);
        }
    }

    private void dephasing(DephasingDeclaration dephasing) {
        DephasingKind kind =
                Catalogue.dephasingKind(String.valueOf(dephasing.getKind())).orElse(null);
        if (kind == null) {
            inference.report(
                    dephasing,
                    IsthmusPackage.Literals.DEPHASING_DECLARATION__KIND,
                    IssueCode.UNKNOWN_NAME,
                    "'" + dephasing.getKind() + "' is no kind of dephasing"
                            + Suggestion.phrase(
                                    String.valueOf(dephasing.getKind()),
                                    Catalogue.dephasingKinds().stream().map(DephasingKind::name))
                            + "; there are "
                            + String.join(
                                    ", ",
                                    Catalogue.dephasingKinds().stream()
                                            .map(DephasingKind::name)
                                            .toList()) + ".");
        } else if (kind.takesArgument() != (dephasing.getArgument() != null)) {
            inference.report(
                    dephasing,
                    IsthmusPackage.Literals.DEPHASING_DECLARATION__KIND,
                    IssueCode.WRONG_ARGUMENTS,
                    "'" + kind.name() + "' takes " + (kind.takesArgument() ? "an argument" : "no argument")
                            + " in parentheses.");
        } else if (kind.name().equals("correlated")) {
            file.real(dephasing.getArgument(), Dimension.NUMBER, "The correlation", Place.PAIR);
        } else if (kind.takesArgument() && !(inference.typeOf(dephasing.getArgument()) instanceof Type.Text)) {
            inference.report(
                    dephasing.getArgument(),
                    null,
                    IssueCode.KIND_MISMATCH,
                    "'" + kind.name() + "' takes a file name in quotes.");
        }
        dephasing.getSettings().forEach(this::dephasing);
    }

    private void dephasing(DephasingSetting setting) {
        if (setting instanceof Within within) {
            file.truth(within.getCondition(), "What stands behind 'within'", Place.SITE);
        } else if (setting instanceof Calibration calibration) {
            Dimension wanted =
                    switch (String.valueOf(calibration.getProperty())) {
                        case "mobility" -> Dimension.MOBILITY;
                        case "phaseTime", "momentumTime" -> Dimension.TIME;
                        case "meanFreePath" -> Dimension.LENGTH;
                        default -> null;
                    };
            if (wanted == null) {
                inference.report(
                        calibration,
                        IsthmusPackage.Literals.CALIBRATION__PROPERTY,
                        IssueCode.UNKNOWN_SETTING,
                        "'" + calibration.getProperty()
                                + "' is nothing to calibrate; there are mobility, momentumTime, phaseTime, meanFreePath.");
            } else {
                file.real(calibration.getValue(), wanted, "'" + calibration.getProperty() + "'", Place.NOWHERE);
            }
            file.real(calibration.getEnergy(), Dimension.ENERGY, "What stands behind 'at'", Place.NOWHERE);
        } else if (setting instanceof Setting plain) {
            file.setting(plain, SettingEntry.Block.DEPHASING, Place.NOWHERE);
        }
    }

    private void electrostatics(ElectrostaticsMember member) {
        Type type = inference.typeOf(member.getShape());
        file.place(member.getShape(), Place.NOWHERE);
        if (type != Type.UNKNOWN && !(type instanceof Type.Shape)) {
            inference.unfit(member.getShape(), type, "A region or gate must be a shape such as box(0 nm .. 10 nm)");
        }
        SettingEntry.Block block = member instanceof Region ? SettingEntry.Block.REGION : SettingEntry.Block.GATE;
        member.getSettings().forEach(setting -> file.setting(setting, block, Place.NOWHERE));
    }
}
