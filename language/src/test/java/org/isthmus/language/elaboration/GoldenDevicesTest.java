package org.isthmus.language.elaboration;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.stream.Stream;
import org.isthmus.runtime.device.DeviceText;
import org.junit.jupiter.api.DynamicTest;
import org.junit.jupiter.api.TestFactory;

/**
 * Elaborated devices as text, beside the device files they come from. With {@code -Disthmus.golden.write=true} the texts
 * are written anew; a person reads the difference.
 */
class GoldenDevicesTest {
    private static final Path FOLDER = Path.of("src/test/resources/org/isthmus/language/elaboration/golden");
    private static final boolean WRITE = Boolean.getBoolean("isthmus.golden.write");

    @TestFactory
    Stream<DynamicTest> everyDevice() throws IOException {
        Map<String, Path> files = new LinkedHashMap<>();
        try (Stream<Path> found = Files.list(FOLDER)) {
            found.filter(path -> path.toString().endsWith(".isth"))
                    .sorted()
                    .forEach(path -> files.put(path.getFileName().toString(), path));
        }
        assertTrue(files.size() >= 6, "the device files are missing: " + files.keySet());
        return files.entrySet().stream()
                .map(entry -> DynamicTest.dynamicTest(entry.getKey(), () -> compare(entry.getValue())));
    }

    private static void compare(Path file) throws IOException {
        Elaborator family = Texts.family(Files.readString(file));
        StringBuilder text = new StringBuilder();
        family.stages(Map.of()).forEach((pass, told) -> {
            if (pass.equals("ExpandLattice") || pass.equals("VerifyDevice")) {
                text.append("== ").append(pass).append('\n').append(told);
            }
        });
        text.append("== Device\n")
                .append(DeviceText.of(family.elaborate(Map.of()).device()));
        Path golden = FOLDER.resolve(file.getFileName().toString().replace(".isth", ".txt"));
        if (WRITE) {
            Files.writeString(golden, text);
        }
        assertEquals(Files.readString(golden), text.toString());
    }
}
