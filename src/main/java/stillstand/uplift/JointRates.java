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
    private final double logEvidence;

    JointRates(
            List<ComparedSite> sites,
            double[][] rates,
            boolean[][] counts,
            Optional<Double> effectiveFraction,
            double logEvidence) {
        this.sites = List.copyOf(sites);
        this.rates = rates;
        this.counts = counts;
        this.effectiveFraction = effectiveFraction;
        this.logEvidence = logEvidence;
    }

    /**
     * Draws of the same sites under several curves, mixed by weight times evidence: of each part as many as that gives, evenly from
     * all of its draws.
     */
    static JointRates mixed(List<JointRates> parts, List<Double> weights) {
        if (parts.size() == 1) {
            return parts.get(0);
        }
        double highest =
                parts.stream().mapToDouble(part -> part.logEvidence).max().orElseThrow();
        double[] share = new double[parts.size()];
        double total = 0;
        for (int k = 0; k < share.length; k++) {
            share[k] = weights.get(k) * Math.exp(parts.get(k).logEvidence - highest);
            total += share[k];
        }
        double most = Double.POSITIVE_INFINITY;
        for (int k = 0; k < share.length; k++) {
            share[k] /= total;
            most = share[k] > 0 ? Math.min(most, parts.get(k).draws() / share[k]) : most;
        }
        int[] taken = new int[share.length];
        int draws = 0;
        for (int k = 0; k < share.length; k++) {
            taken[k] = (int) Math.min(parts.get(k).draws(), Math.round(most * share[k]));
            draws += taken[k];
        }
        int sites = parts.get(0).sites.size();
        double[][] rates = new double[sites][draws];
        boolean[][] counts = new boolean[sites][draws];
        Optional<Double> least = Optional.empty();
        int at = 0;
        for (int k = 0; k < share.length; k++) {
            JointRates part = parts.get(k);
            for (int i = 0; i < taken[k]; i++, at++) {
                int from = (int) ((i + 0.5) * part.draws() / taken[k]);
                for (int s = 0; s < sites; s++) {
                    rates[s][at] = part.rates[s][from];
                    counts[s][at] = part.counts[s][from];
                }
            }
            if (part.effectiveFraction.isPresent() && taken[k] > 0) {
                least = Optional.of(Math.min(least.orElse(1.0), part.effectiveFraction.get()));
            }
        }
        return new JointRates(parts.get(0).sites, rates, counts, least, highest + Math.log(total));
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
