package stillstand.sensitivity;

import java.util.Optional;

/**
 * A site without one of its dated samples; rates with less effort than the run's own, with and without by the same draws.
 *
 * @param site its name
 * @param level of the sample
 * @param sample left out
 * @param levelRate own rate of the level with it; absent where it has none
 * @param levelRateWithout without it; absent where there is none then
 * @param flightRate rate of the flight with it; absent where the site has no flight
 * @param flightRateWithout without it
 */
public record SampleLeftOut(
        String site,
        String level,
        String sample,
        Optional<ShortRate> levelRate,
        Optional<ShortRate> levelRateWithout,
        Optional<ShortRate> flightRate,
        Optional<ShortRate> flightRateWithout) {}
