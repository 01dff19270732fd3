package org.isthmus.language.typing;

import java.util.List;
import org.eclipse.emf.ecore.EObject;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.Argument;
import org.isthmus.language.isthmus.Constant;
import org.isthmus.language.isthmus.DeviceDeclaration;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.FileMember;
import org.isthmus.language.isthmus.HeaderParameter;
import org.isthmus.language.isthmus.HoppingDeclaration;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.LatticeDeclaration;
import org.isthmus.language.isthmus.LatticeMember;
import org.isthmus.language.isthmus.LatticeUse;
import org.isthmus.language.isthmus.ListLiteral;
import org.isthmus.language.isthmus.Material;
import org.isthmus.language.isthmus.MeasurementDeclaration;
import org.isthmus.language.isthmus.OverlapDeclaration;
import org.isthmus.language.isthmus.Quantity;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.language.isthmus.Setting;
import org.isthmus.language.isthmus.SiteDeclaration;
import org.isthmus.language.isthmus.SourceFile;
import org.isthmus.language.isthmus.TextLiteral;
import org.isthmus.language.isthmus.VectorDeclaration;
import org.isthmus.language.typing.Dependence.Place;
import org.isthmus.language.typing.Type.Matrix;
import org.isthmus.language.typing.Type.Point;
import org.isthmus.language.typing.Type.Scalar;
import org.isthmus.runtime.catalogue.Catalogue;
import org.isthmus.runtime.catalogue.MaterialQuantity;
import org.isthmus.runtime.catalogue.SettingEntry;
import org.isthmus.runtime.units.Dimension;

/** What every statement of a file needs of its expressions. */
public final class FileTyping {
    private final Inference inference = new Inference();

    private FileTyping() {}

    /** Everything that is wrong with the dimensions and sorts of a file's expressions. */
    public static List<TypeProblem> problems(SourceFile file) {
        FileTyping typing = new FileTyping();
        for (FileMember member : file.getDeclarations()) {
            typing.member(member);
        }
        return List.copyOf(typing.inference.problems());
    }

    Inference inference() {
        return inference;
    }

    private void member(FileMember member) {
        if (member instanceof Constant constant) {
            constant(constant);
        } else if (member instanceof Material material) {
            material.getQuantities().forEach(this::quantity);
        } else if (member instanceof LatticeDeclaration lattice) {
            lattice.getParameters().forEach(this::header);
            lattice.getMembers().forEach(this::latticeMember);
        } else if (member instanceof DeviceDeclaration device) {
            DeviceTyping typing = new DeviceTyping(this);
            device.getMembers().forEach(typing::member);
        } else if (member instanceof MeasurementDeclaration measurement) {
            MeasurementTyping typing = new MeasurementTyping(this);
            measurement.getStatements().forEach(typing::statement);
        }
    }

    void constant(Constant constant) {
        inference.typeOf(constant);
        place(constant.getValue(), Place.SITE);
    }

    private void header(HeaderParameter parameter) {
        Type type = inference.typeOf(parameter);
        place(parameter.getValue(), Place.NOWHERE);
        if (type != Type.UNKNOWN && !(type instanceof Scalar)) {
            inference.unfit(parameter.getValue(), type, "A lattice's parameter must be a quantity");
        }
    }

    private void quantity(Quantity quantity) {
        Type type = inference.typeOf(quantity);
        place(quantity.getValue(), Place.NOWHERE);
        MaterialQuantity known = Catalogue.materialQuantity(quantity.getName() == null ? "" : quantity.getName())
                .orElse(null);
        if (known != null) {
            real(quantity.getValue(), type, known.dimension(), "'" + quantity.getName() + "' of a material");
            if (type instanceof Scalar scalar && !scalar.dimension().equals(known.dimension())) {
                inference.forget(quantity);
            }
        }
    }

    // ---- lattice

