package org.isthmus.language.structure;

import org.isthmus.language.isthmus.Constant;
import org.isthmus.language.isthmus.Declaration;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.HeaderParameter;
import org.isthmus.language.isthmus.Parameter;
import org.isthmus.language.isthmus.Quantity;
import org.isthmus.language.isthmus.VectorDeclaration;

/** What the text gives a declaration as its value. */
public final class WrittenValue {
    private WrittenValue() {}

    /** The expression; null for a declaration that has no value. */
    public static Expression of(Declaration declaration) {
        if (declaration instanceof Constant constant) {
            return constant.getValue();
        }
        if (declaration instanceof Parameter parameter) {
            return parameter.getValue();
        }
        if (declaration instanceof HeaderParameter parameter) {
            return parameter.getValue();
        }
        if (declaration instanceof Quantity quantity) {
            return quantity.getValue();
        }
        return declaration instanceof VectorDeclaration vector ? vector.getValue() : null;
    }
}
