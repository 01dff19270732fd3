package org.isthmus.language;

import com.google.inject.Binder;
import org.eclipse.xtext.formatting.IIndentationInformation;
import org.eclipse.xtext.formatting2.FormatterPreferenceValuesProvider;
import org.eclipse.xtext.formatting2.FormatterPreferences;
import org.eclipse.xtext.formatting2.IFormatter2;
import org.eclipse.xtext.preferences.IPreferenceValuesProvider;
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

    /** The formatter's preferences come from {@link FourSpaces} wherever no front end has its own. */
    public void configureFormatterPreferences(Binder binder) {
        binder.bind(IPreferenceValuesProvider.class)
                .annotatedWith(FormatterPreferences.class)
                .to(FormatterPreferenceValuesProvider.class);
    }
}
