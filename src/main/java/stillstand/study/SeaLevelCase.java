package stillstand.study;

import java.util.Optional;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.LocalDeparture;
import stillstand.sealevel.SeaLevelCurve;

/**
 * One account of past sea level that a study runs under.
 *
 * @param id of the curve, or of the table where the highstands come from a table
 * @param weight among the study's cases, above 0
 * @param curve read where a level or coral uses its own age; absent where highstands come from a table and no curve is named
 * @param highstands with overrides, defaults and the study's own settings in them
 * @param withoutOverrides the curve's own highstands, where independent estimates replaced some of them
 */
public record SeaLevelCase(
        String id,
        double weight,
        Optional<SeaLevelCurve> curve,
        HighstandTable highstands,
        Optional<HighstandTable> withoutOverrides) {
    /**
     * The same account as it stands on a coast.
     *
     * @param where the site, for the ledger
     * @param source who says so
     */
    SeaLevelCase at(LocalDeparture departure, String where, String source) {
        return new SeaLevelCase(
                id,
                weight,
                curve.map(each -> each.at(departure, where, source)),
                highstands.at(departure, where, source),
                withoutOverrides.map(each -> each.at(departure, where, source)));
    }

    public SeaLevelCase {
        if (!(weight > 0 && weight < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("weight must be above 0 but is " + weight);
        }
    }

    /** A case in which nothing was replaced. */
    public SeaLevelCase(String id, double weight, Optional<SeaLevelCurve> curve, HighstandTable highstands) {
        this(id, weight, curve, highstands, Optional.empty());
    }
}
