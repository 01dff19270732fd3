package org.isthmus.runtime.catalogue;

/** Something that a device file may name without declaring it. */
public interface Entry {
    /** The name in device files. */
    String name();

    /** One or two sentences for hovers and the reference. */
    String documentation();
}
