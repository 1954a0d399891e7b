package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.Test;
import stillstand.uncertainty.LogNormal;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.StandardNormal;
import stillstand.uncertainty.Uniform;

/** The recursion against a sum over every set of pairings, written out one by one. */
class SegmentRecursionTest {
    private static final UpliftHistory RATE = new UpliftHistory.ConstantRate(0.4);
    private static final List<FlightRow> ROWS = List.of(
            new FlightRow("a", 81, 1.5, -22, 6, 3, 6, 0.8, true, false, true),
            new FlightRow("b", 122, 2, 5, 2.5, 0, 13, 1, true, false, false),
            new FlightRow("c", 198, 3, -15, 7, -4, 6, 0.9, true, true, true),
            new FlightRow("d", 238, 3, -8, 7, 0, 6, 1, true, false, false),
            new FlightRow("e", 330, 4, 2, 6, 0, 8, 0.6, true, false, true));
    private static final SharedNumbers SHARED = new SharedNumbers(1, -2, 1.5, 0.7, 400, 0.3);

    @Test
    void equalsEnumerationOfNormalLevels() {
        check(List.of(
                FlightLevel.undated("1", new Normal(12, 2)),
                FlightLevel.dated("2", new Normal(52, 2), List.of(new Normal(120, 3))),
                FlightLevel.undated("3", new Normal(86, 2)).doubtful(10)));
    }

    @Test
    void equalsEnumerationOfSkewedAndOneSidedLevelsInDisorder() {
        check(List.of(
                FlightLevel.undated("1", new LogNormal(50, 4, 0.5)),
                FlightLevel.dated("2", new Uniform(46, 54), List.of(new Normal(120, 3), new Normal(190, 3))),
                FlightLevel.undated("3", new Normal(86, 2))));
    }

    @Test
    void equalsEnumerationOfPinnedLevels() {
        check(List.of(
                FlightLevel.undated("1", new Normal(12, 2)),
                FlightLevel.undated("2", new Normal(52, 2))
                        .onlyRows(Set.of(1, 2))
                        .neverStray(),
                FlightLevel.undated("3", new Normal(86, 2)).onlyRows(Set.of(3))));
    }

    private static void check(List<FlightLevel> levels) {
        FlightModel model = new FlightModel(levels, ROWS, -10, 150, 1000, 0.05, true, true);
        SegmentRecursion recursion = new SegmentRecursion(model);
        double[] enumerated = new double[levels.size() * ROWS.size()];
        double evidence = enumerate(model, enumerated);
        assertEquals(Math.log(evidence), recursion.logEvidence(RATE, SHARED), 1e-12);
        double[] pairing = recursion.pairing();
        for (int k = 0; k < pairing.length; k++) {
            assertEquals(enumerated[k] / evidence, pairing[k], 1e-12);
        }
    }

    /** Sums over every order-preserving choice of row (or none) for each level; pairing sums into {@code pairing}. */
    private static double enumerate(FlightModel model, double[] pairing) {
        List<int[]> choices = new ArrayList<>();
        choose(model.levels().size(), new int[0], choices);
        double evidence = 0;
        for (int[] choice : choices) {
            double weight = weight(model, choice);
            evidence += weight;
            for (int i = 0; i < choice.length; i++) {
                if (choice[i] >= 0) {
                    pairing[i * ROWS.size() + choice[i]] += weight;
                }
            }
        }
        return evidence;
    }

    private static void choose(int levels, int[] so, List<int[]> choices) {
        if (so.length == levels) {
            choices.add(so);
            return;
        }
        int last = Arrays.stream(so).max().orElse(-1);
        for (int j = -1; j < ROWS.size(); j++) {
            if (j == -1 || j > last) {
                int[] longer = Arrays.copyOf(so, so.length + 1);
                longer[so.length] = j;
                choose(levels, longer, choices);
            }
        }
    }

    private static double weight(FlightModel model, int[] choice) {
        double weight = Math.exp(-0.3);
        int matched = 0;
        double foot = 0;
        for (int i = 0; i < choice.length; i++) {
            FlightLevel level = model.levels().get(i);
            if (choice[i] < 0) {
                weight *= level.mayBeStray() ? 0.3 * level.strayFactor() / 160 : 0;
                weight *= Math.pow(1e-3, level.datesKa().size());
                continue;
            }
            if (!level.mayBeRow(choice[i])) {
                return 0;
            }
            double height = level.shorelineMetres().mean();
            for (int k = matched; k < choice[i]; k++) {
                double low = below(k, foot);
                double x = ROWS.get(k).existence();
                weight *= 1 - x + x * (low + (1 - q(k)) * Math.max(0, below(k, height) - low));
            }
            weight *= q(choice[i]) * ROWS.get(choice[i]).existence() * likelihood(level, choice[i]);
            matched = choice[i] + 1;
            foot = height;
        }
        for (int k = matched; k < ROWS.size(); k++) {
            double x = ROWS.get(k).existence();
            double between = below(k, 150) - below(k, foot);
            weight *= 1 - x + x * (below(k, foot) + (1 - q(k)) * between + 1 - below(k, 150));
        }
        return weight;
    }

    private static double q(int j) {
        return 0.7 * Math.exp(-ROWS.get(j).ageKa() / 400);
    }

    private static double ageKa(int j) {
        return ROWS.get(j).ageKa() + (ROWS.get(j).takesCurveAge() ? 1.5 : 0);
    }

    private static double mean(int j) {
        return ROWS.get(j).levelMetres() + 1 - (ROWS.get(j).takesInterstadial() ? 2 : 0) + 0.4 * ageKa(j);
    }

    private static double variance(int j) {
        FlightRow row = ROWS.get(j);
        return Math.pow(row.levelSigmaMetres(), 2)
                + Math.pow(0.4 * row.ageSigmaKa(), 2)
                + 0.8 * row.levelAgeCovarianceMetresKa();
    }

    private static double below(int j, double heightMetres) {
        return StandardNormal.cumulativeProbability((heightMetres - mean(j)) / Math.sqrt(variance(j)));
    }

    /** Joint density of height and dates, dates right or wrong in every combination, integrated over the age by fine steps. */
    private static double likelihood(FlightLevel level, int j) {
        FlightRow row = ROWS.get(j);
        double wide = variance(j) + Math.pow(level.shorelineMetres().standardDeviation(), 2);
        double d = level.shorelineMetres().mean() - mean(j);
        double density = new Normal(0, Math.sqrt(wide)).density(d);
        if (level.datesKa().isEmpty()) {
            return density;
        }
        double tau2 = row.ageSigmaKa() * row.ageSigmaKa();
        double covariance = 0.4 * tau2 + row.levelAgeCovarianceMetresKa();
        Normal age = new Normal(ageKa(j) + covariance / wide * d, Math.sqrt(tau2 - covariance * covariance / wide));
        double sum = 0;
        double step = 0.02;
        for (double t = age.mean() - 10 * age.sigma(); t < age.mean() + 10 * age.sigma(); t += step) {
            double product = 1;
            for (var date : level.datesKa()) {
                double sigma = Math.hypot(date.standardDeviation(), row.durationKa() / Math.sqrt(12));
                product *= 0.95 * new Normal(date.mean(), sigma).density(t) + 0.05 / 1000;
            }
            sum += product * age.density(t) * step;
        }
        return density * sum;
    }
}
