package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Optional;
import java.util.function.Predicate;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import stillstand.ledger.InputProblem;
import stillstand.study.ImportChoices.AgeUnit;
import stillstand.study.ImportChoices.SpreadKind;

/**
 * Which columns of an archived table hold age, level and spread: as the user says, else as the headers plainly say, else a
 * problem that asks, with the option that answers.
 */
final class ArchivedColumns {
    private static final String NAME_OR_NUMBER = " NAME (or its number, from 1)";
    private static final String NO_SPREAD = ", or --spread none to take Stillstand's default";

    private final Table table;
    private final ImportChoices choices;
    private final Findings findings;
    private final List<ArchivedHeader> headers;

    ArchivedColumns(Table table, ImportChoices choices, Findings findings) {
        this.table = table;
        this.choices = choices;
        this.findings = findings;
        headers = table.header().stream().map(ArchivedHeader::of).toList();
    }

    /**
     * The columns to read, counted from 0.
     *
     * @param ageUnit as stated or seen, before a look at the signs of the ages
     * @param levelIsUp as stated or seen in the header
     * @param spreads none, one of a standard deviation, or two of bounds
     */
    record Chosen(int age, AgeUnit ageUnit, int level, boolean levelIsUp, SpreadKind spread, List<Integer> spreads) {
        Chosen {
            spreads = List.copyOf(spreads);
        }
    }

    private record Spread(SpreadKind kind, List<Integer> columns) {}

    /** The choice; absent where something must be asked, which is then among the findings. */
    Optional<Chosen> choose() {
        Optional<Integer> age = column("--age-column", choices.ageColumn(), where(ArchivedHeader::isAge), "the age");
        List<Integer> levels = where(ArchivedHeader::isLevel).stream()
                .filter(at -> !age.equals(Optional.of(at)))
                .toList();
        Optional<Integer> level = column("--level-column", choices.levelColumn(), levels, "the sea level");
        if (age.isPresent() && age.equals(level)) {
            ask(age.get(), "one column for both age and level", "two: --age-column and --level-column");
            return Optional.empty();
        }
        Optional<AgeUnit> unit = age.flatMap(this::unit);
        level.ifPresent(this::requireMetres);
        Optional<Spread> spread = level.flatMap(at -> spread(at, age.orElse(-1)));
        if (age.isEmpty() || level.isEmpty() || unit.isEmpty() || spread.isEmpty()) {
            return Optional.empty();
        }
        return Optional.of(new Chosen(
                age.get(),
                unit.get(),
                level.get(),
                choices.levelIsUp().orElse(!headers.get(level.get()).isDownward()),
                spread.get().kind(),
                spread.get().columns()));
    }

    /** As the user finds it again: by header, else by number. */
    String named(int column) {
        String text = table.header().get(column);
        return text.isEmpty() ? "column " + (column + 1) : quote(text);
    }

    String named(List<Integer> columns) {
        return columns.stream().map(this::named).collect(Collectors.joining(", "));
    }

    /** All columns; one without a header by the first number in it. */
    private String shown() {
        return where(header -> true).stream()
                .map(at -> headers.get(at).text().isEmpty() ? named(at) + ": " + firstCell(at) + " …" : named(at))
                .collect(Collectors.joining(", "));
    }

    private String firstCell(int column) {
        return table.rows().stream()
                .findFirst()
                .filter(row -> column < row.cells().size())
                .map(row -> row.cells().get(column))
                .orElse("");
    }

    private Optional<Integer> column(String option, Optional<String> told, List<Integer> fitting, String what) {
        if (told.isPresent()) {
            return told(option, told.get());
        }
        if (fitting.size() == 1) {
            return Optional.of(fitting.get(0));
        }
        String found = fitting.isEmpty()
                ? "no column that is plainly " + what + " (" + shown() + ")"
                : fitting.size() + " columns that may be " + what + " (" + named(fitting) + ")";
        ask(-1, found, "to be told which it is: " + option + NAME_OR_NUMBER);
        return Optional.empty();
    }

    /** A column by what the user calls it. */
    private Optional<Integer> told(String option, String name) {
        List<Integer> same = where(header -> header.text().equals(name));
        if (same.size() == 1) {
            return Optional.of(same.get(0));
        }
        if (same.size() > 1) {
            ask(-1, same.size() + " columns " + quote(name) + " (" + option + ")", "the number of the one, from 1");
            return Optional.empty();
        }
        if (name.matches("[1-9][0-9]{0,5}") && Integer.parseInt(name) <= headers.size()) {
            return Optional.of(Integer.parseInt(name) - 1);
        }
        List<String> known =
                table.header().stream().filter(text -> !text.isEmpty()).toList();
        ask(
                -1,
                "no column " + quote(name) + " (" + option + ")",
                "a header or a number from 1 to " + headers.size() + RowReader.nearest(name, known));
        return Optional.empty();
    }

    private Optional<AgeUnit> unit(int age) {
        Optional<AgeUnit> unit = choices.ageUnit().or(() -> headers.get(age).ageUnit());
        if (unit.isEmpty()) {
            ask(
                    age,
                    "ages whose unit is not ka or years, or not stated",
                    "to be told it: --age-unit ka, --age-unit years or --age-unit negative-ka");
        }
        return unit;
    }

    private void requireMetres(int level) {
        headers.get(level)
                .otherLength()
                .ifPresent(unit -> ask(level, "a level in " + quote(unit), "one in metres; convert it first"));
    }

