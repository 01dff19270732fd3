package org.isthmus.language.formatting;

import org.eclipse.xtext.formatting.IIndentationInformation;

/** Device files indent by four spaces. */
public class FourSpaces implements IIndentationInformation {
    @Override
    public String getIndentString() {
        return "    ";
    }
}
