package stillstand.uplift;

import java.util.Optional;
import stillstand.uncertainty.AdaptiveStop;
import stillstand.uncertainty.DrawStreams;

/**
 * How many draws a rate gets.
 *
 * @param maximumDraws at which an adaptive run gives up, above 0
 * @param significantDigits of the standard deviation that must be steady (JCGM 101:2008, 7.9.2), 1 or 2
 * @param fixedDraws where present, so many draws, rounded up to whole blocks, and no adaptive stop
 */
public record DrawPlan(int maximumDraws, int significantDigits, Optional<Integer> fixedDraws) {
    public DrawPlan {
        if (maximumDraws < 1) {
            throw new IllegalArgumentException("maximumDraws must be 1 or more but is " + maximumDraws);
        }
        if (significantDigits < 1 || significantDigits > 2) {
            throw new IllegalArgumentException("significantDigits must be 1 or 2 but is " + significantDigits);
        }
        if (fixedDraws.isPresent() && fixedDraws.get() < 1) {
            throw new IllegalArgumentException("fixedDraws must be 1 or more but is " + fixedDraws.get());
        }
    }

    /** Most blocks that may be drawn. */
    int mostBlocks() {
        return blocks(fixedDraws.orElse(maximumDraws));
    }

    /** Fewest blocks that will be drawn whatever they say. */
    int leastBlocks() {
        return fixedDraws.isPresent() ? mostBlocks() : Math.min(mostBlocks(), AdaptiveStop.LEAST_BLOCKS);
    }

    AdaptiveStop stop() {
        return new AdaptiveStop(significantDigits, mostBlocks());
    }

    private static int blocks(int draws) {
        return (draws + DrawStreams.BLOCK_DRAWS - 1) / DrawStreams.BLOCK_DRAWS;
    }
}
