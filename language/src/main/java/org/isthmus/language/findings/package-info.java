/**
 * The rules that a device file can break, each with its stable code.
 *
 * <p>Start at {@link org.isthmus.language.findings.IssueCode}.
 *
 * <p>Invariant: a code never changes its meaning; every code has a snippet that fires it and a twin that does not.
 */
package org.isthmus.language.findings;
