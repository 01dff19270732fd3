/**
 * Values of expressions: compiled once, then evaluated on plain numbers.
 *
 * <p>Start at {@link org.isthmus.language.evaluation.Evaluator} and {@link org.isthmus.language.evaluation.Environment}.
 *
 * <p>Invariant: only expressions without a typing problem are evaluated; what still goes wrong, such as a place outside a
 * table, is an {@link org.isthmus.language.evaluation.EvaluationFailure} that knows its place in the text.
 */
package org.isthmus.language.evaluation;
