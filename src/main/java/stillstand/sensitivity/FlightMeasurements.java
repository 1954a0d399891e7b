package stillstand.sensitivity;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.sensitivity.NextMeasurement.Kind;
import stillstand.uncertainty.DrawStreams;
import stillstand.uplift.FlightDraw;
import stillstand.uplift.FlightLevel;
import stillstand.uplift.FlightModel;
import stillstand.uplift.RatePosterior;
import stillstand.uplift.RatePrior;
import stillstand.uplift.SharedPriors;
import stillstand.uplift.WeighedDraw;
import stillstand.uplift.WhatIfPoints;

/**
 * What to measure next on a flight: every level dated, surveyed again or better understood, ranked by the expected width of the
 * rate's 95 % interval. Joint draws of rate, shared numbers, correlation, true heights and ages are made once and weighed again
 * for each result that a measurement may have.
 *
 * <p>Survey and the rest of a shoreline's height are taken as normal: with standard deviations s and o, a shoreline drawn at p and a
 * height measured at z, the landform's own height is normal with variance 1 / (1 / s^2 + 1 / o^2), and a second survey adds its own.
 */
final class FlightMeasurements {
    private static final int SCRAMBLES = 16;
    private static final int POINTS = 512;
    private static final int OUTCOMES = 320;
    private static final int FEWEST_CELLS = 100;
    private static final int MOST_CELLS = 400;
    /** Halves a standard deviation: 1 / (1 + 3) of the variance is left. */
    private static final double HALVING = 1 / Math.sqrt(3);

    private final String site;
    private final FlightModel model;
    /** By level of the model, one standard deviation of the survey of its height, m. */
    private final double[] surveySigmaMetres;

    private final DrawStreams streams;
    private final RunMonitor monitor;
    private final List<WeighedDraw> given;
    private final RateDraws draws;

    /**
     * @param site its name
     * @param model the flight
     * @param surveySigmaMetres by level of the model, one standard deviation of the survey of its height, m, 0 or more
     * @param whole posterior of the rate
     * @throws RunCancelledException if the monitor asks to stop
     */
    FlightMeasurements(
            String site,
            FlightModel model,
            List<Double> surveySigmaMetres,
            RatePosterior whole,
            RatePrior prior,
            SharedPriors shared,
            DrawStreams streams,
            RunMonitor monitor) {
        this.site = site;
        this.model = model;
        this.surveySigmaMetres = surveySigmaMetres.stream().mapToDouble(s -> s).toArray();
        this.streams = streams;
        this.monitor = monitor;
        String key = "next measurement of " + site;
        WhatIfPoints points = new WhatIfPoints(whole, prior, shared, SCRAMBLES, POINTS, streams, key);
        given = points.draws(model, cells(), streams.stream(key + " correlations", 0), monitor);
        draws = rateDraws();
    }

    /** Half the narrowest standard deviation of a height, as far as that is affordable. */
    private int cells() {
        double narrowest = model.levels().stream()
                .mapToDouble(level -> level.shorelineMetres().standardDeviation())
                .min()
                .orElse(1);
        double wanted = 2 * (model.surveyedToMetres() - model.lowestRecordedMetres()) / narrowest;
        return (int) Math.min(MOST_CELLS, Math.max(FEWEST_CELLS, Math.ceil(wanted)));
    }

    private RateDraws rateDraws() {
        int count = given.size();
        double[] rates = new double[count];
        double[] weights = new double[count];
        int[] blocks = new int[count];
        int[][] readings = new int[model.levels().size()][count];
        Map<String, Integer> numbers = new TreeMap<>();
        for (int k = 0; k < count; k++) {
            WeighedDraw weighed = given.get(k);
            rates[k] = weighed.draw().rateMetresPerKyr();
            weights[k] = weighed.weight();
            blocks[k] = weighed.block();
            for (int i = 0; i < readings.length; i++) {
                String stage = weighed.draw()
                        .matches()
                        .get(i)
                        .map(match -> "at " + model.rows().get(match.row()).stage())
                        .orElse("none");
                Integer number = numbers.computeIfAbsent(stage, unknown -> numbers.size());
                readings[i][k] = number;
            }
        }
        return new RateDraws(rates, weights, blocks, SCRAMBLES, readings, numbers.size());
    }

    /** To how many equal draws the draws amount before any measurement. */
    double effectiveDraws() {
        double sum = Arrays.stream(draws.weights).sum();
        return sum * sum / Arrays.stream(draws.weights).map(w -> w * w).sum();
    }

