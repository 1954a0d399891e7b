package stillstand.sensitivity;

/**
 * How good the measurements are supposed to be of which a run says what they would do.
 *
 * @param dateSigmaKa one standard deviation of a new date, ka, above 0
 * @param surveySigmaMetres one standard deviation of a new survey of a height, m, above 0
 */
public record MeasurementPlan(double dateSigmaKa, double surveySigmaMetres) {
    /** A date to 3 ka, a survey to 0.3 m. */
    public static final MeasurementPlan DEFAULT = new MeasurementPlan(3, 0.3);

    /** @throws IllegalArgumentException if a standard deviation is not a finite number above 0 */
    public MeasurementPlan {
        requirePositive("dateSigmaKa", dateSigmaKa);
        requirePositive("surveySigmaMetres", surveySigmaMetres);
    }

    private static void requirePositive(String name, double value) {
        if (!(value > 0 && value < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(name + " must be above 0 but is " + value);
        }
    }
}
