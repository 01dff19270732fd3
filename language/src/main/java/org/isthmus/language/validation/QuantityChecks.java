package org.isthmus.language.validation;

import org.eclipse.xtext.validation.Check;
import org.isthmus.language.isthmus.SourceFile;
import org.isthmus.language.typing.FileTyping;

/** Dimensions, sorts of values, calls. */
public class QuantityChecks extends ConcernChecks {
    @Check
    public void dimensionsAndSorts(SourceFile file) {
        FileTyping.problems(file).forEach(p -> report(p.code(), p.object(), p.feature(), p.message()));
    }
}
