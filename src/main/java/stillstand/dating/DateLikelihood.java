package stillstand.dating;

import java.util.List;
import java.util.function.DoubleUnaryOperator;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.StandardNormal;
import stillstand.uncertainty.Uncertain;

/**
 * What one date says of the true age of a level.
 *
 * <p>A date of the level itself enters as {@code (1 - w) f(t) + w / a_max}: with probability w it is wrong, and then says no
 * more than that it came from somewhere in 0 to a_max. The sample may have grown at any time in the duration D of the stand,
 * so f is the density of the date spread evenly over D: by variance, {@code sigma^2 + D^2 / 12}, for a normal date, and exactly,
 * {@code (F(t + D/2) - F(t - D/2)) / D} with F the date's cumulative distribution, for any other.
 *
 * <p>A date that bounds the level on one side enters as {@code (1 - w) F(t) + w} (the level is at least as old) or
 * {@code (1 - w) (1 - F(t)) + w} (at most as old), F spread in the same way: a wrong bound excludes nothing. A bound is a
 * probability and not a density; it never gives an age by itself.
 *
 * @param ageKa the date
 * @param bearing what it says of the level
 * @param durationKa of the stand in which the sample may have grown, 0 or more
 * @param wrongProbability that the date is wrong, from 0 to below 1
 * @param oldestKa the greatest age a wrong date may have, above 0
 */
public record DateLikelihood(
        Uncertain ageKa, Bearing bearing, double durationKa, double wrongProbability, double oldestKa) {
    /** Probability that one of several dates is wrong, where nothing else is said. */
    public static final double DEFAULT_WRONG_PROBABILITY = 0.05;

    /** Greatest age of a wrong date where nothing else is said, ka. */
    public static final double DEFAULT_OLDEST_KA = 1000;

    /** Points of the mean over the duration for a bound that is not normal. */
    private static final int BOUND_STEPS = 64;

    /** What a date says of its level. */
    public enum Bearing {
        /** The level formed when the sample did. */
        LEVEL,
        /** The level is at least as old. */
        MINIMUM,
        /** The level is at most as old. */
        MAXIMUM
    }

    /**
     * @throws IllegalArgumentException if {@code durationKa} is negative or not finite, {@code wrongProbability} not in 0 to
     *     below 1, {@code oldestKa} not a finite number above 0, or if a date of the level has neither spread nor duration
     */
    public DateLikelihood {
        if (!(durationKa >= 0 && durationKa < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("durationKa must be 0 or more but is " + durationKa);
        }
        if (!(wrongProbability >= 0 && wrongProbability < 1)) {
            throw new IllegalArgumentException("wrongProbability must lie in 0 to below 1 but is " + wrongProbability);
        }
        Uncertain.requirePositive("oldestKa", oldestKa);
        if (bearing == Bearing.LEVEL && ageKa.isExact() && durationKa == 0) {
            throw new IllegalArgumentException(
                    "a date of a level must have a spread or a duration but is exactly " + ageKa.mean() + " ka");
        }
    }

    /** A date of the level itself that is surely right. */
    public static DateLikelihood certain(Uncertain ageKa, double durationKa) {
        return new DateLikelihood(ageKa, Bearing.LEVEL, durationKa, 0, DEFAULT_OLDEST_KA);
    }

    /** The likelihood of a true age: a density per ka for a date of the level, a probability for a bound. */
    public double at(double trueAgeKa) {
        double[] column = {trueAgeKa};
        toLikelihoods(column);
        return column[0];
    }

    /** The likelihoods of a whole column of true ages, in place. */
    public void toLikelihoods(double[] column) {
        DoubleUnaryOperator ifRight = ifRight();
        double right = 1 - wrongProbability;
        double ifWrong = bearing == Bearing.LEVEL ? wrongProbability / oldestKa : wrongProbability;
        for (int i = 0; i < column.length; i++) {
            column[i] = right * ifRight.applyAsDouble(column[i]) + ifWrong;
        }
    }

    private DoubleUnaryOperator ifRight() {
        double sigma = Math.hypot(ageKa.standardDeviation(), durationKa / Math.sqrt(12));
        if ((ageKa instanceof Normal || ageKa instanceof Exact) && sigma > 0) {
            double centre = ageKa.mean();
            return switch (bearing) {
                case LEVEL -> normalDensity(centre, sigma);
                case MINIMUM -> t -> StandardNormal.cumulativeProbability((t - centre) / sigma);
                case MAXIMUM -> t -> StandardNormal.cumulativeProbability((centre - t) / sigma);
            };
        }
        return switch (bearing) {
            case LEVEL -> this::spreadDensity;
            case MINIMUM -> this::spreadProbability;
            case MAXIMUM -> t -> 1 - spreadProbability(t);
        };
    }

    private static DoubleUnaryOperator normalDensity(double centre, double sigma) {
        double greatest = 1 / (sigma * Math.sqrt(2 * Math.PI));
        return t -> greatest * Math.exp(-0.5 * (t - centre) * (t - centre) / (sigma * sigma));
    }

    private double spreadDensity(double trueAgeKa) {
        return durationKa == 0
                ? ageKa.density(trueAgeKa)
                : (ageKa.cumulativeProbability(trueAgeKa + durationKa / 2)
                                - ageKa.cumulativeProbability(trueAgeKa - durationKa / 2))
                        / durationKa;
    }

    private double spreadProbability(double trueAgeKa) {
        int steps = durationKa == 0 ? 1 : BOUND_STEPS;
        double sum = 0;
        for (int i = 0; i < steps; i++) {
            sum += ageKa.cumulativeProbability(trueAgeKa + durationKa * ((i + 0.5) / steps - 0.5));
        }
        return sum / steps;
    }

    /**
     * Logarithm of the product of several dates at each true age: they are independent given it. Negative infinity where the
     * product is 0.
     */
    public static double[] logProduct(List<DateLikelihood> dates, double[] trueAgesKa) {
        double[] sum = new double[trueAgesKa.length];
        for (DateLikelihood date : dates) {
            double[] column = trueAgesKa.clone();
            date.toLikelihoods(column);
            for (int i = 0; i < sum.length; i++) {
                sum[i] += Math.log(column[i]);
            }
        }
        return sum;
    }

    /** The product itself, which runs out of small numbers at some eighty dates. */
    public static double[] product(List<DateLikelihood> dates, double[] trueAgesKa) {
        double[] product = logProduct(dates, trueAgesKa);
        for (int i = 0; i < product.length; i++) {
            product[i] = Math.exp(product[i]);
        }
        return product;
    }
}
