package stillstand.sensitivity;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import org.apache.commons.rng.UniformRandomProvider;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.StandardNormal;
import stillstand.uplift.CauchyPrior;
import stillstand.uplift.FlightDraw;
import stillstand.uplift.FlightModel;
import stillstand.uplift.FlightMonteCarlo;
import stillstand.uplift.PairingTable;
import stillstand.uplift.RatePrior;
import stillstand.uplift.SampledFlightAnswer;

/**
 * The ranking of next measurements against brute force: a result is simulated from the flight's own posterior, the flight is run
 * again with it, and so on. For each of
 * eight measurements the expected change of width and the expected certainty may differ by four standard errors of the brute force
 * and of the ranking together, with 24 replicates (a t distribution): a right engine fails with probability below 0.02.
 */
@Tag("slow")
class NextMeasurementStatisticalTest {
    private static final DrawStreams STREAMS = new DrawStreams(2026);
    private static final RatePrior PRIOR = new CauchyPrior(0, 0.5, -10, 15);
    private static final FlightMonteCarlo.Effort WHOLE = new FlightMonteCarlo.Effort(16, 512, 100, 4000);
    private static final FlightMonteCarlo.Effort AGAIN = new FlightMonteCarlo.Effort(8, 256, 100, 400);
    private static final int REPLICATES = 24;
    private static final double DATE_SIGMA = 3;
    private static final double AGAIN_SIGMA = 0.5;

    @Test
    void undatedFlightOfFourLevels() {
        check(InventedFlights.model(120, 12, 33, 56, 86));
    }

    @Test
    void flightOfThreeLevelsWithOneDate() {
        check(InventedFlights.dated(InventedFlights.model(80, 8, 22, 47), 2, 128, 6));
    }

    private static void check(FlightModel model) {
        SampledFlightAnswer whole = answer(model, WHOLE, "whole");
        FlightMeasurements measurements = new FlightMeasurements(
                "site",
                model,
                InventedFlights.surveys(model),
                whole.answer().rate(),
                PRIOR,
                InventedFlights.shared(model),
                STREAMS,
                RunMonitor.SILENT);
        for (int level = 0; level < 3; level++) {
            compare(model, whole, measurements.date(level, DATE_SIGMA), level, true);
        }
        compare(model, whole, measurements.survey(1, AGAIN_SIGMA), 1, false);
    }

    private static void compare(
            FlightModel model, SampledFlightAnswer whole, NextMeasurement expected, int level, boolean date) {
        UniformRandomProvider random = STREAMS.stream("results", level);
        double width = width(whole);
        List<Double> changes = new ArrayList<>();
        List<Double> sure = new ArrayList<>();
        List<FlightDraw> draws = whole.draws().draws();
        for (int r = 0; r < REPLICATES; r++) {
            // the draws are in the order of their rates: one from each stratum
            int k = (int) ((r + random.nextDouble()) * draws.size() / REPLICATES);
            FlightDraw truth = draws.get(k);
            FlightModel again = date ? withDate(model, truth, level, random) : withSurvey(model, truth, level, random);
            SampledFlightAnswer then = answer(again, AGAIN, "again");
            changes.add(Math.log(width(then) / width));
            sure.add(certainty(then.answer().pairings(), model));
        }
        double change = 100 * Math.expm1(mean(changes));
        double changeError = (100 + change) * standardError(changes);
        double error = Math.hypot(changeError, expected.width95ChangePercentError());
        String what = String.format(
                Locale.ROOT,
                "%s %s: width %.1f +- %.1f (brute force %.1f +- %.1f), certainty %.3f -> %.3f +- %.3f (%.3f -> %.3f +- %.3f), draws %.0f",
                expected.measurement(),
                expected.level(),
                expected.width95ChangePercent(),
                expected.width95ChangePercentError(),
                change,
                changeError,
                expected.pairing().orElseThrow().certainty(),
                expected.pairing().orElseThrow().expectedCertainty(),
                expected.pairing().orElseThrow().error(),
                certainty(whole.answer().pairings(), model),
                mean(sure),
                standardError(sure),
                expected.effectiveDraws());
        // both widths come of about as many draws; 3 % more since the ranking's cells are not extrapolated
        double end =
                Math.hypot(whole.error().lower95MetresPerKyr(), whole.error().upper95MetresPerKyr());
        assertEquals(width, expected.width95(), 4 * Math.sqrt(2) * end + 0.03 * width, what);
        assertEquals(change, expected.width95ChangePercent(), 4 * error + 1, what);
        NextMeasurement.PairingGain gain = expected.pairing().orElseThrow();
        assertEquals(certainty(whole.answer().pairings(), model), gain.certainty(), 0.03, what);
        assertEquals(
                mean(sure), gain.expectedCertainty(), 4 * Math.hypot(standardError(sure), gain.error()) + 0.01, what);
        assertTrue(expected.effectiveDraws() > NextMeasurement.FEW_DRAWS, what);
    }

