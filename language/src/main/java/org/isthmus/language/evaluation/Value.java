package org.isthmus.language.evaluation;

import java.util.List;
import org.apache.commons.math3.complex.Complex;

/** What a constant expression is, in internal units. */
public sealed interface Value {
    /** A real number. */
    record Real(double value) implements Value {}

    /** A complex number. */
    record ComplexNumber(Complex value) implements Value {}

    /** A square matrix. */
    record MatrixValue(SquareMatrix matrix) implements Value {}

    /** True or false. */
    record TruthValue(boolean value) implements Value {}

    /** A point or vector of two or three components. */
    record PointValue(List<Double> components) implements Value {
        public PointValue {
            components = List.copyOf(components);
        }

        /** A component; the third of a point in the plane is zero. */
        public double component(int axis) {
            return axis < components.size() ? components.get(axis) : 0;
        }
    }

    /** A list. */
    record ListValue(List<Value> elements) implements Value {
        public ListValue {
            elements = List.copyOf(elements);
        }
    }

    /** A range with both ends. */
    record RangeValue(double lower, double upper) implements Value {}

    /** A region of space. */
    record ShapeValue(Shape shape) implements Value {}

    /** A text. */
    record TextValue(String text) implements Value {}

    /** A word of a setting. */
    record ChoiceValue(String word) implements Value {}
}
