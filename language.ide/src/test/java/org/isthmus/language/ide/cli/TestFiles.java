package org.isthmus.language.ide.cli;

/** Device files for tests of commands. */
final class TestFiles {
    /**
     * A chain of 11 sites with one raised by {@code height}; spacing and mass are such that t = 1 eV up to rounding. Closed
     * form: T = (2t sin ka)²/((2t sin ka)² + height²).
     */
    static final String WIRE =
            """
            let t = 1 eV;
            lattice Plain(a = 1 nm) {
                vector u = (a, 0 nm);
                site s at (0 nm, 0 nm);
                hopping s -> s over u = -t;
            }
            device Wire {
                parameter height : energy = 0.5 eV in 0 eV .. 2 eV;
                lattice Plain;
                body box(0 nm .. 10 nm);
                potential bump = height where 4.5 nm <= x <= 5.5 nm;
                lead source from left { temperature = 0 K; mu = 0 eV; }
                lead drain from right { temperature = 0 K; mu = 0 eV; }
            }
            """;

    /** At E = 0: sin ka = 1, T = 4/(4 + height²) = 0.9411… */
    static final String SPECTRUM =
            """
            measurement Spectrum of Wire {
                energy = -1.5 eV .. 1.5 eV in 31 points;
                record transmission, dos;
                expect transmission(source, drain) at 0 eV == 4/4.25 within 1e-9;
            }
            """;

    static final String BROKEN =
            """
            measurement Wrong of Wire {
                energy = -1 eV .. 1 eV in 3 points;
                record transmission;
                expect transmission(source, drain) at 0 eV >= 1;
            }
            """;

    private TestFiles() {}
}
