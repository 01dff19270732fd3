package org.isthmus.language.elaboration;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import org.eclipse.emf.common.util.URI;
import org.isthmus.runtime.device.HoppingTable;
import org.isthmus.runtime.device.TabulatedLead;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.api.io.TempDir;

/** Each finding fires with its numbers, once, at its line; the twin without the mistake is silent. */
class ElaborationFindingsTest {
    private static final String LATTICE =
            """
            lattice L(a = 0.3 nm, t = 1 eV) {
                vector a1 = (a, 0 nm);
                vector a2 = (0 nm, a);
                site A at (0 nm, 0 nm);
                site B at (a/2, a/2);
                hopping A -> B = -t;
                hopping A -> A over a1 = -t;
                hopping A -> A over a2 = -t;
            }
            device D {
                lattice L;
                body box(0 nm .. 3 nm, 0 nm .. 1 nm);
                lead source from left;
                lead drain from right;
            }
            """;

    private static final String SHEET =
            """
            device S {
                lattice Square(a = 1 nm, m = 1 me);
                body box(0 nm .. 9 nm, 0 nm .. 4 nm);
                lead source from left;
                lead drain from right;
            }
            """;

    private static void silent(String text) {
        assertEquals(List.of(), Texts.findings(text));
    }

    private static void fires(String text, String from, String to, String... expected) {
        assertTrue(text.contains(from), from);
        assertEquals(List.of(expected), Texts.findings(text.replace(from, to)));
    }

    @Test
    void soundTextsAreSilent() {
        silent(LATTICE);
        silent(SHEET);
    }

    @Test
    void lattices() {
        fires(
                LATTICE,
                "(0 nm, a);",
                "(2*a, 0 nm);",
                "3 dependent-vectors: Vector 'a2' of lattice 'L' = (0.6 nm, 0 nm, 0 nm) is a combination of the others: it must point out of their line.");
        fires(
                LATTICE,
                "(a/2, a/2);",
                "(-2*a, a);",
                "5 coinciding-sites: Sites 'A' and 'B' of lattice 'L' lie at one place of different cells: give one of them another position or more orbitals.");
        fires(
                LATTICE,
                "A -> B = -t;",
                "A -> B = -t*sigma0;",
                "6 matrix-size: Hopping A -> B is a matrix of size 2, but the site has 1 orbital.");
        fires(
                LATTICE,
                "A -> A over a2 = -t;",
                "A -> A over -a1 = -t;",
                "8 bond-twice: Hopping A -> A over -a1 is the partner of a bond given before, seen from its other end: it is implied, remove it.");
        fires(
                LATTICE,
                "A -> A over a2 = -t;",
                "A -> A over a1 = t;",
                "8 bond-twice: Hopping A -> A over a1 is given twice: remove one of the two.");
        fires(
                LATTICE,
                "A -> A over a2 = -t;",
                "A -> A = -t;",
                "8 bond-twice: Hopping A -> A joins a site to itself: write it as its energy.");
        fires(
                LATTICE,
                "A -> A over a2 = -t;",
                "A -> A over a2/2 = -t;",
                "8 not-a-translation: Hopping A -> A goes over (0 nm, 0.15 nm, 0 nm), which is no whole combination of the vectors of lattice 'L'.");
        fires(
                LATTICE,
                "site A at (0 nm, 0 nm);",
                "site A at (0 nm, 0 nm) { orbitals = 2; energy = t*[[0, 1], [2, 0]]; }",
                "4 not-hermitian: The energy of site 'A' is a matrix that is not Hermitian: it differs from its adjoint by 50 % of its largest element.");
    }

    @Test
    void overlaps() {
        String overlap = LATTICE.replace("A -> A over a2 = -t;", "A -> A over a2 = -t; overlap A -> B = s;");
        silent(overlap.replace("= s;", "= 0.3;"));
        fires(
                overlap,
                "= s;",
                "= 1.25;",
                "8 overlap-not-positive: The overlaps of lattice 'L' give a state the norm -0.25, which must be positive: make them smaller.");
    }

    @Test
    void orbitalsOfDifferentNumber() {
        // two orbitals on A, one on B: the bond needs a matrix of two rows and one column
        String text = LATTICE.replace("site A at (0 nm, 0 nm);", "site A at (0 nm, 0 nm) { orbitals = 2; }");
        assertEquals(
                List.of(
                        "6 matrix-size: Hopping A -> B joins 2 and 1 orbitals: it needs a matrix of 2 rows and 1 column, not a number."),
                Texts.findings(text));
        String fits = text.replace("A -> B = -t;", "A -> B = [[-t], [0.5i*t]];");
        silent(fits);
        HoppingTable bonds = Texts.device(fits).hoppings();
        assertEquals(-1, bonds.real(0, 0, 0));
        assertEquals(0.5, bonds.imaginary(0, 1, 0));
        fires(
                fits,
                "[[-t], [0.5i*t]]",
                "[[-t, t, t], [t, t, t]]",
                "6 matrix-size: Hopping A -> B needs a matrix of 2 rows and 1 column.");
    }

