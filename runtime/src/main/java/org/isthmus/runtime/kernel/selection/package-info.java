/**
 * Which back end an installation uses.
 *
 * <p>Start at {@link org.isthmus.runtime.kernel.selection.Backends}.
 *
 * <p>Invariant: the choice is made once per process and told with every result.
 */
package org.isthmus.runtime.kernel.selection;
