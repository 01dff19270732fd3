package org.isthmus.runtime.units;

/**
 * Physical constants. SI values: exact by the 2019 definition of the SI (The International System of Units, 9th ed.,
 * BIPM 2019) or CODATA 2018 (Tiesinga et al., Rev. Mod. Phys. 93, 025010 (2021)); the others are in eV, nm, fs, K and
 * elementary charges.
 */
public final class PhysicalConstants {
    /** Elementary charge, C; exact. */
    public static final double ELEMENTARY_CHARGE_SI = 1.602176634e-19;
    /** Planck constant, J s; exact. */
    public static final double PLANCK_SI = 6.62607015e-34;
    /** Boltzmann constant, J/K; exact. */
    public static final double BOLTZMANN_SI = 1.380649e-23;
    /** Electron mass, kg; CODATA 2018. */
    public static final double ELECTRON_MASS_SI = 9.1093837015e-31;
    /** Bohr magneton, J/T; CODATA 2018. */
    public static final double BOHR_MAGNETON_SI = 9.2740100783e-24;
    /** Electric constant, F/m; CODATA 2018. */
    public static final double ELECTRIC_CONSTANT_SI = 8.8541878128e-12;

    /** Planck constant, eV fs. */
    public static final double H = PLANCK_SI / ELEMENTARY_CHARGE_SI * 1e15;
    /** Reduced Planck constant, eV fs. */
    public static final double HBAR = H / (2 * Math.PI);
    /** Boltzmann constant, eV/K. */
    public static final double KB = BOLTZMANN_SI / ELEMENTARY_CHARGE_SI;
    /** Electron mass, eV fs²/nm². */
    public static final double ELECTRON_MASS = ELECTRON_MASS_SI / ELEMENTARY_CHARGE_SI * 1e12;
    /** Bohr magneton, eV per internal unit of field (V fs/nm², a thousand tesla). */
    public static final double BOHR_MAGNETON = BOHR_MAGNETON_SI / ELEMENTARY_CHARGE_SI * 1e3;
    /** Electric constant, elementary charges per V nm. */
    public static final double ELECTRIC_CONSTANT = ELECTRIC_CONSTANT_SI / ELEMENTARY_CHARGE_SI * 1e-9;
    /** Conductance quantum 2q²/h, in elementary charges per V fs. */
    public static final double CONDUCTANCE_QUANTUM = 2 / H;
    /** Resistance quantum h/q², V fs per elementary charge. */
    public static final double RESISTANCE_QUANTUM = H;

    private PhysicalConstants() {}
}
