package org.isthmus.language.findings;

import static org.isthmus.runtime.device.Severity.ERROR;
import static org.isthmus.runtime.device.Severity.INFORMATION;
import static org.isthmus.runtime.device.Severity.WARNING;

import java.util.Arrays;
import java.util.Locale;
import java.util.Optional;
import org.isthmus.runtime.device.Severity;

/** Every finding of the language. */
public enum IssueCode {
    // reading
    SYNTAX(ERROR, "The text does not follow the grammar."),
    UNREADABLE_TEXT(ERROR, "The file is too large, too deeply nested or holds characters that no text has."),
    NOT_SOLVED_YET(ERROR, "The language knows this, the solver does not yet."),
    // names
    UNKNOWN_NAME(ERROR, "A name that nothing in sight has."),
    DUPLICATE_NAME(ERROR, "Two declarations of one name in one place."),
    CYCLE(ERROR, "Declarations that need each other: constants, devices that extend, or files that import."),
    UNUSED_PARAMETER(WARNING, "A parameter that no expression uses."),
    HIDES_UNIT(WARNING, "A name that hides the symbol of a unit."),
    UNKNOWN_UNIT(ERROR, "A number followed by something that is no unit symbol."),
    UNKNOWN_SETTING(ERROR, "A property that the block does not have."),
    // quantities
    DIMENSION_MISMATCH(ERROR, "Quantities of different kinds where one kind is needed."),
    KIND_MISMATCH(ERROR, "A value of the wrong sort, such as a list where a number is needed."),
    WRONG_ARGUMENTS(ERROR, "A call with too few, too many or unfitting arguments."),
    MISPLACED(ERROR, "A name that has no meaning at this place."),
    OUT_OF_RANGE(ERROR, "A parameter outside its declared range."),
    NOT_FINITE(ERROR, "An expression that is not a finite number."),
    NOT_REAL(ERROR, "A complex number where a real one is needed."),
    // lattice
    INCOMPLETE_LATTICE(ERROR, "A lattice without vectors or without sites."),
    DEPENDENT_VECTORS(ERROR, "Lattice vectors of which one is a combination of the others."),
    COINCIDING_SITES(ERROR, "Two sites at one place."),
    MATRIX_SIZE(ERROR, "A matrix whose size is not the number of orbitals."),
    NOT_HERMITIAN(ERROR, "A matrix that must be Hermitian and is not."),
    BOND_TWICE(ERROR, "A bond that is given twice, also as its own partner."),
    NOT_A_TRANSLATION(ERROR, "A displacement that is no whole combination of the lattice vectors."),
    OVERLAP_NOT_POSITIVE(ERROR, "Overlaps that give some state a norm of zero or less."),
    // body
    INCOMPLETE_DEVICE(ERROR, "A device without a lattice or without a body."),
    NO_SITE(ERROR, "A body without a site."),
    BODY_TOO_LARGE(ERROR, "A body with more sites than can be solved."),
    UNBOUNDED_BODY(ERROR, "A body that has no end along a direction of its lattice."),
    UNCONNECTED_PARTS(WARNING, "A body of several parts without a bond between them."),
    LONELY_SITE(WARNING, "A site without a neighbour."),
    SITE_COUNT(INFORMATION, "Number of sites and the estimated cost."),
    // resolution
    COARSE_LATTICE(WARNING, "A spacing so wide that E(k) of the lattice is off by more than 5 % in the window."),
    BEYOND_BAND(WARNING, "An energy window that reaches beyond the bands."),
    // leads
    UNKNOWN_SIDE(ERROR, "A side that a body does not have."),
    LEAD_WITHOUT_SITE(ERROR, "A lead that touches no site."),
    EDGE_NOT_PERIODIC(ERROR, "An edge that does not repeat along the lead."),
    LEADS_SHARE_SITE(ERROR, "Two leads from a side on one site."),
    TOO_FEW_LEADS(ERROR, "A current asked of a device with fewer than two leads that carry a given mu."),
    NEGATIVE_TEMPERATURE(ERROR, "A temperature below zero."),
    INCOMPLETE_LEAD(ERROR, "A wide-band lead without broadening and without self-energy."),
    NEGATIVE_BROADENING(ERROR, "A contact that would feed particles from nowhere."),
    LEAD_WITHOUT_BANDS(ERROR, "A potential for a lead that has no bands."),
    NO_OPEN_MODE(WARNING, "A lead without a propagating mode anywhere in the window."),
    CONTACT_STEP(WARNING, "A step of the potential between a lead and the body at its contact."),
    FLOATING_WITH_MU(ERROR, "A floating lead with a given mu or bias."),
    // field
    STRONG_FIELD(WARNING, "More than 0.1 flux quanta per smallest loop of the lattice."),
    // measurement
    UNKNOWN_OBSERVABLE(ERROR, "Something to record that the catalogue does not know."),
    EMPTY_RANGE(ERROR, "A range that is empty or runs backwards."),
    AMBIGUOUS_DROP(ERROR, "A linear drop with more or fewer than two leads that carry a given mu."),
    AVERAGE_WITHOUT_SWEEP(ERROR, "An average over a parameter that is not swept."),
    MISSING_AXIS(ERROR, "An observable that needs an axis or a point which the measurement does not give."),
    THERMAL_WINDOW(
            WARNING, "An energy range that leaves out part of a lead's thermal window where a current is recorded."),
    IDLE_EXPECTATION(WARNING, "An expectation that cannot fail."),
    SOLVE_COUNT(INFORMATION, "Number of solves of a measurement."),
    // files
    TABLE_PROBLEM(ERROR, "A table that is missing, malformed or too short."),
    TABLE_OUTSIDE_PROJECT(ERROR, "A path that leaves the project folder.");

    private final Severity severity;
    private final String explanation;

    IssueCode(Severity severity, String explanation) {
        this.severity = severity;
        this.explanation = explanation;
    }

    /** Stable name in messages: {@code dimension-mismatch}. */
    public String id() {
        return name().toLowerCase(Locale.ROOT).replace('_', '-');
    }

    public Severity severity() {
        return severity;
    }

    /** One sentence for the reference. */
    public String explanation() {
        return explanation;
    }

    /** The code with this stable name. */
    public static Optional<IssueCode> byId(String id) {
        return Arrays.stream(values()).filter(code -> code.id().equals(id)).findFirst();
    }
}
