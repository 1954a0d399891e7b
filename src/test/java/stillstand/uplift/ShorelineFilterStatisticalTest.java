package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Set;
import java.util.stream.Stream;
import org.apache.commons.rng.UniformRandomProvider;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.LogNormal;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.StandardNormal;
import stillstand.uncertainty.Uniform;

/**
 * The evidence against a plain simulation of the model: histories of sea level drawn one by one, survivors found by looking, each
 * history's probability of leaving the flight summed over its pairings. 100,000 histories a case; 4 standard errors: a
 * right filter fails once in 16,000 seeds a case; the seed is fixed.
 */
class ShorelineFilterStatisticalTest {
    private static final int HISTORIES = 100_000;
    private static final double RATE = 0.25;
    private static final SharedNumbers SHARED = new SharedNumbers(2, -4, 1.5, 0.7, 400, 0.8);
    private static final List<FlightRow> ROWS = List.of(
            new FlightRow("1", 6, 0.5, 1, 1, 0.2, 4, 1, false, false, false),
            new FlightRow("5c", 100, 2.5, -12, 5, -4, 6, 0.8, true, true, true),
            new FlightRow("5e", 122, 2, 5, 2.5, 2, 13, 0.9, true, false, false),
            new FlightRow("7", 200, 3.5, -8, 6, 6, 6, 0.6, true, false, true));

    static Stream<List<FlightLevel>> flights() {
        return Stream.of(
                List.of(
                        FlightLevel.undated("1", new Normal(4, 1.5)),
                        FlightLevel.dated("2", new Normal(33, 2), List.of(new Normal(119, 3), new Normal(180, 5))),
                        FlightLevel.dated("3", new Normal(42, 2), List.of(new Normal(190, 12)))),
                List.of(
                        FlightLevel.undated("skewed", new LogNormal(2, 4, 0.6)).doubtful(5),
                        FlightLevel.dated("one-sided", new Uniform(30, 40), List.of(new Uniform(110, 130)))),
                List.of(FlightLevel.undated("pinned", new Normal(35, 3))
                        .onlyRows(Set.of(2))
                        .neverStray()));
    }

    @ParameterizedTest
    @MethodSource("flights")
    void evidenceIsThatOfSimulatedHistories(List<FlightLevel> levels) {
        FlightModel model = new FlightModel(levels, ROWS, -5, 90, 1000, 0.05, true, true);
        double logEvidence = ShorelineFilter.richardson(filter(model, 200), filter(model, 400));
        UniformRandomProvider random = new DrawStreams(7).stream("simulation", 0);
        double sum = 0;
        double squares = 0;
        for (int k = 0; k < HISTORIES; k++) {
            double probability = simulate(model, random);
            sum += probability;
            squares += probability * probability;
        }
        double mean = sum / HISTORIES;
        double error = Math.sqrt((squares / HISTORIES - mean * mean) / HISTORIES);
        double found = Math.exp(logEvidence);
        assertTrue(error < 0.03 * mean, "simulation too coarse: " + mean + " +- " + error);
        assertTrue(Math.abs(found - mean) < 4 * error, found + " for " + mean + " +- " + error);
    }

    private static double filter(FlightModel model, int cells) {
        ShorelineFilter filter = new ShorelineFilter(model, cells);
        return filter.logEvidence(new UpliftHistory.ConstantRate(RATE), SHARED, filter.workspace(false));
    }

    /** One history; returns the probability density of the flight given it. */
    private static double simulate(FlightModel model, UniformRandomProvider random) {
        int n = model.levels().size();
        double[] used = new double[n + 1];
        used[0] = 1;
        double highest = 0;
        for (int j = 0; j < ROWS.size(); j++) {
            FlightRow row = ROWS.get(j);
            if (random.nextDouble() >= row.existence()) {
                continue;
            }
            double correlation = row.levelAgeCovarianceMetresKa() / (row.ageSigmaKa() * row.levelSigmaMetres());
            double first = normal(random);
            double second = correlation * first + Math.sqrt(1 - correlation * correlation) * normal(random);
            double ageKa = row.ageKa() + (row.takesCurveAge() ? 1.5 : 0) + row.ageSigmaKa() * first;
            double levelMetres = row.levelMetres()
                    + (row.takesOffset() ? 2 : 0)
                    - (row.takesInterstadial() ? 4 : 0)
                    + row.levelSigmaMetres() * second;
            double stands = levelMetres + RATE * ageKa;
            if (stands <= highest) {
                continue;
            }
            highest = stands;
            if (stands < 90) {
                double q = 0.7 * Math.exp(-row.ageKa() / 400);
                used = record(model, used, j, stands, ageKa, q);
            }
        }
        double total = 0;
        for (int l = 0; l <= n; l++) {
            double rest = used[l];
            for (int i = l; i < n; i++) {
                rest *= stray(model.levels().get(i));
            }
            total += rest;
        }
        return total * Math.exp(-0.8);
    }

    private static double[] record(FlightModel model, double[] used, int j, double stands, double ageKa, double q) {
        double[] after = new double[used.length];
        for (int l = 0; l < used.length; l++) {
            after[l] += used[l] * (1 - q);
            double strays = 1;
            for (int i = l; i < used.length - 1; i++) {
                FlightLevel level = model.levels().get(i);
                if (level.mayBeRow(j)) {
                    after[i + 1] += used[l] * strays * q * likelihood(level, ROWS.get(j), stands, ageKa);
                }
                strays *= stray(level);
            }
        }
        return after;
    }

    private static double stray(FlightLevel level) {
        return level.mayBeStray()
                ? 0.8
                        / 95
                        * level.strayFactor()
                        * Math.pow(1e-3, level.datesKa().size())
                : 0;
    }

    private static double likelihood(FlightLevel level, FlightRow row, double stands, double ageKa) {
        double likelihood = level.shorelineMetres().density(stands);
        double spread = row.durationKa() / Math.sqrt(12);
        for (var date : level.datesKa()) {
            double right = date instanceof Uniform uniform
                    ? (StandardNormal.cumulativeProbability((uniform.high() - ageKa) / spread)
                                    - StandardNormal.cumulativeProbability((uniform.low() - ageKa) / spread))
                            / (uniform.high() - uniform.low())
                    : new Normal(date.mean(), Math.hypot(date.standardDeviation(), spread)).density(ageKa);
            likelihood *= 0.95 * right + 0.05 / 1000;
        }
        return likelihood;
    }

    private static double normal(UniformRandomProvider random) {
        return StandardNormal.quantile(((random.nextLong() >>> 12) + 0.5) * 0x1p-52);
    }
}
