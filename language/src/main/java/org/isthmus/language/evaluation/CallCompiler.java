package org.isthmus.language.evaluation;

import java.util.ArrayList;
import java.util.List;
import org.apache.commons.math3.complex.Complex;
import org.isthmus.language.evaluation.Code.ComplexCode;
import org.isthmus.language.evaluation.Code.ComplexNode;
import org.isthmus.language.evaluation.Code.Fixed;
import org.isthmus.language.evaluation.Code.MatrixCode;
import org.isthmus.language.evaluation.Code.MatrixNode;
import org.isthmus.language.evaluation.Code.RealCode;
import org.isthmus.language.evaluation.Code.RealNode;
import org.isthmus.language.evaluation.Code.TruthNode;
import org.isthmus.language.evaluation.Value.MatrixValue;
import org.isthmus.language.evaluation.Value.PointValue;
import org.isthmus.language.evaluation.Value.RangeValue;
import org.isthmus.language.evaluation.Value.Real;
import org.isthmus.language.evaluation.Value.ShapeValue;
import org.isthmus.language.evaluation.Value.TextValue;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.CatalogueEntry;
import org.isthmus.language.isthmus.Declaration;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.language.tables.Table;
import org.isthmus.language.tables.TableFailure;
import org.isthmus.language.tables.TableFiles;
import org.isthmus.runtime.catalogue.Catalogue;
import org.isthmus.runtime.catalogue.ChoiceEntry;
import org.isthmus.runtime.catalogue.ConstantEntry;
import org.isthmus.runtime.catalogue.CoordinateEntry;
import org.isthmus.runtime.catalogue.Entry;
import org.isthmus.runtime.catalogue.FunctionEntry;
import org.isthmus.runtime.catalogue.MatrixEntry;
import org.isthmus.runtime.catalogue.ShapeEntry;
import org.isthmus.runtime.catalogue.SpecialEntry;

/** Compiles names and calls. */
final class CallCompiler {
    private final Evaluator evaluator;
    private final Environment environment;

    CallCompiler(Evaluator evaluator, Environment environment) {
        this.evaluator = evaluator;
        this.environment = environment;
    }

    Code compile(Reference reference) {
        Declaration target = reference.getTarget();
        if (target == null || target.eIsProxy()) {
            throw new EvaluationFailure(reference, IssueCode.UNKNOWN_NAME, "This name is not known.");
        }
        if (!(target instanceof CatalogueEntry object)) {
            return environment.codeOf(target);
        }
        Entry entry = Catalogue.expressionName(object.getName()).orElseThrow();
        if (entry instanceof ConstantEntry constant) {
            return new Fixed(new Real(constant.value()));
        }
        if (entry instanceof MatrixEntry matrix) {
            return new Fixed(new MatrixValue(matrix(matrix)));
        }
        if (entry instanceof CoordinateEntry coordinate) {
            return coordinate(coordinate);
        }
        if (entry instanceof ChoiceEntry choice) {
            return new Fixed(new Value.ChoiceValue(choice.name()));
        }
        if (entry instanceof FunctionEntry function) {
            return function(reference, function);
        }
        if (entry instanceof ShapeEntry shape) {
            return new Fixed(new ShapeValue(shape(reference, shape)));
        }
        if (entry instanceof SpecialEntry special) {
            return switch (special.kind()) {
                case IF -> conditional(reference);
                case UNIFORM -> uniform(reference);
                case NORMAL -> normal(reference);
                case TABLE -> table(reference);
            };
        }
        throw new EvaluationFailure(
                reference, IssueCode.MISPLACED, "'" + entry.name() + "' has a value only in 'record' and 'expect'.");
    }

    private static SquareMatrix matrix(MatrixEntry entry) {
        Complex[] elements = new Complex[entry.size() * entry.size()];
        for (int k = 0; k < elements.length; k++) {
            elements[k] =
                    new Complex(entry.elements().get(2 * k), entry.elements().get(2 * k + 1));
        }
        return SquareMatrix.of(entry.size(), elements);
    }

    private static Code coordinate(CoordinateEntry coordinate) {
        int index = coordinate.index();
        if (coordinate.pair()) {
            return new RealCode(site -> site.ofPair(index));
        }
        return new RealCode(
                switch (index) {
                    case 0 -> Site::x;
                    case 1 -> Site::y;
                    default -> Site::z;
                });
    }

    private Code function(Reference reference, FunctionEntry function) {
        List<Code> arguments =
                reference.getArguments().stream().map(evaluator::compile).toList();
        boolean fixed = arguments.stream().allMatch(Fixed.class::isInstance);
        boolean complex = arguments.stream()
                .anyMatch(code -> code instanceof ComplexCode
                        || code instanceof Fixed f && f.value() instanceof Value.ComplexNumber);
        Code code;
        if (complex) {
            code = complexFunction(reference, function, Arithmetic.complexNode(arguments.get(0), reference));
        } else {
            RealNode[] nodes = new RealNode[arguments.size()];
            for (int k = 0; k < nodes.length; k++) {
                nodes[k] = Evaluator.realNode(
                        arguments.get(k), reference.getArguments().get(k));
            }
            FunctionEntry.Code body = function.code();
            code = new RealCode(site -> {
                double[] values = new double[nodes.length];
                for (int k = 0; k < values.length; k++) {
                    values[k] = nodes[k].at(site);
                }
                return body.at(values);
            });
        }
        return fixed ? Evaluator.fold(arguments.get(0), code) : code;
    }

