package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import org.junit.jupiter.api.Test;

/**
 * Direction numbers against the recurrence of Joe and Kuo (2003, ACM Trans. Math. Softw. 29:49, equation 2) from the first
 * rows of their table "new-joe-kuo-6" (2008, SIAM J. Sci. Comput. 30:2635): d = 2: s 1, a 0, m 1; d = 3: s 2, a 1, m 1 3;
 * d = 4: s 3, a 1, m 1 3 1; d = 5: s 3, a 2, m 1 1 1. The first dimension is van der Corput's sequence.
 */
class SobolPointsReferenceTest {
    private static final int LENGTH = 20;

    @Test
    void directionNumbersFollowTheRecurrence() {
        for (int j = 0; j < LENGTH; j++) {
            assertEquals(1, direction(0, j));
        }
        assertRecurrence(1, 1, 0, 1);
        assertRecurrence(2, 2, 1, 1, 3);
        assertRecurrence(3, 3, 1, 1, 3, 1);
        assertRecurrence(4, 3, 2, 1, 1, 1);
    }

    private static void assertRecurrence(int dimension, int degree, int polynomial, int... initial) {
        int[] m = Arrays.copyOf(initial, LENGTH);
        for (int k = degree; k < LENGTH; k++) {
            m[k] = (m[k - degree] << degree) ^ m[k - degree];
            for (int i = 1; i < degree; i++) {
                m[k] ^= (((polynomial >> (degree - 1 - i)) & 1) * m[k - i]) << i;
            }
        }
        for (int j = 0; j < LENGTH; j++) {
            assertEquals(m[j], direction(dimension, j), "dimension " + dimension + ", number " + j);
        }
    }

    /** The odd integer m of a direction number m / 2^(j + 1). */
    private static int direction(int dimension, int j) {
        int number = 0;
        for (int digit = 0; digit < LENGTH; digit++) {
            boolean one = SobolDirections.hasDigit(dimension, j, digit);
            assertTrue(digit <= j || !one);
            number = digit <= j ? 2 * number + (one ? 1 : 0) : number;
        }
        return number;
    }
}
