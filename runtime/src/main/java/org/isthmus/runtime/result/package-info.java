/**
 * Results: tables, verdicts, and the folder that they are written to.
 *
 * <p>Start at {@link org.isthmus.runtime.result.MeasurementResult} and {@link org.isthmus.runtime.result.ResultFolder}.
 *
 * <p>Invariant: a result folder is there whole or not at all, and says which text and which inputs it came from.
 */
package org.isthmus.runtime.result;
