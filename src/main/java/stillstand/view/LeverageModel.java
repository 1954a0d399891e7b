package stillstand.view;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Consumer;
import java.util.function.Function;
import java.util.stream.DoubleStream;
import java.util.stream.Stream;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import stillstand.report.CurveChoiceReport;
import stillstand.report.FlightReport;
import stillstand.report.LeverageReport;
import stillstand.report.Wording;
import stillstand.sensitivity.AssumptionSwitch;
import stillstand.sensitivity.CurveChoice;
import stillstand.sensitivity.CurveLeftOut;
import stillstand.sensitivity.LevelTornado;
import stillstand.sensitivity.Leverage;
import stillstand.sensitivity.NextMeasurement;
import stillstand.sensitivity.SampleLeftOut;
import stillstand.sensitivity.ShortRate;
import stillstand.study.StudyResult;
import stillstand.uncertainty.Digits;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightResult;
import stillstand.uplift.LevelAnswer;

/**
 * What the answers of one site hang on: the curve, each input, each assumption, each piece of evidence, and which measurement
 * would help most. What was not asked of the run is said, with what would ask for it. Rates in m/kyr.
 */
public final class LeverageModel {
    /** Stands for every rate of the site. */
    public static final String EVERY = "every rate";

    private final Consumer<Boolean> ask;
    private final ReadOnlyObjectWrapper<Picture> picture = new ReadOnlyObjectWrapper<>(Picture.NOTHING);
    private Shown shown = Shown.NOTHING;
    private String site = "";
    private String rateOf = EVERY;

    /** The questions. */
    public enum Part {
        /** What each curve says. */
        CURVES("Which curve"),
        /** One-at-a-time ranges. */
        INPUTS("Which input"),
        /** Measurements ranked. */
        NEXT("What to measure next"),
        /** Assumptions switched. */
        ASSUMPTIONS("If otherwise"),
        /** Levels, samples and curves left out. */
        LEFT_OUT("Leave one out");

        private final String title;

        Part(String title) {
            this.title = title;
        }

        /** What it is called. */
        public String title() {
            return title;
        }
    }

    /** What helps where a part has nothing to show. */
    public enum Way {
        /** Another run that is asked for it. */
        ASK_AND_RUN,
        /** More curves. */
        CHOOSE_CURVES
    }

    /** Why a part shows nothing, and what would help. */
    public record Missing(String sentence, Optional<Way> way) {}

    /** What the terminal says to one question. */
    public record Words(Part part, List<String> sentences) {
        public Words {
            sentences = List.copyOf(sentences);
        }
    }

    /** What one curve, or a mixture of all, makes of one rate. */
    public record CurveRow(String rateOf, CurveChoice choice) {
        /** Its name; that of a mixture in words. */
        public String curve() {
            return CurveChoiceReport.name(choice.curve());
        }

        /** Its share; blank for a mixture. */
        public String weight() {
            return choice.mixesCurves() ? "" : CurveChoiceReport.weight(choice.weight());
        }

        /** Which highstands it makes of the levels. */
        public String records() {
            List<String> records = choice.matches().stream()
                    .map(match -> choice.level().isPresent()
                            ? match.highstand().orElse("")
                            : match.level() + " " + match.highstand().orElse("none"))
                    .toList();
            return String.join(", ", records);
        }
    }

    /**
     * What one input does to one rate by itself.
     *
     * @param rateOf the level and the highstand it is taken at
     * @param rate with every input at its median, in words; blank after the first row of a level
     * @param atMedians the same
     * @param input what it is
     * @param range of the input, in its unit
     * @param bar how far the rate moves; absent where the row is of another highstand
     * @param does the move in words
     */
    public record InputRow(
            String rateOf,
            String rate,
            double atMedians,
            String input,
            String range,
            Optional<LevelTornado.Bar> bar,
            String does) {}