    private static Code complexFunction(Reference reference, FunctionEntry function, ComplexNode argument) {
        return switch (function.name()) {
            case "abs" -> new RealCode(site -> argument.at(site).abs());
            case "sqrt" -> new ComplexCode(site -> argument.at(site).sqrt());
            case "exp" -> new ComplexCode(site -> argument.at(site).exp());
            default ->
                throw new EvaluationFailure(
                        reference,
                        IssueCode.NOT_REAL,
                        "'" + function.name() + "' takes real numbers, but this is complex.");
        };
    }

    private Shape shape(Reference reference, ShapeEntry shape) {
        List<Value> values =
                reference.getArguments().stream().map(evaluator::evaluate).toList();
        switch (shape.kind()) {
            case BOX -> {
                double[] ends = {
                    Double.NEGATIVE_INFINITY, Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY,
                    Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY, Double.POSITIVE_INFINITY
                };
                for (int k = 0; k < values.size(); k++) {
                    RangeValue range = (RangeValue) values.get(k);
                    if (range.lower() > range.upper()) {
                        throw new EvaluationFailure(
                                reference.getArguments().get(k),
                                IssueCode.EMPTY_RANGE,
                                "This range of the box runs backwards, from " + range.lower() + " nm to "
                                        + range.upper() + " nm.");
                    }
                    ends[2 * k] = range.lower();
                    ends[2 * k + 1] = range.upper();
                }
                return new Shape.Box(ends);
            }
            case DISC -> {
                return new Shape.Ring(((PointValue) values.get(0)).components(), 0, number(values.get(1)));
            }
            case RING -> {
                return new Shape.Ring(
                        ((PointValue) values.get(0)).components(), number(values.get(1)), number(values.get(2)));
            }
            default -> {
                List<Double> xs = new ArrayList<>();
                List<Double> ys = new ArrayList<>();
                for (Value value : values) {
                    xs.add(((PointValue) value).component(0));
                    ys.add(((PointValue) value).component(1));
                }
                return new Shape.Polygon(xs, ys);
            }
        }
    }

    private static double number(Value value) {
        return ((Real) value).value();
    }

    private Code conditional(Reference reference) {
        Code condition = evaluator.compile(reference.getArguments().get(0));
        TruthNode test = Evaluator.truthNode(condition, reference);
        Code yes = evaluator.compile(reference.getArguments().get(1));
        Code no = evaluator.compile(reference.getArguments().get(2));
        if (condition instanceof Fixed) {
            return test.at(new Site()) ? yes : no;
        }
        if (yes instanceof MatrixCode || yes instanceof Fixed f && f.value() instanceof MatrixValue) {
            MatrixNode a = Arithmetic.matrixNode(yes, reference);
            MatrixNode b = Arithmetic.matrixNode(no, reference);
            return new MatrixCode(site -> test.at(site) ? a.at(site) : b.at(site));
        }
        if (isComplex(yes) || isComplex(no)) {
            ComplexNode a = Arithmetic.complexNode(yes, reference);
            ComplexNode b = Arithmetic.complexNode(no, reference);
            return new ComplexCode(site -> test.at(site) ? a.at(site) : b.at(site));
        }
        RealNode a = Evaluator.realNode(yes, reference);
        RealNode b = Evaluator.realNode(no, reference);
        return new RealCode(site -> test.at(site) ? a.at(site) : b.at(site));
    }

    private static boolean isComplex(Code code) {
        return code instanceof ComplexCode || code instanceof Fixed f && f.value() instanceof Value.ComplexNumber;
    }

    private Code uniform(Reference reference) {
        RealNode lower = evaluator.field(reference.getArguments().get(0));
        RealNode upper = evaluator.field(reference.getArguments().get(1));
        double seed = evaluator.real(reference.getArguments().get(2));
        return new RealCode(site -> {
            double from = lower.at(site);
            return from + (upper.at(site) - from) * SiteRandom.uniform(seed, site.number());
        });
    }

    private Code normal(Reference reference) {
        RealNode deviation = evaluator.field(reference.getArguments().get(0));
        double seed = evaluator.real(reference.getArguments().get(1));
        return new RealCode(site -> deviation.at(site) * SiteRandom.normal(seed, site.number()));
    }

    private Code table(Reference reference) {
        List<Expression> arguments = reference.getArguments();
        String path = ((TextValue) evaluator.evaluate(arguments.get(0))).text();
        Table table;
        try {
            table = TableFiles.function(TableFiles.read(reference.eResource(), path), arguments.size() - 1);
        } catch (TableFailure e) {
            throw new EvaluationFailure(arguments.get(0), e.code(), e.getMessage());
        }
        List<Code> codes = arguments.subList(1, arguments.size()).stream()
                .map(evaluator::compile)
                .toList();
        RealNode first = Evaluator.realNode(codes.get(0), arguments.get(1));
        RealNode second = codes.size() > 1 ? Evaluator.realNode(codes.get(1), arguments.get(2)) : null;
        Code code = new RealCode(site -> {
            try {
                return second == null ? table.at(first.at(site)) : table.at(first.at(site), second.at(site));
            } catch (TableFailure e) {
                throw new EvaluationFailure(arguments.get(1), e.code(), e.getMessage());
            }
        });
        return codes.stream().allMatch(Fixed.class::isInstance) ? Evaluator.fold(codes.get(0), code) : code;
    }
}
