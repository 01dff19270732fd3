package org.isthmus.language;

/**
 * Initialization support for running Xtext languages without Equinox extension registry.
 */
public class IsthmusStandaloneSetup extends IsthmusStandaloneSetupGenerated {

    public static void doSetup() {
        new IsthmusStandaloneSetup().createInjectorAndDoEMFRegistration();
    }
}
