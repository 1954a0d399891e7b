package stillstand.sensitivity;

import java.util.Comparator;
import java.util.Locale;
import java.util.Optional;

/**
 * A measurement that could be made next, and what it may be expected to do to a rate. What it costs is for the user to say.
 *
 * @param site whose rate
 * @param rateOf the level whose own rate it is, or "flight" for the rate of the whole flight
 * @param level that is measured
 * @param sample of that level that is measured; absent where it is the level itself
 * @param measurement what is done: {@code date}, {@code survey}, {@code indicator} or {@code taxon} (see {@link Kind})
 * @param sigma one standard deviation of its result
 * @param unit of {@code sigma}
 * @param width95 width of the rate's 95 % interval (equal tails) as it is, m/kyr
 * @param expectedWidth95 its arithmetic mean width over the results the measurement may have, m/kyr
 * @param width95ChangePercent expected change of the width, percent: the geometric mean, by which measurements are ranked, since a
 *     rare result that upsets a flight would rule an arithmetic one
 * @param width95ChangePercentError one standard error of its calculation
 * @param probabilityWider that the result makes the interval wider
 * @param pairing what it does to the pairings; absent where the rate is not a flight's
 * @param effectiveDraws to how many equal draws the weighed ones amount after a typical result
 */
public record NextMeasurement(
        String site,
        String rateOf,
        String level,
        Optional<String> sample,
        String measurement,
        double sigma,
        String unit,
        double width95,
        double expectedWidth95,
        double width95ChangePercent,
        double width95ChangePercentError,
        double probabilityWider,
        Optional<PairingGain> pairing,
        double effectiveDraws) {
    /** The rate of a whole flight. */
    public static final String FLIGHT = "flight";

    /** Below this the expectation rests on too few draws to be relied upon. */
    public static final double FEW_DRAWS = 50;

    /** The narrowing first. */
    static final Comparator<NextMeasurement> RANKING =
            Comparator.comparingDouble(NextMeasurement::width95ChangePercent);

    /** What is done. */
    public enum Kind {
        /** One date more on a level. */
        DATE,
        /** Its height surveyed again, beside the survey there is. */
        SURVEY,
        /** What the landform stands for made out, so that the spread of that halves. */
        INDICATOR,
        /** The taxon of a coral identified, so that the spread of its depth of growth halves. */
        TAXON;

        /** The word in results. */
        public String id() {
            return name().toLowerCase(Locale.ROOT);
        }
    }

    /**
     * Certainty of the pairings: the probability of the most probable reading of a level, averaged over the levels of the flight.
     *
     * @param certainty as it is, 0 to 1
     * @param expectedCertainty its mean over the results the measurement may have
     * @param error one standard error of the calculation of their difference
     */
    public record PairingGain(double certainty, double expectedCertainty, double error) {}

    static NextMeasurement of(
            String site,
            String rateOf,
            String level,
            Optional<String> sample,
            Kind kind,
            double sigma,
            ExpectedNarrowing found,
            boolean hasPairings) {
        return new NextMeasurement(
                site,
                rateOf,
                level,
                sample,
                kind.id(),
                sigma,
                kind == Kind.DATE ? "ka" : "m",
                found.width95(),
                found.expectedWidth95(),
                100 * found.change(),
                100 * found.changeError(),
                found.probabilityWider(),
                hasPairings
                        ? Optional.of(
                                new PairingGain(found.certainty(), found.expectedCertainty(), found.certaintyError()))
                        : Optional.empty(),
                found.effectiveDraws());
    }
}
