package stillstand.sensitivity;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import stillstand.uplift.FlightMixture;
import stillstand.uplift.FlightResult;
import stillstand.uplift.Rate;
import stillstand.uplift.RateMixture;
import stillstand.uplift.SeaLevelEnsemble;

/**
 * What one choice of sea level makes of one level or of one flight. The answers of the curves stand beside their mixtures, never
 * one without the others: none of the curves is true.
 *
 * @param site its name
 * @param level its name; absent for the flight of the site
 * @param curve id of the curve or table, or one of the mixtures
 * @param rate of the level as propagated, of the flight as held after looking
 * @param logEvidence natural logarithm of the evidence of the flight; absent for levels and for the equal mixture
 * @param weight in the mixture that the study reports: that of the study for a level, times the evidence for a flight; 1 for a
 *     mixture
 * @param matches for each level of a flight the highstand that it most probably records; for a level its own
 */
public record CurveChoice(
        String site,
        Optional<String> level,
        String curve,
        Rate rate,
        Optional<Double> logEvidence,
        double weight,
        List<FlightResult.Match> matches) {
    /** Name of the mixture by the study's weights. */
    public static final String STUDY_WEIGHTED = "study-weighted";
    /** Name of the mixture by the study's weights times the evidence of the flight. */
    public static final String EVIDENCE_WEIGHTED = "evidence-weighted";
    /** Name of the mixture in which all curves weigh alike. */
    public static final String EQUAL_WEIGHTED = "equal-weighted";

    public CurveChoice {
        matches = List.copyOf(matches);
    }

    /** Whether this is a mixture, not a curve. */
    public boolean mixesCurves() {
        return List.of(STUDY_WEIGHTED, EVIDENCE_WEIGHTED, EQUAL_WEIGHTED).contains(curve);
    }

    /**
     * The answer of one level under one curve.
     *
     * @param curve number of the curve in the ensemble
     * @param rate propagated
     * @param highstand that it most probably records
     */
    public record OfCurve(int curve, Rate rate, Optional<String> highstand) {}

    /** The rows of one level: its curves and, where they are two or more, the mixtures. */
    public static List<CurveChoice> ofLevel(
            String site, String level, SeaLevelEnsemble ensemble, List<OfCurve> answers) {
        if (answers.size() < 2) {
            return List.of();
        }
        double total = answers.stream()
                .mapToDouble(each -> ensemble.weights().get(each.curve()))
                .sum();
        List<CurveChoice> rows = new ArrayList<>();
        for (OfCurve each : answers) {
            rows.add(row(
                    site,
                    level,
                    ensemble.bases().get(each.curve()).id(),
                    each.rate(),
                    ensemble.weights().get(each.curve()) / total,
                    List.of(new FlightResult.Match(level, each.highstand()))));
        }
        List<Rate> rates = answers.stream().map(OfCurve::rate).toList();
        List<Double> weights = rows.stream().map(CurveChoice::weight).toList();
        rows.add(row(site, level, STUDY_WEIGHTED, RateMixture.of(rates, weights), 1, List.of()));
        rows.add(row(site, level, EQUAL_WEIGHTED, RateMixture.of(rates, equal(rates.size())), 1, List.of()));
        return rows;
    }

    private static CurveChoice row(
            String site, String level, String curve, Rate rate, double weight, List<FlightResult.Match> matches) {
        return new CurveChoice(site, Optional.of(level), curve, rate, Optional.empty(), weight, matches);
    }

    /**
     * The rows of one flight.
     *
     * @param curves ids, one for each flight
     * @param flights of one site
     * @param priorWeights of the curves, above 0
     */
    public static List<CurveChoice> ofFlight(
            List<String> curves, List<FlightResult> flights, List<Double> priorWeights) {
        if (flights.size() < 2) {
            return List.of();
        }
        List<Double> weights = FlightMixture.weights(flights, priorWeights);
        List<CurveChoice> rows = new ArrayList<>();
        for (int k = 0; k < flights.size(); k++) {
            FlightResult flight = flights.get(k);
            rows.add(new CurveChoice(
                    flight.site(),
                    Optional.empty(),
                    curves.get(k),
                    flight.rate(),
                    Optional.of(flight.logEvidence()),
                    weights.get(k),
                    matches(flight)));
        }
        FlightResult mixed = FlightMixture.of(flights, priorWeights);
        rows.add(new CurveChoice(
                mixed.site(),
                Optional.empty(),
                EVIDENCE_WEIGHTED,
                mixed.rate(),
                Optional.of(mixed.logEvidence()),
                1,
                matches(mixed)));
        rows.add(new CurveChoice(
                mixed.site(),
                Optional.empty(),
                EQUAL_WEIGHTED,
                RateMixture.of(flights.stream().map(FlightResult::rate).toList(), equal(flights.size())),
                Optional.empty(),
                1,
                List.of()));
        return rows;
    }

    private static List<Double> equal(int count) {
        return IntStream.range(0, count).mapToObj(k -> 1.0).toList();
    }

    /** Each level with what it most probably is: a highstand's shoreline, or none. */
    private static List<FlightResult.Match> matches(FlightResult flight) {
        return flight.unmatched().stream()
                .map(level -> new FlightResult.Match(
                        level.level(),
                        flight.pairingsOf(level.level()).stream()
                                .findFirst()
                                .filter(pair -> pair.probability() > level.probability())
                                .map(FlightResult.Pairing::highstand)))
                .toList();
    }
}
