package org.isthmus.runtime.kernel.ejml;

import org.isthmus.runtime.kernel.BackendContract;
import org.isthmus.runtime.kernel.ComplexBackend;

class PureBackendTest extends BackendContract {
    private final ComplexBackend backend = new PureBackend();

    @Override
    protected ComplexBackend backend() {
        return backend;
    }
}
