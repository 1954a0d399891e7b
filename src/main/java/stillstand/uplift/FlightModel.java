package stillstand.uplift;

import java.util.List;

/**
 * A flight of levels, the table of highstands they are matched to, and the fixed rules of matching.
 *
 * @param levels the levels in geomorphic order, lowest first
 * @param rows the highstands, young to old
 * @param surveyedFromMetres lowest height at which a level would have been seen, m above present mean sea level
 * @param surveyedToMetres highest such height
 * @param strayAgeMaximumKa dates of stray levels, and wrong dates, are uniform from 0 to this age, ka
 * @param wrongDateProbability probability that one date is wrong, 0 or more, below 1
 * @param todaysSeaIsFloor whether a shoreline must stand above today's sea to survive
 * @param countsAllStray whether the answer counts the case that no level is a shoreline
 * @param limitingPoints what bounds the rate on one side
 */
public record FlightModel(
        List<FlightLevel> levels,
        List<FlightRow> rows,
        double surveyedFromMetres,
        double surveyedToMetres,
        double strayAgeMaximumKa,
        double wrongDateProbability,
        boolean todaysSeaIsFloor,
        boolean countsAllStray,
        List<LimitingPoint> limitingPoints) {
    /**
     * @throws IllegalArgumentException if there is no level or no row, the surveyed range is upside down (or, where today's sea
     *     is the floor, wholly below it), {@code strayAgeMaximumKa} is not above 0, or {@code wrongDateProbability} is out of
     *     range
     */
    public FlightModel {
        levels = List.copyOf(levels);
        rows = List.copyOf(rows);
        limitingPoints = List.copyOf(limitingPoints);
        if (levels.isEmpty() || rows.isEmpty()) {
            throw new IllegalArgumentException(
                    "a flight must have levels and rows but has " + levels.size() + " and " + rows.size());
        }
        if (!(surveyedFromMetres < surveyedToMetres
                && surveyedToMetres - surveyedFromMetres < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("surveyedFromMetres must be below surveyedToMetres but they are "
                    + surveyedFromMetres + " and " + surveyedToMetres);
        }
        if (!(!todaysSeaIsFloor || surveyedToMetres > 0)) {
            throw new IllegalArgumentException("surveyedToMetres must be above today's sea but is " + surveyedToMetres);
        }
        if (!(strayAgeMaximumKa > 0 && strayAgeMaximumKa < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("strayAgeMaximumKa must be above 0 but is " + strayAgeMaximumKa);
        }
        if (!(wrongDateProbability >= 0 && wrongDateProbability < 1)) {
            throw new IllegalArgumentException(
                    "wrongDateProbability must be 0 or more and below 1 but is " + wrongDateProbability);
        }
    }

    /** A model without limiting points. */
    public FlightModel(
            List<FlightLevel> levels,
            List<FlightRow> rows,
            double surveyedFromMetres,
            double surveyedToMetres,
            double strayAgeMaximumKa,
            double wrongDateProbability,
            boolean todaysSeaIsFloor,
            boolean countsAllStray) {
        this(
                levels,
                rows,
                surveyedFromMetres,
                surveyedToMetres,
                strayAgeMaximumKa,
                wrongDateProbability,
                todaysSeaIsFloor,
                countsAllStray,
                List.of());
    }

    /** The model of a table taken as it stands: dates are right, today's sea is no floor, all levels may be strays. */
    public static FlightModel complete(
            List<FlightLevel> levels, List<FlightRow> rows, double surveyedFromMetres, double surveyedToMetres) {
        return new FlightModel(levels, rows, surveyedFromMetres, surveyedToMetres, 1000, 0, false, true);
    }

    /** The lowest height of a shoreline that can be recorded, m: the lower edge of the cells. */
    public double lowestRecordedMetres() {
        return todaysSeaIsFloor ? Math.max(surveyedFromMetres, 0) : surveyedFromMetres;
    }

    /** The same model with these levels. */
    public FlightModel withLevels(List<FlightLevel> otherLevels) {
        return with(otherLevels, rows, limitingPoints);
    }

    /** The same model with these rows. */
    public FlightModel withRows(List<FlightRow> otherRows) {
        return with(levels, otherRows, limitingPoints);
    }

    /** The same model with these limiting points. */
    public FlightModel withLimitingPoints(List<LimitingPoint> otherPoints) {
        return with(levels, rows, otherPoints);
    }

    private FlightModel with(
            List<FlightLevel> otherLevels, List<FlightRow> otherRows, List<LimitingPoint> otherPoints) {
        return new FlightModel(
                otherLevels,
                otherRows,
                surveyedFromMetres,
                surveyedToMetres,
                strayAgeMaximumKa,
                wrongDateProbability,
                todaysSeaIsFloor,
                countsAllStray,
                otherPoints);
    }

    /** Natural logarithm of the factor of all limiting points. */
    double logLimiting(UpliftHistory history, SharedNumbers shared) {
        double sum = 0;
        for (LimitingPoint point : limitingPoints) {
            sum += point.logFactor(history, shared);
        }
        return sum;
    }
}
