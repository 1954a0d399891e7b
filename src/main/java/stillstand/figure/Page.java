package stillstand.figure;

import java.awt.Color;
import java.awt.Font;
import java.awt.Graphics2D;
import java.awt.RenderingHints;
import java.awt.geom.Rectangle2D;
import java.util.ArrayList;
import java.util.List;
import org.jfree.chart.JFreeChart;

/**
 * A figure laid out: title, key, chart and note, one below the other, in points.
 *
 * @param name stem of its files
 * @param title one line or more above the chart; empty = none
 * @param key what the marks mean, in rows as wide as the page
 * @param chart the chart itself
 * @param note what to know besides, below the chart; empty = none
 * @param widthPoints of the page
 * @param chartHeightPoints of the chart
 */
record Page(
        String name,
        String title,
        List<KeyEntry> key,
        JFreeChart chart,
        String note,
        double widthPoints,
        double chartHeightPoints) {
    private static final double LINE = 1.35;
    private static final double KEY_GAP = 9;

    Page {
        key = List.copyOf(key);
    }

    /** One mark and what it means. */
    record KeyEntry(String text, Swatch swatch) {
        /** Width of the space a mark is drawn in. */
        static final double SWATCH = 14;

        private double width() {
            return SWATCH + 3 + Face.width(text, Style.small());
        }
    }

    /** Draws a mark into a box of {@link KeyEntry#SWATCH} points around a middle line. */
    @FunctionalInterface
    interface Swatch {
        /** Draws between {@code left} and {@code left + SWATCH} around {@code middle}. */
        void paint(Pen pen, double left, double middle);
    }

    Page untitled() {
        return new Page(name, "", key, chart, "", widthPoints, chartHeightPoints);
    }

    private double inner() {
        return widthPoints - 2 * Style.MARGIN;
    }

    private List<String> titleLines() {
        return Face.wrapped(title, titleFont(), inner());
    }

    private List<String> noteLines() {
        return Face.wrapped(note, Face.REGULAR.at(Style.SMALL, List.of(note)), inner());
    }

    private Font titleFont() {
        return Face.SEMIBOLD.at(Style.TITLE, List.of(title));
    }

    private List<List<KeyEntry>> keyRows() {
        List<List<KeyEntry>> rows = new ArrayList<>();
        double used = Double.POSITIVE_INFINITY;
        for (KeyEntry entry : key) {
            if (used + entry.width() > inner()) {
                rows.add(new ArrayList<>());
                used = 0;
            }
            rows.get(rows.size() - 1).add(entry);
            used += entry.width() + KEY_GAP;
        }
        return rows;
    }

    double heightPoints() {
        return 2 * Style.MARGIN
                + blockHeight(titleLines().size(), Style.TITLE)
                + blockHeight(keyRows().size(), Style.SMALL)
                + chartHeightPoints
                + blockHeight(noteLines().size(), Style.SMALL);
    }

    private static double blockHeight(int lines, double points) {
        return lines == 0 ? 0 : lines * LINE * points + 3;
    }

    void draw(Graphics2D graphics) {
        hints(graphics);
        graphics.setPaint(Style.PAPER);
        graphics.fill(new Rectangle2D.Double(0, 0, widthPoints, heightPoints()));
        double y = Style.MARGIN;
        y = lines(graphics, titleLines(), Face.SEMIBOLD, Style.TITLE, Style.INK, y);
        y = key(graphics, y);
        chart.draw(graphics, new Rectangle2D.Double(Style.MARGIN, y, inner(), chartHeightPoints));
        lines(graphics, noteLines(), Face.REGULAR, Style.SMALL, Style.MUTED, y + chartHeightPoints + 3);
    }

    private double lines(Graphics2D graphics, List<String> lines, Face face, double points, Color colour, double from) {
        Pen pen = pen(graphics);
        double y = from;
        for (String line : lines) {
            pen.text(line, Style.MARGIN, y + LINE * points / 2, Pen.Anchor.START, face, points, colour);
            y += LINE * points;
        }
        return lines.isEmpty() ? y : y + 3;
    }

    private double key(Graphics2D graphics, double from) {
        Pen pen = pen(graphics);
        double y = from;
        for (List<KeyEntry> row : keyRows()) {
            double x = Style.MARGIN;
            double middle = y + LINE * Style.SMALL / 2;
            for (KeyEntry entry : row) {
                entry.swatch().paint(pen, x, middle);
                double textAt = x + KeyEntry.SWATCH + 3;
                pen.text(entry.text(), textAt, middle, Pen.Anchor.START, Face.REGULAR, Style.SMALL, Style.INK);
                x += entry.width() + KEY_GAP;
            }
            y += LINE * Style.SMALL;
        }
        return key.isEmpty() ? y : y + 3;
    }

    /** A pen for what lies outside the chart, where no axis applies. */
    private Pen pen(Graphics2D graphics) {
        Rectangle2D all = new Rectangle2D.Double(0, 0, widthPoints, heightPoints());
        return new Pen(graphics, all, chart.getXYPlot(), Style.axis("", 0, 1), Style.axis("", 0, 1));
    }

    private static void hints(Graphics2D graphics) {
        graphics.setRenderingHint(RenderingHints.KEY_ANTIALIASING, RenderingHints.VALUE_ANTIALIAS_ON);
        graphics.setRenderingHint(RenderingHints.KEY_TEXT_ANTIALIASING, RenderingHints.VALUE_TEXT_ANTIALIAS_ON);
        graphics.setRenderingHint(RenderingHints.KEY_FRACTIONALMETRICS, RenderingHints.VALUE_FRACTIONALMETRICS_ON);
        graphics.setRenderingHint(RenderingHints.KEY_STROKE_CONTROL, RenderingHints.VALUE_STROKE_PURE);
    }
}
