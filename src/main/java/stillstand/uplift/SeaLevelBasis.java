package stillstand.uplift;

import java.util.Optional;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.Lowstands;
import stillstand.sealevel.SeaLevelCurve;

/**
 * One account of sea level under which rates are worked out.
 *
 * @param id of the curve or table it rests on
 * @param curve read where a level or coral formed at its own age; absent where the study has highstands only
 * @param highstands with the errors they share
 */
public record SeaLevelBasis(String id, Optional<SeaLevelCurve> curve, HighstandTable highstands) {
    /** The same account with the stands of the sea that drowned reefs record in place of the highstands. */
    SeaLevelBasis ofDrownedReefs() {
        HighstandTable lowstands = curve.filter(read -> read.id().equals(highstands.id()))
                .map(read -> Lowstands.of(read, highstands))
                .orElseGet(() -> Lowstands.own(highstands));
        return new SeaLevelBasis(id, curve, lowstands);
    }
}
