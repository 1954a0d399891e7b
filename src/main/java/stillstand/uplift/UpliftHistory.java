package stillstand.uplift;

import java.util.List;

/** How fast the coast has moved, through time: rates in m/kyr, up positive; ages in ka before present. */
public sealed interface UpliftHistory {
    /** Uplift since the given age, m: the integral of the rate from then to today. */
    double upliftMetresSince(double ageKa);

    /** Rate at the given age, m/kyr. At the age of a change the younger rate holds. */
    double rateMetresPerKyrAt(double ageKa);

    /**
     * One rate for all time.
     *
     * @param rateMetresPerKyr finite
     */
    record ConstantRate(double rateMetresPerKyr) implements UpliftHistory {
        /** @throws IllegalArgumentException if the rate is not finite */
        public ConstantRate {
            requireFinite(rateMetresPerKyr);
        }

        @Override
        public double upliftMetresSince(double ageKa) {
            return rateMetresPerKyr * ageKa;
        }

        @Override
        public double rateMetresPerKyrAt(double ageKa) {
            return rateMetresPerKyr;
        }
    }

    /**
     * Rates that change at given ages.
     *
     * @param changesKa ages of the changes, increasing, above 0
     * @param ratesMetresPerKyr one more rate than changes, young to old, finite
     */
    record SteppedRate(List<Double> changesKa, List<Double> ratesMetresPerKyr) implements UpliftHistory {
        /** @throws IllegalArgumentException if there is not one rate more than changes, or ages do not increase from 0 */
        public SteppedRate {
            changesKa = List.copyOf(changesKa);
            ratesMetresPerKyr = List.copyOf(ratesMetresPerKyr);
            if (ratesMetresPerKyr.size() != changesKa.size() + 1) {
                throw new IllegalArgumentException("rates must be one more than changes but are "
                        + ratesMetresPerKyr.size() + " for " + changesKa.size());
            }
            double previousKa = 0;
            for (double changeKa : changesKa) {
                if (!(changeKa > previousKa && changeKa < Double.POSITIVE_INFINITY)) {
                    throw new IllegalArgumentException(
                            "ages of changes must increase from above 0 but " + changeKa + " follows " + previousKa);
                }
                previousKa = changeKa;
            }
            ratesMetresPerKyr.forEach(UpliftHistory::requireFinite);
        }

        /** One change of rate. */
        public static SteppedRate oneChange(
                double recentRateMetresPerKyr, double changeKa, double olderRateMetresPerKyr) {
            return new SteppedRate(List.of(changeKa), List.of(recentRateMetresPerKyr, olderRateMetresPerKyr));
        }

        @Override
        public double upliftMetresSince(double ageKa) {
            double uplift = 0;
            double fromKa = 0;
            for (int i = 0; i < changesKa.size() && fromKa < ageKa; i++) {
                double toKa = Math.min(ageKa, changesKa.get(i));
                uplift += ratesMetresPerKyr.get(i) * (toKa - fromKa);
                fromKa = changesKa.get(i);
            }
            if (ageKa > fromKa || changesKa.isEmpty()) {
                uplift += ratesMetresPerKyr.get(ratesMetresPerKyr.size() - 1) * (ageKa - fromKa);
            }
            return ageKa < 0 ? ratesMetresPerKyr.get(0) * ageKa : uplift;
        }

        @Override
        public double rateMetresPerKyrAt(double ageKa) {
            for (int i = 0; i < changesKa.size(); i++) {
                if (ageKa <= changesKa.get(i)) {
                    return ratesMetresPerKyr.get(i);
                }
            }
            return ratesMetresPerKyr.get(ratesMetresPerKyr.size() - 1);
        }
    }

    private static void requireFinite(double rateMetresPerKyr) {
        if (!(Math.abs(rateMetresPerKyr) < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("rate must be finite but is " + rateMetresPerKyr);
        }
    }
}
