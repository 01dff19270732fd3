package org.isthmus.language;

import org.eclipse.xtext.formatting.IIndentationInformation;
import org.eclipse.xtext.formatting2.IFormatter2;
import org.isthmus.language.formatting.FourSpaces;
import org.isthmus.language.formatting.IsthmusFormatter;

/** What the language adds to the generated services, wherever it runs. */
public class IsthmusRuntimeModule extends AbstractIsthmusRuntimeModule {

    public Class<? extends IFormatter2> bindIFormatter2() {
        return IsthmusFormatter.class;
    }

    public Class<? extends IIndentationInformation> bindIIndentationInformation() {
        return FourSpaces.class;
    }
}
