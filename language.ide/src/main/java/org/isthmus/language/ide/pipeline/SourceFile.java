package org.isthmus.language.ide.pipeline;

import java.nio.file.Path;

/**
 * A file of the language.
 *
 * @param path absolute and normalised
 * @param shown as the user gave it, for messages
 */
public record SourceFile(Path path, String shown) {}
