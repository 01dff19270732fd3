/**
 * The checks, by concern.
 *
 * <p>Start at {@link org.isthmus.language.validation.IsthmusValidator}, which composes them.
 *
 * <p>Invariant: a check keeps silent where one before it has failed: one mistake, one message.
 */
package org.isthmus.language.validation;
