package org.isthmus.runtime.measure;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.Measurement;
import org.isthmus.runtime.device.Measurement.NoEnergies;
import org.isthmus.runtime.device.Measurement.SweepAxis;
import org.isthmus.runtime.device.ObservableCall;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.observable.Observable;
import org.isthmus.runtime.result.ResultTable;

/** Makes one table per recorded observable. */
final class Tabulation {
    private final Measurement measurement;
    private final Grid grid;
    private final Map<List<Double>, Device> devices;
    private final boolean energyAxis;

    /**
     * Prepares.
     *
     * @param devices the device at every point, for places of sites
     */
    Tabulation(Measurement measurement, Grid grid, Map<List<Double>, Device> devices) {
        this.measurement = measurement;
        this.grid = grid;
        this.devices = devices;
        energyAxis = !(measurement.energy() instanceof NoEnergies);
    }

    List<ResultTable> tables(List<Request> recorded) {
        Map<String, List<Request>> byName = new LinkedHashMap<>();
        for (Request request : recorded) {
            byName.computeIfAbsent(request.call().observable(), n -> new ArrayList<>())
                    .add(request);
        }
        List<ResultTable> tables = new ArrayList<>();
        byName.forEach((name, requests) -> tables.add(averaged(table(name, requests))));
        return tables;
    }

    private ResultTable table(String name, List<Request> requests) {
        Observable observable = requests.get(0).observable();
        boolean resolved = requests.get(0).resolved(energyAxis);
        Device some = devices.values().iterator().next();
        List<ObservableCall> columns = new ArrayList<>();
        for (Request request : requests) {
            for (ObservableCall column : observable.columns(request.call(), some)) {
                if (!columns.contains(column)) {
                    columns.add(column);
                }
            }
        }
        List<String> headers = new ArrayList<>();
        for (int k = 0; k < grid.axes(); k++) {
            headers.add(grid.header(k));
        }
        if (resolved) {
            headers.add("energy (eV)");
        }
        if (observable.perSite()) {
            headers.addAll(List.of("x (nm)", "y (nm)", "z (nm)"));
        }
        int keys = headers.size();
        columns.forEach(column -> headers.add(observable.header(column, resolved)));
        Map<List<Double>, List<Request>> byPlace = new LinkedHashMap<>();
        requests.forEach(
                r -> byPlace.computeIfAbsent(r.place(), p -> new ArrayList<>()).add(r));
        List<double[]> rows = new ArrayList<>();
        for (List<Request> together : byPlace.values()) {
            for (List<Double> point : grid.points(together.get(0).fixed())) {
                rows(together, point, observable, resolved, columns, headers.size(), rows);
            }
        }
        return new ResultTable(name, headers, keys, rows);
    }

    private void rows(
            List<Request> together,
            List<Double> point,
            Observable observable,
            boolean resolved,
            List<ObservableCall> columns,
            int width,
            List<double[]> rows) {
        SiteTable sites = devices.get(point).sites();
        double[] energies = together.get(0).at(point).energies();
        int perEnergy = observable.perSite() ? sites.count() : 1;
        for (int e = 0; e < energies.length; e++) {
            for (int site = 0; site < perEnergy; site++) {
                double[] row = new double[width];
                java.util.Arrays.fill(row, Double.NaN);
                int next = 0;
                for (int k = 0; k < grid.axes(); k++) {
                    row[next++] = grid.told(k, point.get(k));
                }
                if (resolved) {
                    row[next++] = energies[e];
                }
                if (observable.perSite()) {
                    row[next++] = sites.x(site);
                    row[next++] = sites.y(site);
                    row[next++] = sites.z(site);
                }
                for (Request request : together) {
                    List<ObservableCall> own = observable.columns(request.call(), devices.get(point));
                    double[] values = request.at(point).values()[e];
                    for (int c = 0; c < own.size(); c++) {
                        row[next + columns.indexOf(own.get(c))] =
                                observable.told(values[c * perEnergy + site], resolved);
                    }
                }
                rows.add(row);
            }
        }
    }

    /** Mean and standard error over the averaged sweeps; their columns go. */
    private ResultTable averaged(ResultTable table) {
        if (measurement.averages().isEmpty()) {
            return table;
        }
        List<Integer> keptKeys = new ArrayList<>();
        for (int k = 0; k < table.keys(); k++) {
            boolean gone = k < grid.axes()
                    && grid.axis(k) instanceof SweepAxis sweep
                    && measurement.averages().contains(sweep.parameter());
            if (!gone) {
                keptKeys.add(k);
            }
        }
        Map<List<Double>, List<double[]>> groups = new LinkedHashMap<>();
        for (double[] row : table.rows()) {
            List<Double> key = keptKeys.stream().map(k -> row[k]).toList();
            groups.computeIfAbsent(key, k -> new ArrayList<>()).add(row);
        }
        List<String> headers = new ArrayList<>();
        keptKeys.forEach(k -> headers.add(table.headers().get(k)));
        for (String header :
                table.headers().subList(table.keys(), table.headers().size())) {
            headers.add(header);
            headers.add(header + " +-");
        }
        List<double[]> rows = new ArrayList<>();
        groups.forEach((key, members) -> {
            double[] row = new double[headers.size()];
            int next = 0;
            for (double value : key) {
                row[next++] = value;
            }
            for (int c = table.keys(); c < table.headers().size(); c++) {
                int column = c;
                double[] values = members.stream().mapToDouble(r -> r[column]).toArray();
                row[next++] = Statistics.mean(values);
                row[next++] = Statistics.standardError(values);
            }
            rows.add(row);
        });
        return new ResultTable(table.name(), headers, keptKeys.size(), rows);
    }
}
