package org.isthmus.language.typing;

import org.eclipse.emf.ecore.EObject;
import org.eclipse.emf.ecore.EStructuralFeature;
import org.isthmus.language.findings.IssueCode;

/**
 * Something wrong about an expression.
 *
 * @param feature the part of the object that is meant; null for all of it
 */
public record TypeProblem(EObject object, EStructuralFeature feature, IssueCode code, String message) {}
