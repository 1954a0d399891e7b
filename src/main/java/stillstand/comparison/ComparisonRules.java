package stillstand.comparison;

import java.util.List;

/**
 * How sites are compared.
 *
 * @param stableWithinMetresPerKyr a site is stable where its rate is within this of 0; above 0
 * @param siteSpreadMetresPerKyr scale of the half-normal prior of how far sites of a group differ; above 0
 * @param pairs to be compared beside those inside groups
 */
public record ComparisonRules(double stableWithinMetresPerKyr, double siteSpreadMetresPerKyr, List<Pair> pairs) {
    /** 0.05 m/kyr is stable (6 m since the last interglacial); sites differ by 0.1 m/kyr; no pairs. */
    public static final ComparisonRules DEFAULT = new ComparisonRules(0.05, 0.1, List.of());

    /** Two sites by name. */
    public record Pair(String a, String b) {}

    /** @throws IllegalArgumentException if a number is not above 0 */
    public ComparisonRules {
        pairs = List.copyOf(pairs);
        if (!(stableWithinMetresPerKyr > 0 && stableWithinMetresPerKyr < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(
                    "stableWithinMetresPerKyr must be above 0 but is " + stableWithinMetresPerKyr);
        }
        if (!(siteSpreadMetresPerKyr > 0 && siteSpreadMetresPerKyr < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(
                    "siteSpreadMetresPerKyr must be above 0 but is " + siteSpreadMetresPerKyr);
        }
    }
}
