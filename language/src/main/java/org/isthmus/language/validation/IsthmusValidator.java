package org.isthmus.language.validation;

import org.eclipse.xtext.validation.ComposedChecks;

/** All checks of the language. */
@ComposedChecks(
        validators = {
            NameChecks.class,
            QuantityChecks.class,
            StructureChecks.class,
            MeasurementChecks.class,
            DeviceChecks.class
        })
public class IsthmusValidator extends AbstractIsthmusValidator {}
