package stillstand.uplift;

import java.util.List;
import java.util.Optional;
import java.util.Set;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Uncertain;

/**
 * One level of a flight as the shoreline filter sees it: what its measured height says of the height at which its
 * shoreline stands today, and its dates.
 *
 * <p>{@code shorelineMetres} is the likelihood of the measured height, scaled to a distribution of the shoreline's present
 * height: survey error, indicator, palaeo-depth, cover. Any kind serves, since only its probability in cells of height is
 * used.
 *
 * @param name the level's name, for messages
 * @param shorelineMetres present height of the shoreline, m above present mean sea level
 * @param datesKa dates of the level, ka before present; each with a spread
 * @param strayFactor what the density of stray levels is multiplied by for this level: 1, or more where the level is doubtful
 * @param allowedRows the rows of the table (from 0) it may be matched to; absent = all
 * @param mayBeStray whether it may be no shoreline at all
 */
public record FlightLevel(
        String name,
        Uncertain shorelineMetres,
        List<Uncertain> datesKa,
        double strayFactor,
        Optional<Set<Integer>> allowedRows,
        boolean mayBeStray) {
    /**
     * @throws IllegalArgumentException if a date has no spread, or {@code strayFactor} is not a finite number above 0, or the
     *     level may be neither stray nor matched
     */
    public FlightLevel {
        datesKa = List.copyOf(datesKa);
        allowedRows = allowedRows.map(Set::copyOf);
        for (Uncertain date : datesKa) {
            if (date instanceof Exact) {
                throw new IllegalArgumentException("dates of level '" + name + "' must have a spread but one is exact");
            }
        }
        if (!(strayFactor > 0 && strayFactor < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("strayFactor must be above 0 but is " + strayFactor);
        }
        if (!mayBeStray && allowedRows.isPresent() && allowedRows.get().isEmpty()) {
            throw new IllegalArgumentException("level '" + name + "' may be neither stray nor matched to any row");
        }
    }

    /** An undated level that may be any row or a stray. */
    public static FlightLevel undated(String name, Uncertain shorelineMetres) {
        return new FlightLevel(name, shorelineMetres, List.of(), 1, Optional.empty(), true);
    }

    /** A dated level that may be any row or a stray. */
    public static FlightLevel dated(String name, Uncertain shorelineMetres, List<Uncertain> datesKa) {
        return new FlightLevel(name, shorelineMetres, datesKa, 1, Optional.empty(), true);
    }

    /** The same level, matched to these rows or to none. */
    public FlightLevel onlyRows(Set<Integer> rows) {
        return new FlightLevel(name, shorelineMetres, datesKa, strayFactor, Optional.of(rows), mayBeStray);
    }

    /** The same level, held to be a shoreline. */
    public FlightLevel neverStray() {
        return new FlightLevel(name, shorelineMetres, datesKa, strayFactor, allowedRows, false);
    }

    /** The same level with the density of strays multiplied by {@code factor}. */
    public FlightLevel doubtful(double factor) {
        return new FlightLevel(name, shorelineMetres, datesKa, factor, allowedRows, mayBeStray);
    }

    /** Whether this level may be matched to row {@code row} of the table. */
    boolean mayBeRow(int row) {
        return allowedRows.isEmpty() || allowedRows.get().contains(row);
    }
}