    private void latticeMember(LatticeMember member) {
        if (member instanceof Constant constant) {
            inference.typeOf(constant);
            place(constant.getValue(), Place.NOWHERE);
        } else if (member instanceof VectorDeclaration vector) {
            point(vector.getValue(), "A lattice vector");
        } else if (member instanceof SiteDeclaration site) {
            point(site.getPosition(), "The position of a site");
            site.getSettings().forEach(setting -> setting(setting, SettingEntry.Block.SITE, Place.NOWHERE));
        } else if (member instanceof HoppingDeclaration hopping) {
            translation(hopping.getTranslation());
            bond(hopping.getValue(), Dimension.ENERGY, "A hopping");
        } else if (member instanceof OverlapDeclaration overlap) {
            translation(overlap.getTranslation());
            bond(overlap.getValue(), Dimension.NUMBER, "An overlap");
        } else if (member instanceof Setting setting) {
            setting(setting, SettingEntry.Block.LATTICE, Place.NOWHERE);
        }
    }

    /** A bond between sites of different numbers of orbitals is a matrix that is not square, written out by its rows. */
    private void bond(Expression value, Dimension wanted, String what) {
        boolean rows = value instanceof ListLiteral list
                && !list.getElements().isEmpty()
                && list.getElements().stream()
                        .allMatch(row -> row instanceof ListLiteral one
                                && one.getElements().size()
                                        != list.getElements().size());
        if (!rows) {
            scalarOrMatrix(value, wanted, what, Place.NOWHERE, true);
            return;
        }
        place(value, Place.NOWHERE);
        for (Expression row : ((ListLiteral) value).getElements()) {
            if (inference.typeOf(row) instanceof Type.ListOf list && list.element() instanceof Scalar element) {
                dimension(row, element.dimension(), wanted, what);
            }
        }
    }

    private void translation(Expression translation) {
        if (translation != null) {
            point(translation, "What stands behind 'over'");
        }
    }

    void use(LatticeUse use) {
        for (Argument argument : use.getArguments()) {
            Type type = inference.typeOf(argument.getValue());
            place(argument.getValue(), Place.NOWHERE);
            if (argument.getParameter() == null || argument.getParameter().eIsProxy()) {
                continue;
            }
            if (inference.typeOf(argument.getParameter()) instanceof Scalar wanted) {
                real(
                        argument.getValue(),
                        type,
                        wanted.dimension(),
                        "'" + argument.getParameter().getName() + "' of "
                                + use.getLattice().getName());
            }
        }
    }

    // ---- what an expression must be

    void point(Expression expression, String what) {
        Type type = inference.typeOf(expression);
        place(expression, Place.NOWHERE);
        if (type == Type.UNKNOWN) {
            return;
        }
        if (!(type instanceof Point point)) {
            inference.unfit(expression, type, what + " must be a point or a vector such as (1 nm, 0 nm)");
        } else {
            dimension(expression, point.dimension(), Dimension.LENGTH, what);
        }
    }

    /** A real quantity of the given dimension. */
    void real(Expression expression, Dimension wanted, String what, Place place) {
        Type type = inference.typeOf(expression);
        place(expression, place);
        real(expression, type, wanted, what);
    }

    private void real(Expression expression, Type type, Dimension wanted, String what) {
        if (type == Type.UNKNOWN) {
            return;
        }
        if (!(type instanceof Scalar scalar)) {
            inference.unfit(expression, type, what + " must be " + wanted.withArticle());
        } else if (dimension(expression, scalar.dimension(), wanted, what) && scalar.complex()) {
            inference.report(
                    expression, null, IssueCode.NOT_REAL, what + " must be real, but this is a complex number.");
        }
    }

    /** A quantity, or a matrix on the orbitals; complex only where allowed, or in a matrix. */
    void scalarOrMatrix(Expression expression, Dimension wanted, String what, Place place, boolean complexAllowed) {
        Type type = inference.typeOf(expression);
        place(expression, place);
        if (type == Type.UNKNOWN) {
            return;
        }
        if (type instanceof Matrix matrix) {
            dimension(expression, matrix.dimension(), wanted, what);
        } else if (type instanceof Scalar scalar) {
            if (dimension(expression, scalar.dimension(), wanted, what) && scalar.complex() && !complexAllowed) {
                inference.report(
                        expression,
                        null,
                        IssueCode.NOT_REAL,
                        what + " must be real or a Hermitian matrix, but this is a complex number.");
            }
        } else {
            inference.unfit(expression, type, what + " must be " + wanted.withArticle() + " or a matrix");
        }
    }

