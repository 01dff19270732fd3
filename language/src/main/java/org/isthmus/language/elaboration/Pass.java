package org.isthmus.language.elaboration;

/** A step from the syntax model to the device. */
interface Pass {
    /** The class's name, which says what the pass does. */
    default String name() {
        return getClass().getSimpleName();
    }

    /** Takes the draft one step on. What is wrong becomes a finding; a pass with errors ends the elaboration. */
    void run(Draft draft);

    /** What the pass has made, as stable text. */
    String text(Draft draft);
}
