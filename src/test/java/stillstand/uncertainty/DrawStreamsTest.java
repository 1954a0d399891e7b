package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.HashSet;
import java.util.Set;
import org.junit.jupiter.api.Test;

class DrawStreamsTest {
    private static final DrawStreams STREAMS = new DrawStreams(7);

    private static double[] column(DrawStreams streams, String key, int block) {
        double[] column = new double[64];
        streams.probabilities(key, block, column);
        return column;
    }

    @Test
    void streamDependsOnNothingButSeedKeyAndBlock() {
        double[] late = column(STREAMS, "datum of Northport", 9);
        column(STREAMS, "datum of Northport", 3);
        column(STREAMS, "offset", 9);
        assertArrayEquals(late, column(new DrawStreams(7), "datum of Northport", 9));
    }

    @Test
    void everySeedKeyAndBlockHasAStreamOfItsOwn() {
        Set<Double> first = new HashSet<>();
        int streams = 0;
        for (long seed : new long[] {0, 1, 256, -1}) {
            for (String key : new String[] {"", "a", "b", "ab", "a\0", "é"}) {
                for (int block : new int[] {0, 1, 97, 256}) {
                    first.add(column(new DrawStreams(seed), key, block)[0]);
                    streams++;
                }
            }
        }
        assertEquals(streams, first.size());
    }

    @Test
    void probabilitiesLieStrictlyBetweenZeroAndOne() {
        double[] column = new double[1 << 16];
        STREAMS.probabilities("open", 0, column);
        for (double probability : column) {
            assertTrue(probability > 0 && probability < 1);
        }
    }

    @Test
    void negativeBlockIsRefused() {
        assertThrows(IllegalArgumentException.class, () -> STREAMS.stream("a", -1));
    }
}