    @Test
    void bodies() {
        fires(
                SHEET,
                "box(0 nm .. 9 nm, 0 nm .. 4 nm)",
                "box(0.1 nm .. 0.9 nm, 0 nm .. 4 nm)",
                "3 no-site: The body holds no site of lattice 'Square' (shortest bond 1 nm, zero cell at x = 0 nm, y = 0 nm): it lies in x from 0.1 nm to 0.9 nm, y from 0 nm to 4 nm; move or enlarge it.");
        fires(
                SHEET,
                "box(0 nm .. 9 nm, 0 nm .. 4 nm)",
                "box(0 nm .. 9 nm)",
                "3 unbounded-body: The body has no bounds along y, but lattice 'Square' goes on there for ever: give the shape a range along y.");
        fires(
                SHEET,
                "0 nm .. 4 nm);",
                "0 nm .. 4 nm) + box(4 nm .. 4 nm, 20 nm .. 20 nm) + box(0 nm .. 9 nm, 7 nm .. 8 nm);",
                "3 lonely-site: The site at x = 4 nm, y = 20 nm has no neighbour: nothing flows through it; leave it out or close the gap.",
                "3 unconnected-parts: The body has 2 parts without a bond between them: the largest has 50 sites, the smallest 20 sites and begins at x = 0 nm, y = 7 nm; close the gap if they belong together.");
    }

    @Test
    void aScaleOfZeroCutsTheBody() {
        fires(
                SHEET,
                "lead source",
                "hopping cut scaled 0 where x == 4.5 nm; lead source",
                "3 unconnected-parts: The body has 2 parts without a bond between them: the largest has 25 sites, the smallest 25 sites and begins at x = 0 nm, y = 0 nm; close the gap if they belong together.");
    }

    @Test
    @Timeout(10)
    void hugeBodiesEndSoon() {
        fires(
                SHEET,
                "box(0 nm .. 9 nm, 0 nm .. 4 nm)",
                "box(0 nm .. 30000 nm, 0 nm .. 30000 nm)",
                "3 body-too-large: The body has too many sites: about 900000000 of lattice 'Square' lie in the box around it, and 2000000 are the most; take a smaller body or a wider spacing.");
        for (String size : List.of("1 m", "1e30 m", "1e290 m")) {
            List<String> found =
                    Texts.findings(SHEET.replace("9 nm, 0 nm .. 4 nm", size + ", -" + size + " .. " + size));
            assertEquals(1, found.size());
            assertTrue(found.get(0).startsWith("3 body-too-large"), found.get(0));
        }
    }

    @Test
    void potentials() {
        fires(
                SHEET,
                "lead source",
                "potential p = 1 eV/((x - 4 nm)/nm) where y > 2 nm; lead source",
                "4 not-finite: Potential 'p' is infinite, not a finite energy, at x = 4 nm, y = 3 nm and at 1 further site.");
        fires(
                SHEET,
                "lead source",
                "potential p = 1 eV*sigmaZ; lead source",
                "4 matrix-size: Potential 'p' is a matrix of size 2, but there is 1 orbital at x = 0 nm, y = 0 nm and at 49 further sites.");
        fires(
                SHEET,
                "lead source",
                "hopping h scaled 1/(x/nm - 2.5); lead source",
                "4 not-finite: The factor of hopping 'h' is infinite, not a finite number, in the middle of a bond at x = 2.5 nm, y = 0 nm and at 4 further bonds.");
    }

    @Test
    void leads() {
        fires(
                SHEET,
                "lead drain from right;",
                "lead drain from right { across y > 5 nm; }",
                "5 lead-without-site: Lead 'drain' touches no site: the body ends at x = 9 nm (y from 0 to 4 nm), and 'across' takes none of the sites there.");
        fires(
                SHEET,
                "lead drain from right;",
                "lead drain from left { across y > 3 nm; }",
                "5 leads-share-site: Leads 'source' and 'drain' share the site at x = 0 nm, y = 4 nm: give each its part of the edge by 'across'.");
        fires(
                SHEET,
                "lead drain from right;",
                "lead drain from front;",
                "5 edge-not-periodic: The edge does not repeat along lead 'drain': no vector of lattice 'Square' lies along z; turn the lattice so that one does, or take another side.");
        fires(
                SHEET,
                "lead drain from right;",
                "lead drain from right { temperature = -3 K; }",
                "5 negative-temperature: Lead 'drain' has the temperature -3 K: it must be 0 K or more.");
        fires(
                SHEET,
                "lead drain from right;",
                "lead drain on x > 8 nm { broadening = -1 meV; }",
                "5 negative-broadening: The broadening of lead 'drain' is -0.001 eV at x = 9 nm, y = 0 nm: it must not be negative.");
        fires(
                SHEET,
                "lead drain from right;",
                "lead drain on x > 8 nm { }",
                "5 incomplete-lead: Lead 'drain' says nothing of its strength: give it broadening = ENERGY; or selfenergy = table(\"file.csv\");");
        fires(
                SHEET,
                "lead drain from right;",
                "lead drain on x > 8 nm { broadening = 1 meV; potential = 1 meV; }",
                "5 lead-without-bands: Lead 'drain' lies on sites and has no bands that a potential could shift: remove it, or take a lead from a side.");
        // on-leads may share sites with anything
        silent(SHEET.replace(
                "lead drain from right;",
                "lead drain on x < 1 nm { broadening = 1 meV; } lead e on x < 1 nm { broadening = 1 meV; }"));
        fires(
                SHEET,
                "lead drain from right;",
                "lead drain from right { floating; }",
                "5 not-solved-yet: Floating leads are not solved yet: give 'drain' a mu instead.");
    }

