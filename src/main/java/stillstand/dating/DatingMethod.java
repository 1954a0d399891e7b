package stillstand.dating;

import java.util.Optional;

/**
 * A way of dating, as the shipped table knows it.
 *
 * @param id lower-case words joined by hyphens
 * @param name in plain words
 * @param usualSpread how wide its dates usually are; absent where that is not compiled
 * @param source citation
 * @param note what to mind; "" where there is nothing
 */
public record DatingMethod(String id, String name, Optional<Spread> usualSpread, String source, String note) {
    /** @throws IllegalArgumentException if id, name or source is blank */
    public DatingMethod {
        if (id.isBlank() || name.isBlank() || source.isBlank()) {
            throw new IllegalArgumentException("a method must have id, name and source but has \"" + id + "\", \""
                    + name + "\", \"" + source + "\"");
        }
    }

    /**
     * What spread is ordinary. No result is computed from it.
     *
     * @param percentOfAge median, above 0
     * @param sigmas how many standard deviations such spreads usually mean, 1 or 2
     * @param records how many dates the median is of
     */
    public record Spread(double percentOfAge, int sigmas, int records) {
        /** @throws IllegalArgumentException if a component is not above 0, or {@code sigmas} above 2 */
        public Spread {
            if (!(percentOfAge > 0 && percentOfAge < 100 && (sigmas == 1 || sigmas == 2) && records > 0)) {
                throw new IllegalArgumentException(
                        "a spread must be a percentage at 1 or 2 sigma of 1 or more records but is " + percentOfAge
                                + " at " + sigmas + " of " + records);
            }
        }
    }
}
