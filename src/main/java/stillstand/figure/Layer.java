package stillstand.figure;

import java.awt.Graphics2D;
import java.awt.geom.Rectangle2D;
import org.jfree.chart.annotations.AbstractXYAnnotation;
import org.jfree.chart.axis.ValueAxis;
import org.jfree.chart.plot.PlotRenderingInfo;
import org.jfree.chart.plot.XYPlot;

/** What is drawn into a plot: in data where the axes say so, in points where labels must not grow and shrink. */
final class Layer extends AbstractXYAnnotation {
    private static final long serialVersionUID = 1L;

    private final transient Painter painter;

    private Layer(Painter painter) {
        this.painter = painter;
    }

    /** Draws. */
    @FunctionalInterface
    interface Painter {
        /** Draws with a pen that knows the axes. */
        void paint(Pen pen);
    }

    /** Puts a layer above those already there. */
    static void add(XYPlot plot, Painter painter) {
        plot.addAnnotation(new Layer(painter), false);
    }

    @Override
    public void draw(
            Graphics2D graphics,
            XYPlot plot,
            Rectangle2D area,
            ValueAxis domain,
            ValueAxis range,
            int rendererIndex,
            PlotRenderingInfo info) {
        painter.paint(new Pen(graphics, area, plot, domain, range));
    }

    @Override
    public boolean equals(Object other) {
        return this == other;
    }

    @Override
    public int hashCode() {
        return System.identityHashCode(this);
    }
}
