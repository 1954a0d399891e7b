package stillstand.dating;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.apache.commons.statistics.distribution.ChiSquaredDistribution;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Uncertain;

/**
 * Several dates of one thing, and how well they agree. Whether one mean may stand for them is for the reader to judge: a low
 * {@link #p()} says that they scatter more than their spreads allow.
 *
 * @param agesKa two or more, with the spread each has of its own (not what all share, such as that of decay constants)
 */
public record Replicates(List<Normal> agesKa) {
    /** @throws IllegalArgumentException if there are fewer than two ages */
    public Replicates {
        agesKa = List.copyOf(agesKa);
        if (agesKa.size() < 2) {
            throw new IllegalArgumentException("ages must be two or more but are " + agesKa.size());
        }
    }

    /**
     * Dates of any kind by their means and standard deviations. Absent where fewer than two have a spread, since nothing can
     * then be said of their agreement; a date without spread is passed over.
     */
    public static Optional<Replicates> of(List<Uncertain> agesKa) {
        List<Normal> normal = new ArrayList<>();
        for (Uncertain age : agesKa) {
            if (age.standardDeviation() > 0) {
                normal.add(new Normal(age.mean(), age.standardDeviation()));
            }
        }
        return normal.size() < 2 ? Optional.empty() : Optional.of(new Replicates(normal));
    }

    /** Mean weighted by {@code 1/sigma^2}, and its standard deviation from those spreads alone; no scatter is added. */
    public Normal weightedMeanKa() {
        return weightedMeanKa(0);
    }

    /**
     * Mean weighted by {@code 1/(sigma^2 + overdispersion^2)}, and its standard deviation.
     *
     * @param overdispersionKa scatter of the true ages about their common mean, one standard deviation, 0 or more
     */
    public Normal weightedMeanKa(double overdispersionKa) {
        if (!(overdispersionKa >= 0 && overdispersionKa < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("overdispersionKa must be 0 or more but is " + overdispersionKa);
        }
        double weights = 0;
        double sum = 0;
        for (Normal age : agesKa) {
            double weight = 1 / (age.sigma() * age.sigma() + overdispersionKa * overdispersionKa);
            weights += weight;
            sum += weight * age.mean();
        }
        return new Normal(sum / weights, 1 / Math.sqrt(weights));
    }

    /** Degrees of freedom: one less than the dates. */
    public int degrees() {
        return agesKa.size() - 1;
    }

    /** Sum of squared deviations from the weighted mean, each over its variance. */
    public double chiSquare() {
        return chiSquare(0);
    }

    /** Mean square of weighted deviates: {@code chiSquare / degrees} (Wendt and Carl 1991, Chemical Geology 86, 275-285). */
    public double mswd() {
        return chiSquare() / degrees();
    }

    /** Probability of as large an MSWD by chance if the spreads told all of the scatter, from the exact chi-square law. */
    public double p() {
        return ChiSquaredDistribution.of(degrees()).survivalProbability(chiSquare());
    }

    /**
     * The MSWD that is not exceeded with the given probability if the spreads tell all of the scatter: the exact quantile of
     * chi-square over its degrees of freedom.
     *
     * @param degrees of freedom, 1 or more
     * @param probability strictly between 0 and 1; 0.95 for the usual limit
     */
    public static double mswdLimit(int degrees, double probability) {
        Uncertain.requireProbability(probability);
        if (degrees < 1) {
            throw new IllegalArgumentException("degrees must be 1 or more but are " + degrees);
        }
        return ChiSquaredDistribution.of(degrees).inverseCumulativeProbability(probability) / degrees;
    }

    /**
     * Scatter of the true ages, one standard deviation in ka, that makes the sum of squared deviations, each over its variance
     * and the scatter's, equal to its degrees of freedom; 0 where the spreads suffice (Mandel and Paule 1970, Analytical
     * Chemistry 42, 1194).
     */
    public double overdispersionMandelPauleKa() {
        if (chiSquare() <= degrees()) {
            return 0;
        }
        double low = 0;
        double high = 1;
        while (chiSquare(high) > degrees()) {
            low = high;
            high *= 2;
        }
        double middle = (low + high) / 2;
        while (middle > low && middle < high) {
            if (chiSquare(middle) > degrees()) {
                low = middle;
            } else {
                high = middle;
            }
            middle = (low + high) / 2;
        }
        return middle;
    }

    /** The same scatter estimated in one step from the moments (DerSimonian and Laird 1986, Controlled Clinical Trials 7, 177). */
    public double overdispersionDerSimonianLairdKa() {
        double weights = 0;
        double squares = 0;
        for (Normal age : agesKa) {
            double weight = 1 / (age.sigma() * age.sigma());
            weights += weight;
            squares += weight * weight;
        }
        return Math.sqrt(Math.max(0, (chiSquare() - degrees()) / (weights - squares / weights)));
    }

    /**
     * Mean age of a population of true ages that scatter, the scatter integrated out.
     *
     * @param scatterScaleKa scale of the half-normal prior of the scatter, above 0
     */
    public RandomEffects randomEffects(double scatterScaleKa) {
        return RandomEffects.of(this, scatterScaleKa);
    }

    double chiSquare(double overdispersionKa) {
        double mean = weightedMeanKa(overdispersionKa).mean();
        double sum = 0;
        for (Normal age : agesKa) {
            double deviation = age.mean() - mean;
            sum += deviation * deviation / (age.sigma() * age.sigma() + overdispersionKa * overdispersionKa);
        }
        return sum;
    }
}
