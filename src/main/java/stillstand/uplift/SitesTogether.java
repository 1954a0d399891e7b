package stillstand.uplift;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.concurrent.ExecutorService;
import org.apache.commons.rng.UniformRandomProvider;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.DrawStreams;

/**
 * Joint draws of the rates of several sites that stand under one sea.
 *
 * <p>Where all take part by a level, the draws are common ({@link JointLevels}): keys of the sea name no site. Where one takes part
 * by a flight, the sites are taken one after the other: each draw carries what it holds of the sea ({@link SharedSea}); at a flight it
 * is weighted by the evidence of the flight under that sea (the rate and the flight's own numbers summed by importance sampling),
 * draws a rate and a correlation, and learns level and age of the highstands the flight records in closed form; then draws are
 * resampled. A level is drawn under the sea of each draw: flat in displacement, it says nothing of the sea.
 *
 * <p>Sites of one coast share local sea level; sites of different coasts the global one alone.
 */
public final class SitesTogether {
    private static final int CHUNK = 50;
    private static final int MORE = 4;
    private static final int LEAST_DRAWS = 400;

    private final List<ComparedSite> sites;
    private final Effort effort;
    private final DrawStreams streams;
    private final ExecutorService executor;
    private final RunMonitor monitor;
    private final String key;
    private final boolean oneCoast;

    private final SharedSea[] seas;
    private final double[][] rates;
    private final boolean[][] counts;
    private double least = 1;
    private double logEvidence;

    /**
     * How much to compute.
     *
     * @param blocks of common draws, 1 or more
     * @param draws of sites conditioned on each other, 10 or more
     * @param points rates tried in each draw, 2 or more
     * @param cells most cells of height in the filter, 10 or more; fewer where heights are known less well
     * @param leastFraction below which the draws are made again, four times as many
     */
    public record Effort(int blocks, int draws, int points, int cells, double leastFraction) {
        /** 4 blocks of common draws; 1000 draws with 24 rates each, at most 120 cells; again below 0.05. */
        public static final Effort FULL = new Effort(4, 1000, 24, 120, 0.05);

        /** @throws IllegalArgumentException if a number is too small */
        public Effort {
            if (!(blocks >= 1 && draws >= 10 && points >= 2 && cells >= 10 && leastFraction >= 0)) {
                throw new IllegalArgumentException("effort is too small: " + blocks + " blocks, " + draws + " draws, "
                        + points + " points, " + cells + " cells");
            }
        }
    }

    private SitesTogether(
            String curve,
            List<ComparedSite> sites,
            Effort effort,
            DrawStreams streams,
            ExecutorService executor,
            RunMonitor monitor) {
        this.sites = List.copyOf(sites);
        this.effort = effort;
        this.streams = streams;
        this.executor = executor;
        this.monitor = monitor;
        key = "together / " + curve + " / "
                + String.join(" / ", sites.stream().map(ComparedSite::site).toList());
        oneCoast = sharesLocalSea(sites);
        seas = new SharedSea[effort.draws()];
        rates = new double[sites.size()][effort.draws()];
        counts = new boolean[sites.size()][effort.draws()];
    }

    /** Whether all sites stand on one coast and so share local sea level too. */
    public static boolean sharesLocalSea(List<ComparedSite> sites) {
        return sites.stream().map(ComparedSite::coast).distinct().count() == 1;
    }