    /** What is without one level, sample or curve. */
    public record LeftOutRow(
            String what, String name, String rateOf, ShortRate rate, Optional<ShortRate> without, String also) {
        /** How far the rate moves, in half widths of its 95 % interval. */
        public double move() {
            return LeverageReport.move(rate, without);
        }
    }

    /**
     * Everything shown of one site.
     *
     * @param words the sentences of the terminal
     * @param halving what halving one kind of error would do to the flight
     * @param inputAxis change of the rate, m/kyr, that all bars share
     * @param rateAxis of the curves, m/kyr
     * @param asks whether the study asks every run what to measure next
     * @param wasAsked whether the last run was
     * @param stale whether all this is older than the study
     */
    public record Picture(
            List<Words> words,
            List<CurveRow> curves,
            Interval rateAxis,
            List<FlightResult.Halving> halving,
            Interval halvingAxis,
            List<InputRow> inputs,
            Interval inputAxis,
            List<NextMeasurement> next,
            List<AssumptionSwitch> assumptions,
            List<LeftOutRow> leftOut,
            boolean asks,
            boolean wasAsked,
            boolean stale) {
        static final Picture NOTHING = empty(false);
        static final Picture ASKED = empty(true);

        private static Picture empty(boolean asks) {
            return new Picture(
                    List.of(),
                    List.of(),
                    new Interval(-1, 1),
                    List.of(),
                    new Interval(-1, 1),
                    List.of(),
                    new Interval(-1, 1),
                    List.of(),
                    List.of(),
                    List.of(),
                    asks,
                    false,
                    false);
        }

        public Picture {
            words = List.copyOf(words);
            curves = List.copyOf(curves);
            halving = List.copyOf(halving);
            inputs = List.copyOf(inputs);
            next = List.copyOf(next);
            assumptions = List.copyOf(assumptions);
            leftOut = List.copyOf(leftOut);
        }
    }

    /**
     * Shows nothing yet.
     *
     * @param ask takes whether every run from now on is to say what to measure next
     */
    public LeverageModel(Consumer<Boolean> ask) {
        this.ask = ask;
    }

    /** Shows a result, or nothing. */
    public void show(Shown now) {
        shown = now;
        List<String> sites = sites();
        site = sites.contains(site) ? site : sites.stream().findFirst().orElse("");
        choose(site, rateOf);
    }

    /**
     * Shows one site.
     *
     * @param rate one of {@link #ratesOf()} there; of another, every rate is shown
     */
    public void choose(String name, String rate) {
        site = name;
        rateOf = ratesOf().contains(rate) ? rate : EVERY;
        picture.set(picture(shown.result()));
    }

    /** Sites of the last run. */
    public List<String> sites() {
        return shown.result().stream()
                .flatMap(result -> result.levels().stream())
                .map(LevelAnswer::site)
                .distinct()
                .toList();
    }

    /** The site that is shown; blank before a run. */
    public String site() {
        return site;
    }

    /** Whose rate is shown. */
    public String rateOf() {
        return rateOf;
    }

    /** The flight and the levels of the site of which something is known, and every rate together. */
    public List<String> ratesOf() {
        List<String> names = new ArrayList<>(List.of(EVERY));
        shown.result().ifPresent(result -> {
            result.flight(site).ifPresent(flight -> names.add(LeverageReport.name(NextMeasurement.FLIGHT)));
            result.levels().stream()
                    .filter(level -> level.site().equals(site) && level.rate().isPresent())
                    .forEach(level -> names.add(level.level()));
        });
        return names;
    }

    /** What is shown. */
    public ReadOnlyObjectProperty<Picture> pictureProperty() {
        return picture.getReadOnlyProperty();
    }

