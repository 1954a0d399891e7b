package stillstand.uplift;

import java.util.List;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.shoreline.HeightTerm;
import stillstand.uncertainty.Uncertain;

/**
 * The rate of a level by the law of propagation of uncertainty (JCGM 100:2008, 5.1): with independent inputs
 * {@code sigma_U^2 = [sigma_z^2 + sigma_e^2 + (U - w + e')^2 sigma_t^2 + e'^2 sigma_C^2] / t^2 + sigma_w^2}, where
 * {@code e'} is the slope of the curve per ka of age at the age (0 at a highstand) and {@code sigma_C} the error of the
 * curve's ages. It takes every input for normal and the rate for linear, which the draws do not.
 */
final class FirstOrderRate {
    private FirstOrderRate() {}

    /** Rate and standard deviation, m/kyr. */
    static LevelAnswer.FirstOrder of(List<HeightTerm> height, Uncertain loweringMetresPerKyr, SeaAtLevel sea) {
        double heightMetres = 0;
        double variance = 0;
        for (HeightTerm term : height) {
            heightMetres += term.meanMetres();
            variance += square(term.metres().standardDeviation());
        }
        double ageKa = sea.ageKa().mean();
        double seaLevelMetres;
        double slope = 0;
        if (sea instanceof SeaAtLevel.OnCurve read) {
            SeaLevelCurve curve = read.curve();
            Uncertain there = curve.readAt(ageKa);
            seaLevelMetres = there.mean();
            slope = curve.slopeMetresPerKaAt(ageKa);
            variance += square(there.standardDeviation()) + square(read.sharedSigmaMetres());
            variance += square(slope * read.curveAgeSigmaKa());
        } else if (sea instanceof SeaAtLevel.AtHighstand stand) {
            seaLevelMetres = stand.seaLevelMetres().mean();
            variance += square(stand.seaLevelMetres().standardDeviation()) + square(stand.sharedSigmaMetres());
        } else {
            throw new IllegalArgumentException("unknown explanation of a level: " + sea);
        }
        double rise = (heightMetres - seaLevelMetres) / ageKa;
        variance += square((rise + slope) * sea.ageKa().standardDeviation());
        double sigma = Math.sqrt(variance / square(ageKa) + square(loweringMetresPerKyr.standardDeviation()));
        return new LevelAnswer.FirstOrder(rise + loweringMetresPerKyr.mean(), sigma);
    }

    private static double square(double x) {
        return x * x;
    }
}
