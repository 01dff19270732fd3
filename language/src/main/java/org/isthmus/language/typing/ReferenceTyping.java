package org.isthmus.language.typing;

import java.util.ArrayList;
import java.util.List;
import org.eclipse.xtext.EcoreUtil2;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.CatalogueEntry;
import org.isthmus.language.isthmus.Constant;
import org.isthmus.language.isthmus.Declaration;
import org.isthmus.language.isthmus.DeviceDeclaration;
import org.isthmus.language.isthmus.Expectation;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.HeaderParameter;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.LatticeDeclaration;
import org.isthmus.language.isthmus.LeadDeclaration;
import org.isthmus.language.isthmus.Material;
import org.isthmus.language.isthmus.MeasurementDeclaration;
import org.isthmus.language.isthmus.Parameter;
import org.isthmus.language.isthmus.Quantity;
import org.isthmus.language.isthmus.Recording;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.language.isthmus.VectorDeclaration;
import org.isthmus.language.typing.Type.Matrix;
import org.isthmus.language.typing.Type.Point;
import org.isthmus.language.typing.Type.Range;
import org.isthmus.language.typing.Type.Scalar;
import org.isthmus.runtime.catalogue.Catalogue;
import org.isthmus.runtime.catalogue.ChoiceEntry;
import org.isthmus.runtime.catalogue.ConstantEntry;
import org.isthmus.runtime.catalogue.CoordinateEntry;
import org.isthmus.runtime.catalogue.Entry;
import org.isthmus.runtime.catalogue.FunctionEntry;
import org.isthmus.runtime.catalogue.MatrixEntry;
import org.isthmus.runtime.catalogue.ObservableEntry;
import org.isthmus.runtime.catalogue.ReductionEntry;
import org.isthmus.runtime.catalogue.ShapeEntry;
import org.isthmus.runtime.catalogue.SpecialEntry;
import org.isthmus.runtime.device.ExpectedValue.Reduction;
import org.isthmus.runtime.units.Dimension;

/** Types of names and calls. */
final class ReferenceTyping {
    private final Inference inference;

    ReferenceTyping(Inference inference) {
        this.inference = inference;
    }

    Type typeOf(Reference reference) {
        Declaration target = reference.getTarget();
        if (target == null || target.eIsProxy()) {
            reference.getArguments().forEach(inference::typeOf);
            return Type.UNKNOWN;
        }
        if (target instanceof CatalogueEntry entry) {
            return Catalogue.expressionName(entry.getName())
                    .map(known -> entry(reference, known))
                    .orElse(Type.UNKNOWN);
        }
        if (reference.isCall()) {
            return wrong(reference, IssueCode.KIND_MISMATCH, "'" + target.getName() + "' is no function.");
        }
        if (target instanceof Constant
                || target instanceof Parameter
                || target instanceof HeaderParameter
                || target instanceof Quantity
                || target instanceof VectorDeclaration) {
            return inference.typeOf(target);
        }
        if (target instanceof LeadDeclaration) {
            return new Type.LeadName();
        }
        return wrong(
                reference,
                IssueCode.KIND_MISMATCH,
                "'" + target.getName() + "' is " + noun(target) + " and has no value.");
    }

    private static String noun(Declaration declaration) {
        if (declaration instanceof Material) {
            return "a material (its quantities are written '" + declaration.getName() + ".mass', for example)";
        }
        if (declaration instanceof LatticeDeclaration) {
            return "a lattice";
        }
        if (declaration instanceof DeviceDeclaration) {
            return "a device";
        }
        return declaration instanceof MeasurementDeclaration ? "a measurement" : "the name of a member";
    }

    private Type wrong(Reference reference, IssueCode code, String message) {
        inference.report(reference, IsthmusPackage.Literals.REFERENCE__TARGET, code, message);
        return Type.UNKNOWN;
    }