    private Picture picture(Optional<StudyResult> found) {
        if (found.isEmpty()) {
            return asks() ? Picture.ASKED : Picture.NOTHING;
        }
        StudyResult result = found.get();
        Leverage leverage = result.leverage();
        Optional<FlightResult> flight = result.flight(site);
        List<CurveRow> curves = here(
                result.curveChoice().stream()
                        .sorted(Comparator.comparing(choice -> choice.level().isPresent())) // the flight first
                        .map(choice -> new CurveRow(
                                LeverageReport.name(choice.level().orElse(NextMeasurement.FLIGHT)), choice))
                        .toList(),
                row -> row.choice().site(),
                CurveRow::rateOf);
        List<LevelTornado> tornados = here(leverage.tornado(), LevelTornado::site, LevelTornado::level);
        List<FlightResult.Halving> halving = isShown(NextMeasurement.FLIGHT)
                ? flight.map(FlightResult::halving).orElse(List.of()).stream()
                        .sorted(Comparator.comparingDouble(FlightResult.Halving::width95ChangePercent))
                        .toList()
                : List.of();
        return new Picture(
                words(result, flight),
                curves,
                around(
                        0.06,
                        curves.stream()
                                .map(row -> row.choice().rate().shortest95())
                                .flatMapToDouble(of -> DoubleStream.of(of.low(), of.high()))),
                halving,
                around(
                        0.06,
                        DoubleStream.concat(
                                DoubleStream.of(0),
                                halving.stream().mapToDouble(FlightResult.Halving::width95ChangePercent))),
                tornados.stream().flatMap(LeverageModel::inputs).toList(),
                around(
                        0.04,
                        tornados.stream()
                                .flatMap(of -> of.bars().stream()
                                        .flatMap(bar -> Stream.of(
                                                bar.rateAtLow95() - of.rate(), bar.rateAtHigh95() - of.rate())))
                                .mapToDouble(change -> change)),
                here(leverage.nextMeasurements(), NextMeasurement::site, NextMeasurement::rateOf),
                here(leverage.assumptionSwitches(), AssumptionSwitch::site, AssumptionSwitch::rateOf).stream()
                        .sorted(Comparator.comparingDouble(of -> -LeverageReport.move(of.rate(), of.rateWouldBe())))
                        .toList(),
                leftOut(leverage, flight),
                asks(),
                wasAsked(),
                shown.stale());
    }

    private <T> List<T> here(List<T> all, Function<T, String> siteOf, Function<T, String> rate) {
        return all.stream()
                .filter(each -> siteOf.apply(each).equals(site) && isShown(rate.apply(each)))
                .toList();
    }

    /** Whether the rate of a level, or of the flight under either of its names, is looked at. */
    private boolean isShown(String rate) {
        return rateOf.equals(EVERY) || rateOf.equals(rate) || rateOf.equals(LeverageReport.name(rate));
    }

    private List<Words> words(StudyResult result, Optional<FlightResult> flight) {
        LeverageReport report = new LeverageReport(site, result.leverage());
        Map<Part, Stream<String>> words = new EnumMap<>(Part.class);
        words.put(
                Part.CURVES,
                Stream.concat(
                        CurveChoiceReport.ofSite(site, result.curveChoice()).stream(),
                        CurveChoiceReport.ofAll(result.curveEvidence()).stream()));
        words.put(Part.INPUTS, flight.map(FlightReport::new).flatMap(FlightReport::halving).stream());
        words.put(Part.NEXT, report.next().stream());
        words.put(Part.ASSUMPTIONS, report.switches().stream());
        words.put(
                Part.LEFT_OUT,
                Stream.concat(
                        flight.map(FlightReport::new).flatMap(FlightReport::hinges).stream(),
                        report.leftOut().stream()));
        List<Words> all = new ArrayList<>();
        words.forEach((part, lines) ->
                all.add(new Words(part, lines.map(String::strip).toList())));
        return all.stream().filter(of -> !of.sentences().isEmpty()).toList();
    }

