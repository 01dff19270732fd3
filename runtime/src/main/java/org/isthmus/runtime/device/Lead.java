package org.isthmus.runtime.device;

import java.util.List;

/** A contact: a reservoir in equilibrium, coupled to sites of the body. */
public sealed interface Lead permits LatticeLead, WideBandLead, TabulatedLead {
    String name();

    /** K; zero is allowed and means the limit. */
    double temperature();

    /** Electrochemical potential at zero bias, eV. */
    double mu();

    /** True for a voltage probe, whose electrochemical potential is found such that it draws no net current. */
    boolean floating();

    /** The sites of the body that the lead touches, ascending. */
    List<Integer> contactSites();

    SourceRef source();

    /** The same lead at another temperature and electrochemical potential. */
    Lead with(double newTemperature, double newMu);
}
