package stillstand.uplift;

import stillstand.uncertainty.StandardNormal;

/**
 * The shared numbers as a function of independent standard normal scores, one for each number that is not known. Quantiles that are
 * slow to work out are read off a table, linear between nodes 0.01 of a score apart.
 */
final class SharedScores {
    private static final double REACH = 6;
    private static final double STEP = 0.01;

    private final SharedPriors priors;
    private final double[] recording;
    private final double[] strays;

    SharedScores(SharedPriors priors) {
        this.priors = priors;
        int count = (int) Math.round(2 * REACH / STEP) + 1;
        recording = new double[priors.recording() instanceof SharedPriors.Recording.Known ? 0 : count];
        strays = new double[priors.strays() instanceof SharedPriors.Strays.Known ? 0 : count];
        for (int k = 0; k < recording.length; k++) {
            recording[k] = priors.recording().quantile(probability(k * STEP - REACH));
        }
        for (int k = 0; k < strays.length; k++) {
            strays[k] = priors.strays().quantile(probability(k * STEP - REACH));
        }
    }

    /** How many scores there are. */
    int dimensions() {
        return (priors.offsetSigmaMetres() > 0 ? 1 : 0)
                + (priors.interstadialSigmaMetres() > 0 ? 1 : 0)
                + (priors.ageShiftSigmaKa() > 0 ? 1 : 0)
                + (recording.length > 0 ? 1 : 0)
                + (priors.decaysKa().size() > 1 ? 1 : 0)
                + (strays.length > 0 ? 1 : 0);
    }

    /** The numbers of the scores that begin at {@code from}. */
    SharedNumbers at(double[] scores, int from) {
        int k = from;
        double offset = priors.offsetSigmaMetres() > 0 ? priors.offsetSigmaMetres() * scores[k++] : 0;
        double interstadial = priors.interstadialSigmaMetres() > 0 ? priors.interstadialSigmaMetres() * scores[k++] : 0;
        double shift = priors.ageShiftSigmaKa() > 0 ? priors.ageShiftSigmaKa() * scores[k++] : 0;
        double recorded = recording.length > 0
                ? read(recording, scores[k++])
                : priors.recording().quantile(0.5);
        int decays = priors.decaysKa().size();
        int decay = decays > 1 ? (int) Math.min(decays - 1, probability(scores[k++]) * decays) : 0;
        double stray =
                strays.length > 0 ? read(strays, scores[k]) : priors.strays().quantile(0.5);
        return new SharedNumbers(
                offset, interstadial, shift, recorded, priors.decaysKa().get(decay), stray);
    }

    private static double read(double[] table, double score) {
        double at = Math.min(table.length - 1.000001, Math.max(0, (score + REACH) / STEP));
        int k = (int) at;
        return table[k] + (at - k) * (table[k + 1] - table[k]);
    }

    private static double probability(double score) {
        return StandardNormal.cumulativeProbability(score);
    }
}
