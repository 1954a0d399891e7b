package stillstand.ledger;

import java.util.Collection;
import java.util.Locale;
import java.util.Optional;

/** Finds the known name that a mistyped one was probably meant to be, for messages. */
public final class NearestName {
    private NearestName() {}

    /**
     * The known name with the fewest letters changed, added, left out or swapped (case does not count); the first of several.
     *
     * @return empty where more than a third of the letters, and more than one, would have to change
     */
    public static Optional<String> of(String name, Collection<String> known) {
        String wanted = name.toLowerCase(Locale.ROOT);
        int fewest = Math.max(1, wanted.length() / 3) + 1;
        Optional<String> nearest = Optional.empty();
        for (String candidate : known) {
            int distance = distance(wanted, candidate.toLowerCase(Locale.ROOT));
            if (distance < fewest) {
                fewest = distance;
                nearest = Optional.of(candidate);
            }
        }
        return nearest;
    }

    /** Letters changed, added, left out or swapped with their neighbour, row by row (optimal string alignment). */
    private static int distance(String a, String b) {
        int[] beforePrevious = new int[b.length() + 1];
        int[] previous = new int[b.length() + 1];
        for (int j = 0; j <= b.length(); j++) {
            previous[j] = j;
        }
        for (int i = 1; i <= a.length(); i++) {
            int[] row = new int[b.length() + 1];
            row[0] = i;
            for (int j = 1; j <= b.length(); j++) {
                int change = previous[j - 1] + (a.charAt(i - 1) == b.charAt(j - 1) ? 0 : 1);
                row[j] = Math.min(change, Math.min(previous[j], row[j - 1]) + 1);
                boolean swapped =
                        i > 1 && j > 1 && a.charAt(i - 1) == b.charAt(j - 2) && a.charAt(i - 2) == b.charAt(j - 1);
                if (swapped) {
                    row[j] = Math.min(row[j], beforePrevious[j - 2] + 1);
                }
            }
            beforePrevious = previous;
            previous = row;
        }
        return previous[b.length()];
    }
}
