package stillstand.sensitivity;

import java.util.Optional;

/**
 * One assumption switched: what the rate was, what it would be. Both are worked out with the same draws and less effort than the
 * run's own answer, from which the first may differ by the run's error.
 *
 * @param site whose rate
 * @param rateOf the level whose own rate it is, or {@link NextMeasurement#FLIGHT}
 * @param assumption which
 * @param was what is supposed
 * @param wouldBe what is supposed instead
 * @param rate as it is
 * @param rateWouldBe with the other supposition; absent where then there is none
 */
public record AssumptionSwitch(
        String site,
        String rateOf,
        String assumption,
        String was,
        String wouldBe,
        ShortRate rate,
        Optional<ShortRate> rateWouldBe) {}
