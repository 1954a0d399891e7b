package stillstand.sealevel;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import stillstand.ledger.Assumption;
import stillstand.uncertainty.Normal;

/**
 * The stands of the sea that reefs of a sinking island record: they grow up with it, and stop in the rise that follows a lowstand,
 * at or somewhat above its level.
 *
 * <p>Picked from a curve, a row stands between two highstands that follow one another: the lowest turning point of the central line
 * between them, with the errors of the curve there. The reef stopped later and higher by an offset: {@value #LATER_KA} ka younger than
 * the turning point, and above it by a half-normal number of scale {@value #ABOVE_SCALE_METRES} m, which enters by its mean and
 * variance. A table of the user's own is taken as it stands: its rows say when and how high reefs stopped.
 */
public final class Lowstands {
    /** How much younger than the lowest sea a reef stopped, ka; its standard deviation is the same. */
    static final double LATER_KA = 3;
    /** Scale of the height above the lowest sea at which a reef stopped, m. */
    static final double ABOVE_SCALE_METRES = 15;

    private static final double GROWTH_KA = 10;
    private static final double LOCAL_SIGMA_METRES = 5;
    private static final double LEAST_AGE_KA = 0.1;

    private Lowstands() {}

    /**
     * The rows that drowned reefs are matched to, where highstands come from a curve.
     *
     * @param highstands picked from the curve: lowstands lie between them
     * @throws IllegalArgumentException if the curve shows no lowstand between them
     */
    public static HighstandTable of(SeaLevelCurve curve, HighstandTable highstands) {
        List<Highstand> stands =
                highstands.rows().stream().filter(row -> !row.isOlder()).toList();
        List<Highstand> rows = new ArrayList<>();
        for (int i = 1; i < stands.size(); i++) {
            Highstand younger = stands.get(i - 1);
            Highstand older = stands.get(i);
            TurningPoints.lowestBetween(curve, younger.ageKa(), older.ageKa())
                    .ifPresent(pick -> rows.add(row(curve, label(younger.stage(), older.stage()), pick)));
        }
        List<Assumption> said = new ArrayList<>(curve.assumptions());
        said.add(new Assumption(
                "lowstands are picked from a curve",
                String.format(
                        Locale.ROOT,
                        "lowest turning point between two highstands; a reef stopped %.0f ± %.0f ka later, and above it by a"
                                + " half-normal number of scale %.0f m; local sea level ± %.0f m (1 sigma)",
                        LATER_KA,
                        LATER_KA,
                        ABOVE_SCALE_METRES,
                        LOCAL_SIGMA_METRES),
                curve.facts().citation() + "; offsets: Stillstand's default",
                "drowned reefs"));
        return new HighstandTable(curve.id(), false, rows, highstands.sharedErrors(), said);
    }

    /** The rows of a table of the user's own, without those that highstands get by default. */
    public static HighstandTable own(HighstandTable table) {
        List<Highstand> rows = table.rows().stream()
                .filter(row -> !row.isOlder() && !row.equals(Highstand.holocene()))
                .toList();
        return new HighstandTable(table.id(), table.complete(), rows, table.sharedErrors(), table.assumptions());
    }

    private static Highstand row(SeaLevelCurve curve, String label, TurningPoint pick) {
        double aboveMetres = ABOVE_SCALE_METRES * Math.sqrt(2 / Math.PI);
        double aboveSigmaMetres = ABOVE_SCALE_METRES * Math.sqrt(1 - 2 / Math.PI);
        return new Highstand(
                label,
                HighstandClass.INTERGLACIAL,
                Math.max(LEAST_AGE_KA, pick.ageKa() - LATER_KA),
                LATER_KA,
                new Normal(
                        pick.levelMetres() + aboveMetres,
                        Math.hypot(curve.readAt(pick.ageKa()).standardDeviation(), aboveSigmaMetres)),
                GROWTH_KA,
                1,
                true,
                false,
                true,
                LOCAL_SIGMA_METRES,
                curve.id());
    }

    /**
     * {@code 8} between 7e and 9a, {@code 5d} between 5c and 5e; with a highstand 6d inside a glacial, {@code 6} between 5e and 6d and
     * {@code 6e} between 6d and 7a; where nothing of that fits, both names.
     */
    static String label(String younger, String older) {
        Optional<Integer> low = number(younger);
        Optional<Integer> high = number(older);
        if (low.isPresent() && high.isPresent()) {
            if (high.get() - low.get() == 2) {
                return String.valueOf(low.get() + 1);
            }
            String one = younger.substring(String.valueOf(low.get()).length());
            String two = older.substring(String.valueOf(high.get()).length());
            if (high.get().equals(low.get())
                    && one.length() == 1
                    && two.length() == 1
                    && two.charAt(0) - one.charAt(0) == 2) {
                return low.get() + String.valueOf((char) (one.charAt(0) + 1));
            }
            if (high.get() - low.get() == 1) {
                boolean within = high.get() % 2 == 0;
                return within || one.length() != 1
                        ? String.valueOf(within ? high.get() : low.get())
                        : low.get() + String.valueOf((char) (one.charAt(0) + 1));
            }
        }
        return younger + "/" + older;
    }

    private static Optional<Integer> number(String stage) {
        int digits = 0;
        while (digits < stage.length() && stage.charAt(digits) >= '0' && stage.charAt(digits) <= '9') {
            digits++;
        }
        return digits > 0 && digits < 4 ? Optional.of(Integer.valueOf(stage.substring(0, digits))) : Optional.empty();
    }
}
