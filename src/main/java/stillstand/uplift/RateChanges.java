package stillstand.uplift;

import java.util.List;

/**
 * How the rate of a flight may change with time: which models are weighed, and over which ages a change may lie.
 *
 * @param models which
 * @param fromKa lowest age of a change, ka, above 0
 * @param toKa highest age; the same where the age of one change is known
 */
public record RateChanges(Models models, double fromKa, double toKa) {
    /** Youngest age of a change where none is stated, ka. */
    public static final double DEFAULT_FROM_KA = 20;
    /** Oldest age of a change where none is stated, ka. */
    public static final double DEFAULT_TO_KA = 450;

    /** Which models of the rate through time. */
    public enum Models {
        /** One rate for all time. */
        NONE,
        /** One change; no change stands beside it. */
        ONE,
        /** None, one or two changes, equally probable beforehand. */
        UP_TO_TWO,
        /** A rate that wanders; no change stands beside it. */
        GRADUAL,
        /** All of them, equally probable beforehand. */
        CHOOSE
    }

    /** @throws IllegalArgumentException if the ages are not in order and above 0 */
    public RateChanges {
        if (!(fromKa > 0 && fromKa <= toKa && toKa < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(
                    "ages of a change must be above 0 and in order but are " + fromKa + " and " + toKa);
        }
    }

    /** Whether the rate may change at all. */
    public boolean isAsked() {
        return models != Models.NONE;
    }

    /** The most changes at known or unknown times that a model of these has. */
    public int most() {
        return switch (models) {
            case NONE, GRADUAL -> 0;
            case ONE -> 1;
            case UP_TO_TWO, CHOOSE -> 2;
        };
    }

    /** The models whose histories make the answer. */
    List<HistoryPrior> answering(RatePrior rate) {
        HistoryPrior steady = new HistoryPrior.Steady(rate);
        return switch (models) {
            case NONE -> List.of(steady);
            case ONE -> List.of(stepped(rate, 1));
            case UP_TO_TWO -> List.of(steady, stepped(rate, 1), stepped(rate, 2));
            case GRADUAL -> List.of(HistoryPrior.Gradual.of(rate));
            case CHOOSE -> List.of(steady, stepped(rate, 1), stepped(rate, 2), HistoryPrior.Gradual.of(rate));
        };
    }

    private HistoryPrior stepped(RatePrior rate, int changes) {
        return new HistoryPrior.Stepped(rate, changes, fromKa, toKa);
    }

    /** Name of the answer, as results hold it. */
    String name() {
        return switch (models) {
            case NONE -> FlightResult.CONSTANT;
            case ONE -> FlightResult.ONE_CHANGE;
            case UP_TO_TWO -> FlightResult.UP_TO_TWO_CHANGES;
            case GRADUAL -> FlightResult.GRADUAL;
            case CHOOSE -> FlightResult.WEIGHTED;
        };
    }
}
