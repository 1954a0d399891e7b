package stillstand.figure;

import java.awt.BasicStroke;
import java.awt.Color;
import java.awt.Font;
import java.awt.Stroke;
import java.text.DecimalFormat;
import java.text.DecimalFormatSymbols;
import java.util.List;
import java.util.Locale;
import org.jfree.chart.JFreeChart;
import org.jfree.chart.axis.NumberAxis;
import org.jfree.chart.axis.NumberTickUnit;
import org.jfree.chart.axis.TickUnits;
import org.jfree.chart.plot.Plot;
import org.jfree.chart.plot.XYPlot;
import org.jfree.chart.renderer.xy.XYLineAndShapeRenderer;
import org.jfree.chart.ui.RectangleInsets;

/**
 * How all figures look: ink on white, water in blue-greens, rock in sands, correlations in brick. Colours that stand beside each
 * other differ in lightness too, so that a grey copy and a colour-blind reader tell them apart.
 */
final class Style {
    static final Color INK = new Color(0x20262B);
    static final Color MUTED = new Color(0x5E6A72);
    static final Color HAIR = new Color(0xDDE2E4);
    static final Color SEA = new Color(0x14566B);
    static final Color SEA_68 = new Color(0xB9D6DE);
    static final Color SEA_95 = new Color(0xDFECEF);
    static final Color WATER = new Color(0xE6F1F3);
    static final Color ROCK = new Color(0xEFE5D2);
    static final Color ROCK_EDGE = new Color(0x7D6746);
    static final Color LINK = new Color(0x9E2F1A);
    static final Color LINK_FAINT = new Color(0xEBCFC4);
    static final Color PAPER = Color.WHITE;

    /** For shares of a whole, dark to light. */
    static final List<Color> SHARES = List.of(
            new Color(0x17384A),
            new Color(0x9E3B22),
            new Color(0x5B97AC),
            new Color(0xDDA94B),
            new Color(0xEADFC9),
            new Color(0xF4F4F2));

    static final double TEXT = 7;
    static final double SMALL = 6.3;
    static final double TITLE = 9;
    static final double MARGIN = 5;

    /** Room right of a plot, for the half of a number that stands below its edge. */
    private static final double HALF_A_NUMBER = 8;

    private static final double LEAST_STEP = 1e-5;
    private static final int STEPS = 11;

    private Style() {}

    static Font text() {
        return Face.REGULAR.at(TEXT);
    }

    static Font small() {
        return Face.REGULAR.at(SMALL);
    }

    static Stroke line(double widthPoints) {
        return new BasicStroke((float) widthPoints, BasicStroke.CAP_BUTT, BasicStroke.JOIN_ROUND);
    }

    static Stroke dashed(double widthPoints) {
        return new BasicStroke(
                (float) widthPoints, BasicStroke.CAP_BUTT, BasicStroke.JOIN_ROUND, 1, new float[] {2.4f, 2f}, 0);
    }

    /** Colour between faint and full for a probability. */
    static Color link(double probability) {
        return between(LINK_FAINT, LINK, probability);
    }

    static Color between(Color from, Color to, double part) {
        double p = Math.min(Math.max(part, 0), 1);
        return new Color(
                (int) Math.round(from.getRed() + p * (to.getRed() - from.getRed())),
                (int) Math.round(from.getGreen() + p * (to.getGreen() - from.getGreen())),
                (int) Math.round(from.getBlue() + p * (to.getBlue() - from.getBlue())));
    }

    /** A level axis of numbers from one value to another, with true minus signs. */
    static NumberAxis axis(String label, double from, double to) {
        return dressed(new NumberAxis(label), from, to, new RectangleInsets(1.5, 7, 1.5, 7));
    }

    /** The same, upright. */
    static NumberAxis upright(String label, double from, double to) {
        return dressed(new NumberAxis(label), from, to, new RectangleInsets(4, 2.5, 4, 2.5));
    }

    /** Insets decide how dense the ticks are. */
    static NumberAxis dressed(NumberAxis axis, double from, double to, RectangleInsets insets) {
        dress(axis);
        axis.setTickLabelInsets(insets);
        axis.setAutoRange(false);
        axis.setRange(from, to);
        axis.setStandardTickUnits(ticks());
        return axis;
    }

    static void dress(NumberAxis axis) {
        axis.setLabelFont(text());
        axis.setTickLabelFont(text());
        axis.setLabelPaint(INK);
        axis.setTickLabelPaint(INK);
        axis.setAxisLinePaint(INK);
        axis.setAxisLineStroke(line(0.6));
        axis.setTickMarkPaint(INK);
        axis.setTickMarkStroke(line(0.6));
        axis.setTickMarkOutsideLength(2.5f);
        axis.setLabelInsets(new RectangleInsets(2, 2, 2, 2));
    }

    private static TickUnits ticks() {
        TickUnits units = new TickUnits();
        double size = LEAST_STEP;
        for (int power = 0; power < STEPS; power++) {
            int decimals = Math.max(0, 5 - power);
            for (int factor : List.of(1, 2, 5)) {
                units.add(new NumberTickUnit(factor * size, format(decimals), 0));
            }
            size = Math.pow(10, power - 4.0);
        }
        return units;
    }

    private static DecimalFormat format(int decimals) {
        DecimalFormatSymbols symbols = DecimalFormatSymbols.getInstance(Locale.ROOT);
        symbols.setMinusSign('−');
        DecimalFormat format = new DecimalFormat("0" + (decimals > 0 ? "." + "0".repeat(decimals) : ""), symbols);
        format.setNegativePrefix("−");
        return format;
    }

    /** A plot without frame and background, ready for layers. */
    static XYPlot plot(NumberAxis domain, NumberAxis range) {
        XYPlot plot = new XYPlot(null, domain, range, new XYLineAndShapeRenderer()); // without one, no grid is drawn
        plot.setBackgroundPaint(null);
        plot.setOutlineVisible(false);
        plot.setDomainGridlinesVisible(false);
        plot.setRangeGridlinesVisible(false);
        plot.setAxisOffset(RectangleInsets.ZERO_INSETS);
        plot.setInsets(new RectangleInsets(0, 0, 0, HALF_A_NUMBER));
        return plot;
    }

    /** Fine lines at the ticks of the upright axis. */
    static void levelGrid(XYPlot plot) {
        plot.setRangeGridlinesVisible(true);
        plot.setRangeGridlinePaint(HAIR);
        plot.setRangeGridlineStroke(line(0.5));
    }

    /** Fine lines at the ticks of the level axis. */
    static void uprightGrid(XYPlot plot) {
        plot.setDomainGridlinesVisible(true);
        plot.setDomainGridlinePaint(HAIR);
        plot.setDomainGridlineStroke(line(0.5));
    }

    /** A chart of a plot and nothing else. */
    static JFreeChart chart(Plot plot) {
        JFreeChart chart = new JFreeChart(null, text(), plot, false);
        chart.setBackgroundPaint(null);
        chart.setBorderVisible(false);
        chart.setPadding(RectangleInsets.ZERO_INSETS);
        return chart;
    }
}
