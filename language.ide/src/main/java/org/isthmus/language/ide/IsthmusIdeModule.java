package org.isthmus.language.ide;

/**
 * Use this class to register ide components.
 */
public class IsthmusIdeModule extends AbstractIsthmusIdeModule {}