    private Type entry(Reference reference, Entry entry) {
        boolean callable = entry instanceof FunctionEntry
                || entry instanceof SpecialEntry
                || entry instanceof ShapeEntry
                || entry instanceof ObservableEntry
                || entry instanceof ReductionEntry;
        if (reference.isCall() && !callable) {
            return wrong(reference, IssueCode.KIND_MISMATCH, "'" + entry.name() + "' is no function.");
        }
        if (!reference.isCall() && callable && !(entry instanceof ObservableEntry)) {
            return wrong(
                    reference,
                    IssueCode.WRONG_ARGUMENTS,
                    "'" + entry.name() + "' is a function and needs arguments in parentheses.");
        }
        if (entry instanceof ConstantEntry constant) {
            return Type.real(constant.dimension());
        }
        if (entry instanceof MatrixEntry matrix) {
            return new Matrix(matrix.size(), Dimension.NUMBER);
        }
        if (entry instanceof CoordinateEntry) {
            return Type.real(Dimension.LENGTH);
        }
        if (entry instanceof ChoiceEntry choice) {
            return new Type.Choice(choice.name(), choice.setting());
        }
        if (entry instanceof ObservableEntry observable) {
            return observable(reference, observable);
        }
        if (inMeasurement(reference)
                && reference.getArguments().size() == 1
                && Catalogue.reduction(entry.name()).isPresent()) {
            return reduction(reference, Catalogue.reduction(entry.name()).get());
        }
        if (entry instanceof ReductionEntry) {
            return wrong(
                    reference,
                    inMeasurement(reference) ? IssueCode.WRONG_ARGUMENTS : IssueCode.MISPLACED,
                    "'" + entry.name()
                            + "' makes one number of an observable at all points: it takes one argument, in 'expect'.");
        }
        if (entry instanceof FunctionEntry function) {
            return function(reference, function);
        }
        if (entry instanceof ShapeEntry shape) {
            return shape(reference, shape);
        }
        return entry instanceof SpecialEntry special ? special(reference, special) : Type.UNKNOWN;
    }

    private static boolean inMeasurement(Reference reference) {
        return EcoreUtil2.getContainerOfType(reference, Expectation.class) != null
                || EcoreUtil2.getContainerOfType(reference, Recording.class) != null;
    }

    private Type count(Reference reference, String name, int fewest, int most, String unit) {
        int given = reference.getArguments().size();
        if (given >= fewest && given <= most) {
            return null;
        }
        String wanted =
                fewest == most ? String.valueOf(fewest) : most > 9 ? "at least " + fewest : fewest + " to " + most;
        return wrong(
                reference,
                IssueCode.WRONG_ARGUMENTS,
                "'" + name + "' takes " + wanted + " " + unit + (wanted.equals("1") ? "" : "s") + ", not " + given
                        + ".");
    }

    private Type function(Reference reference, FunctionEntry function) {
        Type wrongCount = count(reference, function.name(), function.fewest(), function.most(), "argument");
        if (wrongCount != null) {
            return wrongCount;
        }
        List<Dimension> dimensions = new ArrayList<>();
        boolean complex = false;
        boolean known = true;
        for (Expression argument : reference.getArguments()) {
            Type type = inference.typeOf(argument);
            if (type == Type.UNKNOWN) {
                known = false;
            } else if (type instanceof Scalar scalar) {
                dimensions.add(scalar.dimension());
                complex |= scalar.complex();
            } else {
                return inference.unfit(argument, type, "'" + function.name() + "' needs a quantity");
            }
        }
        if (!known) {
            return Type.UNKNOWN;
        }
        boolean complexCapable = ComplexFunctions.CAPABLE.contains(function.name());
        if (complex && !complexCapable) {
            inference.report(
                    reference,
                    null,
                    IssueCode.NOT_REAL,
                    "'" + function.name() + "' takes real numbers, but this is complex.");
            return Type.UNKNOWN;
        }
        try {
            Dimension dimension = function.rule().of(dimensions);
            return new Scalar(dimension, complex && !function.name().equals("abs"));
        } catch (FunctionEntry.DimensionProblem e) {
            inference.report(
                    reference, null, IssueCode.DIMENSION_MISMATCH, "'" + function.name() + "' " + e.getMessage() + ".");
            return Type.UNKNOWN;
        }
    }

