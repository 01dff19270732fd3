package org.isthmus.runtime.kernel.blas;

import static org.junit.jupiter.api.Assertions.assertTrue;

import org.isthmus.runtime.kernel.BackendContract;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.junit.jupiter.api.Test;

class NativeBackendTest extends BackendContract {
    private final ComplexBackend backend = NativeBackend.load().orElseThrow();

    @Override
    protected ComplexBackend backend() {
        return backend;
    }

    @Test
    void tellsTheProcessorTypeThatTheLibraryChose() {
        assertTrue(backend.description().contains("OpenBLAS"), backend.description());
        assertTrue(backend.description().contains("core type"), backend.description());
    }
}
