package org.isthmus.runtime.device;

import java.util.Locale;

/** The side of a body that a lead leaves from, with its outward direction. */
public enum Side {
    LEFT(0, -1),
    RIGHT(0, 1),
    BOTTOM(1, -1),
    TOP(1, 1),
    BACK(2, -1),
    FRONT(2, 1);

    private final int axis;
    private final int sign;

    Side(int axis, int sign) {
        this.axis = axis;
        this.sign = sign;
    }

    /** 0, 1, 2 for x, y, z. */
    public int axis() {
        return axis;
    }

    /** +1 where outward means growing coordinates. */
    public int sign() {
        return sign;
    }

    /** The word in a device file. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }
}
