/**
 * The canonical layout of device files.
 *
 * <p>Start at {@link org.isthmus.language.formatting.IsthmusFormatter}.
 *
 * <p>Invariant: only white space changes, comments stay where they are, and formatting twice is formatting once.
 */
package org.isthmus.language.formatting;
