package stillstand.uplift;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.sealevel.Highstand;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Interval;

/** What the engine found of a flight, in the form of results: labels for numbers, intervals for densities. */
final class FlightSummary {
    static final double LEAST_PROBABILITY = 1e-4;
    /** A generic older row with less than this of standing in the surveyed range is not worth a line. */
    private static final double LEAST_INSIDE = 0.005;

    private static final int BISECTIONS = 24;

    private static final String OLDER = Highstand.OLDER;
    /** Steps of a rate slid by hand, m/kyr. */
    private static final double SLIDING_STEP = 0.002;

    private final String site;
    private final FlightModel model;
    private final FlightAnswer answer;
    private final JointDraws draws;
    private final List<RowPosition> positions;

    FlightSummary(String site, FlightModel model, FlightAnswer answer, JointDraws draws) {
        this.site = site;
        this.model = model;
        this.answer = answer;
        this.draws = draws;
        positions = model.rows().stream().map(this::position).toList();
    }

    /**
     * Median and half the 68 % interval of where a row's shoreline stands: rates far out in the tails of the posterior would rule
     * a mean and standard deviation.
     */
    private RowPosition position(FlightRow row) {
        RowCells moments = new RowCells(1);
        double[] means = new double[draws.draws().size()];
        double[] sigmas = new double[means.length];
        double low = Double.POSITIVE_INFINITY;
        double high = Double.NEGATIVE_INFINITY;
        for (int k = 0; k < means.length; k++) {
            FlightDraw draw = draws.draws().get(k);
            moments.moments(row, draw.history(), draw.shared());
            means[k] = moments.meanMetres;
            sigmas[k] = Math.max(Math.sqrt(moments.varianceMetres2), 1e-9);
            low = Math.min(low, means[k] - 9 * sigmas[k]);
            high = Math.max(high, means[k] + 9 * sigmas[k]);
        }
        double tail = (1 - Interval.PROBABILITY_68) / 2;
        double width = quantile(1 - tail, means, sigmas, low, high) - quantile(tail, means, sigmas, low, high);
        return new RowPosition(quantile(0.5, means, sigmas, low, high), width / 2);
    }

    private static double quantile(double probability, double[] means, double[] sigmas, double from, double to) {
        double low = from;
        double high = to;
        for (int i = 0; i < BISECTIONS; i++) {
            double middle = (low + high) / 2;
            double below = 0;
            for (int k = 0; k < means.length; k++) {
                below += NormalTail.atMost((middle - means[k]) / sigmas[k]);
            }
            if (below < probability * means.length) {
                low = middle;
            } else {
                high = middle;
            }
        }
        return (low + high) / 2;
    }

    private String level(int i) {
        return model.levels().get(i).name();
    }

    private String stage(int j) {
        return model.rows().get(j).stage();
    }

    /** Most probable first within a level; rows of one label count together. */
    List<FlightResult.Pairing> pairings() {
        List<FlightResult.Pairing> pairings = new ArrayList<>();
        for (int i = 0; i < model.levels().size(); i++) {
            Map<String, Double> byStage = new LinkedHashMap<>();
            for (int j = 0; j < model.rows().size(); j++) {
                byStage.merge(stage(j), answer.pairings().probability(i, j), Double::sum);
            }
            String name = level(i);
            byStage.entrySet().stream()
                    .filter(entry -> entry.getValue() >= LEAST_PROBABILITY)
                    .sorted(Comparator.comparing((Map.Entry<String, Double> entry) -> -entry.getValue()))
                    .forEach(entry ->
                            pairings.add(new FlightResult.Pairing(name, entry.getKey(), rounded(entry.getValue()))));
        }
        return pairings;
    }

    /** Free of the last bits of a sum, which would make a sure pairing look doubtful. */
    static double rounded(double probability) {
        return Math.rint(probability * 1e12) / 1e12;
    }

    List<FlightResult.Unmatched> unmatched() {
        List<FlightResult.Unmatched> unmatched = new ArrayList<>();
        for (int i = 0; i < model.levels().size(); i++) {
            unmatched.add(new FlightResult.Unmatched(
                    level(i), rounded(answer.pairings().stray(i))));
        }
        return unmatched;
    }

    List<FlightResult.PredictedAge> predictedAges() {
        List<FlightResult.PredictedAge> ages = new ArrayList<>();
        for (int i = 0; i < model.levels().size(); i++) {
            String name = level(i);
            answer.ages().get(i).ifPresent(age -> ages.add(new FlightResult.PredictedAge(name, quantity(age))));
        }
        return ages;
    }

