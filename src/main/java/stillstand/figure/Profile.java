package stillstand.figure;

import java.awt.geom.Path2D;
import java.util.List;
import stillstand.figure.SiteView.Claim;
import stillstand.figure.SiteView.LevelView;

/** The surveyed profile of a site as steps: a tread for each level, its inner edge at the level's height, and its name. */
final class Profile {
    /** Least distance between two lines of names. */
    private static final double NAME_GAP = 9;

    private static final double LEFT_FREE = 22;
    private static final double LEADER = 11;

    private final Pen pen;
    private final double left;
    private final double nameWidth;
    private final List<LevelView> stair;

    /**
     * A profile.
     *
     * @param left where it begins, points; it ends with the plot
     * @param nameWidth room for names, points
     * @param stair lowest level first
     */
    Profile(Pen pen, double left, double nameWidth, List<LevelView> stair) {
        this.pen = pen;
        this.left = left;
        this.nameWidth = nameWidth;
        this.stair = stair;
    }

    void paint() {
        double from = left + LEFT_FREE;
        double to = pen.right() - nameWidth - LEADER;
        double step = (to - from) / stair.size();
        pen.box(left, Math.min(pen.y(0), pen.bottom()), to, pen.bottom(), Style.WATER);
        Path2D rock = rock(from, to, step);
        pen.fill(rock, Style.ROCK);
        pen.draw(surface(from, to, step), Style.ROCK_EDGE, Style.line(0.8));
        pen.line(left, pen.top(), left, pen.bottom(), Style.INK, Style.line(0.6));
        levels(from, to, step);
    }

    static double widestName(List<LevelView> stair) {
        return stair.stream()
                .mapToDouble(level -> width(level.name(), Face.SEMIBOLD) + width(stage(level), Face.REGULAR) + 4)
                .max()
                .orElse(0);
    }

    /** All that is as wide whatever the number of steps. */
    static double beside(double nameWidth) {
        return LEFT_FREE + nameWidth + LEADER;
    }

    private static double width(String text, Face face) {
        return Face.width(text, face.at(Style.TEXT, List.of(text)));
    }

    private Path2D rock(double from, double to, double step) {
        Path2D path = surface(from, to, step);
        path.lineTo(to, pen.bottom());
        path.lineTo(from - 4, pen.bottom());
        path.closePath();
        return path;
    }

    /** Each tread falls a little seaward from its inner edge; a cliff leads to the next. */
    private Path2D surface(double from, double to, double step) {
        double metresPerPoint = (height(stair.size() - 1) - height(0)) / 100 + 0.05;
        Path2D path = new Path2D.Double();
        double below = pen.y(height(0) - 9 * metresPerPoint);
        path.moveTo(from - 4, Math.min(below, pen.bottom()));
        for (int i = 0; i < stair.size(); i++) {
            double rise = i == 0 ? 9 * metresPerPoint : height(i) - height(i - 1);
            double outer = height(i) - Math.min(0.3 * rise, 2.5 * metresPerPoint);
            path.lineTo(from + (i + 0.16) * step, pen.y(outer));
            path.lineTo(from + (i + 0.84) * step, pen.y(height(i)));
        }
        path.lineTo(
                to,
                Math.max(
                        pen.top(), pen.y(Math.max(height(stair.size() - 1) + 3 * metresPerPoint, 2 * metresPerPoint))));
        return path;
    }

    private double height(int level) {
        return SiteView.metres(stair.get(level));
    }

    private void levels(double from, double to, double step) {
        int count = stair.size();
        double[] wanted = new double[count];
        for (int i = 0; i < count; i++) {
            wanted[i] = pen.y(height(count - 1 - i));
        }
        double[] places = LabelColumn.places(wanted, NAME_GAP, pen.top() + 5, pen.bottom() - 5);
        for (int i = 0; i < count; i++) {
            LevelView level = stair.get(count - 1 - i);
            double x = from + (count - 1 - i) * step + 0.84 * step;
            pen.line(left, wanted[i], x, wanted[i], Style.MUTED, Style.line(0.25));
            pen.line(x, wanted[i], to, wanted[i], Style.ROCK_EDGE, Style.line(0.25));
            pen.line(to, wanted[i], to + LEADER - 2, places[i], Style.ROCK_EDGE, Style.line(0.25));
            level.height()
                    .ifPresent(height -> pen.line(
                            x,
                            pen.y(height.interval95().low()),
                            x,
                            pen.y(height.interval95().high()),
                            Style.INK,
                            Style.line(0.7)));
            pen.dot(x, wanted[i], 2.1, level.claims().isEmpty() ? Style.MUTED : Style.LINK);
            name(level, to + LEADER, places[i]);
        }
    }

    private void name(LevelView level, double x, double y) {
        String stage = stage(level);
        double room = pen.right() - x - (stage.isEmpty() ? 0 : width(stage, Face.REGULAR) + 3);
        String name = Face.fitted(level.name(), Face.SEMIBOLD.at(Style.TEXT, List.of(level.name())), room);
        pen.text(name, x, y, Pen.Anchor.START, Face.SEMIBOLD, Style.TEXT, Style.INK);
        double after = x + width(name, Face.SEMIBOLD) + 3;
        pen.text(stage, after, y, Pen.Anchor.START, Face.REGULAR, Style.TEXT, Style.LINK);
    }

    /** The most probable highstand, and its probability where it is not certain. */
    private static String stage(LevelView level) {
        if (level.claims().isEmpty()) {
            return "";
        }
        Claim best = level.claims().get(0);
        String percent = Numbers.percent(best.probability());
        return percent.equals("100") ? best.highstand() : best.highstand() + " " + percent + " %";
    }
}
