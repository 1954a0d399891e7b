package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.nio.ByteBuffer;
import java.security.MessageDigest;
import java.util.HexFormat;
import org.apache.commons.rng.UniformRandomProvider;
import org.junit.jupiter.api.Test;

/**
 * The stream against xoshiro256++ written out from its paper (Blackman and Vigna 2021, ACM Trans. Math. Softw. 47:36,
 * figure 1 and section 5), begun at the SHA-256 digest of the documented bytes, here typed as hexadecimal digits.
 */
class DrawStreamsReferenceTest {
    @Test
    void streamIsXoshiroFromTheDigest() throws Exception {
        // seed 258 in 8 bytes, block 3 in 4 bytes, "eta" with the Greek letter in UTF-8 (ce b7)
        byte[] message = HexFormat.of().parseHex("0000000000000102" + "00000003" + "ceb7");
        ByteBuffer digest = ByteBuffer.wrap(MessageDigest.getInstance("SHA-256").digest(message));
        long[] s = {digest.getLong(), digest.getLong(), digest.getLong(), digest.getLong()};

        UniformRandomProvider stream = new DrawStreams(258).stream("\u03b7", 3);

        for (int i = 0; i < 1000; i++) {
            assertEquals(Long.rotateLeft(s[0] + s[3], 23) + s[0], stream.nextLong());
            long t = s[1] << 17;
            s[2] ^= s[0];
            s[3] ^= s[1];
            s[1] ^= s[2];
            s[0] ^= s[3];
            s[2] ^= t;
            s[3] = Long.rotateLeft(s[3], 45);
        }
    }
}
