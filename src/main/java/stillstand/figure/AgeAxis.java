package stillstand.figure;

import java.awt.Graphics2D;
import java.awt.geom.Rectangle2D;
import java.util.List;
import org.jfree.chart.axis.AxisLabelLocation;
import org.jfree.chart.axis.AxisState;
import org.jfree.chart.axis.NumberAxis;
import org.jfree.chart.axis.NumberTick;
import org.jfree.chart.ui.RectangleEdge;
import org.jfree.chart.ui.RectangleInsets;

/** Ages from old to young, and to the right of the present room for what has no age: there it has neither ticks nor numbers. */
final class AgeAxis extends NumberAxis {
    private static final long serialVersionUID = 1L;

    private AgeAxis() {
        super("Age (ka)");
    }

    /**
     * An axis.
     *
     * @param oldestKa its left end
     * @param room part of its length that lies beyond the present, 0 to below 1
     */
    static AgeAxis of(double oldestKa, double room) {
        AgeAxis axis = new AgeAxis();
        Style.dressed(axis, -oldestKa * room / (1 - room), oldestKa, new RectangleInsets(1.5, 7, 1.5, 7));
        axis.setInverted(true);
        axis.setLabelLocation(AxisLabelLocation.LOW_END);
        return axis;
    }

    @Override
    @SuppressWarnings({"rawtypes", "unchecked"}) // the library's own signature
    public List refreshTicks(Graphics2D graphics, AxisState state, Rectangle2D area, RectangleEdge edge) {
        return ((List<Object>) super.refreshTicks(graphics, state, area, edge))
                .stream()
                        .filter(tick -> !(tick instanceof NumberTick number && number.getValue() < 0))
                        .toList();
    }
}
