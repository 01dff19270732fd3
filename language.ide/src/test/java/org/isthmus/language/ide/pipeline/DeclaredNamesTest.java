package org.isthmus.language.ide.pipeline;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Set;
import org.junit.jupiter.api.Test;

class DeclaredNamesTest {
    @Test
    void onlyTheFileLevelDeclares() {
        DeclaredNames names = DeclaredNames.scan(
                """
                /* device NotThis */ namespace wires.long_;
                // let norThis = 1;
                let a = "device text";
                device Wire extends Base { let inner = 2; lattice Chain(a = a); }
                """);
        assertEquals("wires.long_", names.namespace());
        assertEquals(Set.of("a", "Wire"), names.declared());
        assertTrue(names.words().containsAll(Set.of("Base", "inner", "Chain")));
        assertFalse(names.words().contains("text"));
    }

    @Test
    void aFileIsNeededForItsNamesOnly() {
        DeclaredNames user = DeclaredNames.scan("import lib.*; device Wire { let m = GaAs.mass; }");
        assertTrue(user.mayUse(DeclaredNames.scan("namespace lib; material GaAs { mass = 0.067 me; }")));
        assertFalse(user.mayUse(DeclaredNames.scan("namespace lib; material InAs { mass = 0.023 me; }")));
    }

    @Test
    void anotherNamespaceIsSeenOnlyWhereItIsSpelt() {
        DeclaredNames library = DeclaredNames.scan("namespace lab.wires; let spacing = 1 nm; device Wire { }");
        assertFalse(DeclaredNames.scan("namespace mine; device Other { lattice Chain(a = spacing); }")
                .mayUse(library));
        assertTrue(DeclaredNames.scan("import lab.wires.*; device Other extends Wire { }")
                .mayUse(library));
        assertTrue(DeclaredNames.scan("device Other extends lab.wires.Wire { }").mayUse(library));
        assertFalse(DeclaredNames.scan("import lab.leads.*; device Other extends Wire { }")
                .mayUse(library));
    }

    @Test
    void ownDeclarationComesBeforeAnothersOfTheSameName() {
        DeclaredNames own = DeclaredNames.scan("device Wire { } measurement M of Wire { }");
        assertFalse(own.mayUse(DeclaredNames.scan("device Wire { }")));
    }

    @Test
    void unfinishedTextIsNoTrouble() {
        assertEquals(Set.of("a"), DeclaredNames.scan("let a = \"open").declared());
        assertEquals(Set.of("a", "b"), DeclaredNames.scan("let a /*/ let b").declared(), "no comment to the lexer");
    }
}
