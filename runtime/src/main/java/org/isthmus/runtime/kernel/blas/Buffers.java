package org.isthmus.runtime.kernel.blas;

import org.bytedeco.javacpp.DoublePointer;
import org.bytedeco.javacpp.IntPointer;

/** Room outside the heap for the operands of one product, one per thread, growing to the largest product so far. */
final class Buffers {
    private static final ThreadLocal<Buffers> OF_THREAD = ThreadLocal.withInitial(Buffers::new);

    private final DoublePointer[] operands = new DoublePointer[3];
    private final DoublePointer scalar = new DoublePointer(2);
    private IntPointer pivots = new IntPointer(64);
    private final DoublePointer one = new DoublePointer(1.0, 0.0);

    static Buffers ofThread() {
        return OF_THREAD.get();
    }

    /** Copies numbers into an operand's buffer. */
    DoublePointer fill(int operand, double[] data) {
        DoublePointer buffer = operands[operand];
        if (buffer == null || buffer.capacity() < data.length) {
            if (buffer != null) {
                buffer.close();
            }
            buffer = new DoublePointer(Math.max(1024, data.length));
            operands[operand] = buffer;
        }
        return buffer.position(0).put(data, 0, data.length);
    }

    /** Room for pivots. */
    IntPointer pivots(int count) {
        if (pivots.capacity() < count) {
            pivots.close();
            pivots = new IntPointer(2L * count);
        }
        return pivots;
    }

    DoublePointer scalar(double real) {
        return scalar.put(0, real).put(1, 0.0);
    }

    DoublePointer one() {
        return one;
    }
}
