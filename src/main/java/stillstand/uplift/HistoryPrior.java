package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import stillstand.uncertainty.StandardNormal;

/**
 * What is held of the rate through time before the flight is looked at: a model of how it may change, as a function of independent
 * standard normal scores. The evidence of a model depends on its ranges: print {@link #describe} beside it.
 */
public sealed interface HistoryPrior {
    /** Name of the model, as results hold it. */
    String name();

    /** How many scores make a history. */
    int dimensions();

    /**
     * The history that scores stand for.
     *
     * @param scores independent and standard normal a priori, {@link #dimensions} of them from the start of the array
     */
    UpliftHistory at(double[] scores);

    /** Rates between changes: how many changes its histories have; none where the rate moves without steps. */
    int changes();

    /** Its ranges in words. */
    String describe();

    /**
     * One rate for all time.
     *
     * @param rate prior of it
     */
    record Steady(RatePrior rate) implements HistoryPrior {
        @Override
        public String name() {
            return FlightResult.CONSTANT;
        }

        @Override
        public int dimensions() {
            return 1;
        }

        @Override
        public UpliftHistory at(double[] scores) {
            return new UpliftHistory.ConstantRate(rateOf(rate, scores[0]));
        }

        @Override
        public int changes() {
            return 0;
        }

        @Override
        public String describe() {
            return "rate " + rate.describe();
        }
    }

    /**
     * Rates that change at unknown times. The rates are independent, the times uniform, in any order, between two ages.
     *
     * @param rate prior of each rate
     * @param changes how many, 1 or 2
     * @param fromKa lowest age of a change, above 0
     * @param toKa highest age; the same where the age of a single change is known
     */
    record Stepped(RatePrior rate, int changes, double fromKa, double toKa) implements HistoryPrior {
        /** @throws IllegalArgumentException if there is not one change or two, or the ages are not in order and above 0 */
        public Stepped {
            if (!(changes == 1 || changes == 2)) {
                throw new IllegalArgumentException("changes must be 1 or 2 but are " + changes);
            }
            if (!(fromKa > 0 && fromKa <= toKa && toKa < Double.POSITIVE_INFINITY && (changes == 1 || fromKa < toKa))) {
                throw new IllegalArgumentException(
                        "ages of a change must be above 0 and in order but are " + fromKa + " and " + toKa);
            }
        }

        private boolean isKnown() {
            return fromKa == toKa;
        }

        @Override
        public String name() {
            return changes == 1 ? FlightResult.ONE_CHANGE : FlightResult.TWO_CHANGES;
        }

        @Override
        public int dimensions() {
            return changes + 1 + (isKnown() ? 0 : changes);
        }

        /** Of several uniform times the oldest of k lies at the k-th root of a uniform number. */
        @Override
        public UpliftHistory at(double[] scores) {
            List<Double> rates = new ArrayList<>();
            for (int i = 0; i <= changes; i++) {
                rates.add(rateOf(rate, scores[i]));
            }
            Double[] agesKa = new Double[changes];
            double upToKa = toKa;
            for (int i = changes; i >= 1 && !isKnown(); i--) {
                upToKa = fromKa + (upToKa - fromKa) * Math.pow(probability(scores[changes + i]), 1.0 / i);
                agesKa[i - 1] = upToKa;
            }
            if (isKnown()) {
                agesKa[0] = fromKa;
            } else if (changes == 2 && !(agesKa[0] < agesKa[1])) {
                agesKa[1] = Math.nextUp(agesKa[0]); // two changes at one time: the rate between them held for no time
            }
            return new UpliftHistory.SteppedRate(List.of(agesKa), rates);
        }

        @Override
        public String describe() {
            String when = isKnown()
                    ? "change at " + Priors.text(fromKa) + " ka"
                    : (changes == 1 ? "change" : "both changes") + " uniform from " + Priors.text(fromKa) + " to "
                            + Priors.text(toKa) + " ka";
            return (changes + 1) + " independent rates, each " + rate.describe() + "; " + when;
        }
    }

    /**
     * A rate that wanders: constant within bins of time, a random walk from each bin to the older one. The walk is of the rate's
     * logarithm where the prior holds rates of one sign only, else of {@code asinh(rate / bend)}, which may change sign and is like
     * the logarithm where the rate is well above the bend. The step's standard deviation over a bin is half-normal.
     *
     * @param rate prior of the rate in the youngest bin
     * @param binKa length of a bin, ka, above 0
     * @param bins how many; the oldest goes on for ever; 2 or more
     * @param stepScale scale of the half-normal prior of a step's standard deviation, above 0
     * @param bendMetresPerKyr where the walk turns from linear to logarithmic, m/kyr, above 0
     */
    record Gradual(RatePrior rate, double binKa, int bins, double stepScale, double bendMetresPerKyr)
            implements HistoryPrior {
        /** @throws IllegalArgumentException if a number is out of the range given for it */
        public Gradual {
            Priors.requireAboveZero("binKa", binKa);
            Priors.requireAboveZero("stepScale", stepScale);
            Priors.requireAboveZero("bendMetresPerKyr", bendMetresPerKyr);
            if (!(bins >= 2)) {
                throw new IllegalArgumentException("bins must be 2 or more but are " + bins);
            }
        }

        /** Ten bins of 50 ka, steps half-normal(0.3), bend 0.1 m/kyr. */
        static Gradual of(RatePrior rate) {
            return new Gradual(rate, 50, 10, 0.3, 0.1);
        }

        @Override
        public String name() {
            return FlightResult.GRADUAL;
        }

        @Override
        public int dimensions() {
            return bins + 1;
        }

        @Override
        public UpliftHistory at(double[] scores) {
            double youngest = rateOf(rate, scores[0]);
            double step = stepScale * StandardNormal.quantile(0.5 + probability(scores[1]) / 2);
            List<Double> rates = new ArrayList<>(List.of(youngest));
            List<Double> agesKa = new ArrayList<>();
            double walked = 0;
            for (int bin = 1; bin < bins; bin++) {
                walked += step * scores[bin + 1];
                agesKa.add(bin * binKa);
                rates.add(isLogarithmic() ? youngest * Math.exp(walked) : bent(youngest, walked));
            }
            return new UpliftHistory.SteppedRate(agesKa, rates);
        }

        private double bent(double youngest, double walked) {
            return bendMetresPerKyr * Math.sinh(RateGrid.asinh(youngest / bendMetresPerKyr) + walked);
        }

        private boolean isLogarithmic() {
            return !rate.isTwoSided();
        }

        @Override
        public int changes() {
            return 0;
        }

        @Override
        public String describe() {
            String of = isLogarithmic()
                    ? "its logarithm"
                    : "asinh(rate / " + Priors.text(bendMetresPerKyr) + " m/kyr), which may change sign,";
            return String.format(
                    Locale.ROOT,
                    "youngest rate %s; from there %s walks at random over bins of %s ka up to %s ka, a step's standard"
                            + " deviation half-normal(%s)",
                    rate.describe(),
                    of,
                    Priors.text(binKa),
                    Priors.text(binKa * bins),
                    Priors.text(stepScale));
        }
    }

    private static double rateOf(RatePrior prior, double score) {
        return prior.quantile(probability(score));
    }

    /** The probability below a score, kept off 0 and 1. */
    private static double probability(double score) {
        return Math.min(1 - 1e-12, Math.max(1e-12, StandardNormal.cumulativeProbability(score)));
    }
}
