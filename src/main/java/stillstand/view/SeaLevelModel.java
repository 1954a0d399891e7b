package stillstand.view;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.function.Consumer;
import java.util.stream.Stream;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import javafx.collections.FXCollections;
import javafx.collections.ObservableList;
import stillstand.report.CurveReport;
import stillstand.report.Wording;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.HighstandOptions;
import stillstand.sealevel.HighstandOverrides;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.study.HighstandRows;
import stillstand.study.Library;
import stillstand.study.Study;
import stillstand.study.StudyResult.CurvePoint;
import stillstand.study.StudySettings.SeaLevelChoice;
import stillstand.study.StudySettings.WeightedCurve;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Summary;

/**
 * Curves of past sea level to compare and to choose, and the highstands that a study takes from them. Ages in ka, levels in m above
 * present mean sea level.
 */
public final class SeaLevelModel {
    /** What stands for no overrides. */
    public static final String NO_OVERRIDES = "none";

    private static final String USUAL_OVERRIDES = "independent-highstands";
    private static final double STEP_KA = 1;
    private static final double USUAL_SPAN_KA = 430;
    private static final double ROOM_METRES = 8;
    private static final double LEAST_SPAN_KA = 2;
    private static final double LEAST_SPAN_METRES = 2;

    private final Consumer<SeaLevelEdit> edits;
    private final ObservableList<Curve> curves = FXCollections.observableArrayList();
    private final ObservableList<String> overrides = FXCollections.observableArrayList();
    private final ReadOnlyObjectWrapper<Picture> picture =
            new ReadOnlyObjectWrapper<>(new Picture(List.of(), List.of(), List.of(), "", true));
    private final ReadOnlyObjectWrapper<Pane> pane =
            new ReadOnlyObjectWrapper<>(new Pane(new Interval(0, USUAL_SPAN_KA), new Interval(-140, 20)));
    /** Points of the curves drawn so far. */
    private final Map<String, List<CurvePoint>> drawn = new HashMap<>();

    private Library library;
    private Shown shown = Shown.NOTHING;
    private List<String> chosen = List.of();
    private List<String> looked = List.of();
    private String replacing = USUAL_OVERRIDES;
    private Optional<String> table = Optional.empty();

    /**
     * The sea level of no study yet.
     *
     * @param library the curves and tables there are
     * @param edits takes what the user chooses
     */
    public SeaLevelModel(Library library, Consumer<SeaLevelEdit> edits) {
        this.library = library;
        this.edits = edits;
        use(library);
    }

    /**
     * A curve there is.
     *
     * @param id its id
     * @param says what to know of it
     */
    public record Curve(String id, String says) {
        @Override
        public String toString() {
            return id;
        }
    }

    /** What is in view. */
    public record Pane(Interval agesKa, Interval metres) {}

    /** A line through time. */
    public record Line(String id, boolean inUse, List<CurvePoint> points) {
        public Line {
            points = List.copyOf(points);
        }
    }

    /** Where a curve itself has a highstand. */
    public record Pick(double ageKa, double metres) {}

    /**
     * A highstand in use.
     *
     * @param pick where the curve itself has it; absent where it is not the curve's
     * @param replaced whether an independent estimate stands in for the pick
     */
    public record Stand(
            String stage,
            double ageKa,
            double ageSigmaKa,
            double metres,
            double sigmaMetres,
            Optional<Pick> pick,
            boolean replaced,
            String source) {}

    /**
     * What is drawn and listed.
     *
     * @param lines the curves, the first in use first
     * @param stands the highstands under the first of them
     * @param cells of the table of highstands, under {@link CurveReport#HIGHSTAND_COLUMNS}
     * @param of whose highstands they are
     * @param isStudys whether they are just as the study uses them
     */
    public record Picture(List<Line> lines, List<Stand> stands, List<List<String>> cells, String of, boolean isStudys) {
        public Picture {
            lines = List.copyOf(lines);
            stands = List.copyOf(stands);
            cells = List.copyOf(cells);
        }
    }

