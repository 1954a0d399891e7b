package stillstand.figure;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.stream.DoubleStream;
import java.util.stream.Stream;
import org.jfree.chart.axis.NumberAxis;
import org.jfree.chart.plot.XYPlot;
import stillstand.figure.SiteView.Claim;
import stillstand.figure.SiteView.LevelView;
import stillstand.study.StudyResult.CurvePoint;
import stillstand.study.StudyResult.CurveUsed;
import stillstand.study.StudyResult.HighstandUsed;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightResult.Fate;
import stillstand.uplift.Quantity;

/**
 * The Stair: sea level through time on the left, today's levels as steps of a profile on the right, both on one axis of
 * elevation. A straight line from where the sea stood to where its shoreline stands today has the rate for its slope.
 */
final class StairFigure {
    /** Pairings less probable than this have no line. */
    private static final double LEAST_LINE = 0.02;

    /** Shorelines are marked as missing or overrun where that is more probable than not. */
    private static final double LIKELY = 0.5;

    private static final double LEAST_HEIGHT = 190;
    private static final double ROOM_PER_LABEL = 10.5;
    private static final double CLIPPED_BELOW = 25;
    private static final double WIDEST_NAMES = 0.24;
    private static final double LEFT_OF_PLOT = 48;
    private static final double BELOW_PLOT = 30;
    private static final double LEAST_STEPS = 30;
    private static final double MOST_STEPS = 130;
    private static final double STEP = 7;
    private static final double MOST_OF_PLOT = 0.55;

    private final SiteView site;
    private final List<CurveUsed> curves;
    private final double widthPoints;
    private final List<LevelView> stair;
    private final List<Fate> lost;
    private final double oldestKa;

    private StairFigure(SiteView site, List<CurveUsed> curves, double widthPoints) {
        this.site = site;
        this.curves = SeaLine.byWeight(curves);
        this.widthPoints = widthPoints;
        this.stair = site.stair();
        this.oldestKa = 1.04
                * Stream.concat(stair.stream().flatMap(level -> starts(level).map(Start::ageKa)), Stream.of(20.0))
                        .mapToDouble(Double::doubleValue)
                        .max()
                        .orElse(20);
        this.lost = site.flight().stream()
                .flatMap(flight -> flight.missing().stream())
                .filter(fate -> fate.ageKa() <= oldestKa && site.stands().containsKey(fate.highstand()))
                .filter(fate -> fate.unseen() >= LIKELY || fate.reoccupied() >= LIKELY)
                .sorted(Comparator.comparingDouble(Fate::heightMetres))
                .toList();
    }

    /** Where the line of a level begins. */
    private record Start(double ageKa, double seaMetres, double probability) {}

    /** A line from where the sea stood to where its shoreline stands. */
    private record Link(Start start, double metres) {}

    static boolean has(SiteView site) {
        return !site.stair().isEmpty();
    }

    static Page page(String name, SiteView site, List<CurveUsed> curves, double widthPoints) {
        return new StairFigure(site, curves, widthPoints).page(name);
    }

    /** One for each highstand that may have made it; for a level that formed at its dated age, the sea at that age. */
    private Stream<Start> starts(LevelView level) {
        if (level.claims().isEmpty()) {
            return ownAge(level).stream();
        }
        return level.claims().stream()
                .filter(claim -> claim.probability() >= LEAST_LINE)
                .flatMap(claim -> start(claim).stream());
    }

    private Optional<Start> start(Claim claim) {
        HighstandUsed stand = site.stands().get(claim.highstand());
        return stand == null
                ? Optional.empty()
                : Optional.of(new Start(stand.ageKa(), stand.levelMetres(), claim.probability()));
    }

    private static Optional<Start> ownAge(LevelView level) {
        Optional<Quantity> age = level.answer().age();
        return age.flatMap(found -> level.answer()
                .rate()
                .map(rate -> new Start(found.median(), SiteView.metres(level) - rate.median() * found.median(), 1)));
    }

