package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Set;
import java.util.stream.Stream;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import stillstand.uncertainty.LogNormal;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Uniform;

/** What must hold whatever the flight: the way back gives the evidence again, and what became of a row sums to 1. */
class BackwardPassTest {
    record Case(String name, FlightModel model, UpliftHistory history, SharedNumbers shared) {
        @Override
        public String toString() {
            return name;
        }
    }

    static Stream<Case> cases() {
        SharedNumbers plain = SharedNumbers.plain(0.7, 0.2);
        SharedNumbers all = new SharedNumbers(2, -4, 1.5, 0.7, 400, 0.8);
        UpliftHistory usual = new UpliftHistory.ConstantRate(0.62);
        List<FlightRow> older = OlderRows.after(ToyFlights.defaultRows());
        List<FlightLevel> pinned = new ArrayList<>(ToyFlights.undatedSeven());
        pinned.set(1, pinned.get(1).onlyRows(Set.of(2)).neverStray());
        pinned.set(3, pinned.get(3).doubtful(10).onlyRows(Set.of(5, 6)));
        List<FlightLevel> skewed = new ArrayList<>(ToyFlights.datedFlight());
        skewed.set(2, FlightLevel.undated("skewed", new LogNormal(36, 3, 0.6)));
        skewed.set(4, FlightLevel.dated("uniform", new Uniform(120, 128), List.of(new Uniform(200, 230))));
        return Stream.of(
                new Case(
                        "plain",
                        FlightModel.complete(ToyFlights.datedFlight(), ToyFlights.plainRows(), 2, 200),
                        usual,
                        plain),
                new Case(
                        "default",
                        new FlightModel(ToyFlights.datedFlight(), older, -20, 200, 1000, 0.05, true, false),
                        usual,
                        all),
                new Case(
                        "sinking",
                        new FlightModel(ToyFlights.datedFlight(), older, -20, 200, 1000, 0.05, true, true),
                        new UpliftHistory.ConstantRate(-0.01),
                        all),
                new Case("pinned", FlightModel.complete(pinned, ToyFlights.plainRows(), 2, 200), usual, plain),
                new Case("skewed", FlightModel.complete(skewed, ToyFlights.plainRows(), 2, 200), usual, plain),
                new Case(
                        "change of rate",
                        FlightModel.complete(ToyFlights.datedFlight(), ToyFlights.plainRows(), 2, 200),
                        UpliftHistory.SteppedRate.oneChange(0.3, 150, 0.75),
                        plain),
                new Case(
                        "twenty dated levels",
                        FlightModel.complete(twentyDated(), ToyFlights.plainRows(), 2, 700),
                        usual,
                        plain));
    }

    /** Twenty levels, each with eight dates of 0.5 ka: density ratios beyond 1e400. */
    static List<FlightLevel> twentyDated() {
        List<FlightLevel> levels = new ArrayList<>();
        for (FlightRow row : ToyFlights.plainRows()) {
            double ageKa = row.ageKa();
            levels.add(FlightLevel.dated(
                    row.stage(),
                    new Normal(row.levelMetres() + 0.62 * ageKa, 2),
                    java.util.Collections.nCopies(8, new Normal(ageKa, 0.5))));
        }
        levels.sort(java.util.Comparator.comparingDouble(
                level -> level.shorelineMetres().mean()));
        return levels;
    }

    @ParameterizedTest
    @MethodSource("cases")
    void backwardTotalIsTheForwardTotal(Case one) {
        FilterWorkspace w = run(one);
        assertTrue(Double.isFinite(w.logEvidence), "log evidence " + w.logEvidence);
        assertEquals(0, w.backwardMismatch, 1e-12);
    }

    @ParameterizedTest
    @MethodSource("cases")
    void fatesOfEachRowSumToOne(Case one) {
        FilterWorkspace w = run(one);
        for (int j = 0; j < w.rows; j++) {
            double sum = w.unseen[j] + w.over[j] + w.outside[j] + w.absent[j];
            for (int i = 0; i < w.levels; i++) {
                sum += w.pair[i * w.rows + j];
            }
            assertEquals(1, sum, 1e-12, "row " + j);
        }
    }

    @ParameterizedTest
    @MethodSource("cases")
    void everyLevelIsMatchedAtMostOnceAndPinsHold(Case one) {
        FilterWorkspace w = run(one);
        for (int i = 0; i < w.levels; i++) {
            double sum = 0;
            for (int j = 0; j < w.rows; j++) {
                double pair = w.pair[i * w.rows + j];
                sum += pair;
                assertTrue(one.model.levels().get(i).mayBeRow(j) || pair == 0, "level " + i + " row " + j);
            }
            assertTrue(sum <= 1 + 1e-12, "level " + i + " is matched " + sum);
            if (!one.model.levels().get(i).mayBeStray()) {
                assertEquals(1, sum, 1e-12);
            }
        }
    }

    private static FilterWorkspace run(Case one) {
        ShorelineFilter filter = new ShorelineFilter(one.model, 200);
        FilterWorkspace w = filter.workspace(true);
        new BackwardPass(filter, w).run(one.history, one.shared);
        return w;
    }
}
