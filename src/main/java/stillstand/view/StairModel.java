package stillstand.view;

import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.Executor;
import java.util.function.Consumer;
import javafx.beans.property.DoubleProperty;
import javafx.beans.property.ReadOnlyBooleanProperty;
import javafx.beans.property.ReadOnlyBooleanWrapper;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import javafx.beans.property.ReadOnlyStringProperty;
import javafx.beans.property.ReadOnlyStringWrapper;
import javafx.beans.property.SimpleDoubleProperty;
import javafx.collections.FXCollections;
import javafx.collections.ObservableList;
import stillstand.figure.SiteView;
import stillstand.shoreline.StageChoice;
import stillstand.study.SitePlan;
import stillstand.study.SitePreview;
import stillstand.study.StudyResult;
import stillstand.study.StudyResult.CurveUsed;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightPreview;
import stillstand.uplift.FlightResult;
import stillstand.uplift.PredictedStair;
import stillstand.uplift.Rate;
import stillstand.uplift.UpliftHistory;
import stillstand.view.StairPicture.Link;

/**
 * The Stair of one site: its picture, the staircase of a rate that is slid by hand, and pairings that are tried. What a try would
 * give is a preview, worked out in the background; the newest wish alone is worked on. Used on the interface thread only.
 */
public final class StairModel {
    private static final double LEAST_REACH = 0.1;
    /** Where the slider stands before anything is known, m/kyr. */
    private static final double USUAL_RATE = 0.3;

    private static final double SLID = 1e-9;

    private final Executor background;
    private final Executor onInterface;
    private final Consumer<PairingEdit> edits;

    private final ObservableList<String> sites = FXCollections.observableArrayList();
    private final ReadOnlyStringWrapper site = new ReadOnlyStringWrapper("");
    private final ReadOnlyStringWrapper selected = new ReadOnlyStringWrapper("");
    private final ReadOnlyObjectWrapper<StairPicture> picture = new ReadOnlyObjectWrapper<>(StairPicture.EMPTY);
    private final ReadOnlyObjectWrapper<Optional<PredictedStair>> predicted =
            new ReadOnlyObjectWrapper<>(Optional.empty());
    private final ReadOnlyObjectWrapper<Optional<FlightPreview>> preview =
            new ReadOnlyObjectWrapper<>(Optional.empty());
    private final ReadOnlyObjectWrapper<Lens> lens = new ReadOnlyObjectWrapper<>(Lens.ANSWER);
    private final ObservableList<Lens> lenses = FXCollections.observableArrayList(Lens.ANSWER);
    private final DoubleProperty rateMetresPerKyr = new SimpleDoubleProperty(0);
    private final ReadOnlyObjectWrapper<Interval> rateRange = new ReadOnlyObjectWrapper<>(new Interval(-0.5, 1.5));

    private Shown shown = Shown.NOTHING;
    private Optional<SitePreview> tries = Optional.empty();
    /** Choices that are tried and not yet part of the study, by level. */
    private final Map<String, StageChoice> tried = new LinkedHashMap<>();

    private final Map<String, Double> rates = new HashMap<>();
    private final ReadOnlyBooleanWrapper isPreviewing = new ReadOnlyBooleanWrapper(false);
    private double presetRate = USUAL_RATE;
    private boolean working;
    private boolean wanted;

    /**
     * A Stair without a study.
     *
     * @param background where previews are worked out
     * @param onInterface brings them back
     * @param edits takes the pairings that the user decides on
     */
    public StairModel(Executor background, Executor onInterface, Consumer<PairingEdit> edits) {
        this.background = background;
        this.onInterface = onInterface;
        this.edits = edits;
        rateMetresPerKyr.addListener((property, before, now) -> predict());
    }

    /**
     * One way to look at the correlations of a flight.
     *
     * @param title in words
     * @param links its lines; absent = those of the picture
     * @param rate that goes with it, m/kyr; absent = stays
     * @param unread rates whose lines a preview still has to tell, when somebody looks; absent = none
     */
    public record Lens(String title, Optional<List<Link>> links, Optional<Double> rate, Optional<Interval> unread) {
        /** All correlations together. */
        static final Lens ANSWER = new Lens(
                "All correlations, each as strong as it is probable",
                Optional.empty(),
                Optional.empty(),
                Optional.empty());

        public Lens {
            links = links.map(List::copyOf);
        }

        private Lens read(List<Link> lines) {
            return new Lens(title, Optional.of(lines), rate, Optional.empty());
        }

