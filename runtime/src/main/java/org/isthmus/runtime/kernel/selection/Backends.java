package org.isthmus.runtime.kernel.selection;

import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.blas.NativeBackend;
import org.isthmus.runtime.kernel.ejml.PureBackend;

/** The back ends of this installation. */
public final class Backends {
    private static final ComplexBackend CHOSEN = choose();

    private Backends() {}

    /** The native one where its library loads, else the pure one. */
    public static ComplexBackend standard() {
        return CHOSEN;
    }

    /**
     * The back end with this name.
     *
     * @throws IllegalArgumentException for another name, or a native library that does not load
     */
    public static ComplexBackend named(String name) {
        return switch (name) {
            case "native" ->
                NativeBackend.load()
                        .orElseThrow(
                                () -> new IllegalArgumentException("the native linear algebra does not load here"));
            case "pure" -> new PureBackend();
            default -> throw new IllegalArgumentException("no back end '" + name + "'; there are native and pure");
        };
    }

    private static ComplexBackend choose() {
        return NativeBackend.load().map(ComplexBackend.class::cast).orElseGet(PureBackend::new);
    }
}
