/**
 * Programs that measure; no tests.
 *
 * <p>Start at {@link org.isthmus.runtime.benchmark.StripBenchmark}.
 *
 * <p>Invariant: nothing here runs in the build.
 */
package org.isthmus.runtime.benchmark;
