package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Supplier;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.ledger.NearestName;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.TruncatedNormal;
import stillstand.uncertainty.Uncertain;

/** Typed access to the cells of one row; what cannot be read becomes a problem with its place. */
final class RowReader {
    private final Table table;
    private final Map<String, Integer> places;
    private final Table.Row row;
    private final Findings findings;
    private final int problemsBefore;

    private RowReader(Table table, Map<String, Integer> places, Table.Row row, Findings findings) {
        this.table = table;
        this.places = places;
        this.row = row;
        this.findings = findings;
        this.problemsBefore = findings.problemCount();
    }

    /** Checks the header of a table, then hands over its rows one by one. */
    static Iterable<RowReader> rowsOf(Table table, Columns columns, Findings findings) {
        Map<String, Integer> places = columns.places(table, findings);
        return () -> table.rows().stream()
                .map(row -> {
                    RowReader reader = new RowReader(table, places, row, findings);
                    reader.checkLength();
                    return reader;
                })
                .iterator();
    }

    private void checkLength() {
        int wanted = table.header().size();
        List<String> cells = row.cells();
        boolean tooMany = cells.size() > wanted
                && !cells.subList(wanted, cells.size()).stream().allMatch(String::isEmpty);
        if (cells.size() < wanted || tooMany) {
            findings.add(new InputProblem(
                    table.name(),
                    row.line(),
                    0,
                    "",
                    cells.size() + (cells.size() == 1 ? " cell" : " cells"),
                    wanted + ", as many as the header has"));
        }
        for (int i = 0; i < Math.min(wanted, cells.size()); i++) {
            if (table.header().get(i).isEmpty() && !cells.get(i).isEmpty()) {
                findings.add(new InputProblem(
                        table.name(),
                        row.line(),
                        i + 1,
                        "",
                        quote(cells.get(i)) + " in a column without a name",
                        "a name above it"));
            }
        }
    }

    /** Whether everything read of this row so far could be read. */
    boolean isGood() {
        return findings.problemCount() == problemsBefore;
    }

    boolean hasColumn(String header) {
        return places.containsKey(header);
    }

    /** The text of a cell, "" where it is blank or there is no such column. */
    String text(String header) {
        Integer place = places.get(header);
        return place == null || place >= row.cells().size() ? "" : row.cells().get(place);
    }

    Optional<String> optionalText(String header) {
        return Optional.of(text(header)).filter(text -> !text.isEmpty());
    }

    /** The text of a cell that must not be blank. */
    String requiredText(String header, String what) {
        String text = text(header);
        if (text.isEmpty() && hasColumn(header)) {
            problem(header, "nothing", what);
        }
        return text;
    }

    /** The user's own columns, blank cells left out. */
    Map<String, String> own() {
        Map<String, String> own = new LinkedHashMap<>();
        for (String header : table.header()) {
            if (Columns.isOwn(header) && !text(header).isEmpty()) {
                own.put(header, text(header));
            }
        }
        return own;
    }

    Optional<Double> number(String header) {
        return optionalText(header).flatMap(text -> {
            Optional<Double> value = NumberForm.parse(text);
            if (value.isEmpty()) {
                problem(header, quote(text), NumberForm.expectedInsteadOf(text));
            }
            return value;
        });
    }

    /** A number that lies in a range, ends included. */
    Optional<Double> number(String header, double low, double high, String expected) {
        return number(header).filter(value -> {
            boolean inside = value >= low && value <= high;
            if (!inside) {
                problem(header, quote(text(header)), expected);
            }
            return inside;
        });
    }

    /** A number that must not be negative. */
    Optional<Double> length(String header) {
        return number(header, 0, Double.MAX_VALUE, "0 or more");
    }

    /** One of a few words; the default where the cell is blank or holds none of them. */
    <T> T word(String header, Map<String, T> words, T blank) {
        String text = text(header);
        T meant = words.get(text);
        if (text.isEmpty() || meant != null) {
            return meant == null ? blank : meant;
        }
        List<String> known = new ArrayList<>(words.keySet());
        String last = known.remove(known.size() - 1);
        problem(header, quote(text), known.isEmpty() ? last : String.join(", ", known) + " or " + last);
        return blank;
    }

