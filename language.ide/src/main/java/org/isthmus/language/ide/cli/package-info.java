/**
 * The command line: options, what is printed where, exit statuses.
 *
 * <p>Start at {@link org.isthmus.language.ide.cli.IsthmusCommand}; the work itself is done by {@link
 * org.isthmus.language.ide.pipeline.Pipeline}.
 *
 * <p>Invariant: a user never sees a stack trace. Bad input is a finding or a sentence, an internal error is a sentence
 * that names the log it was written to.
 */
package org.isthmus.language.ide.cli;
