package stillstand.comparison;

import java.util.List;
import stillstand.uncertainty.DensityBins;
import stillstand.uplift.Quantity;
import stillstand.uplift.Rate;

/** A rate as results hold it, read back as a distribution: even inside the bins of its density, what lies beyond at their ends. */
final class RateByItself {
    private final Rate rate;
    private final double from;
    private final double width;
    private final double[] upTo;

    RateByItself(Rate rate) {
        this.rate = rate;
        DensityBins bins = rate.density()
                .orElseGet(() -> new DensityBins(rate.median() - 1e-9, rate.median() + 1e-9, List.of(1.0)));
        int count = bins.values().size();
        from = bins.from();
        width = (bins.to() - bins.from()) / count;
        double inside = bins.values().stream().mapToDouble(value -> value).sum();
        upTo = new double[count + 1];
        upTo[0] = Math.max(0, 1 - inside) / 2;
        for (int bin = 0; bin < count; bin++) {
            upTo[bin + 1] = upTo[bin] + bins.values().get(bin);
        }
    }

    Rate rate() {
        return rate;
    }

    /** Without shape. */
    Quantity quantity() {
        return new Quantity(rate.median(), rate.mean(), rate.sd(), rate.interval68(), rate.interval95(), rate.unit());
    }

    double cumulativeProbability(double value) {
        double at = (value - from) / width;
        if (at < 0) {
            return 0;
        }
        int bin = (int) Math.min(at, upTo.length - 2);
        return at >= upTo.length - 1 ? 1 : upTo[bin] + (at - bin) * (upTo[bin + 1] - upTo[bin]);
    }

    double quantile(double probability) {
        int low = 0;
        int high = upTo.length - 1;
        if (probability <= upTo[0]) {
            return from;
        }
        if (probability >= upTo[high]) {
            return from + high * width;
        }
        while (high - low > 1) {
            int middle = (low + high) >>> 1;
            if (upTo[middle] < probability) {
                low = middle;
            } else {
                high = middle;
            }
        }
        return from + (low + (probability - upTo[low]) / (upTo[high] - upTo[low])) * width;
    }
}
