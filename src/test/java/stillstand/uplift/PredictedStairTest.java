package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.files.ShippedLibrary;
import stillstand.sealevel.HighstandEntry;
import stillstand.sealevel.HighstandOptions;
import stillstand.sealevel.HighstandTable;
import stillstand.uncertainty.Normal;

class PredictedStairTest {
    private static HighstandEntry entry(String stage, double ageKa, double levelMetres) {
        return new HighstandEntry(
                stage,
                ageKa,
                1,
                new Normal(levelMetres, 3),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                "invented");
    }

    private static PredictedStair stair(boolean complete, UpliftHistory history) {
        return PredictedStair.of(
                HighstandTable.own(
                        "own",
                        complete,
                        List.of(
                                entry("5a", 80, -20),
                                entry("5c", 100, -30),
                                entry("5e", 120, 5),
                                entry("7a", 200, -15)),
                        ShippedLibrary.load().stages(),
                        new HighstandOptions(false, false)),
                history);
    }

    private static List<String> fates(PredictedStair stair) {
        return stair.steps().stream()
                .map(step -> step.stage() + " " + step.overrunBy().orElse("stands"))
                .toList();
    }

    /** At 0.4 m/kyr: 12, 10, 53 and 65 m. */
    @Test
    void aYoungerSeaThatStoodAsHighTakesAShoreline() {
        PredictedStair stair = stair(true, new UpliftHistory.ConstantRate(0.4));
        assertEquals(List.of("5a stands", "5c 5a", "5e stands", "7a stands"), fates(stair));
        assertEquals(65, stair.steps().get(3).heightMetres(), 1e-12);
        assertEquals(Math.hypot(3, 0.4), stair.steps().get(3).heightSigmaMetres(), 1e-12);
    }

    /** At 0.1: -12, -20, 17 and 5 m; 5c was reached by 5a first, before today's sea. */
    @Test
    void todaysSeaTakesWhatLiesBelowIt() {
        UpliftHistory slow = new UpliftHistory.ConstantRate(0.1);
        assertEquals(List.of("5a stands", "5c 5a", "5e stands", "7a 5e"), fates(stair(true, slow)));
        assertEquals(List.of("1 stands", "5a 1", "5c 5a", "5e stands", "7a 5e"), fates(stair(false, slow)));
    }

    /** 0.4 m/kyr since 90 ka and 1 before: 12, 16, 71 and 131 m. */
    @Test
    void aHistory() {
        PredictedStair stair = stair(true, UpliftHistory.SteppedRate.oneChange(0.4, 90, 1));
        assertEquals(List.of("5a stands", "5c stands", "5e stands", "7a stands"), fates(stair));
        assertEquals(131, stair.steps().get(3).heightMetres(), 1e-12);
    }
}
