package stillstand.uplift;

import java.util.Arrays;
import java.util.List;
import stillstand.uncertainty.Uncertain;

/**
 * Dates of any kind: their product is tabulated on an even grid of ages, each date as its mean density over a grid cell, and
 * integrated against the normal age of the shoreline by the sum over the grid.
 */
final class GriddedDates implements DateKernel {
    private static final int STEPS_PER_SIGMA = 12;
    private static final int MOST_NODES = 8192;

    private final double allWrong;
    private final double firstKa;
    private final double stepKa;
    /** The product less {@link #allWrong}. */
    private final double[] excess;

    GriddedDates(List<Uncertain> datesKa, double durationKa, double wrongProbability, double strayAgeMaximumKa) {
        allWrong = Math.pow(wrongProbability, datesKa.size());
        double spreadKa = durationKa / Math.sqrt(12);
        double low = Double.POSITIVE_INFINITY;
        double high = Double.NEGATIVE_INFINITY;
        double narrowest = Double.POSITIVE_INFINITY;
        for (Uncertain date : datesKa) {
            low = Math.min(low, date.quantile(1e-12));
            high = Math.max(high, date.quantile(1 - 1e-12));
            narrowest = Math.min(narrowest, date.standardDeviation());
        }
        low -= NormalTail.REACH * spreadKa;
        high += NormalTail.REACH * spreadKa;
        int nodes = (int) Math.min(MOST_NODES, Math.ceil((high - low) / (narrowest / STEPS_PER_SIGMA)) + 1);
        stepKa = (high - low) / (nodes - 1);
        firstKa = low;
        excess = new double[nodes];
        Arrays.fill(excess, 1);
        for (Uncertain date : datesKa) {
            double[] density = density(date, spreadKa, nodes);
            for (int k = 0; k < nodes; k++) {
                excess[k] *= (1 - wrongProbability) * strayAgeMaximumKa * density[k] + wrongProbability;
            }
        }
        for (int k = 0; k < nodes; k++) {
            excess[k] -= allWrong;
        }
    }

    private double[] density(Uncertain date, double spreadKa, int nodes) {
        double[] own = new double[nodes];
        double before = date.cumulativeProbability(firstKa - stepKa / 2);
        for (int k = 0; k < nodes; k++) {
            double until = date.cumulativeProbability(firstKa + (k + 0.5) * stepKa);
            own[k] = (until - before) / stepKa;
            before = until;
        }
        if (spreadKa == 0) {
            return own;
        }
        int reach = (int) Math.ceil(NormalTail.REACH * spreadKa / stepKa);
        double[] weights = new double[reach + 1];
        for (int k = 0; k <= reach; k++) {
            weights[k] = NormalTail.between((k - 0.5) * stepKa / spreadKa, (k + 0.5) * stepKa / spreadKa);
        }
        double[] smooth = new double[nodes];
        for (int k = 0; k < nodes; k++) {
            for (int other = Math.max(0, k - reach); other <= Math.min(nodes - 1, k + reach); other++) {
                smooth[k] += own[other] * weights[Math.abs(k - other)];
            }
        }
        return smooth;
    }

    @Override
    public void multiply(
            double[] values,
            int from,
            int to,
            double firstMeanKa,
            double stepMeanKa,
            double varianceKa2,
            double[] scratch) {
        for (int c = from; c <= to; c++) {
            sums(firstMeanKa + (c - from) * stepMeanKa, varianceKa2, scratch);
            values[c] *= allWrong + scratch[0];
        }
    }

    @Override
    public void ageMoments(double meanKa, double varianceKa2, double[] out) {
        double[] sums = new double[3];
        sums(meanKa, varianceKa2, sums);
        double weight = allWrong + sums[0];
        if (!(weight > 0)) {
            out[0] = meanKa;
            out[1] = meanKa * meanKa + varianceKa2;
            return;
        }
        out[0] = (allWrong * meanKa + sums[1]) / weight;
        out[1] = (allWrong * (meanKa * meanKa + varianceKa2) + sums[2]) / weight;
    }

    @Override
    public double drawAgeKa(double meanKa, double varianceKa2, double choice, double normal) {
        double[] sums = new double[3];
        sums(meanKa, varianceKa2, sums);
        double left = choice * (allWrong + sums[0]) - allWrong;
        double sigma = Math.sqrt(varianceKa2);
        if (left <= 0 || sigma < stepKa) {
            return meanKa + sigma * normal;
        }
        double scale = stepKa / (sigma * Math.sqrt(2 * Math.PI));
        for (int k = 0; k < excess.length; k++) {
            double ageKa = firstKa + k * stepKa;
            double d = ageKa - meanKa;
            double part = excess[k] * Math.exp(-d * d / (2 * varianceKa2)) * scale;
            if (part >= left) {
                return ageKa + (left / part - 0.5) * stepKa;
            }
            left -= part;
        }
        return meanKa + sigma * normal;
    }

    /** Integrals of 1, t and t^2 times the excess and the normal density. */
    private void sums(double meanKa, double varianceKa2, double[] sums) {
        double sigma = Math.sqrt(varianceKa2);
        double place = (meanKa - firstKa) / stepKa;
        sums[0] = 0;
        sums[1] = 0;
        sums[2] = 0;
        if (sigma < stepKa) {
            int k = (int) Math.floor(place);
            if (k >= 0 && k < excess.length - 1) {
                sums[0] = excess[k] + (place - k) * (excess[k + 1] - excess[k]);
                sums[1] = sums[0] * meanKa;
                sums[2] = sums[0] * (meanKa * meanKa + varianceKa2);
            }
            return;
        }
        int first = (int) Math.max(0, Math.ceil(place - NormalTail.REACH * sigma / stepKa));
        int last = (int) Math.min(excess.length - 1, Math.floor(place + NormalTail.REACH * sigma / stepKa));
        double scale = stepKa / (sigma * Math.sqrt(2 * Math.PI));
        double d = firstKa + first * stepKa - meanKa;
        double value = Math.exp(-d * d / (2 * varianceKa2));
        double ratio = Math.exp(-(2 * d * stepKa + stepKa * stepKa) / (2 * varianceKa2));
        double curve = Math.exp(-stepKa * stepKa / varianceKa2);
        for (int k = first; k <= last; k++) {
            double part = excess[k] * value * scale;
            double ageKa = firstKa + k * stepKa;
            sums[0] += part;
            sums[1] += part * ageKa;
            sums[2] += part * ageKa * ageKa;
            value *= ratio;
            ratio *= curve;
        }
    }
}
