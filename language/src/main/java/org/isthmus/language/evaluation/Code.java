package org.isthmus.language.evaluation;

import org.apache.commons.math3.complex.Complex;

/** A compiled expression. Safe for several threads, each with its own {@link Site}. */
public sealed interface Code {
    /** The same everywhere. */
    record Fixed(Value value) implements Code {}

    /** A real number per site. */
    record RealCode(RealNode node) implements Code {}

    /** A complex number per site. */
    record ComplexCode(ComplexNode node) implements Code {}

    /** A condition per site. */
    record TruthCode(TruthNode node) implements Code {}

    /** A matrix per site. */
    record MatrixCode(MatrixNode node) implements Code {}

    /** Evaluates to a real number. */
    @FunctionalInterface
    interface RealNode {
        double at(Site site);
    }

    /** Evaluates to a complex number. */
    @FunctionalInterface
    interface ComplexNode {
        Complex at(Site site);
    }

    /** Evaluates to a condition. */
    @FunctionalInterface
    interface TruthNode {
        boolean at(Site site);
    }

    /** Evaluates to a matrix. */
    @FunctionalInterface
    interface MatrixNode {
        SquareMatrix at(Site site);
    }
}
