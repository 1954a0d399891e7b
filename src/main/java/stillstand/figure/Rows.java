package stillstand.figure;

import java.awt.Font;
import java.util.List;
import java.util.stream.Stream;
import org.jfree.chart.axis.AxisLocation;
import org.jfree.chart.axis.NumberAxis;
import org.jfree.chart.axis.SymbolAxis;
import org.jfree.chart.plot.XYPlot;
import org.jfree.chart.ui.RectangleInsets;

/** A plot of one row for each thing, the first on top: names to its left, and on wish a column of text to its right. */
final class Rows {
    /** Widest names, as a part of the page. */
    private static final double NAMES = 0.3;

    private static final double ABOVE_AND_BELOW = 0.5;

    private Rows() {}

    /** A level or an upright axis. */
    @FunctionalInterface
    interface Direction {
        /** The axis from one value to another. */
        NumberAxis axis(String label, double from, double to);
    }

    static XYPlot plot(NumberAxis domain, List<String> names, List<String> right, double widthPoints) {
        XYPlot plot = Style.plot(domain, names(names, NAMES * widthPoints));
        plot.setRangeAxisLocation(AxisLocation.BOTTOM_OR_LEFT);
        if (!right.isEmpty()) {
            plot.setInsets(RectangleInsets.ZERO_INSETS);
            plot.setRangeAxis(1, names(right, widthPoints));
            plot.setRangeAxisLocation(1, AxisLocation.BOTTOM_OR_RIGHT);
        }
        return plot;
    }

    /** Height of a chart of so many rows, with its axis below. */
    static double height(int rows, double rowPoints) {
        return rows * rowPoints + 32;
    }

    private static SymbolAxis names(List<String> texts, double widest) {
        Font font = Face.REGULAR.at(Style.TEXT, texts);
        String[] fitted =
                texts.stream().map(text -> Face.fitted(text, font, widest)).toArray(String[]::new);
        SymbolAxis axis = new SymbolAxis(null, fitted);
        Style.dress(axis);
        axis.setTickLabelFont(font);
        axis.setGridBandsVisible(false);
        axis.setInverted(true);
        axis.setTickMarksVisible(false);
        axis.setAxisLineVisible(false);
        axis.setAutoRange(false);
        axis.setRange(-ABOVE_AND_BELOW, Math.max(texts.size(), 1) - ABOVE_AND_BELOW);
        axis.setTickLabelInsets(new RectangleInsets(0, 4, 0, 4));
        return axis;
    }

    /** Fine lines at the ticks of the axis below and, where it is in view, a line at 0. */
    static void grid(XYPlot plot) {
        Style.uprightGrid(plot);
        Layer.add(plot, pen -> {
            if (plot.getDomainAxis().getRange().contains(0)) {
                pen.line(pen.x(0), pen.top(), pen.x(0), pen.bottom(), Style.MUTED, Style.line(0.6));
            }
        });
    }

    /** From the least to the greatest of some numbers and a little more on both sides. */
    static NumberAxis around(Direction direction, String label, Stream<Double> values) {
        List<Double> all = values.toList();
        double low = all.stream().mapToDouble(Double::doubleValue).min().orElse(0);
        double high = all.stream().mapToDouble(Double::doubleValue).max().orElse(1);
        double spare = high > low ? 0.06 * (high - low) : Math.max(0.1 * Math.abs(high), 0.01);
        return direction.axis(label, low - spare, high + spare);
    }
}
