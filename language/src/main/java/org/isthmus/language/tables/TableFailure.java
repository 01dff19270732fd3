package org.isthmus.language.tables;

import org.isthmus.language.findings.IssueCode;

/** A table that cannot be had; the message is one sentence. */
public final class TableFailure extends Exception {
    private static final long serialVersionUID = 1;

    private final IssueCode code;

    TableFailure(IssueCode code, String message) {
        super(message);
        this.code = code;
    }

    TableFailure(String file, int line, int column, String message) {
        this(IssueCode.TABLE_PROBLEM, "Table " + file + ", line " + line + ", column " + column + ": " + message);
    }

    public IssueCode code() {
        return code;
    }
}
