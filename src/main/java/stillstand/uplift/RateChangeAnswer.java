package stillstand.uplift;

import java.util.List;

/**
 * What a flight says under one change of rate.
 *
 * @param recent posterior of the rate since the change; its evidence is that of the whole model
 * @param older posterior of the rate before the change
 * @param changesKa equally probable draws of the age of the change, ka, by rising recent rate
 * @param probabilityFasterBefore probability that the older rate is the higher one
 * @param logEvidenceError standard error of the logarithm of the evidence, from independent scrambles
 * @param effectiveDraws to how many equally weighted draws the weighted ones amount; below 1000 the digits are not safe
 */
public record RateChangeAnswer(
        RatePosterior recent,
        RatePosterior older,
        List<Double> changesKa,
        double probabilityFasterBefore,
        double logEvidenceError,
        double effectiveDraws) {
    public RateChangeAnswer {
        changesKa = List.copyOf(changesKa);
    }

    /** Natural logarithm of the evidence of the model. */
    public double logEvidence() {
        return recent.logEvidence();
    }

    /** Decimal logarithm of the Bayes factor of the change against one constant rate. */
    public double log10BayesFactor(RatePosterior constant) {
        return (logEvidence() - constant.logEvidence()) / Math.log(10);
    }

    /** Age of the change below which the given probability lies, ka. */
    public double changeQuantileKa(double probability) {
        List<Double> sorted = changesKa.stream().sorted().toList();
        return sorted.get((int) Math.min(sorted.size() - 1, Math.floor(probability * sorted.size())));
    }

    /**
     * Whether dates can tell a change of rate from another correlation: some dated level is younger than the change, and some older,
     * at its median. Otherwise a change of rate and a change of pairing are the same thing.
     */
    public boolean datesCanTell(FlightModel model) {
        double changeKa = changeQuantileKa(0.5);
        boolean younger = model.levels().stream()
                .flatMap(level -> level.datesKa().stream())
                .anyMatch(date -> date.mean() < changeKa);
        return younger
                && model.levels().stream()
                        .flatMap(level -> level.datesKa().stream())
                        .anyMatch(date -> date.mean() > changeKa);
    }
}
