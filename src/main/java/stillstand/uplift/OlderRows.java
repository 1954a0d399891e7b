package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;

/**
 * Generic highstands older than a table: one every 41 kyr, the beat of the Earth's obliquity, to 2600 ka. Without them a flight
 * that reaches above the table's oldest row is read as rising too fast.
 */
public final class OlderRows {
    /** Label of every generic row. */
    public static final String STAGE = "older";

    private static final double STEP_KA = 41;
    private static final double OLDEST_KA = 2600;
    private static final double AGE_SIGMA_KA = 12;
    private static final double LEVEL_METRES = -10;
    private static final double LEVEL_SIGMA_METRES = 15;
    private static final double DURATION_KA = 8;

    private OlderRows() {}

    /** The rows, young to old, followed by generic ones. */
    public static List<FlightRow> after(List<FlightRow> rows) {
        List<FlightRow> all = new ArrayList<>(rows);
        double lastKa = rows.get(rows.size() - 1).ageKa();
        for (int k = 1; lastKa + k * STEP_KA <= OLDEST_KA; k++) {
            all.add(new FlightRow(
                    STAGE,
                    lastKa + k * STEP_KA,
                    AGE_SIGMA_KA,
                    LEVEL_METRES,
                    LEVEL_SIGMA_METRES,
                    0,
                    DURATION_KA,
                    1,
                    true,
                    false,
                    false));
        }
        return List.copyOf(all);
    }
}
