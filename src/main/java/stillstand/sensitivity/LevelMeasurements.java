package stillstand.sensitivity;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.ledger.RunMonitor;
import stillstand.sensitivity.NextMeasurement.Kind;
import stillstand.shoreline.HeightTerm;
import stillstand.shoreline.HeightTerm.Source;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.SobolPoints;
import stillstand.uncertainty.Uncertain;
import stillstand.uplift.SeaAtLevel;

/**
 * What to measure next on a level or coral that has a rate of its own: as {@link FlightMeasurements}, on draws of the propagated
 * rate's inputs.
 */
final class LevelMeasurements {
    private static final int SCRAMBLES = 16;
    private static final int POINTS = 512;
    private static final int OUTCOMES = 320;
    private static final double HALVING = 1 / Math.sqrt(3);

    private final String site;
    private final String level;
    private final Optional<String> sample;
    private final List<LevelInputs> functions = new ArrayList<>();
    private final List<? extends SeaAtLevel> explanations;
    private final DrawStreams streams;
    private final RunMonitor monitor;
    private final RateDraws draws;
    /** By draw as given: its explanation and the values of that explanation's inputs. */
    private final int[] explanationOf = new int[SCRAMBLES * POINTS];

    private final double[][] values = new double[SCRAMBLES * POINTS][];

    /**
     * @param site its name
     * @param level its name
     * @param sample the coral whose rate it is; absent = the level's
     * @param height terms of the height of the former sea, without lowering
     * @param explanations with probabilities that sum to 1
     */
    LevelMeasurements(
            String site,
            String level,
            Optional<String> sample,
            List<HeightTerm> height,
            Uncertain loweringMetresPerKyr,
            List<? extends SeaAtLevel> explanations,
            DrawStreams streams,
            RunMonitor monitor) {
        this.site = site;
        this.level = level;
        this.sample = sample;
        this.streams = streams;
        this.monitor = monitor;
        this.explanations = explanations;
        for (SeaAtLevel sea : explanations) {
            functions.add(new LevelInputs(height, loweringMetresPerKyr, sea));
        }
        draws = drawn();
    }

    private String key() {
        return "next measurement of " + site + " / " + level
                + sample.map(name -> " / " + name).orElse("");
    }

    private RateDraws drawn() {
        int most = functions.stream()
                .mapToInt(function -> function.inputs().size())
                .max()
                .orElse(0);
        double[] rates = new double[SCRAMBLES * POINTS];
        double[] weights = new double[rates.length];
        int[] blocks = new int[rates.length];
        double[][] column = new double[most + 1][POINTS];
        for (int block = 0; block < SCRAMBLES; block++) {
            SobolPoints points = SobolPoints.scrambled(streams, key(), most + 1, block);
            for (int d = 0; d <= most; d++) {
                points.column(d, column[d]);
            }
            for (int i = 0; i < POINTS; i++) {
                int k = block * POINTS + i;
                blocks[k] = block;
                explanationOf[k] = explanation(column[most][i]);
                LevelInputs function = functions.get(explanationOf[k]);
                values[k] = new double[function.inputs().size()];
                for (int d = 0; d < values[k].length; d++) {
                    values[k][d] = function.inputs().get(d).value().quantile(column[d][i]);
                }
                double rate = function.rateMetresPerKyr(values[k]);
                rates[k] = Double.isNaN(rate) ? 0 : rate;
                weights[k] = Double.isNaN(rate) ? 0 : 1;
            }
        }
        int readings = Math.max(1, functions.size());
        return new RateDraws(rates, weights, blocks, SCRAMBLES, new int[][] {explanationOf}, readings);
    }

    private int explanation(double choice) {
        double below = 0;
        for (int e = 0; e < explanations.size() - 1; e++) {
            below += explanations.get(e).probability();
            if (choice < below) {
                return e;
            }
        }
        return explanations.size() - 1;
    }

    /** The ranking, the most narrowing first. */
    List<NextMeasurement> ranked(MeasurementPlan plan) {
        List<NextMeasurement> found = new ArrayList<>();
        of(Kind.DATE, LevelInputs.AGE, plan.dateSigmaKa()).ifPresent(found::add);
        String survey = LevelInputs.name(Source.SURVEY);
        if (plan.surveySigmaMetres() < spread(survey)) {
            of(Kind.SURVEY, survey, plan.surveySigmaMetres()).ifPresent(found::add);
        }
        String depth = LevelInputs.name(Source.PALAEODEPTH);
        of(Kind.TAXON, depth, spread(depth) * HALVING).ifPresent(found::add);
        String range = LevelInputs.name(Source.INDICATIVE_RANGE);
        of(Kind.INDICATOR, range, spread(range) * HALVING).ifPresent(found::add);
        found.sort(NextMeasurement.RANKING);
        return found;
    }

    private double spread(String input) {
        int place = functions.get(0).place(input);
        return place < 0 ? 0 : functions.get(0).inputs().get(place).value().standardDeviation();
    }

    /** A normal result about the true value of an input; absent where the input is known already. */
    Optional<NextMeasurement> of(Kind kind, String input, double sigma) {
        boolean known = functions.stream().allMatch(function -> function.place(input) < 0)
                && (functions.size() == 1 || !input.equals(LevelInputs.AGE));
        if (known || !(sigma > 0)) {
            return Optional.empty();
        }
        int count = draws.count();
        double[] mean = new double[count];
        double[] sigmas = new double[count];
        for (int k = 0; k < count; k++) {
            int own = draws.given[k];
            int e = explanationOf[own];
            int place = functions.get(e).place(input);
            mean[k] = place < 0 ? explanations.get(e).ageKa().mean() : values[own][place];
            double durationKa = kind == Kind.DATE && explanations.get(e) instanceof SeaAtLevel.AtHighstand stand
                    ? stand.highstand().durationKa()
                    : 0;
            sigmas[k] = Math.hypot(sigma, durationKa / Math.sqrt(12));
        }
        ExpectedNarrowing found = ExpectedNarrowing.of(
                draws,
                new ForetoldResult(mean, sigmas, new double[count], 1),
                OUTCOMES,
                streams.stream("results of the " + key(), 0),
                monitor);
        return Optional.of(NextMeasurement.of(site, level, level, sample, kind, sigma, found, functions.size() > 1));
    }
}
