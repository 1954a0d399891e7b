package stillstand.uplift;

/**
 * One value of each number that all rows or all levels of a flight share.
 *
 * @param offsetMetres added to the level of every row that takes the offset
 * @param interstadialMetres added to the level of every row that takes the interstadial factor
 * @param ageShiftKa added to the age of every row that takes the curve's age error
 * @param recordingProbability probability that a surviving shoreline of age 0 is recorded, 0 to 1
 * @param recordingDecayKa recording falls as exp(-age / this); infinite where it does not fall
 * @param expectedStrays expected number of stray levels in the surveyed range, above 0
 */
public record SharedNumbers(
        double offsetMetres,
        double interstadialMetres,
        double ageShiftKa,
        double recordingProbability,
        double recordingDecayKa,
        double expectedStrays) {
    /** @throws IllegalArgumentException if a number is out of the range given for it */
    public SharedNumbers {
        if (!(Math.abs(offsetMetres) + Math.abs(interstadialMetres) + Math.abs(ageShiftKa)
                < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("shared errors must be finite but are " + offsetMetres + ", "
                    + interstadialMetres + ", " + ageShiftKa);
        }
        if (!(recordingProbability >= 0 && recordingProbability <= 1)) {
            throw new IllegalArgumentException("recordingProbability must be 0 to 1 but is " + recordingProbability);
        }
        if (!(recordingDecayKa > 0)) {
            throw new IllegalArgumentException("recordingDecayKa must be above 0 but is " + recordingDecayKa);
        }
        if (!(expectedStrays > 0 && expectedStrays < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("expectedStrays must be above 0 but is " + expectedStrays);
        }
    }

    /** No shared error, a recording probability that does not fall with age. */
    public static SharedNumbers plain(double recordingProbability, double expectedStrays) {
        return new SharedNumbers(0, 0, 0, recordingProbability, Double.POSITIVE_INFINITY, expectedStrays);
    }

    /** The same numbers with this offset, m. */
    public SharedNumbers withOffset(double otherOffsetMetres) {
        return new SharedNumbers(
                otherOffsetMetres,
                interstadialMetres,
                ageShiftKa,
                recordingProbability,
                recordingDecayKa,
                expectedStrays);
    }

    /** The same numbers with this recording probability. */
    public SharedNumbers withRecordingProbability(double otherProbability) {
        return new SharedNumbers(
                offsetMetres, interstadialMetres, ageShiftKa, otherProbability, recordingDecayKa, expectedStrays);
    }

    /** Probability that a surviving shoreline of {@code row} is recorded; the age shift plays no part. */
    public double recordingProbability(FlightRow row) {
        return recordingProbability * Math.exp(-row.ageKa() / recordingDecayKa);
    }
}
