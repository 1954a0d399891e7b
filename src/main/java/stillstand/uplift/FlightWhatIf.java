package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import java.util.function.Function;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Tabulated;
import stillstand.uncertainty.Uncertain;
import stillstand.uncertainty.Uniform;

/** What the answer of a flight hangs on: the same flight without a level, and with one kind of error halved. */
public final class FlightWhatIf {
    private static final int TABLE_POINTS = 200;

    private FlightWhatIf() {}

    /**
     * The flight without one level.
     *
     * @param level its number, from 0
     * @param logPredictive logarithm of the evidence with it less that without it: how well the others foretell both that it is
     *     there and how high it stands
     * @param without posterior of the rate without it
     */
    public record LeftOut(int level, double logPredictive, RatePosterior without) {}

    /**
     * Leaves out each level in turn; of a flight of one level, none.
     *
     * @param all posterior with every level
     * @param rateOf how a model is answered
     */
    public static List<LeftOut> leaveOneOut(
            FlightModel model, RatePosterior all, Function<FlightModel, RatePosterior> rateOf) {
        List<LeftOut> results = new ArrayList<>();
        for (int i = 0; i < model.levels().size() && model.levels().size() > 1; i++) {
            List<FlightLevel> others = new ArrayList<>(model.levels());
            others.remove(i);
            RatePosterior without = rateOf.apply(model.withLevels(others));
            results.add(new LeftOut(i, all.logEvidence() - without.logEvidence(), without));
        }
        return List.copyOf(results);
    }

    /** A kind of error. */
    public enum ErrorGroup {
        /** Heights of the levels. */
        ELEVATION,
        /** Dates of the levels. */
        DATES,
        /** Own errors of the highstands' levels. */
        HIGHSTAND_LEVELS,
        /** Own errors of the highstands' ages. */
        HIGHSTAND_AGES
    }

    /** The same model with the standard deviations of one kind of error halved; to 0 would make conflicts and mislead. */
    public static FlightModel halved(FlightModel model, ErrorGroup group) {
        return switch (group) {
            case ELEVATION ->
                model.withLevels(model.levels().stream()
                        .map(level -> with(level, halved(level.shorelineMetres()), level.datesKa()))
                        .toList());
            case DATES ->
                model.withLevels(model.levels().stream()
                        .map(level -> with(
                                level,
                                level.shorelineMetres(),
                                level.datesKa().stream()
                                        .map(FlightWhatIf::halved)
                                        .toList()))
                        .toList());
            case HIGHSTAND_LEVELS ->
                model.withRows(model.rows().stream()
                        .map(row -> row.withSigmas(row.ageSigmaKa(), row.levelSigmaMetres() / 2))
                        .toList());
            case HIGHSTAND_AGES ->
                model.withRows(model.rows().stream()
                        .map(row -> row.withSigmas(row.ageSigmaKa() / 2, row.levelSigmaMetres()))
                        .toList());
        };
    }

    private static FlightLevel with(FlightLevel level, Uncertain shorelineMetres, List<Uncertain> datesKa) {
        return new FlightLevel(
                level.name(), shorelineMetres, datesKa, level.strayFactor(), level.allowedRows(), level.mayBeStray());
    }

    /** The number drawn in to half its distance from the mean. */
    private static Uncertain halved(Uncertain number) {
        double mean = number.mean();
        if (number instanceof Exact) {
            return number;
        }
        if (number instanceof Normal normal) {
            return new Normal(mean, normal.sigma() / 2);
        }
        if (number instanceof Uniform uniform) {
            return new Uniform(mean + (uniform.low() - mean) / 2, mean + (uniform.high() - mean) / 2);
        }
        double low = number.quantile(1e-6);
        double high = number.quantile(1 - 1e-6);
        List<Tabulated.Point> points = new ArrayList<>();
        double before = number.cumulativeProbability(low);
        for (int k = 0; k < TABLE_POINTS; k++) {
            double from = low + (high - low) * k / TABLE_POINTS;
            double to = low + (high - low) * (k + 1) / TABLE_POINTS;
            double until = number.cumulativeProbability(to);
            points.add(new Tabulated.Point(mean + (from - mean) / 2, Math.max(0, until - before)));
            points.add(new Tabulated.Point(mean + (to - mean) / 2, Math.max(0, until - before)));
            before = until;
        }
        return Tabulated.of(points);
    }
}
