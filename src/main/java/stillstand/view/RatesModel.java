package stillstand.view;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.Collectors;
import java.util.stream.DoubleStream;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import javafx.collections.FXCollections;
import javafx.collections.ObservableList;
import stillstand.report.Wording;
import stillstand.study.StudyResult;
import stillstand.uncertainty.Interval;
import stillstand.uplift.BetweenLevels;
import stillstand.uplift.FlightResult;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.LevelAnswer.Bound;
import stillstand.uplift.LevelAnswer.SampleAnswer;
import stillstand.uplift.Quantity;
import stillstand.uplift.Rate;

/** All rates of a result, a row each, in the words of the report. Rates in m/kyr, uplift positive. */
public final class RatesModel {
    private final ObservableList<Row> rows = FXCollections.observableArrayList();
    private final ObservableList<Row> shownRows = FXCollections.observableArrayList();
    private final ObservableList<String> sites = FXCollections.observableArrayList();
    private final ReadOnlyObjectWrapper<Interval> axis = new ReadOnlyObjectWrapper<>(new Interval(-1, 1));
    private Shown shown = Shown.NOTHING;
    private String site = "";

    /** Whose rate a row is. */
    public enum Kind {
        /** A whole flight. */
        FLIGHT("flight"),
        /** One level. */
        LEVEL("level"),
        /** One sample read on the curve at its own age. */
        SAMPLE("own age"),
        /** The time between two levels. */
        BETWEEN("between");

        private final String word;

        Kind(String word) {
            this.word = word;
        }

        @Override
        public String toString() {
            return word;
        }
    }

    /**
     * One rate, or the reason why there is none.
     *
     * @param site its site
     * @param name of the level, sample or pair of levels
     * @param kind whose rate it is
     * @param rate absent where it waits
     * @param bound where the 95 % interval holds 0
     * @param remark why it waits, or what else to know
     * @param stages the highstands that may have made it
     * @param age its age
     */
    public record Row(
            String site,
            String name,
            Kind kind,
            Optional<Rate> rate,
            Optional<Bound> bound,
            String remark,
            String stages,
            Optional<Quantity> age) {
        /** The bound first on slow coasts, then the rate, or why there is none. */
        public String says() {
            String moves = bound.flatMap(found -> rate.map(of -> "Moves " + Wording.bound(found, of) + "."))
                    .orElse("");
            return moves.isEmpty() || remark.isEmpty() ? moves + remark : moves + " " + remark;
        }

        /** {@code 0.44 ± 0.02}; blank where there is none. */
        public String median() {
            return rate.map(Wording::rate).orElse("");
        }

        /** The shortest interval of probability 0.95; blank where there is none. */
        public String interval95() {
            return rate.map(Wording::interval95).orElse("");
        }

        /** The shortest interval of probability 0.6827; blank where there is none. */
        public String interval68() {
            return rate.map(Wording::interval68).orElse("");
        }

        /** {@code 122.5 ± 3.3}; blank where there is none. */
        public String ageText() {
            return age.map(Wording::quantity).orElse("");
        }
    }

    /** Shows a result, or nothing. */
    public void show(Shown now) {
        shown = now;
        rows.setAll(now.result().map(RatesModel::rows).orElse(List.of()));
        List<String> there = rows.stream().map(Row::site).distinct().toList();
        choose(there.contains(site) ? site : "");
        sites.setAll(there);
    }

    /** Shows one site alone; blank = all. */
    public void choose(String name) {
        site = name;
        shownRows.setAll(rows.stream()
                .filter(row -> name.isEmpty() || row.site().equals(name))
                .toList());
        axis.set(axisOf(shownRows));
    }

    private static List<Row> rows(StudyResult result) {
        List<Row> rows = new ArrayList<>();
        List<String> sites =
                result.levels().stream().map(LevelAnswer::site).distinct().toList();
        for (String name : sites) {
            result.flight(name).ifPresent(flight -> rows.add(flight(flight)));
            for (LevelAnswer level : result.levels()) {
                if (level.site().equals(name)) {
                    rows.add(level(result, level));
                    level.samples().stream()
                            .filter(sample -> sample.rate().isPresent()
                                    || sample.whyNoRate().isPresent())
                            .forEach(sample -> rows.add(sample(level, sample)));
                }
            }
            result.intervals().stream()
                    .filter(between -> between.site().equals(name))
                    .forEach(between -> rows.add(between(between)));
        }
        result.failures()
                .forEach(failure -> rows.add(new Row(
                        failure.site(),
                        "the whole site",
                        Kind.FLIGHT,
                        Optional.empty(),
                        Optional.empty(),
                        "Not done: " + failure.reason(),
                        "",
                        Optional.empty())));
        return rows;
    }

