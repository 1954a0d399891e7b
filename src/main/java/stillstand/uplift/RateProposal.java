package stillstand.uplift;

import java.util.List;
import stillstand.uncertainty.DensityBins;

/**
 * Where rates of a flight are drawn that is weighed together with others: half from its density by itself, three tenths from the
 * root of that, a fifth evenly over its range and a little beyond.
 */
final class RateProposal {
    private static final double ROOT = 0.3;
    private static final double FLAT = 0.2;
    private static final double WING = 0.25;

    private final double from;
    private final double width;
    private final double[] density;
    private final double[] upTo;

    private RateProposal(double from, double width, double[] share) {
        this.from = from;
        this.width = width;
        density = new double[share.length];
        upTo = new double[share.length + 1];
        for (int bin = 0; bin < share.length; bin++) {
            density[bin] = share[bin] / width;
            upTo[bin + 1] = upTo[bin] + share[bin];
        }
    }

    /** About the rate of a flight by itself, inside the range of its prior. */
    static RateProposal about(Rate alone, RatePrior prior) {
        DensityBins bins = alone.density()
                .orElseThrow(() -> new IllegalArgumentException("the rate of a flight must have a density"));
        List<Double> values = bins.values();
        double width = (bins.to() - bins.from()) / values.size();
        int wing = (int) Math.ceil(WING * values.size());
        int low = (int) Math.min(wing, Math.max(0, Math.floor((bins.from() - prior.fromMetresPerKyr()) / width)));
        int high = (int) Math.min(wing, Math.max(0, Math.floor((prior.toMetresPerKyr() - bins.to()) / width)));
        int count = low + values.size() + high;
        double whole = 0;
        double root = 0;
        for (double value : values) {
            whole += value;
            root += Math.sqrt(value);
        }
        double[] share = new double[count];
        for (int bin = 0; bin < count; bin++) {
            boolean inside = bin >= low && bin < low + values.size();
            double value = inside ? values.get(bin - low) : 0;
            share[bin] = (1 - ROOT - FLAT) * value / whole + ROOT * Math.sqrt(value) / root + FLAT / count;
        }
        return new RateProposal(bins.from() - low * width, width, share);
    }

    /** The rate below which a draw lies with this probability, m/kyr. */
    double quantile(double probability) {
        int low = 0;
        int high = density.length - 1;
        double target = probability * upTo[density.length];
        while (low < high) {
            int middle = (low + high) >>> 1;
            if (upTo[middle + 1] < target) {
                low = middle + 1;
            } else {
                high = middle;
            }
        }
        double part = (target - upTo[low]) / (upTo[low + 1] - upTo[low]);
        return from + (low + Math.min(1, Math.max(0, part))) * width;
    }

    /** Density of the draws at a rate between the ends. */
    double density(double rateMetresPerKyr) {
        int bin = (int) ((rateMetresPerKyr - from) / width);
        return density[Math.min(density.length - 1, Math.max(0, bin))];
    }
}