    /** Takes a library with the study's own curves beside the shipped ones. */
    public void use(Library other) {
        library = other;
        drawn.clear();
        curves.setAll(other.curves().stream()
                .map(curve -> new Curve(curve.id(), says(curve)))
                .toList());
        overrides.setAll(Stream.concat(
                        Stream.of(NO_OVERRIDES),
                        other.highstands().stream()
                                .filter(rows -> rows.entries().stream()
                                        .allMatch(entry -> other.stages()
                                                .find(entry.stage())
                                                .isPresent()))
                                .map(HighstandRows::id))
                .toList());
        refresh();
    }

    private static String says(SeaLevelCurve curve) {
        return String.format(
                        Locale.ROOT,
                        "%.0f to %.0f ka, usable from %.0f ka. ",
                        curve.fromKa(),
                        curve.toKa(),
                        curve.facts().usableFromKa())
                + (curve.facts().spreadIsGuessed() ? "Its spread is guessed. " : "")
                + String.join(" ", curve.facts().caveats());
    }

    /** Shows a study's sea level; without a study the chosen curves stay. */
    public void show(Shown now) {
        shown = now;
        now.study().map(study -> study.settings().seaLevel()).ifPresent(this::take);
        if (now.study().isPresent()) {
            looked = List.of();
        }
        refresh();
    }

    private void take(SeaLevelChoice choice) {
        chosen = choice.curves().stream().map(WeightedCurve::id).toList();
        table = choice.highstandTable();
        replacing = choice.overrides().orElse(NO_OVERRIDES);
    }

    /** Whether a curve is the study's, or asked for. */
    public boolean isChosen(String curve) {
        return chosen.contains(curve);
    }

    /** Whether a curve is drawn for comparison alone. */
    public boolean isLookedAt(String curve) {
        return looked.contains(curve);
    }

    /** What replaces the curve's own picks. */
    public String overridesInUse() {
        return replacing;
    }

    /** Id of the table that the study takes its highstands from; empty where they are picked from curves. */
    public Optional<String> tableInUse() {
        return table;
    }

    /** Draws a curve for comparison, or no longer. */
    public void lookAt(String curve, boolean drawn) {
        List<String> others = new ArrayList<>(looked);
        others.remove(curve);
        if (drawn && library.curve(curve).isPresent()) {
            others.add(curve);
        }
        looked = List.copyOf(others);
        refresh();
    }

    /** Asks the study to use a curve, or no longer to; the last one cannot be left. */
    public void choose(String curve, boolean use) {
        List<String> others = new ArrayList<>(chosen);
        others.remove(curve);
        if (use) {
            others.add(curve);
        }
        if (!others.isEmpty() && !others.equals(chosen)) {
            chosen = List.copyOf(others);
            ask();
        }
        refresh();
    }

    /** Asks the study to use one curve in place of all others. */
    public void chooseOnly(String curve) {
        if (library.curve(curve).isPresent() && !chosen.equals(List.of(curve))) {
            chosen = List.of(curve);
            ask();
            refresh();
        }
    }

    /** Asks the study to replace the curve's own picks by a table, or by none. */
    public void override(String by) {
        if (overrides.contains(by) && !by.equals(replacing)) {
            replacing = by;
            ask();
            refresh();
        }
    }

    private void ask() {
        if (!chosen.isEmpty()) {
            edits.accept(new SeaLevelEdit(
                    chosen, replacing.equals(NO_OVERRIDES) ? Optional.empty() : Optional.of(replacing)));
        }
    }