        @Override
        public String toString() {
            return title;
        }
    }

    /** Shows a study, its last result, or neither; what was tried by hand is forgotten, the site stays if there still is one. */
    public void show(Shown now) {
        shown = now;
        tried.clear();
        List<String> names = now.study()
                .map(study -> study.sites().stream()
                        .map(SitePlan::site)
                        .map(stillstand.shoreline.Site::name)
                        .toList())
                .orElseGet(() -> now.result()
                        .map(result -> SiteView.all(result).stream()
                                .map(SiteView::site)
                                .toList())
                        .orElse(List.of()));
        sites.setAll(names);
        String chosen = names.contains(site.get())
                ? site.get()
                : names.stream().findFirst().orElse("");
        open(chosen);
    }

    /** Chooses the site; names that are not there are passed over. */
    public void choose(String name) {
        if (sites.contains(name) && !name.equals(site.get())) {
            tried.clear();
            open(name);
        }
    }

    private void open(String name) {
        boolean other = !name.equals(site.get());
        rememberRate();
        site.set(name);
        tries = shown.study().flatMap(study -> SitePreview.of(study, name));
        Optional<SiteView> answered = shown.result().stream()
                .flatMap(result -> SiteView.all(result).stream())
                .filter(view -> view.site().equals(name))
                .findFirst();
        picture.set(answered.map(view -> StairPicture.of(view, curves(), tries))
                .or(() -> tries.map(each -> StairPicture.of(each, curves())))
                .orElse(StairPicture.EMPTY));
        if (picture.get().level(selected.get()).isEmpty()) {
            selected.set("");
        }
        isPreviewing.set(false);
        preview.set(Optional.empty());
        lenses.setAll(StairLenses.of(picture.get(), flight(), tries.isPresent() && !shown.stale()));
        lens.set(lenses.get(0));
        setRate(other);
        predict();
        refreshPreview();
    }

    private List<CurveUsed> curves() {
        return shown.result()
                .map(result -> result.seaLevel().curves())
                .or(() -> shown.study()
                        .map(study -> StudyResult.SeaLevelUsed.of(study).curves()))
                .orElse(List.of());
    }

    /** The flight of the last run; empty where there is none. */
    public Optional<FlightResult> flight() {
        return shown.result().flatMap(result -> result.flight(site.get()));
    }

    /** The rate that the last run gives for the site: the flight's, else that of its best known level. */
    Optional<Rate> answeredRate() {
        return flight().map(FlightResult::rate)
                .or(() -> shown.result().stream()
                        .flatMap(result -> result.levels().stream())
                        .filter(level -> level.site().equals(site.get()))
                        .flatMap(level -> level.rate().stream())
                        .min((a, b) -> Double.compare(
                                a.interval68().width(), b.interval68().width())));
    }

    private void setRate(boolean otherSite) {
        Optional<Rate> known = answeredRate();
        if (known.isPresent()) {
            rateRange.set(around(known.get()));
        } else if (otherSite) {
            rateRange.set(new Interval(-0.5, 1.5));
        }
        double rate = rates.getOrDefault(site.get(), known.map(Rate::median).orElse(USUAL_RATE));
        presetRate = rates.containsKey(site.get()) ? presetRate : rate;
        slideTo(rate);
    }

    private static Interval around(Rate rate) {
        Interval within = rate.shortest95();
        double reach = Math.max(LEAST_REACH, 2.5 * within.width());
        return new Interval(Math.min(0, within.low() - reach), Math.max(0, within.high() + reach));
    }

    /** A rate that was slid by hand comes back with its site. */
    private void rememberRate() {
        if (!site.get().isEmpty() && Math.abs(rateMetresPerKyr.get() - presetRate) > SLID) {
            rates.put(site.get(), rateMetresPerKyr.get());
        }
    }

    private void predict() {
        UpliftHistory history = new UpliftHistory.ConstantRate(rateMetresPerKyr.get());
        predicted.set(tries.map(each -> PredictedStair.of(each.basis().highstands(), history)));
    }

    /** Slides the rate by hand, m/kyr; the range follows where it is left. */
    public void slideTo(double rate) {
        Interval range = rateRange.get();
        if (Math.abs(rate) < Double.POSITIVE_INFINITY) {
            if (!range.contains(rate)) {
                rateRange.set(new Interval(Math.min(range.low(), rate), Math.max(range.high(), rate)));
            }
            rateMetresPerKyr.set(rate);
        }
    }

