package stillstand.figure;

import java.util.ArrayList;
import java.util.List;

/** Names of highstands along the foot of a plot, each on a hair below its own point, in as many rows as they need. */
final class StageComb {
    /** Height of a row of names. */
    static final double ROW = 8.5;

    /** More rows than this are not made: the least important names are left out. */
    static final int MOST_ROWS = 3;

    private static final double GAP = 2.5;

    private StageComb() {}

    /**
     * How much of an axis to add below what a plot shows, so that the comb finds room under it.
     *
     * @param plotPoints height of the whole plot
     * @return part of the length of the axis without the comb
     */
    static double share(double plotPoints) {
        double comb = MOST_ROWS * ROW + 1;
        return comb / (plotPoints - comb);
    }

    /** A name, where it belongs, and how far up its hair goes; earlier ones are more important. */
    record Tooth(String name, double x, double y) {}

    /**
     * Draws them on clear paper.
     *
     * @param right end of the foot, points
     */
    static void paint(Pen pen, double right, List<Tooth> teeth) {
        pen.box(pen.left(), pen.bottom() - MOST_ROWS * ROW, right, pen.bottom(), Style.PAPER);
        List<List<double[]>> rows = new ArrayList<>();
        for (Tooth tooth : teeth) {
            double half = Face.width(tooth.name(), Style.small()) / 2;
            double middle = Math.min(Math.max(tooth.x(), pen.left() + half), right - half);
            int row = firstFree(rows, middle - half, middle + half);
            if (row == MOST_ROWS) {
                continue;
            }
            if (row == rows.size()) {
                rows.add(new ArrayList<>());
            }
            rows.get(row).add(new double[] {middle - half, middle + half});
            double y = pen.bottom() - (row + 0.5) * ROW;
            pen.line(tooth.x(), tooth.y() + 2.5, tooth.x(), y - 4, Style.MUTED, Style.line(0.25));
            pen.text(tooth.name(), middle, y, Pen.Anchor.MIDDLE, Face.REGULAR, Style.SMALL, Style.INK);
        }
    }

    private static int firstFree(List<List<double[]>> rows, double left, double right) {
        for (int row = 0; row < rows.size(); row++) {
            if (rows.get(row).stream().allMatch(taken -> right + GAP <= taken[0] || left >= taken[1] + GAP)) {
                return row;
            }
        }
        return rows.size();
    }
}
