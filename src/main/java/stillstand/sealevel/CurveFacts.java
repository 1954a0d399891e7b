package stillstand.sealevel;

import java.util.List;

/**
 * What a user must know of a curve beside its numbers.
 *
 * @param citation authors, year, title, journal
 * @param zero what the curve counts its level from
 * @param ageScale what its ages rest on
 * @param spreadMeaning what its spread is, and how sure one may be of that
 * @param spreadIsGuessed whether the spread in use is a default, because the source gives none or does not explain it
 * @param correlationTimeKa time in which an error of the level is forgotten, ka, above 0
 * @param curveAgeSigmaKa one standard deviation of the age scale, ka, 0 or more
 * @param usableFromKa youngest age at which the curve may be used, ka
 * @param caveats what else is wrong with it, a sentence each
 */
public record CurveFacts(
        String citation,
        String zero,
        String ageScale,
        String spreadMeaning,
        boolean spreadIsGuessed,
        double correlationTimeKa,
        double curveAgeSigmaKa,
        double usableFromKa,
        List<String> caveats) {
    /** Correlation time where a curve states none: between curves the differences are forgotten in 5 to 10 ka. */
    public static final double DEFAULT_CORRELATION_TIME_KA = 5;
    /** Age error where a curve states none, as of the scales tuned to the LR04 stack. */
    public static final double DEFAULT_CURVE_AGE_SIGMA_KA = 3;

    /** Zero where a curve states none. */
    public static final String DEFAULT_ZERO = "present mean sea level, supposed";
    /** Age scale where a curve states none. */
    public static final String DEFAULT_AGE_SCALE = "not stated";

    public CurveFacts {
        if (!(correlationTimeKa > 0 && correlationTimeKa < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("correlationTimeKa must be above 0 but is " + correlationTimeKa);
        }
        if (!(curveAgeSigmaKa >= 0 && curveAgeSigmaKa < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("curveAgeSigmaKa must be 0 or more but is " + curveAgeSigmaKa);
        }
        if (!(usableFromKa >= 0 && usableFromKa < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("usableFromKa must be 0 or more but is " + usableFromKa);
        }
        caveats = List.copyOf(caveats);
    }

    /** The same facts under other settings of a study. */
    public CurveFacts with(double otherCorrelationTimeKa, double otherCurveAgeSigmaKa) {
        return new CurveFacts(
                citation,
                zero,
                ageScale,
                spreadMeaning,
                spreadIsGuessed,
                otherCorrelationTimeKa,
                otherCurveAgeSigmaKa,
                usableFromKa,
                caveats);
    }

    /** The same facts for a curve whose spread had to be guessed. */
    public CurveFacts withGuessedSpread(String meaning) {
        return new CurveFacts(
                citation, zero, ageScale, meaning, true, correlationTimeKa, curveAgeSigmaKa, usableFromKa, caveats);
    }

    /** The same facts for a curve moved to another zero. */
    CurveFacts withZero(String otherZero) {
        return new CurveFacts(
                citation,
                otherZero,
                ageScale,
                spreadMeaning,
                spreadIsGuessed,
                correlationTimeKa,
                curveAgeSigmaKa,
                usableFromKa,
                caveats);
    }
}
