package stillstand.uplift;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.function.ToDoubleFunction;

/**
 * Weighted draws of histories and shared numbers from the posterior of one model of the rate through time.
 *
 * @param prior the model
 * @param islands how many independent populations they come from
 * @param draws the draws; their weights are relative
 * @param logEvidence natural logarithm of the model's evidence
 * @param logEvidenceError its standard error
 * @param logAllStray natural logarithm of prior times evidence of "no level is a shoreline"
 * @param coarse the filter they were drawn with
 * @param fine the same with twice as many cells
 */
record HistoryDraws(
        HistoryPrior prior,
        int islands,
        List<Draw> draws,
        double logEvidence,
        double logEvidenceError,
        double logAllStray,
        ShorelineFilter coarse,
        ShorelineFilter fine) {
    /** A draw and its weight. */
    record Draw(ChosenDraws.Chosen chosen, double weight) {
        UpliftHistory history() {
            return chosen.history();
        }
    }

    HistoryDraws {
        draws = List.copyOf(draws);
    }

    /** The same draws with an evidence that is known better. */
    HistoryDraws withLogEvidence(double better, double error) {
        return new HistoryDraws(prior, islands, draws, better, error, logAllStray, coarse, fine);
    }

    double totalWeight() {
        return draws.stream().mapToDouble(Draw::weight).sum();
    }

    /** Distribution of a number that each history has. */
    WeightedRates of(ToDoubleFunction<UpliftHistory> number) {
        return new WeightedRates(
                draws.stream()
                        .mapToDouble(draw -> number.applyAsDouble(draw.history()))
                        .toArray(),
                draws.stream().mapToDouble(Draw::weight).toArray(),
                draws.stream().mapToInt(draw -> draw.chosen().block()).toArray());
    }

    /** Ages of the n-th change, ka, from 0; absent where the model's changes are none or known. */
    Optional<WeightedRates> changesKa(int n) {
        return prior instanceof HistoryPrior.Stepped stepped
                        && n < stepped.changes()
                        && stepped.fromKa() < stepped.toKa()
                ? Optional.of(of(history ->
                        ((UpliftHistory.SteppedRate) history).changesKa().get(n)))
                : Optional.empty();
    }

    /** To how many equally weighted draws these amount, weights alone considered: never more than there are. */
    double effectiveDraws() {
        double[] weights = draws.stream().mapToDouble(Draw::weight).toArray();
        double sum = Arrays.stream(weights).sum();
        return sum * sum / Arrays.stream(weights).map(weight -> weight * weight).sum();
    }
}
