package stillstand.uplift;

/** The groups of inputs among which the variance of a rate is shared out. */
public enum InputGroup {
    /** Survey, datum, indicative meaning, cover, co-seismic step. */
    ELEVATION,
    /** Depth of growth of a coral. */
    PALAEODEPTH,
    /** Age of the level, and which highstand it records. */
    AGE,
    /** Level of the sea at that age, with the curve's age scale and the errors that highstands share. */
    SEA_LEVEL,
    /** Rate at which the surface was lowered. */
    SURFACE_LOWERING
}
