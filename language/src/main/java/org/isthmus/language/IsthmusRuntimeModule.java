package org.isthmus.language;


/**
 * Use this class to register components to be used at runtime / without the Equinox extension registry.
 */
public class IsthmusRuntimeModule extends AbstractIsthmusRuntimeModule {
}