    /** The ranking, the most narrowing first. */
    List<NextMeasurement> ranked(MeasurementPlan plan) {
        List<NextMeasurement> found = new ArrayList<>();
        for (int i = 0; i < model.levels().size(); i++) {
            found.add(date(i, plan.dateSigmaKa()));
            if (plan.surveySigmaMetres() < surveySigmaMetres[i]) {
                found.add(survey(i, plan.surveySigmaMetres()));
            }
            indicator(i).ifPresent(found::add);
        }
        found.sort(NextMeasurement.RANKING);
        return found;
    }

    /** One date more on a level: it may be wrong, and its sample may have grown at any time in the highstand. */
    NextMeasurement date(int level, double sigmaKa) {
        int count = draws.count();
        double[] mean = new double[count];
        double[] sigma = new double[count];
        double[] idle = new double[count];
        for (int k = 0; k < count; k++) {
            Optional<FlightDraw.Match> match = match(level, k);
            double durationKa =
                    match.map(m -> model.rows().get(m.row()).durationKa()).orElse(0.0);
            mean[k] = match.map(FlightDraw.Match::ageKa).orElse(0.0);
            sigma[k] = Math.hypot(sigmaKa, durationKa / Math.sqrt(12));
            idle[k] = match.isPresent() ? model.wrongDateProbability() : 1;
        }
        return weighed(level, Kind.DATE, sigmaKa, new ForetoldResult(mean, sigma, idle, model.strayAgeMaximumKa()));
    }

    /** The height surveyed once more. */
    NextMeasurement survey(int level, double sigmaMetres) {
        double survey = surveySigmaMetres[level];
        double rest = restSigmaMetres(level);
        double precision = 1 / (survey * survey) + 1 / (rest * rest);
        double part = rest > 0 ? 1 / (rest * rest) / precision : 1;
        double own = rest > 0 ? 1 / precision : 0;
        // all relative to the height measured and the mean of the rest
        return normal(level, Kind.SURVEY, sigmaMetres, part, own, survey * survey);
    }

    /** What stands between landform and sea made out, so that its spread halves; absent where it has none. */
    private Optional<NextMeasurement> indicator(int level) {
        double survey = surveySigmaMetres[level];
        double rest = restSigmaMetres(level);
        if (!(rest > 0.01)) {
            return Optional.empty();
        }
        double part = survey > 0 ? rest * rest / (rest * rest + survey * survey) : 1;
        double own = part * survey * survey;
        return Optional.of(normal(level, Kind.INDICATOR, rest * HALVING, part, own, rest * rest));
    }

    /** A result of mean {@code part} times the shoreline's distance from where it was thought to be. */
    private NextMeasurement normal(
            int level, Kind kind, double sigmaMetres, double part, double ownVariance, double strayVariance) {
        double thought = model.levels().get(level).shorelineMetres().mean();
        int count = draws.count();
        double[] mean = new double[count];
        double[] sigma = new double[count];
        for (int k = 0; k < count; k++) {
            Optional<FlightDraw.Match> match = match(level, k);
            mean[k] = match.map(m -> part * (m.heightMetres() - thought)).orElse(0.0);
            sigma[k] = Math.sqrt(sigmaMetres * sigmaMetres + (match.isPresent() ? ownVariance : strayVariance));
        }
        return weighed(level, kind, sigmaMetres, new ForetoldResult(mean, sigma, new double[count], 1));
    }

    /** One standard deviation of all but the survey. */
    private double restSigmaMetres(int level) {
        FlightLevel own = model.levels().get(level);
        double all = own.shorelineMetres().standardDeviation();
        return Math.sqrt(Math.max(0, all * all - surveySigmaMetres[level] * surveySigmaMetres[level]));
    }

    private Optional<FlightDraw.Match> match(int level, int k) {
        return given.get(draws.given[k]).draw().matches().get(level);
    }

    private NextMeasurement weighed(int level, Kind kind, double sigma, ForetoldResult foretold) {
        ExpectedNarrowing found = ExpectedNarrowing.of(
                draws, foretold, OUTCOMES, streams.stream("results of the next measurement of " + site, 0), monitor);
        return NextMeasurement.of(
                site,
                NextMeasurement.FLIGHT,
                model.levels().get(level).name(),
                Optional.empty(),
                kind,
                sigma,
                found,
                true);
    }
}
