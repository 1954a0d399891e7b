package stillstand.uplift;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.concurrent.ExecutorService;
import stillstand.dating.CombinedAge;
import stillstand.dating.DateLikelihood;
import stillstand.ledger.Assumption;
import stillstand.ledger.RunCancelledException;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.FormerSeaLevel;
import stillstand.shoreline.IndicativeRule;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.uncertainty.DrawHistogram;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Summary;
import stillstand.uncertainty.Uncertain;

/**
 * What the levels of one site say of each other, from joint draws: rates between them with shared errors cancelled, and the sea
 * level that a dated level implies given the uplift of another.
 *
 * @param intervals between levels that follow each other in age
 * @param impliedSeaLevel of each dated level
 * @param assumptions what they rest on
 */
public record SiteRelations(
        List<BetweenLevels> intervals, List<ImpliedSeaLevel> impliedSeaLevel, List<Assumption> assumptions) {
    private static final int BLOCKS = 16;
    /** Two levels are told apart in age where so much of the draws has them in this order. */
    private static final double IN_ORDER = 0.975;
    /** No interval is shorter than this. */
    private static final double SHORTEST_KA = 0.01;

    public SiteRelations {
        intervals = List.copyOf(intervals);
        impliedSeaLevel = List.copyOf(impliedSeaLevel);
        assumptions = List.copyOf(assumptions);
    }

    /**
     * The relations of a site's levels.
     *
     * @param rule what an indicative range means
     * @param dates how far dates are believed
     * @param plan joint draws are no more than a level gets
     * @param executor draws the blocks; not owned
     * @throws RunCancelledException if the thread is interrupted
     */
    public static SiteRelations of(
            Site site,
            SeaLevelBasis basis,
            IndicativeRule rule,
            DateRules dates,
            DrawStreams streams,
            DrawPlan plan,
            ExecutorService executor) {
        List<Level> levels = new ArrayList<>();
        List<JointLevels.Entry> entries = new ArrayList<>();
        for (Level level : site.levels()) {
            List<SeaAtLevel> explanations = LevelExplanations.of(
                            level, basis, dates, site.name() + " / " + level.name())
                    .explanations();
            if (!explanations.isEmpty()) {
                levels.add(level);
                entries.add(new JointLevels.Entry(
                        level.name(),
                        FormerSeaLevel.ofLandform(site, level, rule),
                        level.loweringMetresPerKyr(),
                        explanations));
            }
        }
        if (entries.size() < 2) {
            return new SiteRelations(List.of(), List.of(), List.of());
        }
        JointLevels joint = new JointLevels(site.name(), site.coast().orElse(site.name()), entries, streams);
        List<List<JointLevels.Drawn>> blocks =
                BlockTasks.inOrder(executor, 0, Math.min(BLOCKS, plan.mostBlocks()), joint::draw);
        return new Relating(site, levels, entries, blocks, streams, dates).relations();
    }

    /** The joint draws of one site and what is read from them. */
    private record Relating(
            Site site,
            List<Level> levels,
            List<JointLevels.Entry> entries,
            List<List<JointLevels.Drawn>> blocks,
            DrawStreams streams,
            DateRules dates) {

        SiteRelations relations() {
            List<Assumption> assumptions = new ArrayList<>();
            List<Integer> byAge = new ArrayList<>();
            for (int i = 0; i < entries.size(); i++) {
                byAge.add(i);
            }
            byAge.sort(Comparator.comparingDouble(this::meanAgeKa));
            List<BetweenLevels> intervals = new ArrayList<>();
            for (int i = 0; i + 1 < byAge.size(); i++) {
                between(byAge.get(i), byAge.get(i + 1), assumptions).ifPresent(intervals::add);
            }
            List<ImpliedSeaLevel> implied = new ArrayList<>();
            for (int i = 0; i < entries.size(); i++) {
                implied(i).ifPresent(implied::add);
            }
            return new SiteRelations(intervals, implied, assumptions);
        }

        private double meanAgeKa(int level) {
            return entries.get(level).explanations().stream()
                    .mapToDouble(sea -> sea.probability() * sea.ageKa().mean())
                    .sum();
        }

        private Optional<BetweenLevels> between(int young, int old, List<Assumption> assumptions) {
            double[][] rates = new double[blocks.size()][DrawStreams.BLOCK_DRAWS];
            double[][] weights = new double[blocks.size()][DrawStreams.BLOCK_DRAWS];
            long inOrder = 0;
            long valid = 0;
            for (int b = 0; b < rates.length; b++) {
                JointLevels.Drawn younger = blocks.get(b).get(young);
                JointLevels.Drawn older = blocks.get(b).get(old);
                for (int i = 0; i < DrawStreams.BLOCK_DRAWS; i++) {
                    double spanKa = older.ageKa[i] - younger.ageKa[i];
                    boolean counts = younger.valid[i] && older.valid[i];
                    valid += counts ? 1 : 0;
                    if (counts && spanKa >= SHORTEST_KA) {
                        inOrder++;
                        weights[b][i] = 1;
                        rates[b][i] = (older.upliftMetres(i) - younger.upliftMetres(i)) / spanKa;
                    }
                }
            }
            if (inOrder < IN_ORDER * valid || inOrder == 0) {
                return Optional.empty();
            }
            if (inOrder < valid) {
                assumptions.add(new Assumption(
                        "draws in which the older of two levels is the younger are left out of the rate between them",
                        String.format(Locale.ROOT, "%.2g of the draws", 1 - (double) inOrder / valid),
                        "Stillstand's default",
                        site.name() + " / " + entries.get(young).name() + " to "
                                + entries.get(old).name()));
            }
            DrawHistogram draws = DrawHistogram.forDrawsLike(rates[0]);
            for (int b = 0; b < rates.length; b++) {
                draws.add(rates[b], weights[b]);
            }
            return Optional.of(new BetweenLevels(
                    site.name(),
                    entries.get(young).name(),
                    entries.get(old).name(),
                    Rate.of(draws.distribution(), inOrder == valid)));
        }

        private Optional<ImpliedSeaLevel> implied(int dated) {
            List<DateLikelihood> likelihoods = LevelExplanations.ownDates(levels.get(dated), dates);
            boolean hasDate = !LevelExplanations.datesOf(levels.get(dated), DatedSample.Role.LEVEL)
                    .isEmpty();
            Optional<Integer> other = hasDate ? surest(dated) : Optional.empty();
            if (other.isEmpty()) {
                return Optional.empty();
            }
            Optional<Uncertain> age = likelihoods.size() == 1
                    ? Optional.of(likelihoods.get(0).ageKa())
                    : CombinedAge.of(likelihoods).map(Uncertain.class::cast);
            return age.map(a -> implied(dated, other.get(), DatedStage.positive(a)));
        }

        private ImpliedSeaLevel implied(int dated, int other, Uncertain ageKa) {
            double[][] levelsMetres = new double[blocks.size()][DrawStreams.BLOCK_DRAWS];
            double[][] weights = new double[blocks.size()][DrawStreams.BLOCK_DRAWS];
            for (int b = 0; b < levelsMetres.length; b++) {
                double[] ages = new double[DrawStreams.BLOCK_DRAWS];
                streams.probabilities(site.name() + " / " + entries.get(dated).name() + " / dated age", b, ages);
                ageKa.toQuantiles(ages);
                JointLevels.Drawn own = blocks.get(b).get(dated);
                JointLevels.Drawn uplift = blocks.get(b).get(other);
                for (int i = 0; i < DrawStreams.BLOCK_DRAWS; i++) {
                    double rate = uplift.upliftMetres(i) / uplift.ageKa[i];
                    boolean counts = uplift.valid[i] && own.ageKa[i] > 0;
                    weights[b][i] = counts ? 1 : 0;
                    levelsMetres[b][i] = counts ? own.heightMetres[i] - rate * ages[i] : 0;
                }
            }
            DrawHistogram draws = DrawHistogram.forDrawsLike(levelsMetres[0]);
            for (int b = 0; b < levelsMetres.length; b++) {
                draws.add(levelsMetres[b], weights[b]);
            }
            return new ImpliedSeaLevel(
                    site.name(),
                    entries.get(dated).name(),
                    Quantity.of(Summary.of(ageKa), "ka"),
                    Quantity.of(draws.distribution().summary(), "m"),
                    entries.get(other).name(),
                    sharesSea(entries.get(dated), entries.get(other)));
        }

        /** The other level whose rate is known best, to first order; one that rests on another sea level comes first. */
        private Optional<Integer> surest(int dated) {
            Optional<Integer> best = Optional.empty();
            double least = Double.POSITIVE_INFINITY;
            for (int i = 0; i < entries.size(); i++) {
                if (i != dated) {
                    JointLevels.Entry entry = entries.get(i);
                    double sigma = FirstOrderRate.of(
                                    entry.height(),
                                    entry.loweringMetresPerKyr(),
                                    entry.explanations().get(0))
                            .sigma();
                    double rank = sharesSea(entries.get(dated), entry) ? sigma + 1e6 : sigma;
                    if (rank < least) {
                        least = rank;
                        best = Optional.of(i);
                    }
                }
            }
            return best;
        }

        /** Whether two levels may rest on the same sea level. */
        private static boolean sharesSea(JointLevels.Entry a, JointLevels.Entry b) {
            return a.explanations().stream()
                    .anyMatch(one -> b.explanations().stream().anyMatch(other -> sameSea(one, other)));
        }

        private static boolean sameSea(SeaAtLevel one, SeaAtLevel other) {
            if (one instanceof SeaAtLevel.AtHighstand a && other instanceof SeaAtLevel.AtHighstand b) {
                return a.highstand().equals(b.highstand());
            }
            if (one instanceof SeaAtLevel.OnCurve a && other instanceof SeaAtLevel.OnCurve b) {
                double apartKa = Math.abs(a.ageKa().mean() - b.ageKa().mean());
                return a.curve().id().equals(b.curve().id())
                        && apartKa < 3 * a.curve().facts().correlationTimeKa();
            }
            return false;
        }
    }
}
