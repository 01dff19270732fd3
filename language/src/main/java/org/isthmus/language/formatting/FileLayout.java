package org.isthmus.language.formatting;

import com.google.inject.Inject;
import com.google.inject.Provider;
import java.util.List;
import org.eclipse.xtext.formatting2.FormatterPreferences;
import org.eclipse.xtext.formatting2.FormatterRequest;
import org.eclipse.xtext.formatting2.IFormatter2;
import org.eclipse.xtext.formatting2.regionaccess.ITextReplacement;
import org.eclipse.xtext.formatting2.regionaccess.TextRegionAccessBuilder;
import org.eclipse.xtext.preferences.IPreferenceValuesProvider;
import org.eclipse.xtext.preferences.TypedPreferenceValues;
import org.eclipse.xtext.resource.XtextResource;

/** The canonical layout of a whole file, as text. */
public class FileLayout {
    @Inject
    private Provider<IFormatter2> formatter;

    @Inject
    private Provider<TextRegionAccessBuilder> regions;

    @Inject
    @FormatterPreferences
    private IPreferenceValuesProvider preferences;

    /**
     * Lays a file out.
     *
     * @param resource a file without syntax errors
     * @return its text in the canonical layout
     * @throws IllegalArgumentException for a file with syntax errors, whose statements cannot be told apart
     */
    public String format(XtextResource resource) {
        if (resource.getParseResult().hasSyntaxErrors()) {
            throw new IllegalArgumentException("a file with syntax errors has no layout: " + resource.getURI());
        }
        FormatterRequest request = new FormatterRequest();
        request.setTextRegionAccess(regions.get().forNodeModel(resource).create());
        request.setPreferences(TypedPreferenceValues.castOrWrap(preferences.getPreferenceValues(resource)));
        List<ITextReplacement> replacements = formatter.get().format(request);
        return request.getTextRegionAccess().getRewriter().renderToString(replacements);
    }
}
