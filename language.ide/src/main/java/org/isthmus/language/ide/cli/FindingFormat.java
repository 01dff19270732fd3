package org.isthmus.language.ide.cli;

/** How {@code check} writes its findings. */
enum FindingFormat {
    /** A line each: {@code file:line:column: error CODE: text}. */
    text,
    /** One object with a list of findings. */
    json,
    /** SARIF 2.1.0, as code-hosting services and editors read it. */
    sarif
}
