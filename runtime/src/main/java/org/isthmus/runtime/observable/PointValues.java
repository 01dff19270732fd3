package org.isthmus.runtime.observable;

import java.util.Map;
import java.util.NavigableMap;

/**
 * Everything known at one operating point, in internal units.
 *
 * @param energies values at each energy that was asked for or that the axis has: by the call's text, one number or one per
 *     site
 * @param axis the energies of the axis, ascending; empty without one
 * @param integrated values of integrated observables by the call's text
 * @param positions x, y, z of the sites one after the other, nm
 * @param residual largest of all solves at this point
 * @param solves number of energies solved
 */
record PointValues(
        NavigableMap<Double, Map<String, double[]>> energies,
        double[] axis,
        Map<String, double[]> integrated,
        double[] positions,
        double residual,
        long solves) {}
