/**
 * The wording of what parsing and linking have to say.
 *
 * <p>Start at {@link org.isthmus.language.messages.NameMessages} and {@link org.isthmus.language.messages.SyntaxMessages}.
 *
 * <p>Invariant: every message is a sentence about the user's text, with a stable code.
 */
package org.isthmus.language.messages;