    private static Stream<InputRow> inputs(LevelTornado of) {
        String name = of.level() + of.stage().map(stage -> " at " + stage).orElse(", at its own age");
        double longest =
                of.bars().stream().mapToDouble(LevelTornado.Bar::span95).max().orElse(0);
        double sigma = longest / 4;
        List<InputRow> rows = new ArrayList<>();
        for (LevelTornado.Bar bar : of.bars()) {
            rows.add(new InputRow(
                    name,
                    rows.isEmpty() ? number(of.rate(), sigma) : "",
                    of.rate(),
                    bar.input(),
                    range(bar),
                    Optional.of(bar),
                    number(bar.rateAtLow95(), sigma) + " to " + number(bar.rateAtHigh95(), sigma)));
        }
        for (LevelTornado.OtherStage other : of.otherStages()) {
            rows.add(new InputRow(
                    name,
                    "",
                    of.rate(),
                    "were it " + other.stage(),
                    "probability " + CurveChoiceReport.weight(other.probability()),
                    Optional.empty(),
                    number(other.rate(), sigma)));
        }
        return rows.stream();
    }

    private static String range(LevelTornado.Bar bar) {
        Interval values = bar.input95();
        double sigma = values.width() / 4;
        return number(values.low(), sigma) + " to " + number(values.high(), sigma) + " "
                + (bar.unit().equals("sigma") ? "σ" : bar.unit());
    }

    private static String number(double value, double sigma) {
        return Wording.number(Digits.text(value, sigma, 2));
    }

    private List<LeftOutRow> leftOut(Leverage leverage, Optional<FlightResult> flight) {
        List<LeftOutRow> rows = new ArrayList<>();
        String flights = NextMeasurement.FLIGHT;
        flight.ifPresent(of -> of.leaveOneOut()
                .forEach(out -> rows.add(new LeftOutRow(
                        "level",
                        out.level(),
                        flights,
                        ShortRate.of(of.rate()),
                        Optional.of(out.rate()).map(ShortRate::of),
                        "log predictive density " + Wording.number(Digits.text(out.logPredictive(), 1))))));
        for (SampleLeftOut out : leverage.samplesLeftOut()) {
            if (out.site().equals(site)) {
                String name = out.sample() + " of " + out.level();
                out.levelRate()
                        .ifPresent(rate -> rows.add(
                                new LeftOutRow("sample", name, out.level(), rate, out.levelRateWithout(), "")));
                out.flightRate()
                        .ifPresent(rate ->
                                rows.add(new LeftOutRow("sample", name, flights, rate, out.flightRateWithout(), "")));
            }
        }
        for (CurveLeftOut out : leverage.curvesLeftOut()) {
            if (out.site().equals(site)) {
                rows.add(new LeftOutRow(
                        "curve",
                        out.curve(),
                        out.rateOf(),
                        out.rate(),
                        Optional.of(out.rateWithout()),
                        "weight " + CurveChoiceReport.weight(out.weight())));
            }
        }
        return rows.stream()
                .filter(row -> isShown(row.rateOf()))
                .sorted(Comparator.comparingDouble(row -> -row.move()))
                .toList();
    }

    /** The range of some numbers with a part of it to spare on both sides. */
    private static Interval around(double part, DoubleStream values) {
        double[] all = values.sorted().toArray();
        if (all.length == 0) {
            return new Interval(-1, 1);
        }
        double spare = Math.max(part * (all[all.length - 1] - all[0]), 1e-4);
        return new Interval(all[0] - spare, all[all.length - 1] + spare);
    }

    /** The sentences of the terminal to one question; none before a run. */
    public List<String> words(Part part) {
        return picture.get().words().stream()
                .filter(of -> of.part() == part)
                .flatMap(of -> of.sentences().stream())
                .toList();
    }

