package stillstand.sealevel;

import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * Local minus global sea level on one coast, from a model of glacial isostatic adjustment or from data: at named highstands, and at
 * ages, between which it is linear and beyond which it stays what it is at the last.
 *
 * @param atStages by label
 * @param atAges young to old
 */
public record LocalDeparture(Map<String, Estimate> atStages, List<AtAge> atAges) {
    /**
     * A departure.
     *
     * @param offsetMetres local less global sea level, m
     * @param sigmaMetres one standard deviation, 0 or more
     */
    public record Estimate(double offsetMetres, double sigmaMetres) {
        public Estimate {
            if (!(Math.abs(offsetMetres) < Double.POSITIVE_INFINITY)) {
                throw new IllegalArgumentException("offsetMetres must be finite but is " + offsetMetres);
            }
            if (!(sigmaMetres >= 0 && sigmaMetres < Double.POSITIVE_INFINITY)) {
                throw new IllegalArgumentException("sigmaMetres must be 0 or more but is " + sigmaMetres);
            }
        }
    }

    /** A departure at an age, ka. */
    public record AtAge(double ageKa, Estimate estimate) {}

    public LocalDeparture {
        atStages = Map.copyOf(atStages);
        atAges =
                atAges.stream().sorted(Comparator.comparingDouble(AtAge::ageKa)).toList();
    }

    /** At a highstand: what is said of its label, else what the ages around it say; empty where neither does. */
    public Optional<Estimate> at(Highstand row) {
        return Optional.ofNullable(atStages.get(row.stage()))
                .or(() -> covers(row.ageKa()) ? atAge(row.ageKa()) : Optional.empty());
    }

    private boolean covers(double ageKa) {
        return !atAges.isEmpty()
                && ageKa >= atAges.get(0).ageKa()
                && ageKa <= atAges.get(atAges.size() - 1).ageKa();
    }

    /** At an age; empty where no ages are given. */
    public Optional<Estimate> atAge(double ageKa) {
        if (atAges.isEmpty()) {
            return Optional.empty();
        }
        AtAge before = atAges.get(0);
        for (AtAge next : atAges) {
            if (next.ageKa() >= ageKa) {
                double width = next.ageKa() - before.ageKa();
                double part = width > 0 ? Math.max(0, (ageKa - before.ageKa()) / width) : 0;
                return Optional.of(between(before.estimate(), next.estimate(), part));
            }
            before = next;
        }
        return Optional.of(before.estimate());
    }

    private static Estimate between(Estimate young, Estimate old, double part) {
        return new Estimate(
                young.offsetMetres() + part * (old.offsetMetres() - young.offsetMetres()),
                young.sigmaMetres() + part * (old.sigmaMetres() - young.sigmaMetres()));
    }
}
