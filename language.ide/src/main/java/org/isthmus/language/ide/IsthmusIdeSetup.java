package org.isthmus.language.ide;

import com.google.inject.Guice;
import com.google.inject.Injector;
import org.eclipse.xtext.util.Modules2;
import org.isthmus.language.IsthmusRuntimeModule;
import org.isthmus.language.IsthmusStandaloneSetup;

/**
 * Initialization support for running Xtext languages as language servers.
 */
public class IsthmusIdeSetup extends IsthmusStandaloneSetup {

    @Override
    public Injector createInjector() {
        return Guice.createInjector(Modules2.mixin(new IsthmusRuntimeModule(), new IsthmusIdeModule()));
    }
}