    private Page page(String name) {
        double labels = Math.max(stair.size(), lost.size()) * ROOM_PER_LABEL;
        double height = Math.max(LEAST_HEIGHT, labels + 40);
        Interval span = span();
        XYPlot plot = Style.plot(AgeAxis.of(oldestKa, profilePart()), elevation(span, height));
        Layer.add(plot, this::sea);
        Layer.add(plot, pen -> new Profile(pen, pen.x(0), nameWidth(), stair).paint());
        Layer.add(plot, this::lostShorelines);
        return new Page(
                name,
                site.site() + ": sea level, and the stair it left",
                key(),
                Style.chart(plot),
                note(depths() < span.low()),
                widthPoints,
                height);
    }

    /** From below what matters to above it; the curve's depths are cut off where the levels lie close together. */
    private Interval span() {
        double[] matters = Stream.of(
                        stair.stream()
                                .flatMap(level -> level.height().stream()
                                        .flatMap(found -> Stream.of(
                                                found.interval95().low(),
                                                found.interval95().high()))),
                        stair.stream().flatMap(this::starts).map(Start::seaMetres),
                        lost.stream().map(Fate::heightMetres),
                        Stream.of(0.0))
                .flatMap(values -> values)
                .mapToDouble(Double::doubleValue)
                .toArray();
        double low = DoubleStream.of(matters).min().orElse(0);
        double most = DoubleStream.of(matters).max().orElse(0);
        double high = Math.max(
                most, seaInView().mapToDouble(CurvePoint::high68Metres).max().orElse(most));
        double least = Math.max(Math.min(depths(), low), low - CLIPPED_BELOW - 0.6 * (high - low));
        return new Interval(least, high);
    }

    private NumberAxis elevation(Interval span, double height) {
        double comb = StageComb.share(height - BELOW_PLOT) * span.width();
        return Style.upright("Elevation, and sea level then (m)", span.low() - comb, span.high() + 0.07 * span.width());
    }

    private Stream<CurvePoint> seaInView() {
        return curves.stream()
                .limit(1)
                .flatMap(curve -> curve.points().stream())
                .filter(point -> point.ageKa() <= oldestKa);
    }

    /** Lowest sea; where there is no curve, above all else. */
    private double depths() {
        return seaInView().mapToDouble(CurvePoint::low68Metres).min().orElse(Double.POSITIVE_INFINITY);
    }

    /** Part of the plot's width that the profile takes: its names, a step for each level, and room for lost shorelines. */
    private double profilePart() {
        double steps = Math.min(MOST_STEPS, LEAST_STEPS + STEP * stair.size());
        double plotPoints = widthPoints - LEFT_OF_PLOT;
        return Math.min((Profile.beside(nameWidth()) + steps) / plotPoints, MOST_OF_PLOT);
    }

    private double nameWidth() {
        return Math.min(Profile.widestName(stair), WIDEST_NAMES * widthPoints);
    }

    private void sea(Pen pen) {
        SeaLine.paint(pen, curves, oldestKa);
        pen.line(pen.left(), pen.y(0), pen.x(0), pen.y(0), Style.MUTED, Style.line(0.4));
        StageComb.paint(pen, pen.x(0), teeth(pen));
        lost.forEach(fate -> lostLine(pen, fate));
        stair.stream()
                .flatMap(level -> starts(level).map(start -> new Link(start, SiteView.metres(level))))
                .sorted(Comparator.comparingDouble(link -> link.start().probability()))
                .forEach(link -> paint(pen, link));
        lost.forEach(fate -> lostMark(pen, pen.x(fate.ageKa()), seaThen(pen, fate), fate));
    }

    /** Those that a level may record come first. */
    private List<StageComb.Tooth> teeth(Pen pen) {
        List<String> claimed = stair.stream()
                .flatMap(level -> level.claims().stream())
                .filter(claim -> claim.probability() >= LEAST_LINE)
                .map(Claim::highstand)
                .toList();
        return site.stands().values().stream()
                .filter(stand -> stand.ageKa() <= oldestKa)
                .sorted(Comparator.comparing((HighstandUsed stand) -> !claimed.contains(stand.stage()))
                        .thenComparing(HighstandUsed::ageKa))
                .map(stand -> new StageComb.Tooth(stand.stage(), pen.x(stand.ageKa()), pen.y(stand.levelMetres())))
                .toList();
    }

