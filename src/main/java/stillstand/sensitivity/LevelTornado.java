package stillstand.sensitivity;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import stillstand.shoreline.HeightTerm;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Uncertain;
import stillstand.uplift.SeaAtLevel;

/**
 * One-at-a-time ranges of a level's rate: each input at the ends of its own interval, all others at their medians. Rates in m/kyr.
 * The longest bar comes first. Bars do not add up to the spread of the rate; the budget of variance does.
 *
 * @param site of the level
 * @param level its name
 * @param stage the most probable highstand, under which the bars are drawn; absent where the level reads the curve
 * @param rate with every input at its median
 * @param bars of the inputs that have a spread
 * @param otherStages the rate at the medians under each other highstand that may explain the level
 */
public record LevelTornado(
        String site, String level, Optional<String> stage, double rate, List<Bar> bars, List<OtherStage> otherStages) {
    public LevelTornado {
        bars = List.copyOf(bars);
        otherStages = List.copyOf(otherStages);
    }

    /**
     * What one input does by itself.
     *
     * @param input what it is
     * @param unit of its values
     * @param input68 its values with equal tails of 15.9 %
     * @param input95 its values with equal tails of 2.5 %
     * @param rateAtLow68 the rate where the input is at the low end of {@code input68}
     * @param rateAtHigh68 at the high end of it
     * @param rateAtLow95 at the low end of {@code input95}
     * @param rateAtHigh95 at the high end of it
     */
    public record Bar(
            String input,
            String unit,
            Interval input68,
            Interval input95,
            double rateAtLow68,
            double rateAtHigh68,
            double rateAtLow95,
            double rateAtHigh95) {
        /** How far the rate moves between the ends of {@code input95}, m/kyr. */
        public double span95() {
            return Math.abs(rateAtHigh95 - rateAtLow95);
        }
    }

    /**
     * Another highstand.
     *
     * @param stage its label
     * @param probability that it explains the level
     * @param rate with every input at its median
     */
    public record OtherStage(String stage, double probability, double rate) {}

    /**
     * The tornado of one level.
     *
     * @param height terms of the height of the former sea, without lowering
     * @param loweringMetresPerKyr rate at which the surface was lowered
     * @param explanations one or more
     * @return absent where the median age lies beyond the curve
     * @throws IllegalArgumentException if there is no explanation
     */
    public static Optional<LevelTornado> of(
            String site,
            String level,
            List<HeightTerm> height,
            Uncertain loweringMetresPerKyr,
            List<? extends SeaAtLevel> explanations) {
        List<? extends SeaAtLevel> ranked = explanations.stream()
                .sorted(Comparator.comparingDouble((SeaAtLevel sea) -> -sea.probability()))
                .toList();
        if (ranked.isEmpty()) {
            throw new IllegalArgumentException("a tornado needs an explanation of its level");
        }
        LevelInputs inputs = new LevelInputs(height, loweringMetresPerKyr, ranked.get(0));
        double middle = inputs.rateMetresPerKyr(inputs.medians());
        if (Double.isNaN(middle)) {
            return Optional.empty();
        }
        List<Bar> bars = new ArrayList<>();
        for (int i = 0; i < inputs.inputs().size(); i++) {
            bar(inputs, i).ifPresent(bars::add);
        }
        bars.sort(Comparator.comparingDouble(Bar::span95).reversed());
        List<OtherStage> others = new ArrayList<>();
        for (SeaAtLevel sea : ranked.subList(1, ranked.size())) {
            LevelInputs under = new LevelInputs(height, loweringMetresPerKyr, sea);
            stage(sea)
                    .ifPresent(stage -> others.add(
                            new OtherStage(stage, sea.probability(), under.rateMetresPerKyr(under.medians()))));
        }
        return Optional.of(new LevelTornado(site, level, stage(ranked.get(0)), middle, bars, others));
    }

    /** Absent where an end of the input leads beyond the curve. */
    private static Optional<Bar> bar(LevelInputs inputs, int i) {
        LevelInputs.Input input = inputs.inputs().get(i);
        double tail68 = (1 - Interval.PROBABILITY_68) / 2;
        double tail95 = (1 - Interval.PROBABILITY_95) / 2;
        double[] at = {tail68, 1 - tail68, tail95, 1 - tail95};
        double[] value = new double[at.length];
        double[] rate = new double[at.length];
        for (int k = 0; k < at.length; k++) {
            value[k] = input.value().quantile(at[k]);
            double[] values = inputs.medians();
            values[i] = value[k];
            rate[k] = inputs.rateMetresPerKyr(values);
            if (Double.isNaN(rate[k])) {
                return Optional.empty();
            }
        }
        return Optional.of(new Bar(
                input.name(),
                input.unit(),
                new Interval(value[0], value[1]),
                new Interval(value[2], value[3]),
                rate[0],
                rate[1],
                rate[2],
                rate[3]));
    }

    private static Optional<String> stage(SeaAtLevel sea) {
        return sea instanceof SeaAtLevel.AtHighstand stand ? Optional.of(stand.stage()) : Optional.empty();
    }
}
