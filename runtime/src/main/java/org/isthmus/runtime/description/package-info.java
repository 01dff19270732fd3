/**
 * What can be said of a device before it is solved: its size, its leads' bands and open modes, what a solve will cost.
 *
 * <p>Start at {@link org.isthmus.runtime.description.DeviceDescription}.
 *
 * <p>Invariant: describing costs little. What would need a solve of the body is not in here.
 */
package org.isthmus.runtime.description;