    private static Quantity quantity(LevelAge age) {
        return new Quantity(
                age.quantileKa(0.5),
                Optional.of(age.meanKa()),
                Optional.of(age.sigmaKa()),
                tails(age, Interval.PROBABILITY_68),
                tails(age, Interval.PROBABILITY_95),
                "ka");
    }

    private static Interval tails(LevelAge age, double probability) {
        return new Interval(age.quantileKa((1 - probability) / 2), age.quantileKa((1 + probability) / 2));
    }

    List<FlightResult.Fate> fates() {
        PairingTable table = answer.pairings();
        List<FlightResult.Fate> fates = new ArrayList<>();
        for (int j = 0; j < model.rows().size(); j++) {
            FlightRow row = model.rows().get(j);
            if (!row.stage().equals(OLDER) || table.recorded(j) + table.unseen(j) > LEAST_INSIDE) {
                RowPosition position = positions.get(j);
                fates.add(new FlightResult.Fate(
                        row.stage(),
                        row.ageKa(),
                        position.meanMetres(),
                        position.sigmaMetres(),
                        table.recorded(j),
                        table.unseen(j),
                        table.reoccupied(j),
                        table.outside(j),
                        table.absent(j)));
            }
        }
        return fates;
    }

    /** Each level that is rather a shoreline than none, against the highstand that it most probably records. */
    List<LevelResidual> residuals() {
        List<LevelResidual> residuals = new ArrayList<>();
        for (int i = 0; i < model.levels().size(); i++) {
            int best = 0;
            for (int j = 1; j < model.rows().size(); j++) {
                best = answer.pairings().probability(i, j) > answer.pairings().probability(i, best) ? j : best;
            }
            if (answer.pairings().stray(i) < 0.5) {
                RowPosition position = positions.get(best);
                FlightLevel level = model.levels().get(i);
                residuals.add(new LevelResidual(
                        site,
                        level.name(),
                        position.meanMetres(),
                        level.shorelineMetres().mean(),
                        Math.hypot(
                                position.sigmaMetres(), level.shorelineMetres().standardDeviation())));
            }
        }
        return residuals;
    }

    FlightResult.Correlation mostProbable() {
        JointDraws.Correlation first = draws.correlations().get(0);
        List<FlightResult.Match> matches = new ArrayList<>();
        for (int i = 0; i < first.rows().size(); i++) {
            int row = first.rows().get(i);
            matches.add(new FlightResult.Match(level(i), row < 0 ? Optional.empty() : Optional.of(stage(row))));
        }
        return new FlightResult.Correlation(first.share(), matches);
    }

    /** Rates slid by hand over the rows of the table itself, never the generic older ones. */
    List<FlightResult.HandFit> slidingFits(RatePrior prior) {
        List<FlightRow> rows =
                model.rows().stream().filter(row -> !row.stage().equals(OLDER)).toList();
        List<FlightLevel> levels = model.levels().stream()
                .map(level -> FlightLevel.undated(
                        level.name(), new Exact(level.shorelineMetres().mean())))
                .toList();
        double from = prior.toMetresPerKyr() > 0 ? Math.max(0, prior.fromMetresPerKyr()) : prior.fromMetresPerKyr();
        int steps = (int) Math.ceil((prior.toMetresPerKyr() - from) / SLIDING_STEP);
        SlidingFit rms = SlidingFit.leastRms(levels, rows, from, prior.toMetresPerKyr(), steps);
        List<FlightResult.HandFit> fits = new ArrayList<>();
        fits.add(handFit("least rms", rms));
        SlidingFit.largestRSquared(levels, rows, from, prior.toMetresPerKyr(), steps)
                .ifPresent(fit -> fits.add(handFit("largest r squared", fit)));
        return fits;
    }

    private FlightResult.HandFit handFit(String criterion, SlidingFit fit) {
        RatePosterior rate = answer.rate();
        double median = rate.quantile(0.5);
        double distance = Math.abs(fit.rateMetresPerKyr() - median);
        double asFar =
                rate.cumulativeProbability(median - distance) + 1 - rate.cumulativeProbability(median + distance);
        return new FlightResult.HandFit(
                criterion, fit.rateMetresPerKyr(), fit.rmsMetres(), fit.rSquared(), Math.min(1, Math.max(0, asFar)));
    }

    /** Where the 95 % interval holds 0, all one may say is how slow the coast must be. */
    static Optional<LevelAnswer.Bound> bound(Rate rate) {
        Interval interval = rate.interval95();
        return interval.contains(0)
                ? Optional.of(new LevelAnswer.Bound(interval.high(), -interval.low(), Interval.PROBABILITY_95))
                : Optional.empty();
    }
}
