package stillstand.uplift;

import java.util.List;
import java.util.Optional;

/**
 * What a flight says under a constant rate.
 *
 * @param rate posterior of the rate, with the evidence
 * @param pairings which level records which row
 * @param ages age of each level given that it is a shoreline; absent for a level that surely is none
 * @param positions where the shoreline of each row stands or would stand
 * @param probabilityAllStray probability that no level is a shoreline, beside the rest
 */
public record FlightAnswer(
        RatePosterior rate,
        PairingTable pairings,
        List<Optional<LevelAge>> ages,
        List<RowPosition> positions,
        double probabilityAllStray) {
    public FlightAnswer {
        ages = List.copyOf(ages);
        positions = List.copyOf(positions);
    }
}