    private static void paint(Pen pen, Link link) {
        double probability = link.start().probability();
        double x = pen.x(link.start().ageKa());
        double sea = pen.y(link.start().seaMetres());
        pen.line(x, sea, pen.x(0), pen.y(link.metres()), Style.link(probability), Style.line(0.4 + 1.1 * probability));
        pen.dot(x, sea, 1.9, Style.link(probability));
    }

    private void lostLine(Pen pen, Fate fate) {
        pen.line(
                pen.x(fate.ageKa()),
                seaThen(pen, fate),
                pen.x(0),
                pen.y(fate.heightMetres()),
                Style.MUTED,
                Style.dashed(0.5));
    }

    private double seaThen(Pen pen, Fate fate) {
        HighstandUsed stand = site.stands().get(fate.highstand());
        return pen.y(stand == null ? fate.heightMetres() : stand.levelMetres());
    }

    private static void lostMark(Pen pen, double x, double y, Fate fate) {
        if (fate.unseen() >= LIKELY) {
            pen.ring(x, y, 1.9, Style.MUTED);
        } else {
            pen.cross(x, y, 1.9, Style.MUTED);
        }
    }

    /** Marks at the left edge of the profile, their names beside them. */
    private void lostShorelines(Pen pen) {
        List<Fate> downwards = new ArrayList<>(lost);
        downwards.sort(Comparator.comparingDouble(Fate::heightMetres).reversed());
        double[] wanted = downwards.stream()
                .mapToDouble(fate -> pen.y(fate.heightMetres()))
                .toArray();
        double[] places = LabelColumn.places(wanted, 7.5, pen.top() + 4, pen.bottom() - 4);
        double present = pen.x(0);
        for (int i = 0; i < places.length; i++) {
            Fate fate = downwards.get(i);
            pen.line(present, wanted[i], present + 8, places[i], Style.MUTED, Style.line(0.3));
            lostMark(pen, present, wanted[i], fate);
            pen.text(
                    fate.highstand(), present + 9, places[i], Pen.Anchor.START, Face.REGULAR, Style.SMALL, Style.MUTED);
        }
    }

    private List<Page.KeyEntry> key() {
        double swatch = Page.KeyEntry.SWATCH;
        List<Page.KeyEntry> key = new ArrayList<>(SeaLine.key(curves));
        key.add(new Page.KeyEntry("slope = rate; the stronger, the more probable", (pen, x, y) -> {
            pen.line(x, y + 3, x + swatch, y - 1, Style.link(1), Style.line(1.5));
            pen.line(x, y + 4, x + swatch, y + 2, Style.link(0.2), Style.line(0.6));
        }));
        if (lost.stream().anyMatch(fate -> fate.unseen() >= LIKELY)) {
            key.add(new Page.KeyEntry("in view, not found", (pen, x, y) -> {
                pen.line(x, y, x + swatch, y, Style.MUTED, Style.dashed(0.5));
                pen.ring(x + swatch - 2, y, 1.9, Style.MUTED);
            }));
        }
        if (lost.stream().anyMatch(fate -> fate.unseen() < LIKELY)) {
            key.add(new Page.KeyEntry("overrun by a younger sea", (pen, x, y) -> {
                pen.line(x, y, x + swatch, y, Style.MUTED, Style.dashed(0.5));
                pen.cross(x + swatch - 2, y, 1.9, Style.MUTED);
            }));
        }
        return key;
    }

    private String note(boolean cutOff) {
        List<String> sentences = new ArrayList<>();
        sentences.add(site.flight()
                .map(flight -> "Rate of the flight: " + Numbers.rate(flight.rate())
                        + " m/kyr (median and shortest 95 % interval).")
                .orElse("No flight was matched here: each level stands for itself."));
        sentences.add(
                "The steps are not to scale across" + (cutOff ? "; the greatest depths of the sea are cut off." : "."));
        List<String> without = site.levels().stream()
                .filter(level -> level.height().isEmpty())
                .map(LevelView::name)
                .toList();
        if (!without.isEmpty()) {
            sentences.add("Not drawn, for want of a height in the results: " + String.join(", ", without) + ".");
        }
        return String.join(" ", sentences);
    }
}
