package stillstand.view;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.stream.DoubleStream;
import java.util.stream.Stream;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import stillstand.comparison.PooledRates.PooledSite;
import stillstand.comparison.SiteComparison;
import stillstand.comparison.SiteGroup;
import stillstand.comparison.SiteMotion;
import stillstand.comparison.TerraceTilt;
import stillstand.comparison.Tilt;
import stillstand.figure.SiteView.LevelView;
import stillstand.report.ComparisonReport;
import stillstand.report.Wording;
import stillstand.study.StudyResult;
import stillstand.uncertainty.Digits;
import stillstand.uncertainty.Interval;
import stillstand.uplift.Quantity;

/** How sites compare: where they lie, how they differ, and what a coast says as a whole. Rates in m/kyr. */
public final class SitesModel {
    private static final String UNSHARED = "were errors not shared: ";

    private final ReadOnlyObjectWrapper<Content> content = new ReadOnlyObjectWrapper<>(Content.NOTHING);
    private final ReadOnlyObjectWrapper<SitesPicture> picture = new ReadOnlyObjectWrapper<>(SitesPicture.EMPTY);
    private Shown shown = Shown.NOTHING;
    private List<SitesPicture> views = List.of();

    /** The questions. */
    public enum Part {
        /** Which of two is faster. */
        DIFFERENCES("Differences"),
        /** Which way each goes. */
        MOTION("Up or down"),
        /** What a coast says. */
        TOGETHER("Coasts as a whole");

        private final String title;

        Part(String title) {
            this.title = title;
        }

        /** What it is called. */
        public String title() {
            return title;
        }
    }

    /**
     * Something that several sites, or many points of a terrace, say together.
     *
     * @param of the coast or terrace
     * @param what is said
     * @param answer with what is shared kept shared
     * @param beside what would come out were the errors not shared, or of a site by itself; blank where there is no such thing
     * @param warning where the answer is rough or nothing fits
     */
    public record TogetherRow(String of, String what, String answer, String beside, String warning) {}

    /**
     * All that is shown beside the map.
     *
     * @param differenceAxis m/kyr
     * @param stableWithin what counts as stable, in words
     * @param stale whether all this is older than the study
     */
    public record Content(
            List<String> words,
            List<SiteComparison> differences,
            Interval differenceAxis,
            List<SiteMotion> motions,
            List<TogetherRow> together,
            String stableWithin,
            boolean stale) {
        static final Content NOTHING =
                new Content(List.of(), List.of(), new Interval(-1, 1), List.of(), List.of(), "a threshold", false);

        public Content {
            words = List.copyOf(words);
            differences = List.copyOf(differences);
            motions = List.copyOf(motions);
            together = List.copyOf(together);
        }
    }

    /** Shows a result, or nothing. */
    public void show(Shown now) {
        shown = now;
        views = now.result().map(SitesPicture::all).orElse(List.of());
        content.set(now.result().map(this::content).orElse(Content.NOTHING));
        choose(picture.get().name());
    }

    /** Shows one of {@link #views()}; of another, the first. */
    public void choose(String view) {
        picture.set(views.stream()
                .filter(each -> each.name().equals(view))
                .findFirst()
                .or(() -> views.stream().findFirst())
                .orElse(SitesPicture.EMPTY));
    }

    /** The map and the coasts there are. */
    public List<String> views() {
        return views.stream().map(SitesPicture::name).toList();
    }

    /** What is shown beside the map. */
    public ReadOnlyObjectProperty<Content> contentProperty() {
        return content.getReadOnlyProperty();
    }

    /** The map or coast that is shown. */
    ReadOnlyObjectProperty<SitesPicture> pictureProperty() {
        return picture.getReadOnlyProperty();
    }

    private Content content(StudyResult result) {
        List<String> words = new ComparisonReport(result)
                .lines().stream()
                        .filter(line -> line.startsWith("  ")) // the others are headings
                        .map(String::strip)
                        .toList();
        double[] ends = result.comparison().stream()
                .flatMap(pair -> Stream.of(
                        pair.difference().shortest95(),
                        pair.independent().difference().interval95()))
                .flatMapToDouble(of -> DoubleStream.of(of.low(), of.high()))
                .sorted()
                .toArray();
        double spare = ends.length == 0 ? 1 : 0.05 * (ends[ends.length - 1] - ends[0]) + 1e-4;
        Interval axis = ends.length == 0
                ? new Interval(-1, 1)
                : new Interval(Math.min(0, ends[0]) - spare, Math.max(0, ends[ends.length - 1]) + spare);
        return new Content(
                words, result.comparison(), axis, result.siteMotion(), together(result), stableWithin(), shown.stale());
    }

    private static List<TogetherRow> together(StudyResult result) {
        List<TogetherRow> rows = new ArrayList<>();
        for (SiteGroup group : result.siteGroups()) {
            String rough = ComparisonReport.rough(group.effectiveFraction()).strip();
            group.pooled().ifPresent(pooled -> {
                rows.add(new TogetherRow(group.group(), "mean, partially pooled", quantity(pooled.mean()), "", rough));
                rows.add(new TogetherRow(
                        group.group(),
                        "how far its sites differ",
                        Wording.quantity(pooled.spread()) + " m/kyr, 95 % "
                                + ComparisonReport.interval(pooled.spread()),
                        "",
                        ""));
                for (PooledSite site : pooled.sites()) {
                    rows.add(new TogetherRow(
                            group.group(),
                            site.site() + ", drawn to the mean",
                            quantity(site.rate()),
                            by(result, site.site()),
                            ""));
                }
            });
            group.areaMean()
                    .ifPresent(mean ->
                            rows.add(new TogetherRow(group.group(), "mean over areas", quantity(mean), "", rough)));
            group.tilt().ifPresent(tilt -> rows.add(along(group.group(), "tilt along the coast", tilt)));
            group.plane()
                    .ifPresent(plane -> rows.add(new TogetherRow(
                            group.group(),
                            "tilt over the map",
                            ComparisonReport.steepest(plane.sharedErrors()),
                            UNSHARED + ComparisonReport.steepest(plane.independent()),
                            ComparisonReport.straight(plane.sharedErrors().p(), "plane")
                                    .strip())));
        }
        result.terraceTilts().forEach(tilt -> terrace(tilt, rows));
        return rows;
    }

