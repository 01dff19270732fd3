/**
 * The dimension and sort of every expression, found without evaluating anything.
 *
 * <p>Start at {@link org.isthmus.language.typing.Inference}; {@link org.isthmus.language.typing.FileTyping} says what each
 * statement needs.
 *
 * <p>Invariant: one mistake, one problem. What is wrong has type {@code Unknown}, which fits everywhere.
 */
package org.isthmus.language.typing;
