package org.isthmus.language.typing;

import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.AxisCoordinate;
import org.isthmus.language.isthmus.BiasAxis;
import org.isthmus.language.isthmus.CatalogueEntry;
import org.isthmus.language.isthmus.Declaration;
import org.isthmus.language.isthmus.Expectation;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.LeadDeclaration;
import org.isthmus.language.isthmus.MeasurementSetting;
import org.isthmus.language.isthmus.MeasurementStatement;
import org.isthmus.language.isthmus.Parameter;
import org.isthmus.language.isthmus.Points;
import org.isthmus.language.isthmus.Recording;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.language.isthmus.SweepAxis;
import org.isthmus.language.typing.Dependence.Place;
import org.isthmus.language.typing.Type.ListOf;
import org.isthmus.language.typing.Type.Range;
import org.isthmus.language.typing.Type.Scalar;
import org.isthmus.runtime.catalogue.Catalogue;
import org.isthmus.runtime.catalogue.ObservableEntry;
import org.isthmus.runtime.catalogue.SettingEntry;
import org.isthmus.runtime.units.Dimension;

/** What the statements of a measurement need of their expressions. */
final class MeasurementTyping {
    private final FileTyping file;
    private final Inference inference;

    MeasurementTyping(FileTyping file) {
        this.file = file;
        inference = file.inference();
    }

    void statement(MeasurementStatement statement) {
        if (statement instanceof BiasAxis bias) {
            points(bias.getPoints(), Dimension.VOLTAGE, "A bias");
        } else if (statement instanceof SweepAxis sweep) {
            sweep(sweep);
        } else if (statement instanceof MeasurementSetting setting) {
            setting(setting);
        } else if (statement instanceof Recording recording) {
            recording.getItems().forEach(this::item);
        } else if (statement instanceof Expectation expectation) {
            expectation(expectation);
        }
    }

    private void sweep(SweepAxis sweep) {
        if (sweep.getParameter() == null || sweep.getParameter().eIsProxy()) {
            return;
        }
        if (inference.typeOf(sweep.getParameter()) instanceof Scalar scalar) {
            points(
                    sweep.getPoints(),
                    scalar.dimension(),
                    "A sweep of '" + sweep.getParameter().getName() + "'");
        }
    }

    private void setting(MeasurementSetting setting) {
        Declaration target = setting.getTarget();
        if (target == null || target.eIsProxy() || setting.getPoints() == null) {
            return;
        }
        Points points = setting.getPoints();
        if (target instanceof Parameter parameter) {
            single(points, parameter.getName());
            if (inference.typeOf(parameter) instanceof Scalar scalar) {
                file.real(
                        points.getValues(),
                        scalar.dimension(),
                        "Parameter '" + parameter.getName() + "'",
                        Place.NOWHERE);
            }
        } else if (target instanceof CatalogueEntry entry) {
            SettingEntry known = Catalogue.setting(SettingEntry.Block.MEASUREMENT, entry.getName())
                    .orElseThrow();
            if (known.value() == SettingEntry.Value.AXIS) {
                points(points, known.dimension(), "'" + known.name() + "'");
            } else {
                single(points, known.name());
                file.value(setting, points.getValues(), known, Place.NOWHERE);
            }
        }
    }

    private void single(Points points, String name) {
        if (points.getCount() != null || points.getStep() != null || points.getTolerance() != null) {
            inference.report(
                    points,
                    null,
                    IssueCode.KIND_MISMATCH,
                    "'" + name + "' has one value here; write 'sweep " + name + " = …' for several.");
        }
    }

