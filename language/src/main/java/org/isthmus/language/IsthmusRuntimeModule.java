package org.isthmus.language;

import com.google.inject.Binder;
import org.eclipse.xtext.formatting.IIndentationInformation;
import org.eclipse.xtext.formatting2.FormatterPreferenceValuesProvider;
import org.eclipse.xtext.formatting2.FormatterPreferences;
import org.eclipse.xtext.formatting2.IFormatter2;
import org.eclipse.xtext.linking.ILinkingDiagnosticMessageProvider;
import org.eclipse.xtext.parser.antlr.ISyntaxErrorMessageProvider;
import org.eclipse.xtext.preferences.IPreferenceValuesProvider;
import org.eclipse.xtext.resource.IDefaultResourceDescriptionStrategy;
import org.eclipse.xtext.scoping.IGlobalScopeProvider;
import org.eclipse.xtext.validation.IResourceValidator;
import org.isthmus.language.formatting.FourSpaces;
import org.isthmus.language.formatting.IsthmusFormatter;
import org.isthmus.language.messages.NameMessages;
import org.isthmus.language.messages.SyntaxMessages;
import org.isthmus.language.scoping.DeclarationIndexStrategy;
import org.isthmus.language.scoping.IsthmusGlobalScopeProvider;
import org.isthmus.language.validation.SyntaxFirstValidator;

/** What the language adds to the generated services, wherever it runs. */
public class IsthmusRuntimeModule extends AbstractIsthmusRuntimeModule {

    @Override
    public Class<? extends IGlobalScopeProvider> bindIGlobalScopeProvider() {
        return IsthmusGlobalScopeProvider.class;
    }

    public Class<? extends IDefaultResourceDescriptionStrategy> bindIDefaultResourceDescriptionStrategy() {
        return DeclarationIndexStrategy.class;
    }

    public Class<? extends ISyntaxErrorMessageProvider> bindISyntaxErrorMessageProvider() {
        return SyntaxMessages.class;
    }

    public Class<? extends ILinkingDiagnosticMessageProvider.Extended> bindILinkingDiagnosticMessageProvider() {
        return NameMessages.class;
    }

    public Class<? extends IResourceValidator> bindIResourceValidator() {
        return SyntaxFirstValidator.class;
    }

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