    private static Row flight(FlightResult flight) {
        String regions =
                flight.regions95().size() > 1 ? flight.regions95().size() + " correlations remain possible." : "";
        return new Row(
                flight.site(),
                "the flight",
                Kind.FLIGHT,
                Optional.of(flight.rate()),
                flight.bound(),
                regions,
                flight.unmatched().size() + " levels",
                Optional.empty());
    }

    private static Row level(StudyResult result, LevelAnswer level) {
        String stages = result.flight(level.site())
                .map(flight -> flight.pairingsOf(level.level()).stream()
                        .map(pair -> new LevelAnswer.StageProbability(pair.highstand(), pair.probability()))
                        .toList())
                .filter(found -> !found.isEmpty())
                .map(Wording::stages)
                .orElseGet(() -> Wording.stages(level.stages()));
        return new Row(
                level.site(),
                level.level(),
                Kind.LEVEL,
                level.rate(),
                level.bound(),
                result.whyWaiting(level.site(), level.level())
                        .map(why -> "Waits: " + why + ".")
                        .orElse(""),
                stages,
                level.age());
    }

    private static Row sample(LevelAnswer level, SampleAnswer sample) {
        return new Row(
                level.site(),
                level.level() + " / " + sample.sample(),
                Kind.SAMPLE,
                sample.rate(),
                Optional.empty(),
                sample.whyNoRate().map(why -> "No rate: " + why + ".").orElse(""),
                "",
                sample.age());
    }

    private static Row between(BetweenLevels between) {
        return new Row(
                between.site(),
                between.fromLevel() + " to " + between.toLevel(),
                Kind.BETWEEN,
                Optional.of(between.rate()),
                Optional.empty(),
                "",
                "",
                Optional.empty());
    }

    /** From the lowest to the highest end of all 95 % intervals of levels and flights, zero in it, and a little room. */
    private static Interval axisOf(List<Row> rows) {
        double[] ends = rows.stream()
                .filter(row -> row.kind() == Kind.LEVEL || row.kind() == Kind.FLIGHT)
                .flatMap(row -> row.rate().stream())
                .flatMapToDouble(rate -> DoubleStream.of(
                        rate.shortest95().low(), rate.shortest95().high(), 0))
                .toArray();
        if (ends.length == 0) {
            return new Interval(-1, 1);
        }
        double low = DoubleStream.of(ends).min().orElseThrow();
        double high = DoubleStream.of(ends).max().orElseThrow();
        double room = 0.08 * (high - low) + 0.005;
        return new Interval(low - room, high + room);
    }

    /** The site that is shown alone; empty where all are. */
    public Optional<String> chosen() {
        return Optional.of(site).filter(name -> !name.isEmpty());
    }

    /** The rates of the chosen site or of all. */
    public ObservableList<Row> rows() {
        return shownRows;
    }

    /** Names of the sites that have one. */
    public ObservableList<String> sites() {
        return sites;
    }

    /** The axis that all density strips share, m/kyr. */
    public ReadOnlyObjectProperty<Interval> axisProperty() {
        return axis.getReadOnlyProperty();
    }

    /** One sentence on the table. */
    public String status() {
        if (shown.result().isEmpty()) {
            return "No rates yet: run the study.";
        }
        long rated = shownRows.stream().filter(row -> row.rate().isPresent()).count();
        return rated
                + " rates in m/kyr (the same as mm/yr), uplift positive: median ± one standard deviation, and the shortest"
                + " intervals.";
    }

    /** Whether what is shown is older than the study. */
    public boolean isStale() {
        return shown.stale();
    }

    /** The chosen rows as lines of tab-separated cells with a header, for a spreadsheet. */
    public static String text(List<Row> rows) {
        return "site\tof\tkind\trate (m/kyr)\tshortest 68 %\tshortest 95 %\thighstand\tage (ka)\tsays\n"
                + rows.stream()
                        .map(row -> String.join(
                                "\t",
                                row.site(),
                                row.name(),
                                row.kind().toString(),
                                row.median(),
                                row.interval68(),
                                row.interval95(),
                                row.stages(),
                                row.ageText(),
                                row.says()))
                        .collect(Collectors.joining("\n"));
    }
}
