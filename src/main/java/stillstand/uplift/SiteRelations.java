package stillstand.uplift;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
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
    private static final int LEAST_BLOCKS = 4;
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
            SeaLevelEnsemble ensemble,
            IndicativeRule rule,
            DateRules dates,
            DrawStreams streams,
            DrawPlan plan,
            ExecutorService executor) {
        Map<String, JointLevels.Entry> first = new HashMap<>();
        List<Drawing> drawings = new ArrayList<>();
        int blocks = Math.min(Math.max(LEAST_BLOCKS, BLOCKS / ensemble.size()), plan.mostBlocks());
        for (int k = 0; k < ensemble.size(); k++) {
            List<JointLevels.Entry> entries = entries(site, ensemble.bases().get(k), rule, dates);
            entries.forEach(entry -> first.putIfAbsent(entry.name(), entry));
            if (entries.size() >= 2) {
                JointLevels joint = new JointLevels(site.name(), site.coast().orElse(site.name()), entries, streams);
                double weight = ensemble.weights().get(k);
                List<List<JointLevels.Drawn>> drawn = BlockTasks.inOrder(executor, 0, blocks, joint::draw);
                for (int block = 0; block < blocks; block++) {
                    drawings.add(Drawing.of(weight, block, entries, drawn.get(block)));
                }
            }
        }
        List<Level> levels = site.levels().stream()
                .filter(level -> first.containsKey(level.name()))
                .toList();
        if (levels.size() < 2 || drawings.isEmpty()) {
            return new SiteRelations(List.of(), List.of(), List.of());
        }
        List<JointLevels.Entry> entries = levels.stream()
                .flatMap(level -> Optional.ofNullable(first.get(level.name())).stream())
                .toList();
        return new Relating(site, levels, entries, drawings, streams, dates).relations();
    }

    private static List<JointLevels.Entry> entries(
            Site site, SeaLevelBasis basis, IndicativeRule rule, DateRules dates) {
        List<JointLevels.Entry> entries = new ArrayList<>();
        for (Level level : site.levels()) {
            List<SeaAtLevel> explanations = LevelExplanations.of(
                            level, basis, dates, site.name() + " / " + level.name())
                    .explanations();
            if (!explanations.isEmpty()) {
                entries.add(new JointLevels.Entry(
                        level.name(),
                        FormerSeaLevel.ofLandform(site, level, rule),
                        level.loweringMetresPerKyr(),
                        explanations));
            }
        }
        return entries;
    }

    /**
     * A block of joint draws under one account of sea level.
     *
     * @param weight of the account
     * @param block its number under this account
     * @param levels drawn, by name
     */
    private record Drawing(double weight, int block, Map<String, JointLevels.Drawn> levels) {
        static Drawing of(double weight, int block, List<JointLevels.Entry> entries, List<JointLevels.Drawn> drawn) {
            Map<String, JointLevels.Drawn> levels = new HashMap<>();
            for (int i = 0; i < entries.size(); i++) {
                levels.put(entries.get(i).name(), drawn.get(i));
            }
            return new Drawing(weight, block, levels);
        }

        Optional<JointLevels.Drawn> of(JointLevels.Entry entry) {
            return Optional.ofNullable(levels.get(entry.name()));
        }
    }

    /** Columns of draws with their weights; the range of their histogram is that of the first block of each account. */
    private static final class Gathered {
        private final List<double[]> values = new ArrayList<>();
        private final List<double[]> weights = new ArrayList<>();
        private final List<double[]> pilots = new ArrayList<>();

        void add(Drawing drawing, double[] column, double[] columnWeights) {
            values.add(column);
            weights.add(columnWeights);
            if (drawing.block() == 0) {
                pilots.add(column);
            }
        }

        DrawHistogram histogram() {
            DrawHistogram draws = DrawHistogram.forDrawsLike(
                    pilots.stream().flatMapToDouble(Arrays::stream).toArray());
            for (int b = 0; b < values.size(); b++) {
                draws.add(values.get(b), weights.get(b));
            }
            return draws;
        }
    }

    /** The joint draws of one site and what is read from them. */
    private record Relating(
            Site site,
            List<Level> levels,
            List<JointLevels.Entry> entries,
            List<Drawing> drawings,
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
            Gathered gathered = new Gathered();
            double inOrder = 0;
            double valid = 0;
            for (Drawing drawing : drawings) {
                Optional<JointLevels.Drawn> youngDrawn = drawing.of(entries.get(young));
                Optional<JointLevels.Drawn> oldDrawn = drawing.of(entries.get(old));
                if (youngDrawn.isEmpty() || oldDrawn.isEmpty()) {
                    continue;
                }
                JointLevels.Drawn younger = youngDrawn.get();
                JointLevels.Drawn older = oldDrawn.get();
                double[] rate = new double[DrawStreams.BLOCK_DRAWS];
                double[] weight = new double[DrawStreams.BLOCK_DRAWS];
                for (int i = 0; i < DrawStreams.BLOCK_DRAWS; i++) {
                    double spanKa = older.ageKa[i] - younger.ageKa[i];
                    boolean counts = younger.valid[i] && older.valid[i];
                    valid += counts ? drawing.weight() : 0;
                    if (counts && spanKa >= SHORTEST_KA) {
                        inOrder += drawing.weight();
                        weight[i] = drawing.weight();
                        rate[i] = (older.upliftMetres(i) - younger.upliftMetres(i)) / spanKa;
                    }
                }
                gathered.add(drawing, rate, weight);
            }
            if (inOrder < IN_ORDER * valid || inOrder == 0) {
                return Optional.empty();
            }
            if (inOrder < valid) {
                assumptions.add(new Assumption(
                        "draws in which the older of two levels is the younger are left out of the rate between them",
                        String.format(Locale.ROOT, "%.2g of the draws", 1 - inOrder / valid),
                        "Stillstand's default",
                        site.name() + " / " + entries.get(young).name() + " to "
                                + entries.get(old).name()));
            }
            DrawHistogram draws = gathered.histogram();
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
            Gathered gathered = new Gathered();
            for (Drawing drawing : drawings) {
                Optional<JointLevels.Drawn> ownDrawn = drawing.of(entries.get(dated));
                Optional<JointLevels.Drawn> otherDrawn = drawing.of(entries.get(other));
                if (ownDrawn.isEmpty() || otherDrawn.isEmpty()) {
                    continue;
                }
                double[] ages = new double[DrawStreams.BLOCK_DRAWS];
                streams.probabilities(
                        site.name() + " / " + entries.get(dated).name() + " / dated age", drawing.block(), ages);
                ageKa.toQuantiles(ages);
                JointLevels.Drawn own = ownDrawn.get();
                JointLevels.Drawn uplift = otherDrawn.get();
                double[] sea = new double[DrawStreams.BLOCK_DRAWS];
                double[] weight = new double[DrawStreams.BLOCK_DRAWS];
                for (int i = 0; i < DrawStreams.BLOCK_DRAWS; i++) {
                    double rate = uplift.upliftMetres(i) / uplift.ageKa[i];
                    boolean counts = uplift.valid[i] && own.ageKa[i] > 0;
                    weight[i] = counts ? drawing.weight() : 0;
                    sea[i] = counts ? own.heightMetres[i] - rate * ages[i] : 0;
                }
                gathered.add(drawing, sea, weight);
            }
            DrawHistogram draws = gathered.histogram();
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
