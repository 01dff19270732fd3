/**
 * The names that device files know without declaring them: constants, functions, shapes, observables, settings.
 *
 * <p>Start at {@link org.isthmus.runtime.catalogue.Catalogue}. A new entry is one class or one line here and no change of
 * the grammar: linking, completion, hovers, the dimension check and the reference follow from it.
 *
 * <p>Invariant: an entry is immutable and knows its own documentation.
 */
package org.isthmus.runtime.catalogue;
