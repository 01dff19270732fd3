/**
 * What a person looks at: plots as SVG, and a page that holds them.
 *
 * <p>Start at {@link org.isthmus.runtime.report.ResultReport}.
 *
 * <p>Invariant: text in, text out. No fonts, no display, no network: equal results give equal pages on any machine.
 */
package org.isthmus.runtime.report;
