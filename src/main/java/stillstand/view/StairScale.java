package stillstand.view;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.figure.LabelColumn;
import stillstand.uncertainty.Interval;
import stillstand.view.StairPicture.Link;
import stillstand.view.StairPicture.Mark;
import stillstand.view.StairPicture.Stand;

/** Where things of a Stair lie on a paper of some size, in pixels, and what lies under a point. */
final class StairScale {
    /** How near a pointer must be to a thing to mean it. */
    static final double REACH = 9;

    /** How near to a highstand a line must be dropped to be paired with it. */
    static final double DROP_REACH = 26;

    private static final double LEFT = 58;
    private static final double TOP = 30;
    private static final double BELOW = 44;
    private static final double LADDER = 46;
    private static final double NAME_GAP = 15;
    private static final double LEADER = 16;

    final double left = LEFT;
    final double top = TOP;
    final double bottom;
    /** Where today is. */
    final double present;
    /** Where the profile begins, beside the names of predicted steps. */
    final double profileLeft;

    final double profileRight;
    final double right;
    final double oldestKa;
    final Interval span;
    private final StairPicture picture;
    private final double[] namePlaces;

    /**
     * A paper.
     *
     * @param nameWidth of the widest level's name
     */
    StairScale(StairPicture picture, double oldestKa, double width, double height, double nameWidth) {
        this.picture = picture;
        this.oldestKa = oldestKa;
        span = picture.span(oldestKa);
        right = width - 8;
        bottom = height - BELOW;
        double names = Math.min(nameWidth, 0.3 * width);
        double steps =
                Math.min(0.22 * width, 26 + 34 * Math.max(1, picture.levels().size()));
        present = Math.max(LEFT + 40, right - names - LEADER - steps - LADDER);
        profileLeft = present + LADDER;
        profileRight = right - names - LEADER;
        int count = picture.levels().size();
        double[] wanted = new double[count];
        for (int i = 0; i < count; i++) {
            wanted[i] = y(picture.levels().get(count - 1 - i).metres());
        }
        double[] downwards = LabelColumn.places(wanted, NAME_GAP, top + 6, bottom - 6);
        namePlaces = new double[count];
        for (int i = 0; i < count; i++) {
            namePlaces[i] = downwards[count - 1 - i];
        }
    }

    double x(double ageKa) {
        return present - (present - left) * ageKa / oldestKa;
    }

    double y(double metres) {
        return bottom - (bottom - top) * (metres - span.low()) / span.width();
    }

    double ageKaAt(double x) {
        return (present - x) / (present - left) * oldestKa;
    }

    double metresAt(double y) {
        return span.low() + (bottom - y) / (bottom - top) * span.width();
    }

    /** Inner edge of a level's tread. */
    double stepX(int level) {
        double step =
                (profileRight - profileLeft) / Math.max(1, picture.levels().size());
        return profileLeft + (level + 0.84) * step;
    }

    /** Width of a tread with its cliff. */
    double stepWidth() {
        return (profileRight - profileLeft) / Math.max(1, picture.levels().size());
    }

    double nameX() {
        return profileRight + LEADER;
    }

    double nameY(int level) {
        return namePlaces[level];
    }

    /** Ticks of an axis, about so many pixels apart. */
    static List<Double> ticks(double low, double high, double pixels, double apart) {
        double raw = (high - low) * apart / Math.max(1, pixels);
        double power = Math.pow(10, Math.floor(Math.log10(raw)));
        double step = power;
        for (double factor : new double[] {1, 2, 5, 10}) {
            step = factor * power;
            if (step >= raw) {
                break;
            }
        }
        List<Double> ticks = new ArrayList<>();
        for (double tick = Math.ceil(low / step) * step; tick <= high + step * 1e-9; tick += step) {
            ticks.add(Math.rint(tick / step) * step + 0.0); // + 0.0: never -0
        }
        return ticks;
    }

    /** The highstand nearest to a point, within a reach in pixels. */
    Optional<Stand> standAt(double x, double y, double reach) {
        Optional<Stand> best = Optional.empty();
        double least = reach;
        for (Stand stand : picture.stands()) {
            double distance = Math.hypot(x(stand.ageKa()) - x, y(stand.metres()) - y);
            if (stand.ageKa() <= oldestKa && distance <= least) {
                least = distance;
                best = Optional.of(stand);
            }
        }
        return best;
    }

    /** The level whose mark, tread or name is under a point. */
    Optional<Mark> levelAt(double x, double y) {
        Optional<Mark> best = Optional.empty();
        double least = REACH;
        for (int i = 0; i < picture.levels().size(); i++) {
            Mark level = picture.levels().get(i);
            double away = x >= profileRight ? Math.abs(nameY(i) - y) : distanceFromTread(i, level, x, y);
            if (away < least) {
                least = away;
                best = Optional.of(level);
            }
        }
        return best;
    }

    private double distanceFromTread(int i, Mark level, double x, double y) {
        double inner = stepX(i);
        double beyond = Math.max(0, Math.max(x - inner, inner - 0.7 * stepWidth() - x));
        return Math.hypot(beyond, y(level.metres()) - y);
    }

    /** The line under a point; of several the nearest, of equals the more probable. */
    Optional<Link> linkAt(double x, double y, List<Link> links) {
        Optional<Link> best = Optional.empty();
        double least = REACH - 3;
        for (Link link : links) {
            double distance = distance(x, y, x(link.ageKa()), y(link.seaMetres()), present, y(link.metres()));
            double unlikely = 2 * (1 - link.probability());
            if (distance + unlikely < least) {
                least = distance + unlikely;
                best = Optional.of(link);
            }
        }
        return best;
    }

    /** Distance of a point from the piece of line between two others. */
    static double distance(double x, double y, double fromX, double fromY, double toX, double toY) {
        double dx = toX - fromX;
        double dy = toY - fromY;
        double length = dx * dx + dy * dy;
        double part = length > 0 ? Math.min(1, Math.max(0, ((x - fromX) * dx + (y - fromY) * dy) / length)) : 0;
        return Math.hypot(x - fromX - part * dx, y - fromY - part * dy);
    }
}
