package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import org.junit.jupiter.api.Test;
import stillstand.ledger.RunMonitor;
import stillstand.sealevel.HighstandEntry;
import stillstand.sealevel.HighstandOptions;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.StageTable;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.FormsAt;
import stillstand.shoreline.IndicativeMeaning;
import stillstand.shoreline.IndicativeRule;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.shoreline.StageChoice;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Normal;

/**
 * Two tiny flights, one undated, one with a date, tied by a trace: against a sum over every pair of whole correlations, each of whose
 * probabilities is the filter's with its levels held to just these rows, on a grid of rates. 4 standard errors of some 600 effective
 * draws pass.
 */
class TracedFlightsTest {
    private static final RatePrior PRIOR = new LogUniformPrior(0.1, 1.5);
    private static final double TRACE = 0.9;
    private static final int NODES = 1200;
    private static final MatchingRules RULES = new MatchingRules(
            new SharedPriors.Recording.Known(0.7),
            Optional.empty(),
            Optional.of(new SharedPriors.Strays.Known(0.3)),
            1000,
            Optional.empty());

    private static SeaLevelBasis basis() {
        List<HighstandEntry> entries = new ArrayList<>();
        entries.add(entry("A", 80, -10, 4));
        entries.add(entry("B", 122, 5, 3));
        entries.add(entry("C", 200, -4, 4));
        return new SeaLevelBasis(
                "own",
                Optional.empty(),
                HighstandTable.own("own", true, entries, new StageTable(List.of()), HighstandOptions.DEFAULT));
    }

    private static HighstandEntry entry(String stage, double ageKa, double levelMetres, double sigmaMetres) {
        return new HighstandEntry(
                stage,
                ageKa,
                2,
                new Normal(levelMetres, sigmaMetres),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                "test");
    }

    private static Level level(String name, double heightMetres, String terrace, List<DatedSample> dates) {
        return new Level(
                name,
                new Normal(heightMetres, 2),
                new IndicativeMeaning("", new Exact(0), 0),
                FormsAt.HIGHSTAND,
                new Exact(0),
                new Exact(0),
                StageChoice.ANY,
                Optional.of(terrace).filter(each -> !each.isEmpty()),
                false,
                Optional.empty(),
                0,
                dates,
                "",
                Map.of());
    }

    private static Site site(String name, Level... levels) {
        return new Site(
                name,
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                new Exact(0),
                Optional.of(new Interval(2, 150)),
                Optional.empty(),
                List.of(levels),
                List.of(),
                "",
                Map.of());
    }

    private static Site undated() {
        return site("Bare", level("U1", 30, "", List.of()), level("U2", 62, "Long", List.of()));
    }

    private static Site dated() {
        return site(
                "Coral",
                level("D1", 20, "", List.of()),
                level("D2", 49, "Long", List.of(DatedLevels.date("S", new Normal(121, 3)))));
    }

    /** Integrals over the rate of prior times probability of one whole correlation, and of that times the rate. */
    private record Weighed(double mass, double rateMass) {}

    private static Map<List<Integer>, Weighed> correlations(Site site) {
        FlightSetup setup = FlightSetup.of(site, basis(), RULES, IndicativeRule.QUADRATURE);
        SharedNumbers shared = SharedNumbers.plain(0.7, 0.3);
        Map<List<Integer>, Weighed> found = new LinkedHashMap<>();
        int rows = setup.model().rows().size();
        for (int one = -1; one < rows; one++) {
            for (int two = -1; two < rows; two++) {
                FlightModel held = setup.model()
                        .withLevels(List.of(
                                held(setup.model().levels().get(0), one),
                                held(setup.model().levels().get(1), two)));
                ShorelineFilter filter = new ShorelineFilter(held, 200);
                FilterWorkspace workspace = filter.workspace(false);
                double mass = 0;
                double rateMass = 0;
                for (int k = 0; k < NODES; k++) {
                    double rate = PRIOR.quantile((k + 0.5) / NODES);
                    double p = Math.exp(filter.logEvidence(new UpliftHistory.ConstantRate(rate), shared, workspace));
                    mass += p / NODES;
                    rateMass += p * rate / NODES;
                }
                found.put(List.of(one, two), new Weighed(mass, rateMass));
            }
        }
        return found;
    }

    private static FlightLevel held(FlightLevel level, int row) {
        return row < 0 ? level.onlyRows(Set.of()) : level.onlyRows(Set.of(row)).neverStray();
    }

    private static double trace(int one, int two) {
        return one == two && one >= 0 ? TRACE : 1 - TRACE;
    }

