package stillstand.uplift;

import java.util.List;
import java.util.Optional;

/**
 * One joint draw: a history of uplift, a whole correlation, and for each level that is a shoreline its height, age and former sea level.
 *
 * @param history how the coast has moved
 * @param shared the shared numbers
 * @param matches by level; absent where the level is a stray
 */
public record FlightDraw(UpliftHistory history, SharedNumbers shared, List<Optional<Match>> matches) {
    /**
     * A level's shoreline.
     *
     * @param row number of the row it records, from 0
     * @param heightMetres where it stands today, m above present mean sea level
     * @param ageKa its age, ka
     * @param seaLevelMetres sea level when it formed, m: height less uplift since
     */
    public record Match(int row, double heightMetres, double ageKa, double seaLevelMetres) {}

    public FlightDraw {
        matches = List.copyOf(matches);
    }

    /** A draw with one rate for all time, m/kyr. */
    public FlightDraw(double rateMetresPerKyr, SharedNumbers shared, List<Optional<Match>> matches) {
        this(new UpliftHistory.ConstantRate(rateMetresPerKyr), shared, matches);
    }

    /** The rate today, m/kyr: the only one where it has not changed. */
    public double rateMetresPerKyr() {
        return history.rateMetresPerKyrAt(0);
    }

    /** By level, the row it records, or -1 where it is a stray. */
    public List<Integer> rows() {
        return matches.stream().map(match -> match.map(Match::row).orElse(-1)).toList();
    }
}