    private void points(Points points, Dimension wanted, String what) {
        if (points == null) {
            return;
        }
        Type type = inference.typeOf(points.getValues());
        file.place(points.getValues(), Place.NOWHERE);
        Dimension found = null;
        if (type instanceof Range range) {
            found = range.dimension();
        } else if (type instanceof ListOf list && list.element() instanceof Scalar element) {
            found = element.dimension();
            if (element.complex()) {
                inference.report(points.getValues(), null, IssueCode.NOT_REAL, what + " needs real values.");
                return;
            }
        } else if (type != Type.UNKNOWN) {
            inference.unfit(points.getValues(), type, what + " needs a range or a list of values");
            return;
        }
        if (found != null && !found.equals(wanted)) {
            inference.report(
                    points.getValues(),
                    null,
                    IssueCode.DIMENSION_MISMATCH,
                    what + " needs " + wanted.withArticle() + ", but this is " + found.withArticle() + "; "
                            + Inference.fittingUnit(found, wanted));
        }
        if (points.getCount() != null) {
            file.real(points.getCount(), Dimension.NUMBER, "The number of points", Place.NOWHERE);
        }
        if (points.getStep() != null) {
            file.real(points.getStep(), wanted, "The step", Place.NOWHERE);
        }
        if (points.getTolerance() != null) {
            file.real(points.getTolerance(), Dimension.NUMBER, "The tolerance", Place.NOWHERE);
        }
    }

    private void item(Expression item) {
        Type type = inference.typeOf(item);
        boolean observable = item instanceof Reference reference
                && reference.getTarget() instanceof CatalogueEntry entry
                && Catalogue.observable(entry.getName()).isPresent();
        if (type != Type.UNKNOWN && !observable) {
            inference.report(
                    item,
                    null,
                    IssueCode.UNKNOWN_OBSERVABLE,
                    "'record' takes observables such as transmission or current(source).");
        }
        points(item);
    }

    private void expectation(Expectation expectation) {
        Type left = inference.typeOf(expectation.getLeft());
        Type right = inference.typeOf(expectation.getRight());
        points(expectation.getLeft());
        points(expectation.getRight());
        scalar(expectation.getLeft(), left);
        scalar(expectation.getRight(), right);
        if (left instanceof Scalar a
                && right instanceof Scalar b
                && !a.dimension().equals(b.dimension())) {
            inference.mismatch(expectation, "compared", a.dimension(), b.dimension());
            return;
        }
        if (expectation.getTolerance() != null) {
            Dimension wanted =
                    expectation.isRelative() ? Dimension.NUMBER : left instanceof Scalar a ? a.dimension() : null;
            if (wanted == null) {
                inference.typeOf(expectation.getTolerance());
            } else {
                file.real(expectation.getTolerance(), wanted, "The tolerance", Place.NOWHERE);
            }
        }
    }

    private void scalar(Expression side, Type type) {
        if (type != Type.UNKNOWN && !(type instanceof Scalar scalar && !scalar.complex())) {
            inference.unfit(side, type, "An expectation compares real quantities");
        }
    }

    /** The points behind {@code at}: each must fit the axis it picks from. */
    private void points(Expression expression) {
        if (expression == null) {
            return;
        }
        if (expression instanceof Reference own) {
            point(own);
        }
        org.eclipse.xtext.EcoreUtil2.getAllContentsOfType(expression, Reference.class)
                .forEach(this::point);
    }

    private void point(Reference reference) {
        if (reference.getPoint() == null) {
            return;
        }
        boolean observable = reference.getTarget() instanceof CatalogueEntry entry
                && Catalogue.expressionName(entry.getName()).orElse(null) instanceof ObservableEntry;
        if (!observable
                && reference.getTarget() != null
                && !reference.getTarget().eIsProxy()) {
            inference.report(
                    reference,
                    IsthmusPackage.Literals.REFERENCE__POINT,
                    IssueCode.MISPLACED,
                    "'at' picks a point of an observable.");
            return;
        }
        for (AxisCoordinate coordinate : reference.getPoint().getCoordinates()) {
            Dimension wanted = wanted(coordinate.getAxis());
            if (wanted != null) {
                file.real(
                        coordinate.getValue(),
                        wanted,
                        "'" + coordinate.getAxis().getName() + "'",
                        Place.NOWHERE);
            } else {
                inference.typeOf(coordinate.getValue());
            }
        }
    }

    private Dimension wanted(Declaration axis) {
        if (axis == null || axis.eIsProxy()) {
            return null;
        }
        if (axis instanceof LeadDeclaration) {
            return Dimension.VOLTAGE;
        }
        return axis instanceof Parameter parameter
                ? Inference.dimension(inference.typeOf(parameter))
                : Dimension.ENERGY;
    }
}