    private Optional<Spread> spread(int level, int age) {
        if (choices.spread().filter(SpreadKind.NONE::equals).isPresent()) {
            return Optional.of(new Spread(SpreadKind.NONE, List.of()));
        }
        if (choices.spreadColumns().isEmpty()) {
            return spreadSeen(level, age);
        }
        List<Integer> columns = new ArrayList<>();
        for (String name : choices.spreadColumns()) {
            Optional<Integer> column = told("--spread-column", name);
            if (column.isEmpty()) {
                return Optional.empty();
            }
            columns.add(column.get());
        }
        if (columns.contains(level) || columns.contains(age) || new LinkedHashSet<>(columns).size() < columns.size()) {
            ask(-1, "a column chosen twice", "each column for one thing");
            return Optional.empty();
        }
        if (columns.size() == 1) {
            return sigma(columns.get(0));
        }
        return columns.size() == 2 ? bounds(columns) : tooMany(columns);
    }

    /** The spread beside a level, if the headers leave no doubt of it. */
    private Optional<Spread> spreadSeen(int level, int age) {
        ArchivedHeader main = headers.get(level);
        List<Integer> all = where(ArchivedHeader::isSpread).stream()
                .filter(at -> at != level && at != age)
                .toList();
        List<Integer> own =
                all.stream().filter(at -> headers.get(at).extendsHeader(main)).toList();
        List<Integer> near = own.isEmpty()
                ? all.stream()
                        .filter(at -> headers.stream()
                                .noneMatch(other -> headers.get(at).extendsHeader(other)
                                        || (other.isAge()
                                                && headers.get(at).words().containsAll(other.words()))))
                        .toList()
                : own;
        boolean wantsBounds = choices.spread().filter(SpreadKind.BOUNDS::equals).isPresent();
        boolean wantsSigma = choices.spread().isPresent() && !wantsBounds;
        List<Integer> sigmas = wantsBounds ? List.of() : among(near, ArchivedHeader::isSigma);
        List<Integer> lows = wantsSigma ? List.of() : among(near, ArchivedHeader::isLow);
        List<Integer> highs = wantsSigma ? List.of() : among(near, ArchivedHeader::isHigh);
        int edges = lows.size() + highs.size();
        if (sigmas.isEmpty() && edges == 0) {
            return choices.spread().isPresent()
                    ? asked("no column that is plainly a spread of " + named(level))
                    : Optional.of(new Spread(SpreadKind.NONE, List.of()));
        }
        if (sigmas.size() == 1 && edges == 0) {
            return sigma(sigmas.get(0));
        }
        if (sigmas.isEmpty() && lows.size() == 1 && highs.size() == 1) {
            return bounds(List.of(lows.get(0), highs.get(0)));
        }
        List<Integer> doubtful = new ArrayList<>(sigmas);
        doubtful.addAll(lows);
        doubtful.addAll(highs);
        return asked("several columns that may be its spread ("
                + named(doubtful.stream().sorted().toList()) + ")");
    }

    private Optional<Spread> asked(String found) {
        ask(
                -1,
                found,
                "to be told which to take: --spread-column" + NAME_OR_NUMBER + ", twice for two bounds" + NO_SPREAD);
        return Optional.empty();
    }

    private Optional<Spread> sigma(int column) {
        if (choices.spread().filter(SpreadKind.BOUNDS::equals).isPresent()) {
            ask(column, "one column of bounds", "two: --spread-column given twice");
            return Optional.empty();
        }
        Optional<SpreadKind> kind = choices.spread()
                .or(() -> headers.get(column)
                        .sigmas()
                        .map(sigmas -> sigmas == 1 ? SpreadKind.ONE_SIGMA : SpreadKind.TWO_SIGMA));
        if (kind.isEmpty()) {
            ask(
                    column,
                    "a spread that may be 1 or 2 sigma",
                    "to be told which it is: --spread 1sigma or --spread 2sigma" + NO_SPREAD);
        }
        return kind.map(each -> new Spread(each, List.of(column)));
    }

    private Optional<Spread> bounds(List<Integer> columns) {
        if (choices.spread().filter(kind -> kind != SpreadKind.BOUNDS).isPresent()) {
            ask(columns.get(1), "two columns of one standard deviation", "one: --spread-column given once");
            return Optional.empty();
        }
        boolean plain = columns.stream().allMatch(at -> headers.get(at).saysOf95());
        if (choices.spread().isEmpty() && !plain) {
            ask(
                    columns.get(0),
                    "bounds that do not say of what (" + named(columns) + ")",
                    "to be told whether they hold 95 %: --spread bounds if they do" + NO_SPREAD);
            return Optional.empty();
        }
        return Optional.of(new Spread(SpreadKind.BOUNDS, columns));
    }

    private Optional<Spread> tooMany(List<Integer> columns) {
        ask(-1, columns.size() + " columns of spread", "one of a standard deviation or two of bounds");
        return Optional.empty();
    }

    private List<Integer> among(List<Integer> columns, Predicate<ArchivedHeader> fits) {
        return columns.stream().filter(at -> fits.test(headers.get(at))).toList();
    }

    private List<Integer> where(Predicate<ArchivedHeader> fits) {
        return IntStream.range(0, headers.size())
                .filter(at -> fits.test(headers.get(at)))
                .boxed()
                .toList();
    }

    /** A question: at one column, or with -1 at the whole header. */
    private void ask(int column, String found, String expected) {
        String header = column < 0 ? "" : table.header().get(column);
        findings.add(new InputProblem(table.name(), table.headerLine(), column + 1, header, found, expected));
    }
}