    @Test
    void aBodyShorterThanAPeriodHasNoEdgeThatGoesOn() {
        String sliver =
                """
                device H {
                    lattice Honeycomb;
                    body box(0 nm .. 2 nm, 0 nm .. 0.1 nm);
                    lead top from top;
                }
                """;
        List<String> found = Texts.findings(sliver);
        assertEquals(
                "4 edge-not-periodic: The edge does not go on along lead 'top': its 9 sites, moved outward by the period 0.426084 nm, have no bond to the next cell; make the body at least that long along y.",
                found.get(0));
    }

    @Test
    void contactSteps() {
        String raised = SHEET.replace("lead source", "potential p = 0.2 eV; lead source");
        assertEquals(2, Texts.findings(raised).size());
        assertEquals(
                "4 contact-step: The potential steps by 0.2 eV from lead 'source' to the body at x = 0 nm, y = 0 nm: carriers are reflected there; let the potential end inside the body, or give the lead potential = 0.2 eV.",
                Texts.findings(raised).get(0));
        silent(raised.replace("from left;", "from left { potential = 0.2 eV; }")
                .replace("from right;", "from right { potential = 0.2 eV; }"));
        silent(SHEET.replace("lead source", "potential p = 0.2 eV*gauss(x - 4.5 nm, 1 nm); lead source"));
    }

    @Test
    void strongFields() {
        // h/q = 4135.67 T nm²: 0.1 quanta through 1 nm² are 413.6 T
        silent(SHEET.replace("lead source", "magnetic field = 413 T; lead source"));
        assertEquals(
                1,
                Texts.findings(SHEET.replace("lead source", "magnetic field = -414 T; lead source"))
                        .size());
        // a chain has no loop
        silent("device C { lattice Chain; body box(0 nm .. 5 nm); magnetic field = 5000 T; lead l from left; }");
    }

    @Test
    void oneSiteAloneIsABody() {
        silent(
                "device Dot { lattice Chain; body box(0 nm .. 0.1 nm); lead l on x < 1 nm { broadening = 1 meV; } lead r on x < 1 nm { broadening = 2 meV; } }");
    }

    @Test
    void selfEnergyTables(@TempDir Path folder) throws Exception {
        String text =
                SHEET.replace("lead drain from right;", "lead drain on x > 8 nm { selfenergy = table(\"s.csv\"); }");
        URI uri = URI.createFileURI(folder.resolve("t.isth").toString());
        Files.writeString(folder.resolve("s.csv"), "energy (meV),real (eV),imag (eV)\n0,0.01,-0.05\n200,0.03,-0.01\n");
        TabulatedLead lead = (TabulatedLead) Texts.family(Texts.resource(text, uri))
                .elaborate(Map.of())
                .device()
                .lead("drain");
        assertEquals(List.of(0.0, 0.2), lead.energy());
        assertEquals(List.of(-0.05, -0.01), lead.imaginary());
        assertEquals(5, lead.contactSites().size());
        Files.writeString(folder.resolve("s.csv"), "energy (eV),real (eV),imag (eV)\n0,0.01,0.05\n0.2,0.03,-0.01\n\n");
        assertEquals(
                "5 negative-broadening: Table s.csv has a self-energy with the imaginary part 0.05 eV at 0 eV: it must not be positive.",
                Texts.told(Texts.family(Texts.resource(text, uri))
                        .elaborate(Map.of())
                        .findings()
                        .get(0)));
        Files.writeString(folder.resolve("s.csv"), "energy (eV),imag (eV)\n0,-0.05\n0.2,-0.01\n\n\n");
        assertEquals(
                "5 table-problem: Table s.csv, line 1, column 1: the header of a self-energy reads energy (eV),real (eV),imag (eV).",
                Texts.told(Texts.family(Texts.resource(text, uri))
                        .elaborate(Map.of())
                        .findings()
                        .get(0)));
    }

    @Test
    void aShippedLatticeWithUnfitValuesIsToldWhereItIsUsed() {
        fires(SHEET, "a = 1 nm", "a = 0 nm", "2 dependent-vectors: Vector 'u' of lattice 'Square' has no length.");
    }

    @Test
    void aLatticeCanBeCheckedAlone() {
        assertEquals(List.of(), Elaborator.check(Texts.lattice(LATTICE)));
        assertEquals(
                1,
                Elaborator.check(Texts.lattice(LATTICE.replace("(0 nm, a);", "(2*a, 0 nm);")))
                        .size());
    }
}
