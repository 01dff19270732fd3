package org.isthmus.runtime.result;

import io.jhdf.HdfFile;
import io.jhdf.WritableHdfFile;
import io.jhdf.api.WritableDataset;
import io.jhdf.api.WritableGroup;
import java.nio.file.Path;

/**
 * {@code result.h5}: a group per table, in it an array per column under the column's name, its unit as the attribute {@code
 * unit} ({@code 1} for plain numbers). A value that is not defined is not a number. Equal results give equal files.
 */
final class ResultArrays {
    private ResultArrays() {}

    static void write(Path file, MeasurementResult result, Provenance provenance) {
        try (WritableHdfFile arrays = HdfFile.write(file)) {
            arrays.putAttribute("tool", provenance.tool());
            arrays.putAttribute("device", result.device());
            arrays.putAttribute("measurement", result.measurement());
            arrays.putAttribute("deviceSha256", result.deviceDigest());
            for (ResultTable table : result.tables()) {
                // HDF5 knows no arrays without elements here
                if (!table.rows().isEmpty() && !table.headers().isEmpty()) {
                    table(arrays.putGroup(table.name()), table);
                }
            }
        }
    }

    private static void table(WritableGroup group, ResultTable table) {
        for (int k = 0; k < table.headers().size(); k++) {
            int column = k;
            String unit = table.unit(k);
            WritableDataset array = group.putDataset(
                    table.columnName(k),
                    table.rows().stream().mapToDouble(row -> row[column]).toArray());
            array.putAttribute("unit", unit.isEmpty() ? "1" : unit);
            array.putAttribute("role", k < table.keys() ? "place" : "value");
        }
    }
}
