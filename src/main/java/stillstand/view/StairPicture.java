package stillstand.view;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import stillstand.figure.SiteView;
import stillstand.figure.SiteView.Claim;
import stillstand.figure.SiteView.LevelView;
import stillstand.sealevel.Highstand;
import stillstand.shoreline.FormerSeaLevel;
import stillstand.shoreline.FormsAt;
import stillstand.shoreline.HeightTerm;
import stillstand.shoreline.Level;
import stillstand.shoreline.StageChoice;
import stillstand.study.SitePreview;
import stillstand.study.StudyResult.CurvePoint;
import stillstand.study.StudyResult.CurveUsed;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightResult;
import stillstand.uplift.FlightResult.Fate;
import stillstand.uplift.FlightResult.Pairing;

/**
 * What the Stair of one site draws, whatever the size of the paper. Ages in ka, heights in m above present mean sea level.
 *
 * @param site its name; blank where nothing is open
 * @param curves sea level through time, the weightiest first
 * @param stands the highstands that a level may be paired with, young to old
 * @param levels of the site, lowest first
 * @param lost shorelines that the answer says are missing or overrun
 * @param answered whether the lines are a run's
 */
record StairPicture(
        String site, List<CurveUsed> curves, List<Stand> stands, List<Mark> levels, List<Fate> lost, boolean answered) {
    /** Pairings less probable than this have no line. */
    static final double LEAST_LINE = 0.02;

    static final StairPicture EMPTY = new StairPicture("", List.of(), List.of(), List.of(), List.of(), false);

    private static final double LIKELY = 0.5;
    private static final double LEAST_AGE_KA = 20;
    private static final double CLIPPED_BELOW_METRES = 25;
    private static final double SIGMAS_95 = 1.96;

    StairPicture {
        curves = List.copyOf(curves);
        stands = List.copyOf(stands);
        levels = List.copyOf(levels);
        lost = List.copyOf(lost);
    }

    /** A highstand of the sea; sigmas with every error, shared ones too. */
    record Stand(String stage, double ageKa, double ageSigmaKa, double metres, double sigmaMetres) {}

    /**
     * A level.
     *
     * @param name its name
     * @param metres where its sea stands today
     * @param interval95 of that
     * @param claims the highstands it may record, most probable first
     * @param ownAge the line of a level that formed at its own age, whatever the sea did
     * @param choice what the study says of its highstand
     * @param takesPart whether a highstand may be chosen for it
     */
    record Mark(
            String name,
            double metres,
            Interval interval95,
            List<Claim> claims,
            Optional<Link> ownAge,
            StageChoice choice,
            boolean takesPart) {
        Mark {
            claims = List.copyOf(claims);
        }
    }

    /** A line from where the sea stood to where its shoreline stands; its slope is the rate. The stage of an own age is blank. */
    record Link(String level, String stage, double ageKa, double seaMetres, double metres, double probability) {
        /** m/kyr. */
        double rateMetresPerKyr() {
            return (metres - seaMetres) / ageKa;
        }
    }

    /** The picture of a site that has been run. */
    static StairPicture of(SiteView site, List<CurveUsed> curves, Optional<SitePreview> now) {
        List<Stand> stands = now.map(StairPicture::stands)
                .orElseGet(() -> site.stands().values().stream()
                        .map(stand -> new Stand(
                                stand.stage(),
                                stand.ageKa(),
                                stand.ageSigmaKa(),
                                stand.levelMetres(),
                                stand.levelSigmaMetres()))
                        .toList());
        List<Mark> marks = new ArrayList<>();
        for (LevelView level : site.stair()) {
            SiteView.Height height = level.height().orElseThrow();
            Optional<Level> asked = now.flatMap(each -> find(each, level.name()));
            Interval measured = height.interval95().width() > 0 || asked.isEmpty()
                    ? height.interval95()
                    : around(height.metres(), now.orElseThrow(), asked.get());
            marks.add(new Mark(
                    level.name(),
                    height.metres(),
                    measured,
                    level.claims(),
                    level.claims().isEmpty() ? ownAge(level, height.metres()) : Optional.empty(),
                    asked.map(Level::highstand).orElse(StageChoice.ANY),
                    asked.map(each -> each.formsAt() == FormsAt.HIGHSTAND)
                            .orElse(!level.claims().isEmpty())));
        }
        List<Fate> lost = site.flight().map(FlightResult::missing).orElse(List.of()).stream()
                .filter(fate -> fate.unseen() >= LIKELY || fate.reoccupied() >= LIKELY)
                .filter(fate -> stands.stream().anyMatch(stand -> stand.stage().equals(fate.highstand())))
                .toList();
        return new StairPicture(site.site(), byWeight(curves), stands, marks, lost, true);
    }

    /** Results give such a level its height alone; its spread is that of the study. */
    private static Interval around(double metres, SitePreview site, Level level) {
        double half = SIGMAS_95
                * Math.sqrt(terms(site, level)
                        .mapToDouble(term -> Math.pow(term.metres().standardDeviation(), 2))
                        .sum());
        return new Interval(metres - half, metres + half);
    }

    private static Stream<HeightTerm> terms(SitePreview site, Level level) {
        return FormerSeaLevel.ofLandform(site.site(), level, site.indicativeRange()).stream();
    }

    /** The picture of a site that has not been run. */
    static StairPicture of(SitePreview site, List<CurveUsed> curves) {
        List<Mark> marks = new ArrayList<>();
        for (Level level : site.site().levels()) {
            double metres = terms(site, level)
                    .mapToDouble(term -> term.sign() * term.metres().mean())
                    .sum();
            marks.add(new Mark(
                    level.name(),
                    metres,
                    around(metres, site, level),
                    List.of(),
                    Optional.empty(),
                    level.highstand(),
                    level.formsAt() == FormsAt.HIGHSTAND));
        }
        marks.sort(Comparator.comparingDouble(Mark::metres));
        return new StairPicture(site.site().name(), byWeight(curves), stands(site), marks, List.of(), false);
    }

    private static List<CurveUsed> byWeight(List<CurveUsed> curves) {
        return curves.stream()
                .filter(curve -> !curve.points().isEmpty())
                .sorted(Comparator.comparingDouble(CurveUsed::weight).reversed())
                .toList();
    }

    private static List<Stand> stands(SitePreview site) {
        return site.basis().highstands().rows().stream()
                .filter(row -> !row.isOlder())
                .map(row -> stand(row, site))
                .toList();
    }

    private static Stand stand(Highstand row, SitePreview site) {
        return new Stand(
                row.stage(),
                row.ageKa(),
                row.marginalAgeSigmaKa(site.basis().highstands().sharedErrors()),
                row.level().mean(),
                row.marginalLevelSigmaMetres(site.basis().highstands().sharedErrors()));
    }

    private static Optional<Level> find(SitePreview site, String level) {
        return site.site().levels().stream()
                .filter(each -> each.name().equals(level))
                .findFirst();
    }

    private static Optional<Link> ownAge(LevelView level, double metres) {
        return level.answer()
                .age()
                .flatMap(age -> level.answer()
                        .rate()
                        .map(rate -> new Link(
                                level.name(), "", age.median(), metres - rate.median() * age.median(), metres, 1)));
    }

    Optional<Mark> level(String name) {
        return levels.stream().filter(level -> level.name().equals(name)).findFirst();
    }

    Optional<Stand> stand(String stage) {
        return stands.stream().filter(stand -> stand.stage().equals(stage)).findFirst();
    }

    /** The lines of the picture's own claims. */
    List<Link> links() {
        return levels.stream()
                .flatMap(level -> Stream.concat(
                        level.ownAge().stream(),
                        level.claims().stream()
                                .flatMap(claim -> link(level, claim.highstand(), claim.probability()).stream())))
                .toList();
    }

    /** The lines of other pairings: a preview's, or one correlation's. */
    List<Link> links(List<Pairing> pairings) {
        return pairings.stream()
                .flatMap(pair -> level(pair.level()).stream()
                        .flatMap(mark -> link(mark, pair.highstand(), pair.probability()).stream()))
                .toList();
    }

    private Optional<Link> link(Mark level, String stage, double probability) {
        return stand(stage)
                .filter(stand -> probability >= LEAST_LINE)
                .map(stand ->
                        new Link(level.name(), stage, stand.ageKa(), stand.metres(), level.metres(), probability));
    }

    /** How far back to draw: a little beyond the oldest line. */
    double oldestKa(List<Link> others) {
        return 1.06
                * Stream.concat(links().stream(), others.stream())
                        .mapToDouble(Link::ageKa)
                        .max()
                        .orElse(stands.stream()
                                .mapToDouble(Stand::ageKa)
                                .filter(age -> age < 450)
                                .max()
                                .orElse(LEAST_AGE_KA));
    }

    /** Heights to draw: all that matters, and the sea's depths as far as levels still have room. */
    Interval span(double oldestKa) {
        double low = 0;
        double high = 0;
        for (Mark level : levels) {
            low = Math.min(low, level.interval95().low());
            high = Math.max(high, level.interval95().high());
        }
        for (Link link : links()) {
            low = Math.min(low, link.seaMetres());
            high = Math.max(high, link.seaMetres());
        }
        for (Stand stand : stands) {
            high = stand.ageKa() <= oldestKa ? Math.max(high, stand.metres()) : high;
        }
        double depths = curves.stream()
                .limit(1)
                .flatMap(curve -> curve.points().stream())
                .filter(point -> point.ageKa() <= oldestKa)
                .mapToDouble(CurvePoint::low68Metres)
                .min()
                .orElse(low);
        double least = Math.max(Math.min(depths, low), low - CLIPPED_BELOW_METRES - 0.5 * (high - low));
        double room = 0.06 * (high - least) + 1;
        return new Interval(least - room, high + room);
    }
}