    private boolean dimension(Expression expression, Dimension found, Dimension wanted, String what) {
        if (found.equals(wanted)) {
            return true;
        }
        inference.report(
                expression,
                null,
                IssueCode.DIMENSION_MISMATCH,
                what + " must be " + wanted.withArticle() + ", but this is " + found.withArticle() + "; "
                        + Inference.fittingUnit(found, wanted));
        return false;
    }

    void truth(Expression expression, String what, Place place) {
        if (expression == null) {
            return;
        }
        Type type = inference.typeOf(expression);
        place(expression, place);
        if (type != Type.UNKNOWN && !(type instanceof Type.Truth)) {
            inference.unfit(expression, type, what + " must be a condition");
        }
    }

    /** Reports coordinates where there is no site to take them of. */
    void place(Expression expression, Place allowed) {
        Dependence.misplaced(expression, allowed)
                .ifPresent(reference -> inference.report(
                        reference,
                        IsthmusPackage.Literals.REFERENCE__TARGET,
                        IssueCode.MISPLACED,
                        "'" + reference.getTarget().getName() + "' has no meaning here: "
                                + (allowed == Place.NOWHERE
                                        ? "there is no site or bond to take it of."
                                        : allowed == Place.SITE
                                                ? "it belongs to a pair of sites, and here is one."
                                                : "here are two sites; write x1 or x2, for example.")));
    }

    void setting(Setting setting, SettingEntry.Block block, Place place) {
        SettingEntry entry = Catalogue.setting(block, setting.getName() == null ? "" : setting.getName())
                .orElse(null);
        if (entry == null) {
            inference.report(
                    setting,
                    IsthmusPackage.Literals.SETTING__NAME,
                    IssueCode.UNKNOWN_SETTING,
                    "'" + setting.getName() + "' is no property of this block"
                            + Suggestion.phrase(
                                    String.valueOf(setting.getName()),
                                    Catalogue.settings(block).stream().map(SettingEntry::name))
                            + "; it has "
                            + String.join(
                                    ", ",
                                    Catalogue.settings(block).stream()
                                            .map(SettingEntry::name)
                                            .toList()) + ".");
            inference.typeOf(setting.getValue());
            return;
        }
        value(setting, setting.getValue(), entry, place);
    }

    void value(EObject owner, Expression value, SettingEntry entry, Place place) {
        String what = "'" + entry.name() + "'";
        switch (entry.value()) {
            case QUANTITY, COUNT -> real(value, entry.dimension(), what, place);
            case QUANTITY_OR_MATRIX -> scalarOrMatrix(value, entry.dimension(), what, place, false);
            case CHOICE -> choice(value, entry);
            case TABLE -> table(value, what);
            default -> inference.typeOf(value);
        }
    }

    private void choice(Expression value, SettingEntry entry) {
        Type type = inference.typeOf(value);
        if (type != Type.UNKNOWN
                && !(type instanceof Type.Choice choice && choice.setting().equals(entry.name()))) {
            String words = String.join(
                    ", ",
                    Catalogue.expressionNames().stream()
                            .filter(e -> e instanceof org.isthmus.runtime.catalogue.ChoiceEntry c
                                    && c.setting().equals(entry.name()))
                            .map(org.isthmus.runtime.catalogue.Entry::name)
                            .toList());
            inference.unfit(value, type, "'" + entry.name() + "' must be one of " + words);
        }
    }

    /** A whole table, {@code table("file.csv")}: not a number, so it has no type of its own. */
    private void table(Expression value, String what) {
        boolean fits = value instanceof Reference reference
                && reference.isCall()
                && reference.getTarget() != null
                && "table".equals(reference.getTarget().getName())
                && reference.getArguments().size() == 1
                && reference.getArguments().get(0) instanceof TextLiteral;
        if (!fits) {
            inference.report(
                    value, null, IssueCode.KIND_MISMATCH, what + " must be a table, as in table(\"contact.csv\").");
        }
    }
}