    /**
     * Draws under all curves that say something of every site, mixed by weight; where a flight takes part, by weight times evidence.
     *
     * @param sites two or more, each once
     * @param executor draws parts side by side, which changes no bit; not owned, and needs a thread that is not the caller's
     * @param monitor is asked whether to stop
     * @throws IllegalArgumentException if there are fewer than two sites or one stands twice, or under no curve a sea level is
     *     possible for all
     * @throws RunCancelledException if the monitor asks to stop
     */
    public static JointRates of(
            List<StandIn> sites,
            StandIn.Conventions conventions,
            Effort effort,
            DrawStreams streams,
            ExecutorService executor,
            RunMonitor monitor) {
        SeaLevelEnsemble curves = sites.stream()
                .map(stand -> stand.site().seaLevel())
                .max(Comparator.comparingInt(SeaLevelEnsemble::size))
                .orElseThrow(() -> new IllegalArgumentException("there must be sites"));
        Effort each = new Effort(
                Math.max(1, effort.blocks() / curves.size()),
                Math.max(Math.min(LEAST_DRAWS, effort.draws()), effort.draws() / curves.size()),
                effort.points(),
                effort.cells(),
                effort.leastFraction());
        List<JointRates> parts = new ArrayList<>();
        List<Double> weights = new ArrayList<>();
        List<IllegalArgumentException> impossible = new ArrayList<>();
        for (int k = 0; k < curves.size(); k++) {
            String curve = curves.bases().get(k).id();
            List<ComparedSite> under = sites.stream()
                    .flatMap(stand -> stand.under(curve, conventions).stream())
                    .toList();
            if (under.size() == sites.size()) {
                try {
                    parts.add(of(curve, under, each, streams, executor, monitor));
                    weights.add(curves.weights().get(k));
                } catch (IllegalArgumentException e) {
                    impossible.add(e);
                }
            }
        }
        if (parts.isEmpty()) {
            throw impossible.isEmpty()
                    ? new IllegalArgumentException("no curve says something of each of these sites")
                    : impossible.get(0);
        }
        return JointRates.mixed(parts, weights);
    }

    /**
     * Draws under one curve.
     *
     * @param curve its id
     * @param sites two or more, each once
     * @param executor draws parts side by side, which changes no bit; not owned, and needs a thread that is not the caller's
     * @param monitor is asked whether to stop
     * @throws IllegalArgumentException if there are fewer than two sites or one stands twice, or no sea level is possible for all
     * @throws RunCancelledException if the monitor asks to stop
     */
    static JointRates of(
            String curve,
            List<ComparedSite> sites,
            Effort effort,
            DrawStreams streams,
            ExecutorService executor,
            RunMonitor monitor) {
        Set<String> names = new HashSet<>();
        sites.forEach(site -> names.add(site.site()));
        if (sites.size() < 2 || names.size() < sites.size()) {
            throw new IllegalArgumentException("sites must be two or more, each once, but are "
                    + sites.stream().map(ComparedSite::site).toList());
        }
        if (sites.stream().allMatch(ComparedLevel.class::isInstance)) {
            return ofLevels(sites, effort, streams, executor, monitor);
        }
        JointRates joint = new SitesTogether(curve, sites, effort, streams, executor, monitor).conditioned();
        if (joint.effectiveFraction().orElseThrow() >= effort.leastFraction()) {
            return joint;
        }
        Effort more = new Effort(effort.blocks(), MORE * effort.draws(), effort.points(), effort.cells(), 0);
        return new SitesTogether(curve, sites, more, streams, executor, monitor).conditioned();
    }

    private static JointRates ofLevels(
            List<ComparedSite> sites,
            Effort effort,
            DrawStreams streams,
            ExecutorService executor,
            RunMonitor monitor) {
        int draws = effort.blocks() * DrawStreams.BLOCK_DRAWS;
        double[][] rates = new double[sites.size()][draws];
        boolean[][] counts = new boolean[sites.size()][draws];
        BlockTasks.inOrder(executor, 0, sites.size() * effort.blocks(), task -> {
            stopIfCancelled(monitor);
            int s = task / effort.blocks();
            int block = task % effort.blocks();
            ComparedLevel level = (ComparedLevel) sites.get(s);
            JointLevels.Drawn drawn = new JointLevels(level.site(), level.coast(), List.of(level.entry()), streams)
                    .draw(block)
                    .get(0);
            for (int i = 0; i < DrawStreams.BLOCK_DRAWS; i++) {
                int at = block * DrawStreams.BLOCK_DRAWS + i;
                counts[s][at] = drawn.valid[i] && drawn.ageKa[i] > 0;
                rates[s][at] = counts[s][at] ? drawn.upliftMetres(i) / drawn.ageKa[i] : 0;
            }
            return task;
        });
        return new JointRates(sites, rates, counts, Optional.empty(), 0);
    }

    private JointRates conditioned() {
        drawSeas();
        for (int s = 0; s < sites.size(); s++) {
            monitor.step("sites together / " + sites.get(s).site(), 1);
            boolean last = s == sites.size() - 1;
            double[] weights = step(s, last);
            resample(s, weights);
        }
        return new JointRates(sites, rates, counts, Optional.of(least), logEvidence);
    }