    private Type shape(Reference reference, ShapeEntry shape) {
        Type wrongCount =
                switch (shape.kind()) {
                    case BOX -> count(reference, "box", 1, 3, "range");
                    case DISC -> count(reference, "disc", 2, 2, "argument");
                    case RING -> count(reference, "ring", 3, 3, "argument");
                    case POLYGON -> count(reference, "polygon", 3, Integer.MAX_VALUE, "corner");
                };
        if (wrongCount != null) {
            return wrongCount;
        }
        for (int i = 0; i < reference.getArguments().size(); i++) {
            Expression argument = reference.getArguments().get(i);
            Type type = inference.typeOf(argument);
            if (type == Type.UNKNOWN) {
                continue;
            }
            boolean fits;
            String need;
            if (shape.kind() == ShapeEntry.Kind.BOX) {
                fits = type instanceof Range;
                need = "a range such as 0 nm .. 10 nm";
            } else if (shape.kind() == ShapeEntry.Kind.POLYGON || i == 0) {
                fits = type instanceof Point;
                need = "a point such as (0 nm, 0 nm)";
            } else {
                fits = type instanceof Scalar scalar && !scalar.complex();
                need = "a length";
            }
            if (!fits) {
                inference.unfit(argument, type, "'" + shape.name() + "' needs " + need + " here");
                continue;
            }
            Dimension dimension = type instanceof Range range ? range.dimension() : Inference.dimension(type);
            if (!dimension.equals(Dimension.LENGTH)) {
                inference.report(
                        argument,
                        null,
                        IssueCode.DIMENSION_MISMATCH,
                        "'" + shape.name() + "' needs a length here, but this is " + dimension.withArticle() + "; "
                                + Inference.fittingUnit(dimension, Dimension.LENGTH));
            }
        }
        return Type.SHAPE;
    }

    private Type special(Reference reference, SpecialEntry special) {
        return switch (special.kind()) {
            case IF -> conditional(reference);
            case UNIFORM -> random(reference, "uniform", 3);
            case NORMAL -> random(reference, "normal", 2);
            case TABLE -> TableTyping.typeOf(reference, inference);
        };
    }

    private Type conditional(Reference reference) {
        Type wrongCount = count(reference, "if", 3, 3, "argument");
        if (wrongCount != null) {
            return wrongCount;
        }
        Type condition = inference.typeOf(reference.getArguments().get(0));
        Type yes = inference.typeOf(reference.getArguments().get(1));
        Type no = inference.typeOf(reference.getArguments().get(2));
        if (condition == Type.UNKNOWN || yes == Type.UNKNOWN || no == Type.UNKNOWN) {
            return Type.UNKNOWN;
        }
        if (!(condition instanceof Type.Truth)) {
            return inference.unfit(reference.getArguments().get(0), condition, "'if' needs a condition first");
        }
        if (yes instanceof Scalar a && no instanceof Scalar b) {
            return a.dimension().equals(b.dimension())
                    ? new Scalar(a.dimension(), a.complex() || b.complex())
                    : inference.mismatch(reference, "alternatives of one 'if'", a.dimension(), b.dimension());
        }
        return yes.equals(no)
                ? yes
                : inference.unfit(
                        reference.getArguments().get(2),
                        no,
                        "'if' needs the same sort of value twice, first " + yes.describe());
    }