    private void refresh() {
        List<String> ids = Stream.concat(chosen.stream(), looked.stream())
                .distinct()
                .filter(id -> library.curve(id).isPresent())
                .toList();
        List<Line> lines = ids.stream()
                .flatMap(id -> library.curve(id).stream())
                .map(curve -> new Line(
                        curve.id(),
                        chosen.contains(curve.id()),
                        drawn.computeIfAbsent(curve.id(), id -> points(curve))))
                .toList();
        Optional<HighstandTable> own = ids.stream()
                .findFirst()
                .flatMap(library::curve)
                .flatMap(curve -> table(curve, HighstandOverrides.NONE));
        Optional<HighstandTable> used = used(ids);
        List<Stand> stands = used.map(each -> stands(each, own)).orElse(List.of());
        List<List<String>> cells = used.map(each -> CurveReport.highstandRows(
                        own.orElse(each), each, ids.stream().findFirst().orElse(each.id())))
                .orElse(List.of());
        picture.set(
                new Picture(lines, stands, cells, used.map(HighstandTable::id).orElse(""), isStudys()));
    }

    /** The study's own where it is as the study has it, else what the choice would give. */
    private Optional<HighstandTable> used(List<String> ids) {
        Optional<Study> study = shown.study();
        if (study.isPresent() && isStudys()) {
            return study.map(each -> each.seaLevel().get(0).highstands());
        }
        return ids.stream().findFirst().flatMap(library::curve).flatMap(curve -> table(curve, replaced()));
    }

    private boolean isStudys() {
        return shown.study()
                .map(study -> study.settings().seaLevel())
                .map(choice ->
                        choice.curves().stream().map(WeightedCurve::id).toList().equals(chosen)
                                && choice.overrides().orElse(NO_OVERRIDES).equals(replacing))
                .orElse(false);
    }

    private HighstandOverrides replaced() {
        return library.highstands(replacing)
                .map(rows -> new HighstandOverrides(rows.id(), rows.entries()))
                .orElse(HighstandOverrides.NONE);
    }

    private Optional<HighstandTable> table(SeaLevelCurve curve, HighstandOverrides by) {
        return HighstandTable.canComeFrom(curve, library.stages())
                ? Optional.of(HighstandTable.fromCurve(curve, library.stages(), by, HighstandOptions.DEFAULT))
                : Optional.empty();
    }

    private static List<Stand> stands(HighstandTable used, Optional<HighstandTable> own) {
        return used.rows().stream()
                .filter(row -> !row.isOlder())
                .map(row -> {
                    Optional<Highstand> pick = own.flatMap(table -> table.find(row.stage()))
                            .filter(found ->
                                    found.source().equals(own.orElseThrow().id()));
                    return new Stand(
                            row.stage(),
                            row.ageKa(),
                            row.marginalAgeSigmaKa(used.sharedErrors()),
                            row.level().mean(),
                            row.marginalLevelSigmaMetres(used.sharedErrors()),
                            pick.map(found ->
                                    new Pick(found.ageKa(), found.level().quantile(0.5))),
                            pick.map(found -> !found.source().equals(row.source()))
                                    .orElse(true),
                            row.source());
                })
                .toList();
    }

    private static List<CurvePoint> points(SeaLevelCurve curve) {
        List<CurvePoint> points = new ArrayList<>();
        for (double ageKa = Math.ceil(curve.fromKa()); ageKa <= curve.toKa(); ageKa += STEP_KA) {
            Summary there = Summary.of(curve.readAt(ageKa));
            points.add(new CurvePoint(
                    ageKa,
                    curve.levelMetresAt(ageKa),
                    there.interval68().low(),
                    there.interval68().high(),
                    there.interval95().low(),
                    there.interval95().high()));
        }
        return points;
    }

    /**
     * Zooms about a place.
     *
     * @param factor below 1 = nearer
     * @param ageKa what stays where it is
     * @param metres what stays where it is
     */
    public void zoom(double factor, double ageKa, double metres) {
        Pane now = pane.get();
        double ages = Math.max(LEAST_SPAN_KA, now.agesKa().width() * factor);
        double heights = Math.max(LEAST_SPAN_METRES, now.metres().width() * factor);
        look(
                ageKa - (ageKa - now.agesKa().low()) * ages / now.agesKa().width(),
                ages,
                metres - (metres - now.metres().low()) * heights / now.metres().width(),
                heights);
    }

