/**
 * What a contact does to the body: its self-energy Σ on the orbitals that it touches.
 *
 * <p>Start at {@link org.isthmus.runtime.selfenergy.Contact}; {@link org.isthmus.runtime.selfenergy.Contacts} makes one
 * from a lead.
 *
 * <p>Invariant: Σ is the retarded limit η → 0⁺ itself; no visible imaginary part is added to a real energy.
 */
package org.isthmus.runtime.selfenergy;
