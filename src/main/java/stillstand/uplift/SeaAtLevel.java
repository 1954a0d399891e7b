package stillstand.uplift;

import stillstand.sealevel.Highstand;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.SharedErrors;
import stillstand.uncertainty.Uncertain;

/** One explanation of a level: when it formed and where the sea stood then. */
public sealed interface SeaAtLevel {
    /** Age of the level under this explanation, ka, above 0. */
    Uncertain ageKa();

    /** How probable it is among the explanations of the level; they sum to 1. */
    double probability();

    /** The same explanation, more or less probable. */
    SeaAtLevel withProbability(double other);

    /**
     * The level records the top of a highstand.
     *
     * @param highstand the row of the table
     * @param shared the errors that rows share, as far as this row takes them
     * @param probability among the explanations of the level
     * @param ageKa of the highstand, given the dates of the level
     */
    record AtHighstand(Highstand highstand, SharedErrors shared, double probability, Uncertain ageKa)
            implements SeaAtLevel {
        public AtHighstand {
            if (!(probability > 0 && probability <= 1)) {
                throw new IllegalArgumentException("probability must lie in 0 to 1 but is " + probability);
            }
        }

        @Override
        public AtHighstand withProbability(double other) {
            return new AtHighstand(highstand, shared, other, ageKa);
        }

        /** Label of the highstand. */
        public String stage() {
            return highstand.stage();
        }

        /** Height of the sea then, m, without what the row shares with others. */
        public Uncertain seaLevelMetres() {
            return highstand.level();
        }

        /** Standard deviation of offset, interstadial factor and local sea level together, m. */
        public double sharedSigmaMetres() {
            double offset = highstand.takesOffset() ? shared.offsetSigmaMetres() : 0;
            double factor = highstand.takesInterstadialFactor() ? shared.interstadialSigmaMetres() : 0;
            return Math.hypot(highstand.localOffsetSigmaMetres(), Math.hypot(offset, factor));
        }
    }

    /**
     * The level formed at its dated age, whatever the sea did then: the curve is read at each drawn age.
     *
     * @param curve read at the age; never beyond its span
     * @param ageKa of the level
     * @param curveAgeSigmaKa standard deviation of the curve's age scale, 0 or more
     * @param sharedSigmaMetres standard deviation of the offset shared by the whole curve, 0 or more
     * @param probability among the explanations of the level: that of the curve among the study's curves
     */
    record OnCurve(
            SeaLevelCurve curve, Uncertain ageKa, double curveAgeSigmaKa, double sharedSigmaMetres, double probability)
            implements SeaAtLevel {
        public OnCurve {
            if (!(probability > 0 && probability <= 1)) {
                throw new IllegalArgumentException("probability must lie in 0 to 1 but is " + probability);
            }
        }

        @Override
        public OnCurve withProbability(double other) {
            return new OnCurve(curve, ageKa, curveAgeSigmaKa, sharedSigmaMetres, other);
        }
    }
}
