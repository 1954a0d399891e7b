package stillstand.view;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.Consumer;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import stillstand.report.LeverageReport;
import stillstand.sensitivity.NextMeasurement;
import stillstand.study.StudyResult;
import stillstand.uncertainty.Digits;
import stillstand.uplift.LevelAnswer;

/**
 * What the answers of one site hang on: the curve, each input, each assumption, each piece of evidence, and which measurement
 * would help most. What was not asked of the run is said, with what would ask for it. Rates in m/kyr.
 */
public final class LeverageModel {
    /** Stands for every rate of the site. */
    public static final String EVERY = "every rate";

    private static final String HALF_WIDTHS = "How far a rate moves is in half widths of its 95 % interval.";

    private final Consumer<Boolean> ask;
    private final ReadOnlyObjectWrapper<LeveragePicture> picture = new ReadOnlyObjectWrapper<>(LeveragePicture.NOTHING);
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
        picture.set(shown.result()
                .map(result -> new LeverageRows(result, site, rateOf).picture(asks(), wasAsked(), shown.stale()))
                .orElse(asks() ? LeveragePicture.ASKED : LeveragePicture.NOTHING));
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
    public ReadOnlyObjectProperty<LeveragePicture> pictureProperty() {
        return picture.getReadOnlyProperty();
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
        LeveragePicture now = picture.get();
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
                "Mean change of the width of the 95 % interval, ± one standard error of its calculation, and the"
                        + " probability that it widens. What it costs is for you to say.";
            case ASSUMPTIONS ->
                "Both rates with the same draws, median and 95 %: compare them with each other. " + HALF_WIDTHS;
            case LEFT_OUT ->
                "Median and 95 %, with and without. " + HALF_WIDTHS
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
                : each.effectiveDraws() < NextMeasurement.FEW_DRAWS ? "too few draws" : "cannot be told";
    }

    /** {@code 0.88 to 0.94}; blank where the rate is not a flight's. */
    static String certainty(NextMeasurement each) {
        return each.pairing()
                .map(gain -> Digits.text(gain.certainty(), 2) + " to " + Digits.text(gain.expectedCertainty(), 2)
                        + (gain.error() < 0.0005 ? "" : " ± " + Digits.text(gain.error(), gain.error(), 1)))
                .orElse("");
    }
}
