package org.isthmus.language.elaboration;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.List;
import java.util.Map;
import java.util.concurrent.CancellationException;
import java.util.stream.IntStream;
import org.isthmus.runtime.device.DeviceText;
import org.junit.jupiter.api.Test;

class ElaborationThreadsTest {
    private static final String TEXT =
            """
            device Ribbon {
                parameter seed = 1;
                lattice Honeycomb;
                body box(0 nm .. 6 nm, 0 nm .. 3 nm);
                potential dirt = normal(10 meV, seed);
                magnetic field = 20 T;
                lead l from left;
                lead r from right;
            }
            """;

    @Test
    void severalThreadsGetWhatOneGets() {
        Elaborator family = Texts.family(TEXT);
        List<String> alone =
                IntStream.range(0, 24).mapToObj(seed -> text(family, seed % 6)).toList();
        List<String> together = IntStream.range(0, 24)
                .parallel()
                .mapToObj(seed -> text(family, seed % 6))
                .toList();
        assertEquals(alone, together);
        assertEquals(6, alone.stream().distinct().count());
    }

    private static String text(Elaborator family, double seed) {
        return DeviceText.of(family.elaborate(Map.of("seed", seed)).device());
    }

    @Test
    void aSignalEndsIt() {
        Elaborator family = Texts.family(TEXT);
        int[] asked = {0};
        assertThrows(CancellationException.class, () -> family.elaborate(Map.of(), () -> asked[0]++ > 3));
        Thread.currentThread().interrupt();
        try {
            assertThrows(CancellationException.class, () -> family.elaborate(Map.of()));
        } finally {
            Thread.interrupted();
        }
    }
}
