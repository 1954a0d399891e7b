package stillstand.uplift;

import java.util.Locale;
import java.util.Optional;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.uncertainty.Uncertain;

/**
 * Whether a curve can be read at an age at all. Where the sea rose or fell by tens of metres within the error of the age,
 * a reading is no evidence: then a sentence stands in place of a rate.
 */
final class CurveReading {
    /** Most that the central line may vary within one standard deviation of the age, m. */
    static final double MOST_VARIATION_METRES = 20;

    private CurveReading() {}

    /**
     * Why a curve cannot be read at an age; empty where it can.
     *
     * <p>The age spans {@code t +- sqrt(sigma_t^2 + sigma_C^2)}, with {@code sigma_C} the error of the curve's ages.
     */
    static Optional<String> whyNot(SeaLevelCurve curve, Uncertain ageKa) {
        double centreKa = ageKa.mean();
        if (!curve.covers(centreKa)) {
            return Optional.of(String.format(
                    Locale.ROOT,
                    "its age of %.1f ka lies outside curve '%s' (%.1f to %.1f ka)",
                    centreKa,
                    curve.id(),
                    curve.fromKa(),
                    curve.toKa()));
        }
        if (!curve.isUsableAt(centreKa)) {
            return Optional.of(String.format(
                    Locale.ROOT,
                    "curve '%s' is of use from %.1f ka only, and its age is %.1f ka",
                    curve.id(),
                    curve.facts().usableFromKa(),
                    centreKa));
        }
        double reachKa = Math.hypot(ageKa.standardDeviation(), curve.facts().curveAgeSigmaKa());
        double variationMetres = curve.variationMetres(
                Math.max(curve.fromKa(), centreKa - reachKa), Math.min(curve.toKa(), centreKa + reachKa));
        if (variationMetres < MOST_VARIATION_METRES) {
            return Optional.empty();
        }
        return Optional.of(String.format(
                Locale.ROOT,
                "the curve is too steep at this age to give a rate: '%s' varies by %.0f m within %.1f ± %.1f ka",
                curve.id(),
                variationMetres,
                centreKa,
                reachKa));
    }
}
