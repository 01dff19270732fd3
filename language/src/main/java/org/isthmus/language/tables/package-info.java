/**
 * Sampled functions in CSV files.
 *
 * <p>Start at {@link org.isthmus.language.tables.TableFiles}.
 *
 * <p>Invariant: no path leaves the project folder, and a malformed file is told with its line and column.
 */
package org.isthmus.language.tables;
