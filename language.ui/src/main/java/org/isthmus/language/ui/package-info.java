/**
 * The Eclipse workbench for devices: editor, run configurations, device and result views.
 *
 * <p>Empty so far: the editor services live in {@code org.isthmus.language.ide}, and this module will only adapt them.
 * Invariant: nothing below this module knows it.
 */
package org.isthmus.language.ui;
