package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.IntStream;

/**
 * The accounts of sea level under which a site is worked out, each with its weight.
 *
 * @param bases one or more, of different ids
 * @param weights of the bases, each above 0, together 1
 */
public record SeaLevelEnsemble(List<SeaLevelBasis> bases, List<Double> weights) {
    /**
     * Takes weights that need not add up to 1.
     *
     * @throws IllegalArgumentException if there is no basis, their numbers differ, or a weight is not above 0
     */
    public SeaLevelEnsemble {
        bases = List.copyOf(bases);
        if (bases.isEmpty() || bases.size() != weights.size()) {
            throw new IllegalArgumentException("an ensemble needs a weight for each of one or more curves but has "
                    + weights.size() + " for " + bases.size());
        }
        double sum = 0;
        for (double weight : weights) {
            if (!(weight > 0 && weight < Double.POSITIVE_INFINITY)) {
                throw new IllegalArgumentException("weight of a curve must be above 0 but is " + weight);
            }
            sum += weight;
        }
        List<Double> shares = new ArrayList<>();
        for (double weight : weights) {
            shares.add(weight / sum);
        }
        weights = List.copyOf(shares);
    }

    /** One account of sea level alone. */
    public static SeaLevelEnsemble of(SeaLevelBasis basis) {
        return new SeaLevelEnsemble(List.of(basis), List.of(1.0));
    }

    /** How many accounts there are. */
    public int size() {
        return bases.size();
    }

    /** Each account by itself, as an ensemble of one. */
    public List<SeaLevelEnsemble> parts() {
        return bases.stream().map(SeaLevelEnsemble::of).toList();
    }

    /** The same accounts, all alike in weight. */
    public SeaLevelEnsemble equallyWeighted() {
        return new SeaLevelEnsemble(
                bases, IntStream.range(0, bases.size()).mapToObj(i -> 1.0).toList());
    }
}
