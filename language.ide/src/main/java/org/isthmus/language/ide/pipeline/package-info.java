/**
 * From files to results in one place: load, check, elaborate, plan, run, write.
 *
 * <p>Start at {@link org.isthmus.language.ide.pipeline.Pipeline}. Command line, language server and workbench all call
 * it, and nothing else does the orchestration.
 *
 * <p>Invariant: a stage gets an immutable input and gives an immutable output; what a stage finds wrong with the user's
 * text is a finding in its output, never an exception.
 */
package org.isthmus.language.ide.pipeline;
