/**
 * From the syntax model to the device that is solved, by named passes over one draft.
 *
 * <p>Start at {@link org.isthmus.language.elaboration.Elaborator}; {@link org.isthmus.language.elaboration.Pass} says what
 * a pass is.
 *
 * <p>Invariant: what is wrong with a device becomes a finding with a place in the text; only an interruption is an
 * exception. Equal texts and parameters give equal tables, bit for bit.
 */
package org.isthmus.language.elaboration;
