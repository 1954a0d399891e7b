package stillstand.view;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Collectors;
import java.util.stream.DoubleStream;
import stillstand.comparison.SiteMotion;
import stillstand.figure.SiteView;
import stillstand.figure.SiteView.LevelView;
import stillstand.study.StudyResult;
import stillstand.uncertainty.Interval;

/**
 * Sites on a map, or along a coast with their levels, whatever the size of the paper.
 *
 * @param name of the view, as it is chosen
 * @param kind what the axes are
 * @param spots the sites, on a map from north to south, on a coast by distance
 * @param joins levels of neighbours along a coast that may record one highstand
 */
record SitesPicture(String name, Kind kind, List<Spot> spots, List<Join> joins) {
    /** Levels joined with less probability than this are not. */
    static final double LEAST_JOINED = 0.05;

    static final String MAP = "Map";
    static final SitesPicture EMPTY = new SitesPicture("", Kind.MAP, List.of(), List.of());
    private static final double LEAST_DEGREES = 0.02;
    private static final double SPARE = 0.1;
    private static final double NAMES = 0.14;

    SitesPicture {
        spots = List.copyOf(spots);
        joins = List.copyOf(joins);
    }

    /** What the axes are. */
    enum Kind {
        /** Longitude and latitude, degrees. */
        MAP,
        /** Distance along the coast, km, and height, m. */
        COAST
    }

    /**
     * A site.
     *
     * @param x longitude in degrees, without a jump at the date line, or distance along the coast in km
     * @param y latitude in degrees; on a coast 0
     * @param levels of a coast, lowest first; none on a map
     */
    record Spot(SiteMotion site, double x, double y, List<LevelView> levels) {
        Spot {
            levels = List.copyOf(levels);
        }
    }

    /** A line between levels of two neighbours, heights in m above present mean sea level. */
    record Join(int fromSpot, double fromMetres, int toSpot, double toMetres, double probability) {}

    /** Every view that a result has. */
    static List<SitesPicture> all(StudyResult result) {
        List<SitesPicture> views = new ArrayList<>();
        map(result).ifPresent(views::add);
        Map<String, List<SiteMotion>> coasts = result.siteMotion().stream()
                .filter(site ->
                        site.coast().isPresent() && site.distanceAlongCoastKm().isPresent())
                .collect(Collectors.groupingBy(
                        site -> site.coast().orElseThrow(), LinkedHashMap::new, Collectors.toList()));
        coasts.forEach((coast, sites) -> {
            if (sites.size() > 1) {
                views.add(coast(result, coast, sites));
            }
        });
        return views;
    }

    private static Optional<SitesPicture> map(StudyResult result) {
        List<SiteMotion> placed = result.siteMotion().stream()
                .filter(site -> site.latitude().isPresent() && site.longitude().isPresent())
                .sorted(Comparator.comparingDouble(site -> -site.latitude().orElseThrow()))
                .toList();
        if (placed.size() < 2) {
            return Optional.empty();
        }
        double near = placed.get(0).longitude().orElseThrow();
        return Optional.of(new SitesPicture(
                MAP,
                Kind.MAP,
                placed.stream()
                        .map(site -> new Spot(
                                site,
                                near + wrapped(site.longitude().orElseThrow() - near),
                                site.latitude().orElseThrow(),
                                List.of()))
                        .toList(),
                List.of()));
    }

    /** From -180 to below 180 degrees. */
    private static double wrapped(double degrees) {
        double turned = (degrees + 180) % 360;
        return (turned < 0 ? turned + 360 : turned) - 180;
    }

    private static SitesPicture coast(StudyResult result, String coast, List<SiteMotion> sites) {
        Map<String, SiteView> views =
                SiteView.all(result).stream().collect(Collectors.toMap(SiteView::site, view -> view));
        List<Spot> spots = sites.stream()
                .map(site -> new Spot(
                        site,
                        site.distanceAlongCoastKm().orElseThrow(),
                        0,
                        Optional.ofNullable(views.get(site.site()))
                                .map(SiteView::stair)
                                .orElse(List.of())))
                .sorted(Comparator.comparingDouble(Spot::x))
                .toList();
        List<Join> joins = new ArrayList<>();
        for (int i = 0; i + 1 < spots.size(); i++) {
            for (LevelView level : spots.get(i).levels()) {
                for (LevelView other : spots.get(i + 1).levels()) {
                    double probability = level.probabilitySameHighstand(other);
                    if (probability >= LEAST_JOINED) {
                        joins.add(new Join(i, metres(level), i + 1, metres(other), probability));
                    }
                }
            }
        }
        return new SitesPicture("Along " + coast, Kind.COAST, spots, joins);
    }

    static double metres(LevelView level) {
        return level.height().orElseThrow().metres();
    }

    /** What the axis from left to right must hold. */
    Interval across() {
        return around(spots.stream().mapToDouble(Spot::x), kind == Kind.MAP ? LEAST_DEGREES : 1e-3);
    }

    /** What the upright axis must hold; above the levels of a coast stand the names of the sites. */
    Interval upright() {
        if (kind == Kind.MAP) {
            return around(spots.stream().mapToDouble(Spot::y), LEAST_DEGREES);
        }
        Interval levels = around(
                DoubleStream.concat(
                        DoubleStream.of(0),
                        spots.stream()
                                .flatMap(spot -> spot.levels().stream())
                                .map(level -> level.height().orElseThrow().interval95())
                                .flatMapToDouble(of -> DoubleStream.of(of.low(), of.high()))),
                1e-3);
        return new Interval(levels.low(), levels.high() + NAMES * levels.width());
    }

    private static Interval around(DoubleStream values, double least) {
        double[] sorted = values.sorted().toArray();
        if (sorted.length == 0) {
            return new Interval(0, 1);
        }
        double low = sorted[0];
        double high = sorted[sorted.length - 1];
        double spare = Math.max(least, SPARE * (high - low));
        return new Interval(low - spare, high + spare);
    }
}