    /** Why a part shows nothing; empty where it shows something. */
    public Optional<Missing> missing(Part part) {
        Picture now = picture.get();
        boolean isEmpty = switch (part) {
            case CURVES -> now.curves().isEmpty();
            case INPUTS -> now.inputs().isEmpty() && now.halving().isEmpty();
            case NEXT -> now.next().isEmpty();
            case ASSUMPTIONS -> now.assumptions().isEmpty();
            case LEFT_OUT -> now.leftOut().isEmpty();
        };
        if (!isEmpty) {
            return Optional.empty();
        }
        if (shown.result().isEmpty()) {
            return Optional.of(new Missing("Nothing hangs on anything yet: run the study.", Optional.empty()));
        }
        return Optional.of(
                switch (part) {
                    case CURVES -> whyNoCurves();
                    case INPUTS ->
                        new Missing(
                                "No input can be moved by itself here: this rate waits for a highstand.",
                                Optional.empty());
                    case NEXT, ASSUMPTIONS ->
                        now.wasAsked()
                                ? new Missing("The run was asked, and found nothing here to tell.", Optional.empty())
                                : new Missing(
                                        "The last run was not asked for this, since it takes longer than the rates"
                                                + " themselves.",
                                        Optional.of(Way.ASK_AND_RUN));
                    case LEFT_OUT ->
                        now.wasAsked()
                                ? new Missing("Nothing can be left out here.", Optional.empty())
                                : new Missing(
                                        "Levels are left out of a flight, curves where there are several, samples where"
                                                + " the run is asked for it.",
                                        Optional.of(Way.ASK_AND_RUN));
                });
    }

    private Missing whyNoCurves() {
        boolean elsewhere =
                shown.result().stream().anyMatch(result -> !result.curveChoice().isEmpty());
        return elsewhere
                ? new Missing("Only one curve serves this rate.", Optional.empty())
                : new Missing(
                        "The study ran under one curve, so nobody can tell what another would say.",
                        Optional.of(Way.CHOOSE_CURVES));
    }

    /** What else to know of a part. */
    public String note(Part part) {
        return switch (part) {
            case CURVES ->
                "No curve is true, and they share cores and methods. Read the mixtures beside the curves, never alone.";
            case INPUTS ->
                "Each input from the low end of its own range (brown) to the high end (blue), all others at their"
                        + " medians: thick 68 %, thin 95 %. Bars do not add up to the spread.";
            case NEXT ->
                "Mean change of the width of the 95 % interval, ± one standard error of its calculation. What it costs is"
                        + " for you to say.";
            case ASSUMPTIONS -> "Both rates with the same draws, median and 95 %: compare them with each other.";
            case LEFT_OUT ->
                "Median and 95 %, with and without."
                        + (picture.get().wasAsked() ? "" : " Samples only where the run is asked for it.");
        };
    }

    private boolean wasAsked() {
        boolean found = shown.result().map(StudyResult::leverage).stream()
                .anyMatch(of -> !of.nextMeasurements().isEmpty()
                        || !of.assumptionSwitches().isEmpty()
                        || !of.samplesLeftOut().isEmpty());
        return found || (asks() && shown.result().isPresent() && !shown.stale());
    }

    private boolean asks() {
        return shown.study()
                .filter(study -> study.settings().leverage().isPresent())
                .isPresent();
    }

    /** Asks every run what to measure next, or no longer: an edit of the study. */
    public void ask(boolean every) {
        if (every != asks()) {
            ask.accept(every);
        }
    }

    /** Whether a measurement would narrow an interval by more than can be told, in a word. */
    static String tells(NextMeasurement each) {
        return LeverageReport.tells(each)
                ? ""
                : each.effectiveDraws() < NextMeasurement.FEW_DRAWS
                        ? "too few draws to say"
                        : "no more than can be told";
    }

    /** {@code 0.88 to 0.94}; blank where the rate is not a flight's. */
    static String certainty(NextMeasurement each) {
        return each.pairing()
                .map(gain -> Digits.text(gain.certainty(), 2) + " to " + Digits.text(gain.expectedCertainty(), 2)
                        + (gain.error() < 0.0005 ? "" : " ± " + Digits.text(gain.error(), gain.error(), 1)))
                .orElse("");
    }
}
