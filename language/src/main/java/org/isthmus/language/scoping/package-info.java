/**
 * What names mean: files and namespaces, the members of a device's family, and behind all of them the shipped lattices and
 * the catalogue.
 *
 * <p>Start at {@link org.isthmus.language.scoping.IsthmusScopeProvider}.
 *
 * <p>Invariant: a user's own name always comes before one of the catalogue.
 */
package org.isthmus.language.scoping;
