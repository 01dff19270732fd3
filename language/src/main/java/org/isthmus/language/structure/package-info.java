/**
 * Reading the syntax model: what a device consists of once its family is taken together.
 *
 * <p>Start at {@link org.isthmus.language.structure.DeviceStructure}.
 *
 * <p>Invariant: nothing here evaluates an expression, and a broken or cyclic file is read without complaint: complaints
 * belong to the checks.
 */
package org.isthmus.language.structure;
