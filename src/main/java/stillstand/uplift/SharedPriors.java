package stillstand.uplift;

import java.util.List;
import org.apache.commons.statistics.distribution.BetaDistribution;
import org.apache.commons.statistics.distribution.GammaDistribution;
import stillstand.uncertainty.StandardNormal;

/**
 * What is held of the shared numbers before the flight is looked at; all independent.
 *
 * @param offsetSigmaMetres standard deviation of the offset of all levels of the table, m, 0 or more
 * @param interstadialSigmaMetres standard deviation of the factor that interstadials share, m, 0 or more
 * @param ageShiftSigmaKa standard deviation of the shift that ages from the curve share, ka, 0 or more
 * @param recording prior of the recording probability at age 0
 * @param decaysKa equally likely decays of recording with age, ka; infinite = none; one or more
 * @param strays prior of the expected number of strays
 */
public record SharedPriors(
        double offsetSigmaMetres,
        double interstadialSigmaMetres,
        double ageShiftSigmaKa,
        Recording recording,
        List<Double> decaysKa,
        Strays strays) {
    /** How many independent numbers there are. */
    static final int DIMENSIONS = 6;

    /** Decays of the default model. */
    public static final List<Double> DEFAULT_DECAYS_KA = List.of(200.0, 400.0, 800.0, Double.POSITIVE_INFINITY);

    /** Prior of the recording probability. */
    public sealed interface Recording {
        /** The value below which the given probability lies. */
        double quantile(double probability);

        /** A known recording probability, 0 to 1. */
        record Known(double value) implements Recording {
            /** @throws IllegalArgumentException if the value is not 0 to 1 */
            public Known {
                if (!(value >= 0 && value <= 1)) {
                    throw new IllegalArgumentException("recording probability must be 0 to 1 but is " + value);
                }
            }

            @Override
            public double quantile(double probability) {
                return value;
            }
        }

        /** A Beta(a, b) prior. */
        record BetaPrior(double a, double b) implements Recording {
            /** @throws IllegalArgumentException if a or b is not above 0 */
            public BetaPrior {
                if (!(a > 0 && b > 0)) {
                    throw new IllegalArgumentException("a and b must be above 0 but are " + a + " and " + b);
                }
            }

            @Override
            public double quantile(double probability) {
                return BetaDistribution.of(a, b).inverseCumulativeProbability(probability);
            }
        }
    }

    /** Prior of the expected number of strays. */
    public sealed interface Strays {
        /** The value below which the given probability lies. */
        double quantile(double probability);

        /** Logarithm of the mean of {@code e^-lambda lambda^n}. */
        double logMeanOfAllStray(int levels);

        /** A known number, above 0. */
        record Known(double value) implements Strays {
            /** @throws IllegalArgumentException if the value is not above 0 */
            public Known {
                if (!(value > 0)) {
                    throw new IllegalArgumentException("expected strays must be above 0 but are " + value);
                }
            }

            @Override
            public double quantile(double probability) {
                return value;
            }

            @Override
            public double logMeanOfAllStray(int levels) {
                return levels * Math.log(value) - value;
            }
        }

        /** A gamma prior of shape 2 and the given mean, above 0. */
        record GammaPrior(double mean) implements Strays {
            private static final double SHAPE = 2;

            /** @throws IllegalArgumentException if the mean is not above 0 */
            public GammaPrior {
                if (!(mean > 0)) {
                    throw new IllegalArgumentException("mean of expected strays must be above 0 but is " + mean);
                }
            }

            @Override
            public double quantile(double probability) {
                return GammaDistribution.of(SHAPE, mean / SHAPE).inverseCumulativeProbability(probability);
            }

            /** Gamma(n + 2) s^n / (1 + s)^(n + 2), s the scale. */
            @Override
            public double logMeanOfAllStray(int levels) {
                double scale = mean / SHAPE;
                double logGamma = 0;
                for (int k = 2; k <= levels + 1; k++) {
                    logGamma += Math.log(k);
                }
                return logGamma + levels * Math.log(scale) - (levels + SHAPE) * Math.log1p(scale);
            }
        }
    }

    /** @throws IllegalArgumentException if a standard deviation is negative or there is no decay */
    public SharedPriors {
        decaysKa = List.copyOf(decaysKa);
        if (!(offsetSigmaMetres >= 0 && interstadialSigmaMetres >= 0 && ageShiftSigmaKa >= 0)) {
            throw new IllegalArgumentException("standard deviations must be 0 or more but are " + offsetSigmaMetres
                    + ", " + interstadialSigmaMetres + ", " + ageShiftSigmaKa);
        }
        if (decaysKa.isEmpty()) {
            throw new IllegalArgumentException("there must be a decay of recording, infinite where there is none");
        }
    }

    /** The default model's priors: offset 3 m, interstadials 6 m, Beta(4, 2.5), four decays, one stray in ten levels. */
    public static SharedPriors defaults(double curveAgeSigmaKa, int levels) {
        return new SharedPriors(
                3,
                6,
                curveAgeSigmaKa / Math.sqrt(2),
                new Recording.BetaPrior(4, 2.5),
                DEFAULT_DECAYS_KA,
                new Strays.GammaPrior(0.1 * levels));
    }

    /** The shared numbers at the given probabilities: offset, interstadials, recording, strays, age shift, decay. */
    SharedNumbers at(double offset, double interstadial, double recorded, double stray, double shift, double decay) {
        return new SharedNumbers(
                offsetSigmaMetres * StandardNormal.quantile(offset),
                interstadialSigmaMetres * StandardNormal.quantile(interstadial),
                ageShiftSigmaKa * StandardNormal.quantile(shift),
                recording.quantile(recorded),
                decaysKa.get((int) (decay * decaysKa.size())),
                strays.quantile(stray));
    }
}
