package stillstand.uplift;

import java.util.List;
import java.util.Optional;

/**
 * Joint draws of the rates of several sites, m/kyr: the draws of one number belong together, and what sites share is the same in
 * them. All draws are equally probable; a draw of a site may count for nothing (its age lay beyond the curve).
 */
public final class JointRates {
    private final List<ComparedSite> sites;
    private final double[][] rates;
    private final boolean[][] counts;
    private final Optional<Double> effectiveFraction;

    JointRates(
            List<ComparedSite> sites, double[][] rates, boolean[][] counts, Optional<Double> effectiveFraction) {
        this.sites = List.copyOf(sites);
        this.rates = rates;
        this.counts = counts;
        this.effectiveFraction = effectiveFraction;
    }

    /** The sites, in the order of the draws' first index. */
    public List<ComparedSite> sites() {
        return sites;
    }

    /** How many draws there are. */
    public int draws() {
        return rates[0].length;
    }

    /** Rate of a site in a draw, m/kyr; means nothing where {@link #counts} is false. */
    public double rateMetresPerKyr(int site, int draw) {
        return rates[site][draw];
    }

    /** Whether the draw of a site counts. */
    public boolean counts(int site, int draw) {
        return counts[site][draw];
    }

    /**
     * Where sites were conditioned on each other one by one, the smallest part of the draws that stayed effective in a step: (sum
     * of weights)^2 over number times sum of squares; absent for common draws, which have no weights.
     */
    public Optional<Double> effectiveFraction() {
        return effectiveFraction;
    }
}
