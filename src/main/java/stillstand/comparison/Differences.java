package stillstand.comparison;

import java.util.Arrays;
import java.util.Optional;
import stillstand.uncertainty.DrawDistribution;
import stillstand.uncertainty.DrawHistogram;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.SortedDraws;
import stillstand.uplift.JointRates;
import stillstand.uplift.Quantity;
import stillstand.uplift.Rate;
import stillstand.uplift.SitesTogether;

/** Differences between sites, from joint draws. */
final class Differences {
    /** Points of a lattice over two rates that are taken for independent: the second number has no factor in common with the first. */
    private static final int LATTICE = 4096;

    private static final int STRIDE = 1581;

    private final JointRates joint;
    private final boolean withDensity;
    private final String shared;

    /** @param withDensity whether differences carry a density for figures */
    Differences(JointRates joint, boolean withDensity) {
        this.joint = joint;
        this.withDensity = withDensity;
        shared = SitesTogether.sharesLocalSea(joint.sites()) ? SiteComparison.ONE_COAST : SiteComparison.TWO_COASTS;
    }

    /**
     * One difference; absent where no draw counts at both sites.
     *
     * @param a number of one site among the draws, {@code b} of the other
     * @param aAlone its rate by itself, {@code bAlone} the other's
     */
    Optional<SiteComparison> between(int a, int b, RateByItself aAlone, RateByItself bAlone) {
        int n = 0;
        double[] differences = new double[joint.draws()];
        double[] sums = new double[5];
        int faster = 0;
        for (int k = 0; k < joint.draws(); k++) {
            if (joint.counts(a, k) && joint.counts(b, k)) {
                double x = joint.rateMetresPerKyr(a, k);
                double y = joint.rateMetresPerKyr(b, k);
                sums[0] += x;
                sums[1] += y;
                sums[2] += x * x;
                sums[3] += y * y;
                sums[4] += x * y;
                faster += x > y ? 1 : 0;
                differences[n++] = x - y;
            }
        }
        if (n == 0) {
            return Optional.empty();
        }
        boolean hasMean =
                aAlone.rate().mean().isPresent() && bAlone.rate().mean().isPresent();
        return Optional.of(new SiteComparison(
                joint.sites().get(a).site(),
                joint.sites().get(b).site(),
                joint.sites().get(a).level(),
                joint.sites().get(b).level(),
                rate(Arrays.copyOf(differences, n), hasMean),
                (double) faster / n,
                hasMean ? correlation(sums, n) : Optional.empty(),
                independent(aAlone, bAlone),
                shared,
                joint.effectiveFraction()));
    }

    private static Optional<Double> correlation(double[] sums, int n) {
        double covariance = sums[4] / n - sums[0] / n * sums[1] / n;
        double product = (sums[2] / n - sums[0] / n * sums[0] / n) * (sums[3] / n - sums[1] / n * sums[1] / n);
        return product > 0 ? Optional.of(Math.max(-1, Math.min(1, covariance / Math.sqrt(product)))) : Optional.empty();
    }

    private Rate rate(double[] differences, boolean hasMean) {
        DrawHistogram draws = DrawHistogram.forDrawsLike(
                SortedDraws.of(Arrays.copyOf(differences, Math.min(differences.length, LATTICE))));
        draws.add(differences);
        Rate rate = Rate.of(draws.distribution(), hasMean);
        return withDensity
                ? rate
                : new Rate(
                        rate.median(),
                        rate.mean(),
                        rate.sd(),
                        rate.interval68(),
                        rate.interval95(),
                        rate.shortest68(),
                        rate.shortest95(),
                        Optional.empty(),
                        rate.unit());
    }

    private static SiteComparison.Independent independent(RateByItself a, RateByItself b) {
        double[] differences = new double[LATTICE];
        int faster = 0;
        for (int k = 0; k < LATTICE; k++) {
            double first = a.quantile((k + 0.5) / LATTICE);
            double second = b.quantile(((long) k * STRIDE % LATTICE + 0.5) / LATTICE);
            differences[k] = first - second;
            faster += first > second ? 1 : 0;
        }
        SortedDraws sorted = SortedDraws.of(differences);
        Optional<Double> mean = a.rate().mean().flatMap(x -> b.rate().mean().map(y -> x - y));
        Optional<Double> sd = a.rate().sd().flatMap(x -> b.rate().sd().map(y -> Math.hypot(x, y)));
        return new SiteComparison.Independent(
                new Quantity(
                        sorted.quantile(0.5),
                        mean,
                        sd,
                        between(sorted, Interval.PROBABILITY_68),
                        between(sorted, Interval.PROBABILITY_95),
                        Rate.UNIT),
                (double) faster / LATTICE);
    }

    private static Interval between(SortedDraws draws, double probability) {
        return new Interval(draws.quantile((1 - probability) / 2), draws.quantile((1 + probability) / 2));
    }

    /** Draws of one number, summed up. */
    static Quantity quantity(double[] draws) {
        DrawHistogram histogram = DrawHistogram.forDrawsLike(draws.clone());
        histogram.add(draws);
        DrawDistribution distribution = histogram.distribution();
        return Quantity.of(distribution.summary(), Rate.UNIT);
    }
}
