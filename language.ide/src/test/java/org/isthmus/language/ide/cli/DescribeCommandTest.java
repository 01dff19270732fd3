package org.isthmus.language.ide.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class DescribeCommandTest {
    @TempDir
    Path folder;

    @Test
    void tellsWhatCounts() throws Exception {
        Path file = Files.writeString(folder.resolve("wire.isth"), TestFiles.WIRE);
        CommandLineRun run = CommandLineRun.of("describe", file);
        assertEquals(0, run.status(), run.err());
        for (String part : List.of(
                "device Wire",
                "11 sites, 11 orbitals, 10 bonds",
                "lead source from left",
                // E = −2t cos ka: from −2t to 2t, and a wave of four sites in the middle
                "bands from -2 to 2 eV; 1 open mode at mu, shortest wave 4 nm = 4 spacings",
                "plan: ",
                "estimate per energy and core")) {
            assertTrue(run.out().contains(part), part + " in\n" + run.out());
        }
    }

    @Test
    void listsSitesInTheOrderOfTheTables() throws Exception {
        Path file = Files.writeString(folder.resolve("wire.isth"), TestFiles.WIRE);
        CommandLineRun run = CommandLineRun.of("describe", file, "--sites");
        assertEquals(0, run.status(), run.err());
        assertEquals(
                "site,x (nm),y (nm),z (nm),basis,orbitals,energy (eV)",
                run.lines().get(0));
        assertEquals("5,5,0,0,0,1,0.5", run.lines().get(6));
        assertEquals(12, run.lines().size());
    }

    @Test
    void severalDevicesOrOne() throws Exception {
        Path file = Files.writeString(
                folder.resolve("wires.isth"), TestFiles.WIRE + "device High extends Wire { height = 1 eV; }\n");
        assertEquals(
                2,
                CommandLineRun.of("describe", file).lines().stream()
                        .filter(l -> l.startsWith("device "))
                        .count());
        CommandLineRun one = CommandLineRun.of("describe", file, "--device", "High");
        assertTrue(one.out().contains("height = 1 eV"), one.out());
        CommandLineRun none = CommandLineRun.of("describe", file, "--device", "Low");
        assertEquals(2, none.status());
        assertTrue(none.err().contains("there are Wire, High"), none.err());
    }

    @Test
    void aBrokenDeviceIsFindings() throws Exception {
        Path file = Files.writeString(
                folder.resolve("wire.isth"), TestFiles.WIRE.replace("box(0 nm .. 10 nm)", "box(20.2 nm .. 20.4 nm)"));
        CommandLineRun run = CommandLineRun.of("describe", file);
        assertEquals(1, run.status());
        assertTrue(run.err().startsWith(file + ":"), run.err());
    }
}
