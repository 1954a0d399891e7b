package stillstand.uplift;

import java.util.Optional;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.SeaLevelCurve;

/**
 * One account of sea level under which rates are worked out.
 *
 * @param id of the curve or table it rests on
 * @param curve read where a level or coral formed at its own age; absent where the study has highstands only
 * @param highstands with the errors they share
 */
public record SeaLevelBasis(String id, Optional<SeaLevelCurve> curve, HighstandTable highstands) {}
