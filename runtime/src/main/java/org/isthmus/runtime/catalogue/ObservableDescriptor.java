package org.isthmus.runtime.catalogue;

import org.isthmus.runtime.units.Dimension;

/** What the catalogue says of an observable. */
public record ObservableDescriptor(
        String name,
        Arguments arguments,
        Resolution resolution,
        boolean perSite,
        Dimension integrated,
        Dimension resolvedDimension,
        boolean available,
        String documentation)
        implements ObservableEntry {
    @Override
    public Dimension dimension(boolean resolved) {
        return resolved ? resolvedDimension : integrated;
    }
}