    /** Moves what is in view by parts of itself: positive = to older ages, to higher levels. */
    public void move(double ages, double heights) {
        Pane now = pane.get();
        look(
                now.agesKa().low() + ages * now.agesKa().width(),
                now.agesKa().width(),
                now.metres().low() + heights * now.metres().width(),
                now.metres().width());
    }

    private void look(double fromKa, double ages, double fromMetres, double heights) {
        double from = Math.max(-0.02 * ages, fromKa);
        pane.set(new Pane(new Interval(from, from + ages), new Interval(fromMetres, fromMetres + heights)));
    }

    /** Shows all of the usual span. */
    public void wholeView() {
        double oldest = picture.get().lines().stream()
                .mapToDouble(line -> line.points().isEmpty()
                        ? 0
                        : line.points().get(line.points().size() - 1).ageKa())
                .max()
                .orElse(USUAL_SPAN_KA);
        double to = Math.min(USUAL_SPAN_KA, Math.max(LEAST_SPAN_KA, oldest));
        double low = -130;
        double high = 10;
        for (Line line : picture.get().lines()) {
            for (CurvePoint point : line.points()) {
                if (point.ageKa() <= to) {
                    low = Math.min(low, point.low68Metres());
                    high = Math.max(high, point.high68Metres());
                }
            }
        }
        pane.set(new Pane(new Interval(0, to), new Interval(low - ROOM_METRES, high + 2 * ROOM_METRES)));
    }

    /** What lies at an age: the level of each curve, and its 95 % interval. */
    public String reading(double ageKa) {
        return String.format(Locale.ROOT, "%.1f ka", ageKa)
                + picture.get().lines().stream()
                        .flatMap(line -> library.curve(line.id()).stream())
                        .filter(curve -> curve.covers(ageKa))
                        .map(curve -> {
                            Interval within = Summary.of(curve.readAt(ageKa)).interval95();
                            return "; " + curve.id() + " "
                                    + Wording.number(String.format(
                                            Locale.ROOT,
                                            "%.1f m (95 %%: %.1f to %.1f m)",
                                            curve.levelMetresAt(ageKa),
                                            within.low(),
                                            within.high()));
                        })
                        .reduce("", String::concat);
    }

    /** What a highstand is. */
    public static String reading(Stand stand) {
        return Wording.number(String.format(
                        Locale.ROOT,
                        "%s: %.1f ± %.1f m at %.1f ± %.1f ka (1 sigma)",
                        stand.stage(),
                        stand.metres(),
                        stand.sigmaMetres(),
                        stand.ageKa(),
                        stand.ageSigmaKa()))
                + ", from " + stand.source();
    }

    /** One sentence on the picture. */
    public String status() {
        if (picture.get().lines().isEmpty()) {
            return "Tick a curve to draw it.";
        }
        if (table.isPresent()) {
            return "The study takes its highstands from table " + table.get()
                    + "; curves are read only where levels and corals use their own ages.";
        }
        return isStudys()
                ? "Highstands as the study uses them."
                : "Highstands as they would be under " + picture.get().of() + ".";
    }

    /** The curves there are. */
    public ObservableList<Curve> curves() {
        return curves;
    }

    /** What may replace a curve's own picks. */
    public ObservableList<String> overrides() {
        return overrides;
    }

    /** What is drawn and listed. */
    public ReadOnlyObjectProperty<Picture> pictureProperty() {
        return picture.getReadOnlyProperty();
    }

    /** What is in view. */
    public ReadOnlyObjectProperty<Pane> paneProperty() {
        return pane.getReadOnlyProperty();
    }
}
