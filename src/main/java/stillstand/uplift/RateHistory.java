package stillstand.uplift;

import java.util.List;

/**
 * The rate through time where it may change.
 *
 * @param changes when it changed, young to old, under the likeliest model that has changes at unknown times; none where no model of
 *     the answer has
 * @param bins mean rate over even stretches of time, young to old, the uncertain times of changes averaged over
 */
public record RateHistory(List<Change> changes, List<FlightResult.Segment> bins) {
    public RateHistory {
        changes = List.copyOf(changes);
        bins = List.copyOf(bins);
    }

    /**
     * One change of rate.
     *
     * @param model the model it belongs to
     * @param age when, ka
     * @param probabilityFasterBefore that the coast rose faster (or sank slower) before it than since
     * @param datedYounger whether a dated level is younger than its median age
     * @param datedOlder whether a dated level is older
     */
    public record Change(
            String model, Quantity age, double probabilityFasterBefore, boolean datedYounger, boolean datedOlder) {
        /** Whether dates can tell the change from another pairing of levels and highstands. */
        public boolean datesCanTell() {
            return datedYounger && datedOlder;
        }
    }
}
