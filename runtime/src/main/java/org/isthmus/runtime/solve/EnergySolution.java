package org.isthmus.runtime.solve;

/**
 * What a solve at one energy knows. Leads count in the order of the device. With G = [(E + i0⁺)S − H − Σ]⁻¹ and
 * Γ = i(Σ − Σ†).
 *
 * <p>Plain numbers only: it may be kept and read by any thread.
 */
public interface EnergySolution {
    /** eV. */
    double energy();

    int leadCount();

    /** Tr[Γ_to G Γ_from G†]; for from = to the same trace, which is not the reflection. */
    double transmission(int from, int to);

    /**
     * Tr[Γ_p A] with A = i(G − G†): what can flow into or out of lead p. Without dephasing it equals Σ_q
     * transmission(q, p); the difference is the violation of current conservation at this energy.
     */
    double spectralTrace(int lead);

    /** Tr[(t t†)²] with t = Γ_to^½ G Γ_from^½. */
    double transmissionSquared(int from, int to);

    /**
     * Tr[A_cd(a) A_dc(b)] with A_cd(a) = δ_ac δ_ad − s_ac† s_ad, the correlator of Büttiker, Phys. Rev. B 46, 12485
     * (1992), eq. 2.6, for the scattering matrix s_ab = −δ_ab + i Γ_a^½ G_ab Γ_b^½.
     */
    double noiseTrace(int a, int b, int c, int d);

    /** Modes of the lead that propagate at this energy; a wide-band or tabulated lead has none to count and gives −1. */
    int openModes(int lead);

    /**
     * Spectral function per site fed by a lead, 1/eV: the site's share of Tr[G Γ_p G† S]. The sum over leads is 2π times
     * the local density of states wherever no state is out of the leads' reach.
     *
     * @throws IllegalStateException where the solve was not asked for local values
     */
    double[] siteSpectral(int lead);

    /** Site's share of Tr[A S] with A = i(G − G†), 1/eV: includes states that no lead feeds. Asked for like the above. */
    double[] siteSpectral();

    /** Largest relative residual of the equations that gave this solution (self-energies and elimination). */
    double equationResidual();
}
