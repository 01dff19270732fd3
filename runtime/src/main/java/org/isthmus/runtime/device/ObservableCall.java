package org.isthmus.runtime.device;

import java.util.List;

/**
 * An observable with its arguments, such as {@code transmission(source, drain)}. Without leads, a record of it means
 * all leads or all pairs.
 *
 * @param observable name in the catalogue of observables
 * @param leads names of leads, in the order of the call
 * @param matrix interleaved real and imaginary parts of a Hermitian matrix, row by row, for observables that take one;
 *     else empty
 * @param matrixText the matrix as the user wrote it, for column names; else empty
 */
public record ObservableCall(String observable, List<String> leads, List<Double> matrix, String matrixText) {
    public ObservableCall {
        leads = List.copyOf(leads);
        matrix = List.copyOf(matrix);
    }

    public ObservableCall(String observable, String... leads) {
        this(observable, List.of(leads), List.of(), "");
    }

    @Override
    public String toString() {
        if (leads.isEmpty() && matrix.isEmpty()) {
            return observable;
        }
        return observable + "(" + String.join(", ", leads) + (matrix.isEmpty() ? "" : ", " + matrixText) + ")";
    }
}
