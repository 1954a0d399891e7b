package stillstand.sealevel;

import java.util.Optional;

/**
 * A highstand that curves are searched for, and what is supposed of it whatever the curve.
 *
 * @param label marine isotope stage or substage, such as {@code 5e}
 * @param alsoCalled another name, such as {@code 5.5}
 * @param fromKa young edge of the window in which it is looked for, ka
 * @param toKa old edge, above {@code fromKa}
 * @param highstandClass its class
 * @param durationKa time in which corals of its terrace may have grown, ka, 0 or more
 * @param existsProbability chance that it stood apart long enough to cut a shoreline, above 0, at most 1
 */
public record Stage(
        String label,
        Optional<String> alsoCalled,
        double fromKa,
        double toKa,
        HighstandClass highstandClass,
        double durationKa,
        double existsProbability) {
    /** Label of the stage of today's interglacial, whose row is never picked from a curve. */
    public static final String HOLOCENE = "1";

    public Stage {
        if (label.isBlank()) {
            throw new IllegalArgumentException("label must say something");
        }
        if (!(fromKa >= 0 && fromKa < toKa && toKa < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(
                    "window of stage '" + label + "' must run from young to old but is " + fromKa + " to " + toKa);
        }
        Highstand.requireDuration(durationKa);
        Highstand.requireProbability(existsProbability);
    }

    /** Whether the age lies strictly inside the window. */
    public boolean holds(double ageKa) {
        return fromKa < ageKa && ageKa < toKa;
    }
}
