package org.isthmus.runtime.catalogue;

/** A word that a setting may have as its value. */
public record ChoiceEntry(String name, String setting, String documentation) implements Entry {}
