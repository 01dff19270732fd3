package org.isthmus.language.typing;

import org.isthmus.runtime.units.Dimension;

/** What sort of value an expression has. */
public sealed interface Type {
    /** A number with a dimension. */
    record Scalar(Dimension dimension, boolean complex) implements Type {
        @Override
        public String describe() {
            return (complex ? "a complex " + dimension.describe() : dimension.withArticle());
        }
    }

    /** A square matrix. */
    record Matrix(int size, Dimension dimension) implements Type {
        @Override
        public String describe() {
            return "a " + size + "×" + size + " matrix";
        }
    }

    /** True or false. */
    record Truth() implements Type {
        @Override
        public String describe() {
            return "a condition";
        }
    }

    /** A point or a vector with two or three components of one dimension. */
    record Point(int components, Dimension dimension) implements Type {
        @Override
        public String describe() {
            return "a point";
        }
    }

    /** A list of values of one type. */
    record ListOf(Type element) implements Type {
        @Override
        public String describe() {
            return "a list";
        }
    }

    /** A range of real quantities. */
    record Range(Dimension dimension) implements Type {
        @Override
        public String describe() {
            return "a range";
        }
    }

    /** A region of space. */
    record Shape() implements Type {
        @Override
        public String describe() {
            return "a shape";
        }
    }

    /** A text in quotes. */
    record Text() implements Type {
        @Override
        public String describe() {
            return "a text";
        }
    }

    /** A word of a setting. */
    record Choice(String word, String setting) implements Type {
        @Override
        public String describe() {
            return "the word '" + word + "'";
        }
    }

    /** The name of a lead, as an argument of an observable. */
    record LeadName() implements Type {
        @Override
        public String describe() {
            return "a lead";
        }
    }

    /** The type of what is wrong already. */
    record Unknown() implements Type {
        @Override
        public String describe() {
            return "something unknown";
        }
    }

    Unknown UNKNOWN = new Unknown();
    Truth TRUTH = new Truth();
    Shape SHAPE = new Shape();

    /** With its article, for messages. */
    String describe();

    static Scalar real(Dimension dimension) {
        return new Scalar(dimension, false);
    }
}
