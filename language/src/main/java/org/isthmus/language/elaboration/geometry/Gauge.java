package org.isthmus.language.elaboration.geometry;

import org.isthmus.runtime.device.Side;
import org.isthmus.runtime.units.PhysicalConstants;

/**
 * Peierls phases of a uniform field B along z. Carriers have charge −q, so ⟨i|H|j⟩ takes the factor exp(+i(q/ħ)∫A·dl),
 * i to j, along the straight bond (Peierls, Z. Phys. 80, 763 (1933), with the sign of the charge).
 *
 * <p>In the body A = (−By, 0), which does not depend on x: leads along x, and along z, stay periodic. Leads along y need A
 * = (0, Bx) = (−By, 0) + ∇(Bxy): a site i of theirs carries the phase χ = (q/ħ)Bxy, so that ⟨i|H|j⟩ takes exp i(χ_j − χ_i)
 * as well, on bonds inside the lead and on those that join it to the body. Fluxes through loops are the same in any
 * gauge, also through loops that cross from body to lead.
 *
 * <p>The straight-line integral of a linear A is its value at the bond's middle times the bond: nothing is neglected.
 */
public final class Gauge {
    /** No field: every phase is zero. */
    public static final Gauge NONE = new Gauge(0);

    private final double fluxDensity;

    private Gauge(double fluxDensity) {
        this.fluxDensity = fluxDensity;
    }

    /**
     * The gauge of a field.
     *
     * @param field B in V·fs/nm²
     */
    public static Gauge of(double field) {
        return field == 0 ? NONE : new Gauge(field / PhysicalConstants.HBAR);
    }

    /** True without a field. */
    public boolean none() {
        return fluxDensity == 0;
    }

    /** χ of a site of a lead on this side, rad. */
    public double turned(Side side, double x, double y) {
        return side.axis() == 1 ? fluxDensity * x * y : 0;
    }

    /** (q/ħ)∫A·dl from one place of the body to another, rad. */
    public double phase(double x1, double y1, double x2, double y2) {
        return -fluxDensity * (x2 - x1) * (y1 + y2) / 2;
    }

    /** Phase of a bond inside a lead on this side, rad; depends on how the bond lies across the lead only. */
    public double phase(Side side, double x1, double y1, double x2, double y2) {
        return side.axis() == 1 ? fluxDensity * (y2 - y1) * (x1 + x2) / 2 : phase(x1, y1, x2, y2);
    }

    /** Flux quanta h/q through an area in the plane, nm². */
    public double fluxQuanta(double area) {
        return fluxDensity * area / (2 * Math.PI);
    }
}
