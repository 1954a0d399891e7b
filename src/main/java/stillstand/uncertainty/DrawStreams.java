package stillstand.uncertainty;

import java.nio.ByteBuffer;
import java.nio.charset.StandardCharsets;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import org.apache.commons.rng.UniformRandomProvider;
import org.apache.commons.rng.simple.RandomSource;

/**
 * All randomness of a run. Draws come in blocks, and the random stream of one input in one block is a function of the seed,
 * the input's key and the block's number alone: threads may take the blocks in any order, and no input's draws move
 * another's.
 *
 * <p>An input that several levels share has a key that does not name the level; an input of one level has a key that names
 * its site and level.
 *
 * <p>The generator is XO_SHI_RO_256_PP (Blackman and Vigna 2021, ACM Trans. Math. Softw. 47:36). Its four words of state are
 * the SHA-256 digest of seed (8 bytes), block (4 bytes) and key (UTF-8, to the end), all big-endian. The two numbers have a
 * fixed length and stand first, so different triples have different bytes.
 *
 * @param seed any number; the same seed gives the same draws
 */
public record DrawStreams(long seed) {
    /** Draws in a block, and points in one scramble of Sobol' points. */
    public static final int BLOCK_DRAWS = 1 << 14;

    /** What the generator is called in a record of how a result came about. */
    public static final String GENERATOR = "XO_SHI_RO_256_PP, state SHA-256(seed, block, key)";

    private static final int STATE_WORDS = 4;

    /**
     * A fresh generator at the start of the stream.
     *
     * @param inputKey names the input
     * @param block number of the block, from 0
     * @throws IllegalArgumentException if {@code block} is negative
     */
    public UniformRandomProvider stream(String inputKey, int block) {
        if (block < 0) {
            throw new IllegalArgumentException("block must be 0 or more but is " + block);
        }
        byte[] key = inputKey.getBytes(StandardCharsets.UTF_8);
        ByteBuffer message = ByteBuffer.allocate(Long.BYTES + Integer.BYTES + key.length);
        message.putLong(seed).putInt(block).put(key);
        ByteBuffer digest = ByteBuffer.wrap(sha256(message.array()));
        long[] state = new long[STATE_WORDS];
        digest.asLongBuffer().get(state);
        return RandomSource.XO_SHI_RO_256_PP.create(state);
    }

    /**
     * Fills a column with independent probabilities, uniform and strictly between 0 and 1, from the start of the stream.
     *
     * @param inputKey names the input
     * @param block number of the block, from 0
     * @throws IllegalArgumentException if {@code block} is negative
     */
    public void probabilities(String inputKey, int block, double[] column) {
        UniformRandomProvider stream = stream(inputKey, block);
        for (int i = 0; i < column.length; i++) {
            column[i] = ((stream.nextLong() >>> 12) + 0.5) * 0x1p-52;
        }
    }

    private static byte[] sha256(byte[] message) {
        try {
            return MessageDigest.getInstance("SHA-256").digest(message);
        } catch (NoSuchAlgorithmException e) {
            throw new IllegalStateException("every Java platform has SHA-256", e);
        }
    }
}
