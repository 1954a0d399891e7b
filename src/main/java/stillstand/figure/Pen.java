package stillstand.figure;

import java.awt.Color;
import java.awt.Font;
import java.awt.Graphics2D;
import java.awt.Shape;
import java.awt.Stroke;
import java.awt.geom.Ellipse2D;
import java.awt.geom.Line2D;
import java.awt.geom.Path2D;
import java.awt.geom.Rectangle2D;
import java.util.List;
import org.jfree.chart.axis.ValueAxis;
import org.jfree.chart.plot.XYPlot;

/** Draws in points; {@link #x} and {@link #y} say where a number of the axes lies. */
final class Pen {
    private static final double AXIS_LINE = 0.4;

    private final Graphics2D graphics;
    private final Rectangle2D area;
    private final XYPlot plot;
    private final ValueAxis domain;
    private final ValueAxis range;

    Pen(Graphics2D graphics, Rectangle2D area, XYPlot plot, ValueAxis domain, ValueAxis range) {
        this.graphics = graphics;
        this.area = area;
        this.plot = plot;
        this.domain = domain;
        this.range = range;
    }

    /** Where the text begins, is centred or ends. */
    enum Anchor {
        START(0),
        MIDDLE(0.5),
        END(1);

        private final double part;

        Anchor(double part) {
            this.part = part;
        }
    }

    double x(double value) {
        return domain.valueToJava2D(value, area, plot.getDomainAxisEdge());
    }

    double y(double value) {
        return range.valueToJava2D(value, area, plot.getRangeAxisEdge());
    }

    /** Right of the axis line, which nothing is to cover. */
    double left() {
        return area.getMinX() + AXIS_LINE;
    }

    double right() {
        return area.getMaxX();
    }

    double top() {
        return area.getMinY();
    }

    /** Above the axis line, which nothing is to cover. */
    double bottom() {
        return area.getMaxY() - AXIS_LINE;
    }

    void line(double x1, double y1, double x2, double y2, Color colour, Stroke stroke) {
        draw(new Line2D.Double(x1, y1, x2, y2), colour, stroke);
    }

    void draw(Shape shape, Color colour, Stroke stroke) {
        graphics.setPaint(colour);
        graphics.setStroke(stroke);
        graphics.draw(shape);
    }

    void fill(Shape shape, Color colour) {
        graphics.setPaint(colour);
        graphics.fill(shape);
    }

    void box(double x1, double y1, double x2, double y2, Color colour) {
        fill(new Rectangle2D.Double(Math.min(x1, x2), Math.min(y1, y2), Math.abs(x2 - x1), Math.abs(y2 - y1)), colour);
    }

    /** A filled dot with a white rim. */
    void dot(double x, double y, double radius, Color colour) {
        Shape circle = circle(x, y, radius);
        fill(circle, colour);
        draw(circle, Style.PAPER, Style.line(0.5));
    }

    /** A hollow ring. */
    void ring(double x, double y, double radius, Color colour) {
        Shape circle = circle(x, y, radius);
        fill(circle, Style.PAPER);
        draw(circle, colour, Style.line(0.8));
    }

    void cross(double x, double y, double radius, Color colour) {
        Path2D path = new Path2D.Double();
        path.moveTo(x - radius, y - radius);
        path.lineTo(x + radius, y + radius);
        path.moveTo(x - radius, y + radius);
        path.lineTo(x + radius, y - radius);
        draw(path, colour, Style.line(0.9));
    }

    void diamond(double x, double y, double radius, Color colour) {
        Path2D path = new Path2D.Double();
        path.moveTo(x - radius, y);
        path.lineTo(x, y - radius);
        path.lineTo(x + radius, y);
        path.lineTo(x, y + radius);
        path.closePath();
        fill(path, colour);
        draw(path, Style.PAPER, Style.line(0.5));
    }

    private static Shape circle(double x, double y, double radius) {
        return new Ellipse2D.Double(x - radius, y - radius, 2 * radius, 2 * radius);
    }

    /** Text whose small letters are centred on {@code y}. */
    void text(String text, double x, double y, Anchor anchor, Face face, double points, Color colour) {
        if (text.isEmpty()) {
            return;
        }
        Font font = face.at(points, List.of(text));
        graphics.setFont(font);
        graphics.setPaint(colour);
        graphics.drawString(text, (float) (x - anchor.part * Face.width(text, font)), (float) (y + 0.36 * points));
    }
}
