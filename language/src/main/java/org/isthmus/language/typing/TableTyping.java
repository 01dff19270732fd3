package org.isthmus.language.typing;

import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.Expression;
import org.isthmus.language.isthmus.Reference;
import org.isthmus.language.isthmus.TextLiteral;
import org.isthmus.language.tables.Table;
import org.isthmus.language.tables.TableFailure;
import org.isthmus.language.tables.TableFiles;
import org.isthmus.language.typing.Type.Scalar;

/** Types of sampled functions: the file's header says them. */
final class TableTyping {
    private TableTyping() {}

    static Type typeOf(Reference reference, Inference inference) {
        int arguments = reference.getArguments().size() - 1;
        if (arguments < 1 || arguments > 2 || !(reference.getArguments().get(0) instanceof TextLiteral)) {
            inference.report(
                    reference,
                    null,
                    IssueCode.WRONG_ARGUMENTS,
                    "'table' takes the file in quotes and one or two quantities, as in table(\"profile.csv\", x).");
            return Type.UNKNOWN;
        }
        Table table;
        try {
            table = TableFiles.function(TableFiles.read(reference.eResource(), path(reference)), arguments);
        } catch (TableFailure e) {
            inference.report(reference.getArguments().get(0), null, e.code(), e.getMessage());
            return Type.UNKNOWN;
        }
        for (int i = 0; i < arguments; i++) {
            Expression argument = reference.getArguments().get(i + 1);
            Type type = inference.typeOf(argument);
            Table.Column column = table.columns().get(i);
            if (type == Type.UNKNOWN) {
                continue;
            }
            if (!(type instanceof Scalar scalar) || scalar.complex()) {
                return inference.unfit(argument, type, "'table' needs a real quantity here");
            }
            if (!scalar.dimension().equals(column.dimension())) {
                inference.report(
                        argument,
                        null,
                        IssueCode.DIMENSION_MISMATCH,
                        "Column '" + column.name() + "' of " + table.path() + " is "
                                + column.dimension().withArticle()
                                + ", but this is " + scalar.dimension().withArticle() + "; "
                                + Inference.fittingUnit(scalar.dimension(), column.dimension()));
            }
        }
        return Type.real(table.columns().get(arguments).dimension());
    }

    /** The text of the first argument, without its quotes. */
    static String path(Reference reference) {
        return TextLiterals.text((TextLiteral) reference.getArguments().get(0));
    }
}
