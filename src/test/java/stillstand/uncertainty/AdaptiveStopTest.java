package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.uncertainty.AdaptiveStop.Decision;

class AdaptiveStopTest {

    private static List<BlockEstimates> blocks(int count, double wobble) {
        List<BlockEstimates> blocks = new ArrayList<>();
        for (int i = 0; i < count; i++) {
            double shift = i % 2 == 0 ? wobble : -wobble;
            blocks.add(new BlockEstimates(10 + shift, 1, new Interval(8, 12)));
        }
        return blocks;
    }

    /** By hand: R values at +-w have the standard error w / sqrt(R - 1); u = 1 to one digit has the tolerance 0.5. */
    @Test
    void stopsWhenTwiceTheErrorIsWithinTheTolerance() {
        AdaptiveStop stop = new AdaptiveStop(1, 64);
        assertEquals(Decision.CONVERGED, stop.after(blocks(10, 0.74), 1)); // 2 x 0.74 / 3 = 0.493
        assertEquals(Decision.GO_ON, stop.after(blocks(10, 0.76), 1)); // 2 x 0.76 / 3 = 0.507
        assertEquals(Decision.CONVERGED, stop.after(blocks(12, 0.76), 1));
        assertEquals(Decision.GO_ON, new AdaptiveStop(2, 64).after(blocks(12, 0.76), 1));
    }

    @Test
    void everyOneOfTheFourNumbersCanHoldUpTheEnd() {
        AdaptiveStop stop = new AdaptiveStop(1, 64);
        List<List<BlockEstimates>> held =
                List.of(new ArrayList<>(), new ArrayList<>(), new ArrayList<>(), new ArrayList<>());
        for (int i = 0; i < 10; i++) {
            double wobble = i % 2 == 0 ? 0.9 : -0.9;
            held.get(0).add(new BlockEstimates(10 + wobble, 1, new Interval(8, 12)));
            held.get(1).add(new BlockEstimates(10, 1 + wobble, new Interval(8, 12)));
            held.get(2).add(new BlockEstimates(10, 1, new Interval(8 + wobble, 12)));
            held.get(3).add(new BlockEstimates(10, 1, new Interval(8, 12 + wobble)));
        }
        for (List<BlockEstimates> blocks : held) {
            assertEquals(Decision.GO_ON, stop.after(blocks, 1));
        }
    }

    @Test
    void neverStopsBelowTenBlocksUnlessCapped() {
        assertEquals(Decision.GO_ON, new AdaptiveStop(1, 64).after(blocks(9, 0), 1));
        assertEquals(Decision.CAPPED, new AdaptiveStop(1, 9).after(blocks(9, 0), 1));
        assertEquals(Decision.CAPPED, new AdaptiveStop(2, 12).after(blocks(12, 5), 1));
        assertEquals(Decision.CONVERGED, new AdaptiveStop(2, 12).after(blocks(12, 0), 1));
    }

    @Test
    void numberWithoutSpreadHasConverged() {
        assertEquals(Decision.CONVERGED, new AdaptiveStop(2, 64).after(blocks(10, 0), 0));
    }

    @Test
    void errorIsTheSpreadBetweenBlocksOverTheRootOfTheirNumber() {
        assertEquals(Optional.empty(), MonteCarloError.between(blocks(9, 0.3)));
        MonteCarloError error = MonteCarloError.between(blocks(10, 0.3)).orElseThrow();
        assertEquals(0.1, error.median(), 1e-12); // 0.3 / sqrt(10 - 1)
        assertEquals(0, error.low95());
    }

    @Test
    void impossibleRulesAreRefused() {
        assertThrows(IllegalArgumentException.class, () -> new AdaptiveStop(0, 10));
        assertThrows(IllegalArgumentException.class, () -> new AdaptiveStop(3, 10));
        assertThrows(IllegalArgumentException.class, () -> new AdaptiveStop(1, 0));
        assertThrows(IllegalArgumentException.class, () -> AdaptiveStop.tolerance(0, 1));
    }

    @Test
    void normalNumberToTwoDigitsConvergesLongBeforeTheCap() {
        Propagation run = Propagation.of(List.of(new Normal(0, 1), new Normal(0, 1)), 10, x -> x[0] + x[1]);
        assertEquals(
                Decision.CONVERGED,
                new AdaptiveStop(2, 64).after(run.blocks(), run.distribution().sd()));
        assertTrue(run.error().median() < 0.001);
    }
}
