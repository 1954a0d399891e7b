package stillstand.uplift;

import java.util.List;
import org.apache.commons.rng.UniformRandomProvider;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.shoreline.HeightTerm;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.StandardNormal;
import stillstand.uncertainty.Uncertain;

/** One level under the sea of one draw after another: a rate, flat in displacement. Not for two threads at once. */
final class LevelUnderSea {
    private final ComparedLevel level;
    private final boolean oneCoast;
    private final UniformRandomProvider random;
    private boolean counts = true;

    LevelUnderSea(ComparedLevel level, boolean oneCoast, UniformRandomProvider random) {
        this.level = level;
        this.oneCoast = oneCoast;
        this.random = random;
    }

    /** Whether the last rate counts: its age was above 0 and inside the curve. */
    boolean counts() {
        return counts;
    }

    /** A rate under a sea, m/kyr; 0 where it does not count. */
    double rateUnder(SharedSea sea) {
        double heightMetres = 0;
        for (HeightTerm term : level.entry().height()) {
            heightMetres += term.sign() * draw(term.metres());
        }
        double lowering = draw(level.entry().loweringMetresPerKyr());
        SeaAtLevel explanation = explanation();
        double ageKa;
        double seaLevelMetres;
        counts = true;
        if (explanation instanceof SeaAtLevel.AtHighstand stand) {
            Highstand row = stand.highstand();
            double ownAgeKa = row.ownAgeSigmaKa(stand.shared());
            double sharedAgeKa = row.takesCurveAgeError() ? sea.ageShiftKa(stand.shared()) : 0;
            ComparedFlight.SharedRow shares = ComparedFlight.SharedRow.of(row);
            SharedSea.Departure known =
                    sea.departure(shares.key(), shares.varianceMetres2(oneCoast), ownAgeKa * ownAgeKa);
            double levelDeviate = normal();
            double slope = known.levelVariance() > 0 ? known.covariance() / Math.sqrt(known.levelVariance()) : 0;
            double rest = Math.sqrt(Math.max(0, known.ageVariance() - slope * slope));
            double ageDeparture = known.ageKa() + slope * levelDeviate + rest * normal();
            seaLevelMetres = row.level().mean()
                    + known.levelMetres()
                    + Math.sqrt(known.levelVariance()) * levelDeviate
                    + (oneCoast ? 0 : row.localOffsetSigmaMetres() * normal())
                    + (row.takesOffset() ? sea.offsetMetres(stand.shared()) : 0)
                    + (row.takesInterstadialFactor() ? sea.interstadialMetres(stand.shared()) : 0);
            double allAgeKa =
                    Math.hypot(row.takesCurveAgeError() ? stand.shared().sharedAgeSigmaKa() : 0, ownAgeKa);
            ageKa = value(stand.ageKa(), allAgeKa == 0 ? 0 : (sharedAgeKa + ageDeparture) / allAgeKa);
        } else {
            SeaAtLevel.OnCurve read = (SeaAtLevel.OnCurve) explanation;
            SeaLevelCurve curve = read.curve();
            ageKa = draw(read.ageKa());
            double readAtKa = ageKa + read.curveAgeSigmaKa() * sea.curveAge;
            counts = readAtKa >= curve.fromKa() && readAtKa <= curve.toKa();
            double[] metres = new double[1];
            double inside = Math.min(Math.max(readAtKa, curve.fromKa()), curve.toKa());
            curve.readAt(new double[] {inside}, new double[] {normal()}, metres);
            seaLevelMetres = metres[0] + read.sharedSigmaMetres() * sea.offset;
        }
        counts &= ageKa > 0;
        return counts ? (heightMetres + lowering * ageKa - seaLevelMetres) / ageKa : 0;
    }

    private SeaAtLevel explanation() {
        List<SeaAtLevel> all = level.entry().explanations();
        double left = all.size() > 1 ? random.nextDouble() : 0;
        int e = 0;
        while (e < all.size() - 1 && left > all.get(e).probability()) {
            left -= all.get(e++).probability();
        }
        return all.get(e);
    }

    private double draw(Uncertain number) {
        if (number.isExact()) {
            return number.mean();
        }
        return number instanceof Normal
                ? number.mean() + number.standardDeviation() * normal()
                : number.quantile(FlightUnderSea.uniform(random));
    }

    private double normal() {
        return FlightUnderSea.normal(FlightUnderSea.uniform(random));
    }

    /** From a standard normal deviate to a value of a number. */
    private static double value(Uncertain number, double deviate) {
        if (number.isExact()) {
            return number.mean();
        }
        if (number instanceof Normal normal) {
            return normal.mean() + normal.sigma() * deviate;
        }
        double probability = StandardNormal.cumulativeProbability(deviate);
        return number.quantile(Math.min(Math.max(probability, 1e-15), 1 - 1e-15));
    }
}
