package stillstand.uplift;

import stillstand.sealevel.SeaLevelCurve;
import stillstand.uncertainty.Uncertain;

/** One explanation of a level: when it formed and where the sea stood then. */
public sealed interface SeaAtLevel {
    /** Age of the level under this explanation, ka, above 0. */
    Uncertain ageKa();

    /** How probable it is among the explanations of the level; they sum to 1. */
    double probability();

    /**
     * The level records the top of a highstand.
     *
     * @param stage label of the highstand
     * @param probability among the explanations of the level
     * @param ageKa of the highstand, given the dates of the level
     * @param seaLevelMetres of the highstand itself
     * @param sharedSigmaMetres standard deviation of what it shares with other highstands: offset, interstadial factor,
     *     local sea level; 0 or more
     */
    record AtHighstand(
            String stage, double probability, Uncertain ageKa, Uncertain seaLevelMetres, double sharedSigmaMetres)
            implements SeaAtLevel {
        public AtHighstand {
            if (!(probability > 0 && probability <= 1)) {
                throw new IllegalArgumentException("probability must lie in 0 to 1 but is " + probability);
            }
            if (!(sharedSigmaMetres >= 0 && sharedSigmaMetres < Double.POSITIVE_INFINITY)) {
                throw new IllegalArgumentException("sharedSigmaMetres must be 0 or more but is " + sharedSigmaMetres);
            }
        }
    }

    /**
     * The level formed at its dated age, whatever the sea did then: the curve is read at each drawn age.
     *
     * @param curve read at the age; never beyond its span
     * @param ageKa of the level
     * @param curveAgeSigmaKa standard deviation of the curve's age scale, 0 or more
     * @param sharedSigmaMetres standard deviation of the offset shared by the whole curve, 0 or more
     */
    record OnCurve(SeaLevelCurve curve, Uncertain ageKa, double curveAgeSigmaKa, double sharedSigmaMetres)
            implements SeaAtLevel {
        @Override
        public double probability() {
            return 1;
        }
    }
}
