package org.isthmus.language.formatting;

import static org.junit.jupiter.api.Assertions.assertEquals;

import com.google.inject.Inject;
import org.eclipse.xtext.resource.XtextResource;
import org.eclipse.xtext.testing.InjectWith;
import org.eclipse.xtext.testing.extensions.InjectionExtension;
import org.eclipse.xtext.testing.util.ParseHelper;
import org.isthmus.language.isthmus.SourceFile;
import org.isthmus.language.tests.IsthmusInjectorProvider;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.extension.ExtendWith;

@ExtendWith(InjectionExtension.class)
@InjectWith(IsthmusInjectorProvider.class)
class IsthmusFormatterTest {
    @Inject
    private ParseHelper<SourceFile> parser;

    @Inject
    private FileLayout layout;

    private String formatted(String text) throws Exception {
        return layout.format((XtextResource) parser.parse(text).eResource());
    }

    private static final String CANONICAL =
            """
            namespace harbour.wires;

            import harbour.materials.*;
            import harbour.lattices.Comb;

            // the pitch of the mask
            let pitch = 0.25 nm; // measured
            let area = pitch^2;

            material GaAs { mass = 0.067 me; g = -0.44; }

            lattice Comb(a = 0.3 nm, t = 1 eV) {
                vector u = (a, 0 nm);
                site A at (0 nm, 0 nm);
                site B at (0 nm, a/2) { orbitals = 2; energy = 2*t; }
                hopping A -> A over -u = -t*sigma0 + 1i*alpha/(2*a)*sigmaY;

                /* kept */
                overlap A -> A over 2*u = 0.1;
            }

            /** A wire. */
            device Wire extends Base {
                parameter height : energy = 0.5 eV in 0 eV .. 2 eV;
                parameter D : energy^2 = 1e-4 eV^2;
                lattice Comb(a = pitch);
                body box(0 nm .. 9 nm) - disc((3 nm, -1 nm), 2 nm) & ring((0 nm, 0 nm), 1 nm, 2 nm);
                potential bump = -height*x/nm where not x < 3 nm and 0 nm <= x <= -(1 nm);
                hopping weak scaled 0.5 where x > 3 nm;
                magnetic field = 5 T;
                lead source from left { temperature = 300 K; floating; }
                dephasing phonons correlated(exp(-distance/nm)) {
                    calibrate mobility = 1500 cm^2/(V*s) at 0.1 eV;
                }
                replace potential dent = [[1, 2], [3, 4]]*1 eV;
                remove potential dent2;
            }

            measurement Spectrum of Wire {
                energy = 0 eV .. 1 eV in 201 points;
                record transmission, ldos at (height = 0.3 eV, 0.2 V);
                expect max(abs(current(source) + current(drain))) <= 1e-12 A within 5 %;
                expect transmission(source, drain) at -0.2 eV == 1;
            }
            """;

    @Test
    void theCanonicalLayoutStays() throws Exception {
        assertEquals(CANONICAL, formatted(CANONICAL));
    }

    @Test
    void whiteSpaceDoesNotMatter() throws Exception {
        String untidy = CANONICAL
                .replace(" = ", "=")
                .replace(", ", " ,  ")
                .replace("    ", "\t ")
                .replace(" + ", "+")
                .replaceAll("(?<=[a-z0-9])\\*(?=[a-z(])", " * ");
        assertEquals(CANONICAL, formatted(untidy));
    }

    @Test
    void formattingTwiceIsFormattingOnce() throws Exception {
        String untidy = "let a=1;device D{body box(0 nm..1 nm);\n\n\n\nlead l from left;}\n\n\n\n// end\nlet b=2;";
        String once = formatted(untidy);
        assertEquals(once, formatted(once));
        assertEquals(
                """
                let a = 1;

                device D {
                    body box(0 nm .. 1 nm);

                    lead l from left;
                }

                // end
                let b = 2;
                """,
                once);
    }
}
