package org.isthmus.runtime.catalogue;

/**
 * A kind of dephasing: what the matrix D is.
 *
 * @param takesArgument true where the kind is followed by an argument in parentheses
 */
public record DephasingKind(String name, boolean takesArgument, String documentation) implements Entry {}