    /** Opens a level beside the picture; blank closes. */
    public void select(String level) {
        selected.set(picture.get().level(level).isPresent() ? level : "");
    }

    /** Goes to the level above (+1) or below (-1) the selected one. */
    public void selectNext(int step) {
        List<StairPicture.Mark> levels = picture.get().levels();
        if (levels.isEmpty()) {
            return;
        }
        int at = -1;
        for (int i = 0; i < levels.size(); i++) {
            at = levels.get(i).name().equals(selected.get()) ? i : at;
        }
        int next = at < 0 ? (step > 0 ? 0 : levels.size() - 1) : Math.floorMod(at + step, levels.size());
        selected.set(levels.get(next).name());
    }

    /** Looks at one of the {@link #lenses()}. */
    public void look(Lens through) {
        lens.set(through);
        through.rate().ifPresent(this::slideTo);
        through.unread().ifPresent(rates -> tries.ifPresent(of -> read(through, rates, of)));
    }

    private void read(Lens through, Interval within, SitePreview of) {
        background.execute(() -> {
            Optional<FlightPreview> found = of.previewWithin(within);
            onInterface.execute(() -> {
                int at = lenses.indexOf(through);
                if (tries.isPresent() && tries.get() == of && at >= 0) {
                    boolean isLookedAt = lens.get().equals(through);
                    Lens read = through.read(found.map(each -> picture.get().links(each.pairings()))
                            .orElse(List.of()));
                    lenses.set(at, read);
                    if (isLookedAt) {
                        lens.set(read);
                    }
                }
            });
        });
    }

    /** Steps to the next (+1) or previous (-1) of the lenses. */
    public void step(int step) {
        look(lenses.get(Math.floorMod(lenses.indexOf(lens.get()) + step, lenses.size())));
    }

    /** What the study, and what is tried on top of it, says of a level's highstand. */
    public StageChoice choiceOf(String level) {
        StageChoice own =
                picture.get().level(level).map(StairPicture.Mark::choice).orElse(StageChoice.ANY);
        return tried.getOrDefault(level, own);
    }

    /** Whether a highstand may be chosen for a level now; a study with problems cannot be argued with. */
    public boolean canPair(String level) {
        return tries.isPresent()
                && picture.get().level(level).map(StairPicture.Mark::takesPart).orElse(false);
    }

    /** Tries a choice for the preview alone, while a line is being dragged. */
    public void attempt(String level, StageChoice choice) {
        if (canPair(level) && !choice.equals(choiceOf(level))) {
            tried.put(level, choice);
            refreshPreview();
        }
    }

    /** Gives a try up. */
    public void abandon(String level) {
        if (tried.remove(level) != null) {
            refreshPreview();
        }
    }

    /** Ties a level to one highstand. */
    public void pin(String level, String stage) {
        decide(level, StageChoice.pinnedTo(stage));
    }

    /** Says that a level records anything but this highstand. */
    public void forbid(String level, String stage) {
        tried.remove(level); // what was tried on the way is no part of the decision
        decide(level, choiceOf(level).without(stage));
    }

    /** Leaves it to the flight which highstand made a level. */
    public void free(String level) {
        decide(level, StageChoice.ANY);
    }

    private void decide(String level, StageChoice choice) {
        if (canPair(level)) {
            tried.put(level, choice);
            edits.accept(new PairingEdit(site.get(), level, choice.text()));
            refreshPreview();
        }
    }

    /** Whether there is anything that the last run does not answer. */
    public boolean isPreviewWanted() {
        return !tried.isEmpty()
                || shown.stale()
                || (flight().isEmpty() && !picture.get().answered());
    }

    private void refreshPreview() {
        if (!isPreviewWanted() || tries.isEmpty()) {
            preview.set(Optional.empty());
            isPreviewing.set(false);
            return;
        }
        isPreviewing.set(true);
        wanted = true;
        if (!working) {
            work();
        }
    }

    private void work() {
        working = true;
        wanted = false;
        SitePreview of = tries.orElseThrow();
        Map<String, StageChoice> choices = Map.copyOf(tried);
        background.execute(() -> {
            Optional<FlightPreview> found = attempted(of, choices);
            onInterface.execute(() -> {
                working = false;
                if (tries.isPresent() && tries.get() == of && isPreviewWanted()) {
                    preview.set(found);
                    found.ifPresent(this::followFirst);
                }
                if (wanted && tries.isPresent()) {
                    work();
                } else {
                    isPreviewing.set(false);
                }
            });
        });
    }

