package org.isthmus.language.validation;

import java.util.List;
import org.eclipse.emf.ecore.resource.Resource;
import org.eclipse.xtext.util.CancelIndicator;
import org.eclipse.xtext.validation.CheckMode;
import org.eclipse.xtext.validation.Issue;
import org.eclipse.xtext.validation.ResourceValidatorImpl;
import org.isthmus.language.findings.IssueCode;

/**
 * One mistake, one message: where a file cannot be read, what follows from the reading is not told, and of the parser's
 * complaints only the first, since the others mostly stem from it.
 */
public class SyntaxFirstValidator extends ResourceValidatorImpl {
    @Override
    public List<Issue> validate(Resource resource, CheckMode mode, CancelIndicator indicator) {
        List<Issue> issues = super.validate(resource, mode, indicator);
        return issues.stream()
                .filter(issue -> IssueCode.SYNTAX.id().equals(issue.getCode()))
                .findFirst()
                .map(List::of)
                .orElse(issues);
    }
}