    private static List<Flights.Answered> answers(Site... sites) {
        ExecutorService executor = Executors.newFixedThreadPool(2);
        try {
            DrawStreams streams = new DrawStreams(7);
            Flights flights = new Flights(
                    streams,
                    executor,
                    RunMonitor.SILENT,
                    RULES,
                    IndicativeRule.QUADRATURE,
                    new RateChanges(RateChanges.Models.NONE, 20, 450));
            List<TracedFlights.TracedSite> traced = new ArrayList<>();
            for (Site site : sites) {
                traced.add(new TracedFlights.TracedSite(
                        site,
                        basis(),
                        PRIOR,
                        Optional.of(flights.of(site, basis(), PRIOR).flight())));
            }
            return new TracedFlights(streams, executor, RunMonitor.SILENT, RULES, IndicativeRule.QUADRATURE, TRACE)
                    .of(traced);
        } finally {
            executor.shutdownNow();
        }
    }

    private static double pairing(FlightResult flight, String level, String stage) {
        return flight.pairingsOf(level).stream()
                .filter(pair -> pair.highstand().equals(stage))
                .mapToDouble(FlightResult.Pairing::probability)
                .sum();
    }

    @Test
    void agreesWithTheSumOverAllPairsOfCorrelations() {
        Map<List<Integer>, Weighed> bare = correlations(undated());
        Map<List<Integer>, Weighed> coral = correlations(dated());
        double total = 0;
        double bareRate = 0;
        double coralRate = 0;
        double bareRecordsB = 0;
        double aloneRecordsB = 0;
        double alone = 0;
        for (Map.Entry<List<Integer>, Weighed> one : bare.entrySet()) {
            boolean recordsB = one.getKey().get(1) == 1;
            alone += one.getValue().mass;
            aloneRecordsB += recordsB ? one.getValue().mass : 0;
            for (Map.Entry<List<Integer>, Weighed> two : coral.entrySet()) {
                double factor = trace(one.getKey().get(1), two.getKey().get(1));
                total += factor * one.getValue().mass * two.getValue().mass;
                bareRate += factor * one.getValue().rateMass * two.getValue().mass;
                coralRate += factor * one.getValue().mass * two.getValue().rateMass;
                bareRecordsB += recordsB ? factor * one.getValue().mass * two.getValue().mass : 0;
            }
        }
        List<Flights.Answered> answers = answers(undated(), dated());
        FlightResult bareFlight = answers.get(0).flight();
        FlightResult coralFlight = answers.get(1).flight();
        double error = 4 / Math.sqrt(600);

        assertEquals(
                bareRate / total,
                bareFlight.rate().mean().orElseThrow(),
                error * bareFlight.rate().sd().orElseThrow());
        assertEquals(
                coralRate / total,
                coralFlight.rate().mean().orElseThrow(),
                error * coralFlight.rate().sd().orElseThrow());
        assertEquals(bareRecordsB / total, pairing(bareFlight, "U2", "B"), error * 0.5);
        // the trace makes a difference that is larger than that
        assertTrue(bareRecordsB / total > aloneRecordsB / alone + 0.1, aloneRecordsB / alone + " alone");
    }

    /** Shares by hand: two sites of two correlations each. */
    @Test
    void sharesByHand() {
        Map<List<String>, Double> one = Map.of(List.of("A"), 0.4, List.of("B"), 0.6);
        Map<List<String>, Double> two = Map.of(List.of("B"), 0.7, List.of(TracedShares.NO_SHORELINE), 0.3);
        TracedShares.Found found = TracedShares.of(List.of(one, two), List.of(new TracedShares.Link(0, 0, 1, 0)), 0.9);
        double same = 0.6 * 0.7 * 0.9;
        double other = (0.4 * 0.7 + 0.4 * 0.3 + 0.6 * 0.3) * 0.1;
        assertEquals(same + other, found.factor(), 1e-15);
        assertEquals(
                (same + 0.6 * 0.3 * 0.1) / (same + other),
                found.shares().get(0).getOrDefault(List.of("B"), -1.0),
                1e-15);
        assertEquals(
                (0.4 + 0.6) * 0.3 * 0.1 / (same + other),
                found.shares().get(1).getOrDefault(List.of(TracedShares.NO_SHORELINE), -1.0),
                1e-15);
    }

    @Test
    void certainTracesThatCannotBeAreRefused() {
        Map<List<String>, Double> one = Map.of(List.of("A"), 1.0);
        Map<List<String>, Double> two = Map.of(List.of("B"), 1.0);
        assertEquals(
                "no correlation of all sites agrees with the traces",
                assertThrows(
                                IllegalArgumentException.class,
                                () -> TracedShares.of(List.of(one, two), List.of(new TracedShares.Link(0, 0, 1, 0)), 1))
                        .getMessage());
    }
}
