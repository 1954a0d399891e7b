package stillstand.figure;

import java.awt.Color;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import org.jfree.chart.axis.NumberAxis;
import org.jfree.chart.plot.XYPlot;
import stillstand.comparison.SiteMotion;
import stillstand.study.StudyResult;

/** Sites where they lie, and whether they go up, are stable or go down; names and rates in a column beside. */
final class MapFigure {
    private static final double LINE = 9.5;
    private static final double LEADER = 10;
    private static final double WIDEST = 0.42;
    private static final double LEAST_DEGREES = 0.02;
    private static final double BESIDE_AXIS = 38;
    /** More names than this fit no page. */
    private static final int MOST_NAMES = 70;

    private MapFigure() {}

    static boolean has(StudyResult result) {
        return placed(result).size() >= 2;
    }

    /** Sites with a place, from north to south. */
    private static List<SiteMotion> placed(StudyResult result) {
        return result.siteMotion().stream()
                .filter(site -> site.latitude().isPresent() && site.longitude().isPresent())
                .sorted(Comparator.comparingDouble(site -> -latitude(site)))
                .toList();
    }

    private static double latitude(SiteMotion site) {
        return site.latitude().orElse(0.0);
    }

    /** Longitudes of one map do not jump at the date line. */
    private static double longitude(SiteMotion site, double near) {
        double apart = (site.longitude().orElse(0.0) - near) % 360;
        return near + (apart > 180 ? apart - 360 : apart < -180 ? apart + 360 : apart);
    }

    static Page page(String name, StudyResult result, double widthPoints) {
        List<SiteMotion> sites = placed(result);
        double near = sites.get(0).longitude().orElse(0.0);
        double[] x = sites.stream().mapToDouble(site -> longitude(site, near)).toArray();
        double[] y = sites.stream().mapToDouble(MapFigure::latitude).toArray();
        double middle = (least(y) + greatest(y)) / 2;
        double squeeze = Math.max(0.05, Math.cos(Math.toRadians(middle)));
        boolean named = sites.size() <= MOST_NAMES;
        double names = named ? Math.min(WIDEST * widthPoints, widestName(sites)) + LEADER : 0;
        double mapPoints = widthPoints - 2 * Style.MARGIN - BESIDE_AXIS - names;
        double high = Math.max(LEAST_DEGREES, 1.16 * (greatest(y) - least(y)));
        double wide = Math.max(LEAST_DEGREES, 1.16 * (greatest(x) - least(x)));
        double heightPoints = Math.max(
                Math.max(0.5 * mapPoints, Math.min(0.9 * mapPoints, mapPoints * high / (wide * squeeze))),
                named ? sites.size() * LINE + 4 : 0);
        double degreesPerPoint = Math.max(wide * squeeze / mapPoints, high / heightPoints);
        double from = (least(x) + greatest(x)) / 2 - mapPoints * degreesPerPoint / squeeze / 2;
        NumberAxis domain =
                Style.axis("Longitude (degrees)", from, from + (mapPoints + names) * degreesPerPoint / squeeze);
        NumberAxis range = Style.upright(
                "Latitude (degrees)",
                middle - heightPoints * degreesPerPoint / 2,
                middle + heightPoints * degreesPerPoint / 2);
        XYPlot plot = Style.plot(domain, range);
        Layer.add(plot, pen -> paint(pen, sites, x, named ? names : 0));
        return new Page(
                name,
                "Sites and their motion",
                List.of(key(SiteMotion.UP), key(SiteMotion.STABLE), key(SiteMotion.DOWN)),
                Style.chart(plot),
                "Rates in m/kyr, uplift positive: median and one standard deviation. The colour is that of the most probable"
                        + " motion.",
                widthPoints,
                heightPoints + 32);
    }

    private static Page.KeyEntry key(String motion) {
        return new Page.KeyEntry(
                motion, (pen, left, y) -> pen.dot(left + Page.KeyEntry.SWATCH / 2, y, 2.6, colour(motion)));
    }

    static Color colour(String motion) {
        return switch (motion) {
            case SiteMotion.UP -> Style.LINK;
            case SiteMotion.DOWN -> Style.SEA;
            default -> Style.MUTED;
        };
    }

    private static void paint(Pen pen, List<SiteMotion> sites, double[] x, double namesPoints) {
        double edge = pen.right() - namesPoints;
        double[] wanted =
                sites.stream().mapToDouble(site -> pen.y(latitude(site))).toArray();
        double[] places = LabelColumn.places(wanted, LINE, pen.top() + 5, pen.bottom() - 5);
        for (int i = 0; i < sites.size(); i++) {
            SiteMotion site = sites.get(i);
            if (namesPoints > 0) {
                pen.line(pen.x(x[i]), wanted[i], edge + LEADER - 2, places[i], Style.HAIR, Style.line(0.5));
                String text = text(site);
                pen.text(
                        Face.fitted(text, Face.REGULAR.at(Style.TEXT, List.of(text)), namesPoints - LEADER),
                        edge + LEADER,
                        places[i],
                        Pen.Anchor.START,
                        Face.REGULAR,
                        Style.TEXT,
                        colour(site.motion()));
            }
        }
        for (int i = 0; i < sites.size(); i++) {
            pen.dot(pen.x(x[i]), wanted[i], 2.8, colour(sites.get(i).motion()));
        }
    }

    static String text(SiteMotion site) {
        double sigma = site.rate().sd().orElse(site.rate().interval68().width() / 2);
        return String.format(
                Locale.ROOT, "%s %s", site.site(), Numbers.plusMinus(site.rate().median(), sigma));
    }

    private static double widestName(List<SiteMotion> sites) {
        return sites.stream()
                        .map(MapFigure::text)
                        .mapToDouble(text -> Face.width(text, Face.REGULAR.at(Style.TEXT, List.of(text))))
                        .max()
                        .orElse(0)
                + 2;
    }

    private static double least(double[] values) {
        return java.util.Arrays.stream(values).min().orElse(0);
    }

    private static double greatest(double[] values) {
        return java.util.Arrays.stream(values).max().orElse(1);
    }
}