    /** A name that must be known, absent where the cell is blank. */
    Optional<String> known(String header, Supplier<? extends Collection<String>> names, String what) {
        return optionalText(header).filter(text -> {
            Collection<String> known = names.get();
            boolean isKnown = known.contains(text);
            if (!isKnown) {
                problem(header, quote(text), what + nearest(text, known));
            }
            return isKnown;
        });
    }

    /** The known name most like an unknown one, ready to stand after what was expected. */
    static String nearest(String text, Collection<String> names) {
        return NearestName.of(text, names)
                .map(name -> " (nearest: " + quote(name) + ")")
                .orElse("");
    }

    /** A number with the spread beside it; absent where its cell is blank or cannot be read. */
    Optional<Uncertain> measured(Column column, String appliesTo) {
        return measured(column, Double.NEGATIVE_INFINITY, appliesTo);
    }

    /** A number that cannot be negative, with the spread beside it, cut off at 0. */
    Optional<Uncertain> measuredLength(Column column, String appliesTo) {
        return measured(column, 0, appliesTo);
    }

    private Optional<Uncertain> measured(Column column, double lowest, String appliesTo) {
        Optional<Double> value = lowest == 0 ? length(column.header()) : number(column.header());
        Optional<Double> sigma = sigma(column);
        if (value.isEmpty() || sigma.isEmpty()) {
            return Optional.empty();
        }
        if (sigma.get() == 0) {
            findings.add(
                    spreadColumn(column).isPresent()
                            ? new Assumption(column.header() + " is exact", "spread 0", "the study", appliesTo)
                            : new Assumption(
                                    column.header() + " has no spread column and is taken as exact",
                                    "spread 0",
                                    "Stillstand's default",
                                    "all"));
            return Optional.of(new Exact(value.get()));
        }
        return Optional.of(
                lowest == 0
                        ? new TruncatedNormal(value.get(), sigma.get(), 0, Double.POSITIVE_INFINITY)
                        : new Normal(value.get(), sigma.get()));
    }

    /** One standard deviation beside a value; absent where it cannot be told. */
    private Optional<Double> sigma(Column column) {
        String value = text(column.header());
        Optional<String> header = spreadColumn(column);
        if (header.isEmpty()) {
            return column.spread() == Column.Spread.REQUIRED ? Optional.empty() : Optional.of(0.0);
        }
        String spread = text(header.get());
        if (value.isEmpty() && !spread.isEmpty() && hasColumn(column.header())) {
            problem(header.get(), quote(spread) + " beside a blank " + column.header(), "both or neither");
        }
        if (value.isEmpty()) {
            return Optional.empty();
        }
        if (spread.isEmpty()) {
            problem(header.get(), "nothing", "the spread of " + column.header() + " (0 where it is exact)");
            return Optional.empty();
        }
        double sigmas = header.get().equals(column.oneSigmaHeader()) ? 1 : 2;
        return length(header.get()).map(stated -> stated / sigmas);
    }

    private Optional<String> spreadColumn(Column column) {
        if (hasColumn(column.oneSigmaHeader())) {
            return Optional.of(column.oneSigmaHeader());
        }
        return Optional.of(column.twoSigmaHeader()).filter(this::hasColumn);
    }

    void problem(String header, String found, String expected) {
        findings.add(new InputProblem(table.name(), row.line(), columnOf(header), header, found, expected));
    }

    void warn(String header, String message) {
        findings.add(new InputWarning(table.name(), row.line(), columnOf(header), message));
    }

    void assume(String assumption, String value, String source, String appliesTo) {
        findings.add(new Assumption(assumption, value, source, appliesTo));
    }

    long line() {
        return row.line();
    }

    private int columnOf(String header) {
        Integer place = places.get(header);
        return place == null ? 0 : place + 1;
    }
}
