package org.isthmus.runtime.selfenergy;

import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.device.TabulatedLead;
import org.isthmus.runtime.device.WideBandLead;
import org.isthmus.runtime.kernel.ComplexMatrix;

/** A contact with a number per site: wide band, or from a table. */
final class SiteContact implements Contact {
    private final String name;
    private final int[] orbitals;
    private final double[] broadening;
    private final TabulatedLead table;

    SiteContact(WideBandLead lead, SiteTable body) {
        name = lead.name();
        int[] owner = owners(lead.contactSites(), body);
        orbitals = orbitals(lead.contactSites(), body);
        broadening =
                Arrays.stream(owner).mapToDouble(i -> lead.broadening().get(i)).toArray();
        table = null;
    }

    SiteContact(TabulatedLead lead, SiteTable body) {
        name = lead.name();
        orbitals = orbitals(lead.contactSites(), body);
        broadening = null;
        table = lead;
    }

    private static int[] orbitals(List<Integer> sites, SiteTable body) {
        return sites.stream()
                .flatMapToInt(site -> IntStream.range(body.firstOrbital(site), body.firstOrbital(site + 1)))
                .toArray();
    }

    private static int[] owners(List<Integer> sites, SiteTable body) {
        return IntStream.range(0, sites.size())
                .flatMap(i -> IntStream.generate(() -> i).limit(body.orbitals(sites.get(i))))
                .toArray();
    }

    @Override
    public int[] orbitals() {
        return orbitals.clone();
    }

    @Override
    public SelfEnergy at(double real, double imaginary) {
        ComplexMatrix sigma = ComplexMatrix.zeros(orbitals.length, orbitals.length);
        if (table == null) {
            for (int i = 0; i < orbitals.length; i++) {
                sigma.set(i, i, 0, -broadening[i] / 2);
            }
            return new SelfEnergy(sigma, -1, 0, 0);
        }
        double[] value = interpolated(real);
        for (int i = 0; i < orbitals.length; i++) {
            sigma.set(i, i, value[0], value[1]);
        }
        return new SelfEnergy(sigma, -1, 0, 0);
    }

    private double[] interpolated(double energy) {
        List<Double> rows = table.energy();
        double first = rows.get(0);
        double last = rows.get(rows.size() - 1);
        if (energy < first || energy > last) {
            throw new OutsideTableException(
                    "Lead '" + name + "' has a self-energy from " + first + " eV to " + last + " eV in " + table.table()
                            + ", but is needed at " + energy + " eV; extend the table or narrow the window.");
        }
        int low = 0;
        int high = rows.size() - 1;
        while (high - low > 1) {
            int middle = (low + high) >>> 1;
            if (rows.get(middle) <= energy) {
                low = middle;
            } else {
                high = middle;
            }
        }
        double part = (energy - rows.get(low)) / (rows.get(high) - rows.get(low));
        return new double[] {
            table.real().get(low)
                    + part * (table.real().get(high) - table.real().get(low)),
            table.imaginary().get(low)
                    + part * (table.imaginary().get(high) - table.imaginary().get(low))
        };
    }

    @Override
    public List<Double> modeOpenings() {
        return table == null ? List.of() : table.energy();
    }

    @Override
    public double[] bandBounds() {
        return new double[0];
    }

    @Override
    public String describe() {
        return table == null ? "wide band" : "table " + table.table();
    }
}
