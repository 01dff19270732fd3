package org.isthmus.runtime.plan;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTimeout;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.Duration;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.BitSet;
import java.util.List;
import java.util.Random;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.Lead;
import org.isthmus.runtime.device.SiteTable;
import org.isthmus.runtime.plan.SolveStep.CoupleContacts;
import org.isthmus.runtime.plan.SolveStep.Eliminate;
import org.isthmus.runtime.solve.TestDevices;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class PlannerTest {
    /** Sites at random places with one or two orbitals, near ones bonded; some parts hang on nothing. */
    private static Device scattered(long seed, int leads) {
        Random random = new Random(seed);
        int n = 150;
        double[][] places = new double[n][];
        SiteTable.Builder sites = new SiteTable.Builder(n);
        int[] orbitals = new int[n];
        for (int i = 0; i < n; i++) {
            places[i] = new double[] {10 * random.nextDouble(), 6 * random.nextDouble(), 3 * random.nextDouble()};
            orbitals[i] = 1 + random.nextInt(2);
            sites.add(
                    places[i][0],
                    places[i][1],
                    places[i][2],
                    0,
                    orbitals[i],
                    new double[2 * orbitals[i] * orbitals[i]]);
        }
        HoppingTable.Builder bonds = new HoppingTable.Builder(n);
        HoppingTable.Builder overlaps = new HoppingTable.Builder(n);
        for (int i = 0; i < n; i++) {
            for (int j = i + 1; j < n; j++) {
                double dx = places[i][0] - places[j][0];
                double dy = places[i][1] - places[j][1];
                double dz = places[i][2] - places[j][2];
                if (dx * dx + dy * dy + dz * dz < 1) {
                    (random.nextInt(4) == 0 ? overlaps : bonds)
                            .add(i, j, orbitals[i], orbitals[j], new double[2 * orbitals[i] * orbitals[j]]);
                }
            }
        }
        List<Lead> contacts = new ArrayList<>();
        for (int p = 0; p < leads; p++) {
            contacts.add(TestDevices.wideBand("p" + p, 1, 40 * p));
        }
        return TestDevices.device(sites.build(), bonds.build(), overlaps.build(), contacts);
    }

    /** What a plan must be, whatever made it: the symbolic elimination of the bond graph, overlaps included. */
    private static void check(Device device, SolvePlan plan) {
        SiteTable sites = device.sites();
        BitSet seen = new BitSet();
        int[] stepOf = new int[plan.orbitals()];
        boolean[] taken = new boolean[plan.steps().size()];
        for (int k = 0; k < plan.steps().size(); k++) {
            SolveStep step = plan.steps().get(k);
            int[] own = step instanceof Eliminate e ? e.eliminated() : ((CoupleContacts) step).orbitals();
            for (int orbital : own) {
                assertFalse(seen.get(orbital), "eliminated once");
                seen.set(orbital);
                stepOf[orbital] = k;
            }
            for (int child : step.children()) {
                assertTrue(child < k, "children first");
                assertFalse(taken[child], "one parent");
                taken[child] = true;
                for (int orbital : ((Eliminate) plan.steps().get(child)).border()) {
                    assertTrue(
                            Arrays.binarySearch(own, orbital) >= 0
                                    || step instanceof Eliminate e && Arrays.binarySearch(e.border(), orbital) >= 0,
                            "a border passes to the parent");
                }
            }
        }
        assertEquals(sites.orbitalCount(), seen.cardinality());
        for (int k = 0; k + 1 < taken.length; k++) {
            assertTrue(taken[k], "every step has a parent");
        }
        for (HoppingTable bonds : List.of(device.hoppings(), device.overlaps())) {
            for (int b = 0; b < bonds.count(); b++) {
                int from = sites.firstOrbital(bonds.from(b));
                int to = sites.firstOrbital(bonds.to(b));
                if (stepOf[from] != stepOf[to]) {
                    Eliminate first = (Eliminate) plan.steps().get(Math.min(stepOf[from], stepOf[to]));
                    assertTrue(Arrays.binarySearch(first.border(), stepOf[from] < stepOf[to] ? to : from) >= 0);
                }
            }
        }
        for (Lead lead : device.leads()) {
            for (int site : lead.contactSites()) {
                assertEquals(plan.steps().size() - 1, stepOf[sites.firstOrbital(site)], "leads touch the root");
            }
        }
    }

    @ParameterizedTest
    @ValueSource(longs = {1, 2, 3, 4})
    void everyPartitionIsAnElimination(long seed) {
        for (int leads = 1; leads <= 3; leads++) {
            Device device = scattered(seed, leads);
            check(device, Planner.slices(device));
            for (int leaf : new int[] {1, 7, 40, 1000}) {
                check(device, Planner.nestedDissection(device, leaf));
            }
            check(device, Planner.plan(device));
        }
    }

    /** A wire is best sliced or nearly so, a sheet dissected: two dimensions halve the exponent of the front (George 1973). */
    @Test
    void aSheetIsDissected() {
        Device sheet = TestDevices.strip(100, 100, s -> 0, 0);
        SolvePlan plan = Planner.plan(sheet);
        assertTrue(plan.method().startsWith("nested dissection"), plan.method());
        assertTrue(plan.flops() < 0.1 * Planner.slices(sheet).flops());
        String text = plan.toString();
        assertEquals(text, Planner.plan(sheet).toString(), "stable");
        assertTrue(text.contains("slices: 99 steps"), text);
        assertTrue(text.lines().count() < 15, "condensed");
    }

    /** The planner's own aim: a large device is planned in seconds. */
    @Test
    void largeDevicesArePlannedInSeconds() {
        Device sheet = TestDevices.strip(500, 400, s -> 0, 0);
        Device chain = TestDevices.strip(200_000, 1, s -> 0, 0);
        assertTimeout(Duration.ofSeconds(20), () -> Planner.plan(sheet));
        assertTimeout(Duration.ofSeconds(20), () -> Planner.plan(chain));
    }
}
