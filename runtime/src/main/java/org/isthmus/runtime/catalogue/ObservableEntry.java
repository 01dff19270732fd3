package org.isthmus.runtime.catalogue;

import org.isthmus.runtime.units.Dimension;

/** Something that can be recorded. */
public interface ObservableEntry extends Entry {
    /** What stands in its parentheses. */
    enum Arguments {
        /** Nothing. */
        NONE(0, 0, false),
        /** A lead; recorded without it, all leads. */
        LEAD(1, 1, false),
        /** A lead, or a lead and a matrix. */
        LEAD_AND_MATRIX(1, 1, true),
        /** Two leads; recorded without them, all ordered pairs. */
        LEAD_PAIR(2, 2, false),
        /** Two leads that carry the current, two that read the voltage. */
        FOUR_LEADS(4, 4, false);

        private final int fewestLeads;
        private final int mostLeads;
        private final boolean matrix;

        Arguments(int fewestLeads, int mostLeads, boolean matrix) {
            this.fewestLeads = fewestLeads;
            this.mostLeads = mostLeads;
            this.matrix = matrix;
        }

        public int fewestLeads() {
            return fewestLeads;
        }

        public int mostLeads() {
            return mostLeads;
        }

        public boolean matrix() {
            return matrix;
        }
    }

    /** How it depends on the energy axis. */
    enum Resolution {
        /** Has a value at each energy. */
        ENERGY,
        /** Is integrated over energy, whatever the axis. */
        INTEGRATED,
        /** Has a value at each energy where the measurement has an energy axis; is integrated otherwise. */
        EITHER
    }

    Arguments arguments();

    Resolution resolution();

    /** True where it has a value per site. */
    boolean perSite();

    /** Dimension of its values; where {@code resolved}, on an energy axis. */
    Dimension dimension(boolean resolved);

    /** True where the solver computes it. */
    boolean available();
}