    private static String by(StudyResult result, String site) {
        return result.siteMotion().stream()
                .filter(each -> each.site().equals(site))
                .findFirst()
                .map(each -> "by itself: " + quantity(each.rate()))
                .orElse("");
    }

    private static String quantity(Quantity of) {
        return Wording.quantity(of) + " m/kyr, 95 % " + ComparisonReport.interval(of);
    }

    private static TogetherRow along(String of, String what, Tilt tilt) {
        return new TogetherRow(
                of,
                what,
                ComparisonReport.estimate(tilt.sharedErrors().slope()),
                UNSHARED + ComparisonReport.estimate(tilt.independent().slope()),
                ComparisonReport.straight(tilt.sharedErrors().p(), "line").strip());
    }

    private static void terrace(TerraceTilt tilt, List<TogetherRow> rows) {
        String of = tilt.site() + " / " + tilt.level();
        String points = " by " + tilt.points() + " points";
        tilt.along().ifPresent(line -> rows.add(along(of, "tilt along the coast" + points, line)));
        tilt.plane()
                .ifPresent(plane -> rows.add(new TogetherRow(
                        of,
                        "tilt over the map" + points,
                        ComparisonReport.steepest(plane.sharedErrors()),
                        UNSHARED + ComparisonReport.steepest(plane.independent()),
                        ComparisonReport.straight(plane.sharedErrors().p(), "plane")
                                .strip())));
        tilt.rate()
                .ifPresent(rate ->
                        rows.add(new TogetherRow(of, "tilt over its age", ComparisonReport.estimate(rate), "", "")));
    }

    /** Why a part shows nothing, and what would change that; empty where it shows something. */
    public Optional<String> missing(Part part) {
        Content now = content.get();
        boolean isEmpty = switch (part) {
            case DIFFERENCES -> now.differences().isEmpty();
            case MOTION -> now.motions().isEmpty();
            case TOGETHER -> now.together().isEmpty();
        };
        if (!isEmpty) {
            return Optional.empty();
        }
        if (shown.result().isEmpty()) {
            return Optional.of("Nothing to compare yet: run the study.");
        }
        return Optional.of(
                switch (part) {
                    case DIFFERENCES ->
                        now.motions().size() < 2
                                ? "One site with a rate has none to be compared with."
                                : "Sites are compared within a coast (column coast of sites.csv), or as pairs that"
                                        + " study.json names (comparison.pairs, under Settings in Evidence).";
                    case MOTION -> "No site has a rate.";
                    case TOGETHER ->
                        "No coast has two sites with a rate (column coast of sites.csv), and no terrace"
                                + " has three points (points.csv).";
                });
    }

    /** Why there is no map; blank where there is one, or a coast. */
    public String whyNoPicture() {
        return !views.isEmpty()
                ? ""
                : shown.result().isEmpty()
                        ? "No map yet: run the study."
                        : "No map: fewer than two sites with a rate state latitude and longitude, and no coast has two"
                                + " with a distance along it (sites.csv).";
    }

    /** What else to know of a part. */
    public String note(Part part) {
        return switch (part) {
            case DIFFERENCES ->
                "Brick: errors of sea level that two sites share are kept shared. Blue below: the wrong answer,"
                        + " as if they were independent.";
            case MOTION ->
                "A site counts as stable where its rate is within "
                        + content.get().stableWithin() + " of 0.";
            case TOGETHER ->
                "Sites of a coast share errors of sea level, which is not mistaken for agreement. Beside each answer what would"
                        + " come out otherwise.";
        };
    }

    private String stableWithin() {
        return shown.study()
                .filter(study -> !shown.stale())
                .map(study -> Digits.text(study.settings().comparison().stableWithinMetresPerKyr()) + " m/kyr")
                .orElse("a threshold");
    }

    /** What stands for a site: its flight, or a level. */
    static String standsBy(SiteMotion site) {
        return site.level().orElse("flight");
    }

    /** {@code Gannet Steps: up (>99 %), 1.26 ± 0.03 m/kyr}. */
    static String reading(SiteMotion site) {
        double most = Math.max(site.up(), Math.max(site.stable(), site.down()));
        return site.site() + ": " + site.motion() + " (" + ComparisonReport.percent(most) + "), "
                + Wording.quantity(site.rate()) + " m/kyr";
    }

    /** {@code G4 at 152.3 m: 5e 100 %}. */
    static String reading(LevelView level) {
        return level.name() + " at "
                + Wording.number(String.format(Locale.ROOT, "%.1f m", SitesPicture.metres(level)))
                + (level.claims().isEmpty()
                        ? ""
                        : ": " + level.claims().get(0).highstand() + " "
                                + ComparisonReport.percent(level.claims().get(0).probability()));
    }
}
