/**
 * Where things are: cells of a lattice inside a body, bonds between them, leads that go on from a side, loops and the
 * flux through them. Plain numbers, no syntax model and no expressions.
 *
 * <p>Start at {@link org.isthmus.language.elaboration.geometry.LatticeFrame} and {@link
 * org.isthmus.language.elaboration.geometry.BodySites}.
 *
 * <p>Invariant: a site is named by whole numbers (its cell and its place in the basis); positions follow from them and
 * never decide which site is meant.
 */
package org.isthmus.language.elaboration.geometry;