    /** Before the first run the slider stands where the preview does, until it is slid by hand. */
    private void followFirst(FlightPreview found) {
        boolean untouched = Math.abs(rateMetresPerKyr.get() - presetRate) <= SLID && !rates.containsKey(site.get());
        if (answeredRate().isEmpty() && untouched) {
            presetRate = found.rate().median();
            rateRange.set(around(found.rate()));
            slideTo(presetRate);
        }
    }

    private static Optional<FlightPreview> attempted(SitePreview of, Map<String, StageChoice> choices) {
        try {
            return of.preview(choices);
        } catch (IllegalArgumentException e) {
            return Optional.empty(); // such pairings cannot be; the status says that nothing fits
        }
    }

    /** One sentence on what is on the paper. */
    public String status() {
        if (site.get().isEmpty()) {
            return "Nothing to draw yet: a study needs a site and levels.";
        }
        if (isPreviewWanted() && tries.isPresent()) {
            Optional<String> whyNot = tries.get().whyNot();
            if (whyNot.isPresent()) {
                return "No preview: " + whyNot.get() + ".";
            }
            if (!tries.get().isNeeded(tried)) {
                return "Every level is tied to one highstand: a run gives each its own rate and matches no flight.";
            }
            return preview.get()
                    .map(found -> StairReadings.previewed(found, tries.get()))
                    .orElse(isPreviewing.get() ? "Preview …" : "No rate of the prior can have left these pairings.");
        }
        return flight().map(StairReadings::answered)
                .orElse("No flight was matched here: each level stands for itself.");
    }

    /** Lines of the preview; empty where there is none. */
    public List<Link> previewLinks() {
        return preview.get().map(found -> picture.get().links(found.pairings())).orElse(List.of());
    }

    /** Lines of the answer, through the present lens. */
    public List<Link> answerLinks() {
        return lens.get().links().orElseGet(() -> picture.get().links());
    }

    /** How the predicted steps miss the levels; empty where there are none. */
    public Optional<String> miss() {
        return predicted.get().flatMap(stair -> StairReadings.miss(picture.get(), stair));
    }

    /** All that is known of the selected level; empty where none is. */
    public List<Fact> levelFacts() {
        return picture.get()
                .level(selected.get())
                .map(level -> new LevelFacts(shown.result(), site.get(), level, choiceOf(level.name()), preview.get())
                        .facts())
                .orElse(List.of());
    }

    /** What the site's flight says, a sentence each. */
    public List<String> flightSentences() {
        return LevelFacts.ofFlight(flight());
    }

    /** Names of the sites. */
    public ObservableList<String> sites() {
        return sites;
    }

    /** Ways to look at the correlations; the first is the answer. */
    public ObservableList<Lens> lenses() {
        return lenses;
    }

    /** Name of the site shown; blank where there is none. */
    public ReadOnlyStringProperty siteProperty() {
        return site.getReadOnlyProperty();
    }

    /** Name of the level opened; blank where none is. */
    public ReadOnlyStringProperty selectedProperty() {
        return selected.getReadOnlyProperty();
    }

    /** What is drawn. */
    public ReadOnlyObjectProperty<StairPicture> pictureProperty() {
        return picture.getReadOnlyProperty();
    }

    /** The staircase of the slid rate; empty while the study has problems. */
    public ReadOnlyObjectProperty<Optional<PredictedStair>> predictedProperty() {
        return predicted.getReadOnlyProperty();
    }

    /** The preview; empty where the last run answers already, or nothing can. */
    public ReadOnlyObjectProperty<Optional<FlightPreview>> previewProperty() {
        return preview.getReadOnlyProperty();
    }

    /** Whether a preview is being worked out. */
    public ReadOnlyBooleanProperty previewingProperty() {
        return isPreviewing.getReadOnlyProperty();
    }

    /** The present way to look at the correlations. */
    public ReadOnlyObjectProperty<Lens> lensProperty() {
        return lens.getReadOnlyProperty();
    }

    /** The rate slid by hand, m/kyr. */
    public DoubleProperty rateProperty() {
        return rateMetresPerKyr;
    }

    /** From and to which rate one may slide, m/kyr. */
    public ReadOnlyObjectProperty<Interval> rateRangeProperty() {
        return rateRange.getReadOnlyProperty();
    }

    /** Whether what is shown is older than the study. */
    public boolean isStale() {
        return shown.stale();
    }
}