    private static FlightModel withDate(FlightModel model, FlightDraw truth, int level, UniformRandomProvider random) {
        Optional<FlightDraw.Match> match = truth.matches().get(level);
        boolean says = match.isPresent() && random.nextDouble() >= model.wrongDateProbability();
        double durationKa =
                match.map(m -> model.rows().get(m.row()).durationKa()).orElse(0.0);
        double ageKa = says
                ? match.orElseThrow().ageKa() + Math.hypot(DATE_SIGMA, durationKa / Math.sqrt(12)) * normal(random)
                : model.strayAgeMaximumKa() * random.nextDouble();
        return InventedFlights.dated(model, level, ageKa, DATE_SIGMA);
    }

    /** The landform's own height given the shoreline's and the first survey, a second survey of it, and the mean of both. */
    private static FlightModel withSurvey(
            FlightModel model, FlightDraw truth, int level, UniformRandomProvider random) {
        double first = model.levels().get(level).shorelineMetres().mean();
        double survey = InventedFlights.SURVEY_SIGMA * InventedFlights.SURVEY_SIGMA;
        double rest = InventedFlights.HEIGHT_SIGMA * InventedFlights.HEIGHT_SIGMA - survey;
        Optional<FlightDraw.Match> match = truth.matches().get(level);
        double landform = match.isPresent()
                ? (first / survey + match.get().heightMetres() / rest) / (1 / survey + 1 / rest)
                        + normal(random) / Math.sqrt(1 / survey + 1 / rest)
                : first + Math.sqrt(survey) * normal(random);
        double second = landform + AGAIN_SIGMA * normal(random);
        double precision = 1 / survey + 1 / (AGAIN_SIGMA * AGAIN_SIGMA);
        double both = (first / survey + second / (AGAIN_SIGMA * AGAIN_SIGMA)) / precision;
        return InventedFlights.moved(model, level, both, Math.sqrt(1 / precision + rest));
    }

    private static double normal(UniformRandomProvider random) {
        return StandardNormal.quantile(((random.nextLong() >>> 12) + 0.5) * 0x1p-52);
    }

    private static SampledFlightAnswer answer(FlightModel model, FlightMonteCarlo.Effort effort, String key) {
        return FlightMonteCarlo.answer(
                model, PRIOR, InventedFlights.shared(model), effort, STREAMS, key, RunMonitor.SILENT);
    }

    private static double width(SampledFlightAnswer answer) {
        return answer.answer().rate().equalTails(0.95).widthMetresPerKyr();
    }

    /** As the ranking counts it: rows of one label together, no shoreline as a reading of its own. */
    private static double certainty(PairingTable table, FlightModel model) {
        double sum = 0;
        for (int i = 0; i < table.levels(); i++) {
            double best = table.stray(i);
            for (int j = 0; j < table.rows(); j++) {
                best = Math.max(best, table.probability(i, j));
            }
            sum += best / model.levels().size();
        }
        return sum;
    }

    private static double mean(List<Double> values) {
        return values.stream().mapToDouble(v -> v).average().orElseThrow();
    }

    private static double standardError(List<Double> values) {
        double mean = mean(values);
        double squares =
                values.stream().mapToDouble(v -> (v - mean) * (v - mean)).sum();
        return Math.sqrt(squares / (values.size() - 1) / values.size());
    }
}
