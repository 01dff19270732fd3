package org.isthmus.examples;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import org.isthmus.language.ide.pipeline.Pipeline;
import org.isthmus.language.ide.pipeline.Project;
import org.isthmus.language.ide.pipeline.SourceFile;
import org.isthmus.runtime.result.MeasurementResult;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Every shipped file checks without errors or warnings and runs, and everything that it expects holds. */
class ExamplesRunTest {
    @Test
    void theWholeProjectChecksWithoutComplaint() throws Exception {
        assertEquals(List.of(), ExampleRuns.complaints(ExampleFiles.FOLDER));
    }

    static Stream<Path> measuring() {
        return ExampleFiles.measuring();
    }

    @ParameterizedTest
    @MethodSource("measuring")
    void expectationsHold(Path file) throws Exception {
        List<MeasurementResult> results = ExampleRuns.run(file);
        assertFalse(results.isEmpty(), "no result for " + file);
        for (MeasurementResult result : results) {
            // six decades above rounding, below anything that a user would notice
            assertTrue(result.residual() < 1e-7, result.folder() + ": " + result.residual());
            assertFalse(result.verdicts().isEmpty(), result.folder() + " expects nothing");
            result.verdicts().forEach(v -> assertTrue(v.held(), v.sentence()));
        }
    }

    /** Canonical layout: what a user reads first should look as the formatter leaves it. */
    @Test
    void theFilesAreLaidOutCanonically() throws Exception {
        Pipeline pipeline = new Pipeline("tests");
        Project project = pipeline.load(List.of(ExampleFiles.FOLDER));
        assertEquals(ExampleFiles.all().size(), project.parsed().size());
        for (SourceFile file : project.parsed()) {
            assertEquals(Optional.empty(), pipeline.relaidOut(project, file), file.shown());
        }
    }
}
