package stillstand.figure;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import org.jfree.chart.plot.XYPlot;
import stillstand.comparison.SiteMotion;
import stillstand.study.StudyResult;

/** All levels of the sites of a coast, by distance along it, joined from site to site where they are of one highstand. */
final class CoastFigure {
    private static final double HEIGHT = 190;
    private static final double NUMBER_GAP = 10;
    /** Levels joined with less probability than this are not. */
    private static final double LEAST_JOINED = 0.05;
    /** More sites than this are not named one by one. */
    private static final int MOST_NAMES = 40;

    private CoastFigure() {}

    /** A site on the coast. */
    private record Station(SiteMotion site, double km, SiteView view) {}

    /** Coasts with two sites or more that state a distance, by name. */
    static List<String> coasts(StudyResult result) {
        Map<String, Long> counts = result.siteMotion().stream()
                .filter(site ->
                        site.distanceAlongCoastKm().isPresent() && site.coast().isPresent())
                .collect(Collectors.groupingBy(
                        site -> site.coast().orElseThrow(), LinkedHashMap::new, Collectors.counting()));
        return counts.entrySet().stream()
                .filter(coast -> coast.getValue() > 1)
                .map(Map.Entry::getKey)
                .toList();
    }

    private static List<Station> stations(StudyResult result, String coast) {
        Map<String, SiteView> views = new LinkedHashMap<>();
        SiteView.all(result).forEach(view -> views.put(view.site(), view));
        List<Station> stations = new ArrayList<>();
        for (SiteMotion site : result.siteMotion()) {
            if (site.coast().filter(coast::equals).isPresent()
                    && site.distanceAlongCoastKm().isPresent()
                    && views.containsKey(site.site())) {
                stations.add(new Station(site, site.distanceAlongCoastKm().get(), views.get(site.site())));
            }
        }
        stations.sort(Comparator.comparingDouble(Station::km));
        return stations;
    }

    static Page page(String name, StudyResult result, String coast, double widthPoints) {
        List<Station> stations = stations(result, coast);
        List<Double> heights = Stream.concat(
                        Stream.of(0.0),
                        stations.stream()
                                .flatMap(station -> station.view().stair().stream())
                                .map(SiteView::metres))
                .sorted()
                .toList();
        double lowest = heights.get(0);
        double highest = heights.get(heights.size() - 1);
        XYPlot plot = Style.plot(
                Rows.around(
                        Style::axis,
                        "Distance along the coast (km)",
                        stations.stream().map(Station::km)),
                Rows.around(
                        Style::upright,
                        "Height above present mean sea level (m)",
                        // above the highest level stand the numbers of the sites
                        Stream.of(lowest, highest + 0.1 * (highest - lowest))));
        Style.levelGrid(plot);
        Layer.add(plot, pen -> paint(pen, stations));
        return new Page(
                name,
                coast + ": levels along the coast",
                List.of(
                        new Page.KeyEntry(
                                "level", (pen, x, y) -> pen.dot(x + Page.KeyEntry.SWATCH / 2, y, 2.1, Style.INK)),
                        new Page.KeyEntry(
                                "same highstand at both sites, the surer the darker",
                                (pen, x, y) -> pen.line(x, y, x + Page.KeyEntry.SWATCH, y, Style.LINK, Style.line(1)))),
                Style.chart(plot),
                note(stations),
                widthPoints,
                HEIGHT);
    }

    private static String note(List<Station> stations) {
        if (stations.size() > MOST_NAMES) {
            return stations.size() + " sites; their rates stand in results.json.";
        }
        List<String> names = new ArrayList<>();
        for (int i = 0; i < stations.size(); i++) {
            names.add((i + 1) + " " + MapFigure.text(stations.get(i).site()));
        }
        return "Sites and their rates in m/kyr: " + String.join("; ", names) + ".";
    }

    private static void paint(Pen pen, List<Station> stations) {
        for (int i = 0; i + 1 < stations.size(); i++) {
            join(pen, stations.get(i), stations.get(i + 1));
        }
        for (Station station : stations) {
            double x = pen.x(station.km());
            for (SiteView.LevelView level : station.view().stair()) {
                level.height()
                        .ifPresent(height -> pen.line(
                                x,
                                pen.y(height.interval95().low()),
                                x,
                                pen.y(height.interval95().high()),
                                Style.INK,
                                Style.line(0.7)));
                pen.dot(x, pen.y(SiteView.metres(level)), 2.1, Style.INK);
            }
        }
        if (stations.size() <= MOST_NAMES) {
            numbers(pen, stations);
        }
    }

    /** Levels of two neighbours that record one highstand, with the probability that both do. */
    private static void join(Pen pen, Station one, Station next) {
        for (SiteView.LevelView level : one.view().stair()) {
            for (SiteView.LevelView other : next.view().stair()) {
                double probability = level.probabilitySameHighstand(other);
                if (probability >= LEAST_JOINED) {
                    pen.line(
                            pen.x(one.km()),
                            pen.y(SiteView.metres(level)),
                            pen.x(next.km()),
                            pen.y(SiteView.metres(other)),
                            Style.link(probability),
                            Style.line(1));
                }
            }
        }
    }

    /** Numbers of the sites; where all have no room, of every second or third. */
    private static void numbers(Pen pen, List<Station> stations) {
        int step = (int) Math.ceil(stations.size() * NUMBER_GAP / (pen.right() - pen.left() - NUMBER_GAP));
        List<Integer> numbered = IntStream.range(0, stations.size())
                .filter(i -> i % step == 0)
                .boxed()
                .toList();
        double[] wanted =
                numbered.stream().mapToDouble(i -> pen.x(stations.get(i).km())).toArray();
        double[] places = LabelColumn.places(wanted, NUMBER_GAP, pen.left() + 5, pen.right() - 5);
        for (int i = 0; i < places.length; i++) {
            pen.line(wanted[i], pen.top() + 12, places[i], pen.top() + 8, Style.MUTED, Style.line(0.4));
            pen.text(
                    String.valueOf(numbered.get(i) + 1),
                    places[i],
                    pen.top() + 4,
                    Pen.Anchor.MIDDLE,
                    Face.SEMIBOLD,
                    Style.TEXT,
                    Style.INK);
        }
    }
}
