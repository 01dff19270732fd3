package org.isthmus.language.typing;

import java.util.Set;

/** Functions that also take complex numbers. */
public final class ComplexFunctions {
    /** Their names. */
    public static final Set<String> CAPABLE = Set.of("abs", "sqrt", "exp");

    private ComplexFunctions() {}
}