    private Type random(Reference reference, String name, int arguments) {
        Type wrongCount = count(reference, name, arguments, arguments, "argument");
        if (wrongCount != null) {
            return wrongCount;
        }
        Dimension dimension = null;
        for (int i = 0; i < arguments; i++) {
            Expression argument = reference.getArguments().get(i);
            Type type = inference.typeOf(argument);
            if (type == Type.UNKNOWN) {
                return type;
            }
            if (!(type instanceof Scalar scalar) || scalar.complex()) {
                return inference.unfit(argument, type, "'" + name + "' needs a real quantity here");
            }
            if (i == arguments - 1) {
                if (!scalar.dimension().isNumber()) {
                    inference.report(
                            argument,
                            null,
                            IssueCode.DIMENSION_MISMATCH,
                            "The seed of '" + name + "' is a plain number, but this is "
                                    + scalar.dimension().withArticle() + ".");
                }
            } else if (dimension == null) {
                dimension = scalar.dimension();
            } else if (!dimension.equals(scalar.dimension())) {
                return inference.mismatch(argument, "bounds of one '" + name + "'", dimension, scalar.dimension());
            }
        }
        return Type.real(dimension);
    }

    private Type reduction(Reference reference, ReductionEntry reduction) {
        Type operand = inference.typeOf(reference.getArguments().get(0));
        if (operand == Type.UNKNOWN) {
            return operand;
        }
        if (!(operand instanceof Scalar scalar)) {
            return inference.unfit(
                    reference.getArguments().get(0), operand, "'" + reduction.name() + "' needs an observable");
        }
        Reduction kind = reduction.reduction();
        if (kind == Reduction.MIN || kind == Reduction.MAX || kind == Reduction.MEAN) {
            return scalar;
        }
        Dimension axis = MeasurementAxes.firstAxis(reference, inference);
        if (axis == null) {
            return Type.UNKNOWN;
        }
        return Type.real(kind == Reduction.SLOPE ? scalar.dimension().over(axis) : axis);
    }

    private Type observable(Reference reference, ObservableEntry observable) {
        if (!inMeasurement(reference)) {
            return wrong(
                    reference,
                    IssueCode.MISPLACED,
                    "'" + observable.name() + "' is an observable: it has a value only in 'record' and 'expect'.");
        }
        int leads = 0;
        boolean matrix = false;
        for (Expression argument : reference.getArguments()) {
            Type type = inference.typeOf(argument);
            if (type == Type.UNKNOWN) {
                return type;
            }
            if (type instanceof Type.LeadName && !matrix) {
                leads++;
            } else if (observable.arguments().matrix() && (type instanceof Matrix) && !matrix && leads == 1) {
                matrix = true;
            } else {
                return inference.unfit(argument, type, "'" + observable.name() + "' needs a lead here");
            }
        }
        int wanted = observable.arguments().mostLeads();
        boolean bare = reference.getArguments().isEmpty();
        if (bare ? wanted > 0 && !inRecord(reference) : leads != wanted) {
            return wrong(
                    reference,
                    IssueCode.WRONG_ARGUMENTS,
                    "'" + observable.name() + "' takes "
                            + (wanted == 0 ? "no lead" : wanted == 1 ? "one lead" : wanted + " leads") + ", not "
                            + leads + ".");
        }
        if (matrix) {
            Matrix flow = (Matrix) inference.typeOf(reference.getArguments().get(1));
            return Type.real(flow.dimension()
                    .over(resolved(reference, observable) ? Dimension.TIME.times(Dimension.ENERGY) : Dimension.TIME));
        }
        return Type.real(observable.dimension(resolved(reference, observable)));
    }

    private static boolean inRecord(Reference reference) {
        return reference.eContainer() instanceof Recording;
    }

    private static boolean resolved(Reference reference, ObservableEntry observable) {
        return switch (observable.resolution()) {
            case ENERGY -> true;
            case INTEGRATED -> false;
            case EITHER -> MeasurementAxes.hasEnergyAxis(reference);
        };
    }
}
