package stillstand.study;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.ledger.NearestName;

/**
 * The columns that a kind of table may have, and the check of a table's header against them.
 *
 * @param known in the order in which the README lists them
 * @param required headers it cannot do without
 */
record Columns(List<Column> known, List<String> required) {
    private static final String OWN = "x_";

    Columns {
        known = List.copyOf(known);
        required = List.copyOf(required);
    }

    /** Whether a column is the user's own. */
    static boolean isOwn(String header) {
        return header.startsWith(OWN);
    }

    /** Place of each column that can be read, counted from 0; what is wrong with the header is found on the way. */
    Map<String, Integer> places(Table table, Findings findings) {
        Map<String, Integer> places = new HashMap<>();
        for (int i = 0; i < table.header().size(); i++) {
            String header = table.header().get(i);
            if (header.isEmpty()) {
                continue;
            }
            Integer first = places.putIfAbsent(header, i);
            if (first != null) {
                findings.add(problem(
                        table, i, header, "this column twice", "it once (it is column " + (first + 1) + " already)"));
            } else if (!isOwn(header)) {
                checkName(table, i, header, findings);
            }
        }
        for (String header : required) {
            if (!places.containsKey(header)) {
                findings.add(missing(table, "no column \"" + header + "\"", "one"));
            }
        }
        for (Column column : known) {
            checkSpread(table, column, places, findings);
        }
        return places;
    }

    private void checkName(Table table, int index, String header, Findings findings) {
        for (Column column : known) {
            if (column.headers().contains(header)) {
                if (!column.isUsed()) {
                    findings.add(
                            new InputWarning(table.name(), table.headerLine(), index + 1, header + " is not used yet"));
                }
                return;
            }
        }
        List<String> names = new ArrayList<>();
        known.forEach(column -> names.addAll(column.headers()));
        Optional<String> nearest = NearestName.of(header, names);
        findings.add(problem(
                table,
                index,
                header,
                "an unknown column",
                nearest.map(name -> "\"" + name + "\", or ").orElse("a known one, or ")
                        + "a name that starts with x_ for a column of your own"));
    }

    private static void checkSpread(Table table, Column column, Map<String, Integer> places, Findings findings) {
        if (column.spread() == Column.Spread.NONE) {
            return;
        }
        Integer one = places.get(column.oneSigmaHeader());
        Integer two = places.get(column.twoSigmaHeader());
        if (one != null && two != null) {
            String later = one > two ? column.oneSigmaHeader() : column.twoSigmaHeader();
            String earlier = one > two ? column.twoSigmaHeader() : column.oneSigmaHeader();
            findings.add(problem(
                    table, Math.max(one, two), later, "this column beside " + earlier, "one of the two, never both"));
        }
        boolean hasValue = places.containsKey(column.header());
        if (!hasValue && (one != null || two != null)) {
            int index = one != null ? one : places.getOrDefault(column.twoSigmaHeader(), 0);
            findings.add(problem(
                    table,
                    index,
                    table.header().get(index),
                    "a spread without its value",
                    "a column \"" + column.header() + "\" beside it"));
        }
        if (hasValue && one == null && two == null && column.spread() == Column.Spread.REQUIRED) {
            findings.add(missing(
                    table,
                    "no spread beside \"" + column.header() + "\"",
                    "a column \"" + column.oneSigmaHeader() + "\" or \"" + column.twoSigmaHeader() + "\""));
        }
    }

    private static InputProblem problem(Table table, int index, String header, String found, String expected) {
        return new InputProblem(table.name(), table.headerLine(), index + 1, header, found, expected);
    }

    private static InputProblem missing(Table table, String found, String expected) {
        return new InputProblem(table.name(), table.headerLine(), 0, "", found, expected);
    }
}
