package stillstand.uplift;

import java.util.List;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Uncertain;

/**
 * Normal dates of a level: the product of the mixtures is expanded, each subset of right dates being a product of normals, so
 * itself a normal in the age times a constant.
 */
final class NormalDates implements DateKernel {
    private static final double NEGLIGIBLE = -60;

    private final double allWrong;
    private final int subsets;
    private final double[] logFactor;
    private final double[] centreKa;
    private final double[] ownVarianceKa2;

    NormalDates(List<Uncertain> datesKa, double durationKa, double wrongProbability, double strayAgeMaximumKa) {
        int dates = datesKa.size();
        allWrong = Math.pow(wrongProbability, dates);
        int all = 1 << dates;
        logFactor = new double[all];
        centreKa = new double[all];
        ownVarianceKa2 = new double[all];
        int kept = 0;
        for (int subset = wrongProbability > 0 ? 1 : all - 1; subset < all; subset++) {
            double precision = 0;
            double weighted = 0;
            double squares = 0;
            double log = 0;
            for (int k = 0; k < dates; k++) {
                if ((subset >> k & 1) == 0) {
                    log += Math.log(wrongProbability);
                    continue;
                }
                Normal date = (Normal) datesKa.get(k);
                double variance = date.sigma() * date.sigma() + durationKa * durationKa / 12;
                precision += 1 / variance;
                weighted += date.mean() / variance;
                squares += date.mean() * date.mean() / variance;
                log += Math.log1p(-wrongProbability)
                        + Math.log(strayAgeMaximumKa)
                        - Math.log(2 * Math.PI * variance) / 2;
            }
            double centre = weighted / precision;
            logFactor[kept] = log + Math.log(2 * Math.PI / precision) / 2 - (squares - centre * weighted) / 2;
            centreKa[kept] = centre;
            ownVarianceKa2[kept] = 1 / precision;
            kept++;
        }
        subsets = kept;
    }

    @Override
    public void multiply(
            double[] values,
            int from,
            int to,
            double firstMeanKa,
            double stepKa,
            double varianceKa2,
            double[] scratch) {
        for (int c = from; c <= to; c++) {
            scratch[c] = allWrong;
        }
        double floor = allWrong > 0 ? Math.log(allWrong) + NEGLIGIBLE : -745;
        for (int i = 0; i < subsets; i++) {
            double total = varianceKa2 + ownVarianceKa2[i];
            double log = logFactor[i] - Math.log(2 * Math.PI * total) / 2;
            addBell(scratch, from, to, firstMeanKa - centreKa[i], stepKa, total, log, floor);
        }
        for (int c = from; c <= to; c++) {
            values[c] *= scratch[c];
        }
    }

    /**
     * Adds {@code exp(log - d^2 / (2 variance))}, d running evenly from {@code d0} by {@code step}: from the cell nearest the
     * peak outward, each value the one before times a ratio that itself changes by a constant factor.
     */
    private static void addBell(
            double[] out, int from, int to, double d0, double step, double variance, double log, double floor) {
        double nearest = step == 0 ? 0 : Math.min(to - from, Math.max(0, -d0 / step));
        int peak = from + (int) (nearest + 0.5);
        double d = d0 + (peak - from) * step;
        double highest = log - d * d / (2 * variance);
        if (highest < floor) {
            return;
        }
        double value = Math.exp(highest);
        double curve = Math.exp(-step * step / variance);
        double up = Math.exp(-(2 * d * step + step * step) / (2 * variance));
        double running = value;
        for (int c = peak; c <= to; c++) {
            out[c] += running;
            running *= up;
            up *= curve;
        }
        double down = Math.exp((2 * d * step - step * step) / (2 * variance));
        running = value * down;
        down *= curve;
        for (int c = peak - 1; c >= from; c--) {
            out[c] += running;
            running *= down;
            down *= curve;
        }
    }

    @Override
    public void ageMoments(double meanKa, double varianceKa2, double[] out) {
        double weight = allWrong;
        double first = allWrong * meanKa;
        double second = allWrong * (meanKa * meanKa + varianceKa2);
        for (int i = 0; i < subsets; i++) {
            double total = varianceKa2 + ownVarianceKa2[i];
            double d = meanKa - centreKa[i];
            double part = Math.exp(logFactor[i] - Math.log(2 * Math.PI * total) / 2 - d * d / (2 * total));
            double mean = meanKa - varianceKa2 / total * d;
            double variance = varianceKa2 * ownVarianceKa2[i] / total;
            weight += part;
            first += part * mean;
            second += part * (mean * mean + variance);
        }
        out[0] = weight > 0 ? first / weight : meanKa;
        out[1] = weight > 0 ? second / weight : meanKa * meanKa + varianceKa2;
    }

    @Override
    public double drawAgeKa(double meanKa, double varianceKa2, double choice, double normal) {
        double[] parts = new double[subsets];
        double sum = allWrong;
        for (int i = 0; i < subsets; i++) {
            double total = varianceKa2 + ownVarianceKa2[i];
            double d = meanKa - centreKa[i];
            parts[i] = Math.exp(logFactor[i] - Math.log(2 * Math.PI * total) / 2 - d * d / (2 * total));
            sum += parts[i];
        }
        double left = choice * sum - allWrong;
        for (int i = 0; i < subsets && left > 0; i++) {
            left -= parts[i];
            if (left <= 0) {
                double total = varianceKa2 + ownVarianceKa2[i];
                double mean = meanKa - varianceKa2 / total * (meanKa - centreKa[i]);
                return mean + Math.sqrt(varianceKa2 * ownVarianceKa2[i] / total) * normal;
            }
        }
        return meanKa + Math.sqrt(varianceKa2) * normal;
    }
}
