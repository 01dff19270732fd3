package org.isthmus.runtime.catalogue;

import org.isthmus.runtime.device.ExpectedValue.Reduction;

/** Makes one number of the values at all points of a measurement. */
public record ReductionEntry(String name, Reduction reduction, String documentation) implements Entry {}
