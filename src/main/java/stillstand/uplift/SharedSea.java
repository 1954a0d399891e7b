package stillstand.uplift;

import java.util.HashMap;
import java.util.Map;
import stillstand.sealevel.SharedErrors;

/**
 * What one draw of a comparison holds of the sea that its sites share: the three shared numbers as values, and of each row that a
 * site has spoken of a bivariate normal of how far level and age depart from the table.
 */
final class SharedSea {
    /**
     * Departure of a row from its table: means and covariance of level (m) and age (ka).
     *
     * @param levelMetres mean departure of the level
     * @param ageKa mean departure of the age
     * @param levelVariance m^2
     * @param covariance m ka
     * @param ageVariance ka^2
     */
    record Departure(double levelMetres, double ageKa, double levelVariance, double covariance, double ageVariance) {
        static Departure prior(double levelVariance, double ageVariance) {
            return new Departure(0, 0, levelVariance, 0, ageVariance);
        }

        /** After {@code residual = level + rate x age + noise} has been seen, noise normal about 0: a Kalman step. */
        Departure given(double residualMetres, double rateMetresPerKyr, double noiseVariance) {
            double withLevel = levelVariance + rateMetresPerKyr * covariance;
            double withAge = covariance + rateMetresPerKyr * ageVariance;
            double total = withLevel + rateMetresPerKyr * withAge + noiseVariance;
            if (!(total > 0)) {
                return this;
            }
            double innovation = residualMetres - levelMetres - rateMetresPerKyr * ageKa;
            return new Departure(
                    levelMetres + withLevel / total * innovation,
                    ageKa + withAge / total * innovation,
                    Math.max(0, levelVariance - withLevel * withLevel / total),
                    covariance - withLevel * withAge / total,
                    Math.max(0, ageVariance - withAge * withAge / total));
        }

        /** After dates have made the age normal about {@code meanKa} with this variance: the level follows it. */
        Departure withAge(double meanKa, double variance) {
            if (!(ageVariance > 0)) {
                return this;
            }
            double slope = covariance / ageVariance;
            return new Departure(
                    levelMetres + slope * (meanKa - ageKa),
                    meanKa,
                    Math.max(0, levelVariance + slope * slope * (variance - ageVariance)),
                    slope * variance,
                    variance);
        }
    }

    /** Standard normal: offset common to all highstands, factor of interstadials, the curve's age error. */
    final double offset;

    final double interstadial;
    final double curveAge;
    private final Map<String, Departure> rows;

    private SharedSea(double offset, double interstadial, double curveAge, Map<String, Departure> rows) {
        this.offset = offset;
        this.interstadial = interstadial;
        this.curveAge = curveAge;
        this.rows = rows;
    }

    static SharedSea before(double offset, double interstadial, double curveAge) {
        return new SharedSea(offset, interstadial, curveAge, Map.of());
    }

    /** What is held of a row, given what a table says of it. */
    Departure departure(String key, double levelVariance, double ageVariance) {
        Departure known = rows.get(key);
        return known == null ? Departure.prior(levelVariance, ageVariance) : known;
    }

    /** Whether a site has spoken of a row. */
    boolean knows(String key) {
        return rows.containsKey(key);
    }

    SharedSea with(Map<String, Departure> changed) {
        Map<String, Departure> all = new HashMap<>(rows);
        all.putAll(changed);
        return new SharedSea(offset, interstadial, curveAge, all);
    }

    double offsetMetres(SharedErrors errors) {
        return offset * errors.offsetSigmaMetres();
    }

    double interstadialMetres(SharedErrors errors) {
        return interstadial * errors.interstadialSigmaMetres();
    }

    double ageShiftKa(SharedErrors errors) {
        return curveAge * errors.sharedAgeSigmaKa();
    }
}