    private void drawSeas() {
        UniformRandomProvider random = streams.stream(key + " / sea", 0);
        int[] offsets = shuffled(random);
        int[] interstadials = shuffled(random);
        int[] ages = shuffled(random);
        for (int k = 0; k < seas.length; k++) {
            seas[k] = SharedSea.before(
                    stratified(offsets[k], random), stratified(interstadials[k], random), stratified(ages[k], random));
        }
    }

    private int[] shuffled(UniformRandomProvider random) {
        return shuffled(seas.length, random);
    }

    static int[] shuffled(int count, UniformRandomProvider random) {
        int[] order = new int[count];
        for (int k = 0; k < count; k++) {
            int other = random.nextInt(k + 1);
            order[k] = order[other];
            order[other] = k;
        }
        return order;
    }

    private double stratified(int stratum, UniformRandomProvider random) {
        return FlightUnderSea.normal((stratum + FlightUnderSea.uniform(random)) / seas.length);
    }

    /** Takes one site into all draws; its weights. */
    private double[] step(int s, boolean last) {
        ComparedSite site = sites.get(s);
        Optional<FlightUnderSea.Prepared> prepared = site instanceof ComparedFlight flight
                ? Optional.of(new FlightUnderSea.Prepared(flight, effort, oneCoast))
                : Optional.empty();
        double[] logs = new double[seas.length];
        BlockTasks.inOrder(executor, 0, (seas.length + CHUNK - 1) / CHUNK, chunk -> {
            UniformRandomProvider random = streams.stream(key + " / at " + site.site(), chunk);
            Optional<FlightUnderSea> under = prepared.map(ready -> new FlightUnderSea(ready, random));
            int upTo = Math.min(seas.length, (chunk + 1) * CHUNK);
            for (int k = chunk * CHUNK; k < upTo; k++) {
                stopIfCancelled(monitor);
                if (under.isPresent()) {
                    logs[k] = under.get().weigh(seas[k]);
                    if (logs[k] > Double.NEGATIVE_INFINITY) {
                        rates[s][k] = under.get().rateMetresPerKyr();
                        counts[s][k] = true;
                        seas[k] = last ? seas[k] : under.get().learned();
                    }
                } else {
                    LevelUnderSea level = new LevelUnderSea((ComparedLevel) site, oneCoast, random);
                    rates[s][k] = level.rateUnder(seas[k]);
                    counts[s][k] = level.counts();
                }
            }
            return chunk;
        });
        double highest = Arrays.stream(logs).max().orElseThrow();
        if (!(highest > Double.NEGATIVE_INFINITY)) {
            throw new IllegalArgumentException(
                    "no sea level is possible for '" + site.site() + "' and the sites compared with it");
        }
        double[] weights =
                Arrays.stream(logs).map(log -> Math.exp(log - highest)).toArray();
        logEvidence += highest + Math.log(Arrays.stream(weights).average().orElseThrow());
        return weights;
    }

    /** Systematic resampling of all draws up to site {@code upTo}. */
    private void resample(int upTo, double[] weights) {
        double total = Arrays.stream(weights).sum();
        double squares = Arrays.stream(weights).map(weight -> weight * weight).sum();
        double fraction = total * total / squares / weights.length;
        least = Math.min(least, fraction);
        if (fraction > 1 - 1e-9) {
            return;
        }
        int[] from = new int[weights.length];
        double step = total / weights.length;
        double start = streams.stream(key + " / resampled", upTo).nextDouble();
        double sum = 0;
        int at = 0;
        for (int k = 0; k < weights.length; k++) {
            sum += weights[k];
            while (at < from.length && (at + start) * step < sum) {
                from[at++] = k;
            }
        }
        Arrays.fill(from, at, from.length, at > 0 ? from[at - 1] : 0);
        List<SharedSea> kept = new ArrayList<>();
        for (int k : from) {
            kept.add(seas[k]);
        }
        kept.toArray(seas);
        for (int s = 0; s <= upTo; s++) {
            double[] oldRates = rates[s].clone();
            boolean[] oldCounts = counts[s].clone();
            for (int k = 0; k < from.length; k++) {
                rates[s][k] = oldRates[from[k]];
                counts[s][k] = oldCounts[from[k]];
            }
        }
    }

    private static void stopIfCancelled(RunMonitor monitor) {
        if (monitor.isCancelled()) {
            throw new RunCancelledException();
        }
    }
}
