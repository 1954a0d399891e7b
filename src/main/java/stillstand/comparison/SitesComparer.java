package stillstand.comparison;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.concurrent.ExecutorService;
import java.util.function.BiConsumer;
import stillstand.comparison.ComparisonRules.Pair;
import stillstand.ledger.Assumption;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.shoreline.Position;
import stillstand.shoreline.Site;
import stillstand.uncertainty.DrawStreams;
import stillstand.uplift.ComparedLevels;
import stillstand.uplift.JointRates;
import stillstand.uplift.Rate;
import stillstand.uplift.SitesTogether;
import stillstand.uplift.StandIn;

/**
 * Compares the sites of a study: inside each coast or island group, and on request, never all with all. In a group of at most
 * {@value #MOST_TOGETHER} sites every pair is compared; in a larger one each site with the next along the coast.
 */
public final class SitesComparer {
    /** Most sites of a group that are compared each with each. */
    public static final int MOST_TOGETHER = 20;
    /** Most sites of a group that are pooled and tilted. */
    private static final int MOST_POOLED = 200;
    /** Most pairs whose differences carry a density for figures. */
    private static final int MOST_WITH_DENSITY = 500;
    /** Below this part of effective draws an answer is said to be rough. */
    private static final double ROUGH = 0.05;

    private static final String OURS = "Stillstand's default";

    private final List<SiteToCompare> sites;
    private final ComparisonRules rules;
    private final StandIn.Conventions conventions;
    private final SitesTogether.Effort effort;
    private final DrawStreams streams;
    private final ExecutorService executor;
    private final RunMonitor monitor;

    private final List<Optional<RateByItself>> alone = new ArrayList<>();
    private final List<Optional<StandIn>> stands = new ArrayList<>();
    private final Map<String, Integer> byName = new HashMap<>();
    private final List<SiteComparison> pairs = new ArrayList<>();
    private final Set<Set<String>> done = new HashSet<>();
    private final List<SiteGroup> groups = new ArrayList<>();
    private final List<Assumption> said = new ArrayList<>();

    private SitesComparer(
            List<SiteToCompare> sites,
            ComparisonRules rules,
            StandIn.Conventions conventions,
            DrawStreams streams,
            ExecutorService executor,
            RunMonitor monitor) {
        this.sites = List.copyOf(sites);
        this.rules = rules;
        this.conventions = conventions;
        this.streams = streams;
        this.executor = executor;
        this.monitor = monitor;
        SitesTogether.Effort full = SitesTogether.Effort.FULL;
        effort = sites.size() <= MOST_POOLED
                ? full
                : new SitesTogether.Effort(1, full.draws(), full.points(), full.cells(), full.leastFraction());
        for (int s = 0; s < sites.size(); s++) {
            byName.put(sites.get(s).name(), s);
        }
    }

    /**
     * Compares.
     *
     * @param executor draws; not owned, and needs a thread that is not the caller's
     * @param monitor is told of progress and asked whether to stop
     * @throws RunCancelledException if the monitor asks to stop
     */
    public static SitesCompared compare(
            List<SiteToCompare> sites,
            ComparisonRules rules,
            StandIn.Conventions conventions,
            DrawStreams streams,
            ExecutorService executor,
            RunMonitor monitor) {
        return new SitesComparer(sites, rules, conventions, streams, executor, monitor).compared();
    }

    private SitesCompared compared() {
        Map<String, List<Integer>> byGroup = new LinkedHashMap<>();
        for (int s = 0; s < sites.size(); s++) {
            byGroup.computeIfAbsent(sites.get(s).site().coast(), coast -> new ArrayList<>())
                    .add(s);
            alone.add(Optional.empty());
            stands.add(Optional.empty());
        }
        byGroup.values().forEach(this::stand);
        boolean withDensity = byGroup.values().stream()
                                .mapToInt(group -> pairsOf(group.size()))
                                .sum()
                        + rules.pairs().size()
                <= MOST_WITH_DENSITY;
        byGroup.forEach((name, group) -> compareGroup(name, group, withDensity));
        List<SiteMotion> motions = motions();
        for (Pair pair : rules.pairs()) {
            request(pair, withDensity);
        }
        say(motions.isEmpty());
        return new SitesCompared(pairs, motions, groups, said);
    }

    private static int pairsOf(int sites) {
        return sites <= MOST_TOGETHER ? sites * (sites - 1) / 2 : sites - 1;
    }

    /** What stands for each site of a group: its flight, or the level that most of its sites without a flight have in common. */
    private void stand(List<Integer> group) {
        List<Integer> byLevel = new ArrayList<>();
        for (int s : group) {
            SiteToCompare site = sites.get(s);
            if (site.flight().isPresent()) {
                stand(s, Optional.empty(), site.flight().get());
            } else {
                byLevel.add(s);
            }
        }
        standByLevels(byLevel);
    }

    private void standByLevels(List<Integer> group) {
        List<Optional<String>> levels = ComparedLevels.choose(
                group.stream().map(s -> sites.get(s).site()).toList(), conventions.rule(), conventions.dates());
        for (int i = 0; i < group.size(); i++) {
            int s = group.get(i);
            Optional<String> level = levels.get(i);
            level.flatMap(name -> Optional.ofNullable(sites.get(s).levels().get(name)))
                    .ifPresent(rate -> stand(s, level, rate));
        }
    }

    private void stand(int s, Optional<String> level, Rate rate) {
        stands.set(s, Optional.of(new StandIn(sites.get(s).site(), level, rate)));
        alone.set(s, Optional.of(new RateByItself(rate)));
    }

    private void compareGroup(String name, List<Integer> whole, boolean withDensity) {
        List<Integer> group =
                whole.stream().filter(s -> stands.get(s).isPresent()).toList();
        if (group.size() < 2) {
            return;
        }
        monitor.step("sites of " + name, 1);
        boolean flights = group.stream().anyMatch(s -> sites.get(s).flight().isPresent());
        if (group.size() <= (flights ? MOST_TOGETHER : MOST_POOLED)) {
            joint(name, group).ifPresent(joint -> compareTogether(name, group, joint, withDensity));
            return;
        }
        said.add(new Assumption(
                "sites of a group are neither pooled nor tilted",
                group.size() + " sites are more than are drawn together",
                OURS,
                name));
        neighbours(name, group, (one, next) -> addPair(one, next, withDensity));
    }

    private void compareTogether(String name, List<Integer> group, JointRates joint, boolean withDensity) {
        GroupAnswer answer = new GroupAnswer(
                name,
                group.stream().map(sites::get).toList(),
                group.stream().map(s -> alone.get(s).orElseThrow()).toList(),
                joint,
                rules.siteSpreadMetresPerKyr());
        groups.add(answer.answer());
        sayLeftOut(name, answer.withoutMean());
        if (group.size() <= MOST_TOGETHER) {
            for (int a = 0; a < group.size(); a++) {
                for (int b = a + 1; b < group.size(); b++) {
                    add(joint, group, a, b, withDensity);
                }
            }
        } else {
            neighbours(
                    name,
                    group,
                    (one, next) -> add(joint, group, group.indexOf(one), group.indexOf(next), withDensity));
        }
    }

    /** Does something with each site and the next along the coast; without distances, the next in the table. */
    private void neighbours(String name, List<Integer> group, BiConsumer<Integer, Integer> compare) {
        boolean distances =
                group.stream().allMatch(s -> site(s).distanceAlongCoastKm().isPresent());
        List<Integer> order = new ArrayList<>(group);
        if (distances) {
            order.sort(Comparator.comparing(s -> site(s).distanceAlongCoastKm().orElseThrow()));
        }
        said.add(new Assumption(
                "sites of a large group are compared with their neighbours only",
                distances ? "by distance along the coast" : "in the order of the table",
                OURS,
                name));
        for (int i = 0; i + 1 < order.size(); i++) {
            compare.accept(order.get(i), order.get(i + 1));
        }
    }

    private Site site(int s) {
        return sites.get(s).site().site();
    }

    /** Joint draws of some sites; absent, and said, where no sea level fits them all. */
    private Optional<JointRates> joint(String what, List<Integer> group) {
        try {
            JointRates joint = SitesTogether.of(
                    group.stream().map(s -> stands.get(s).orElseThrow()).toList(),
                    conventions,
                    effort,
                    streams,
                    executor,
                    monitor);
            sayRough(what, joint);
            return Optional.of(joint);
        } catch (IllegalArgumentException e) {
            said.add(new Assumption(
                    "sites are not compared", String.valueOf(e.getMessage()), "what the sites say of the sea", what));
            return Optional.empty();
        }
    }

    private void addPair(int a, int b, boolean withDensity) {
        List<Integer> two = List.of(a, b);
        joint(sites.get(a).name() + " and " + sites.get(b).name(), two)
                .ifPresent(joint -> add(joint, two, 0, 1, withDensity));
    }

    private void add(JointRates joint, List<Integer> group, int a, int b, boolean withDensity) {
        if (monitor.isCancelled()) {
            throw new RunCancelledException();
        }
        int one = group.get(a);
        int other = group.get(b);
        if (done.add(Set.of(sites.get(one).name(), sites.get(other).name()))) {
            new Differences(joint, withDensity)
                    .between(
                            a, b, alone.get(one).orElseThrow(), alone.get(other).orElseThrow())
                    .ifPresent(pairs::add);
        }
    }

    private void request(Pair pair, boolean withDensity) {
        int a = byName.getOrDefault(pair.a(), -1);
        int b = byName.getOrDefault(pair.b(), -1);
        if (a < 0 || b < 0 || a == b || done.contains(Set.of(pair.a(), pair.b()))) {
            return;
        }
        if (stands.get(a).isEmpty() || stands.get(b).isEmpty()) {
            String without = stands.get(a).isEmpty() ? pair.a() : pair.b();
            said.add(new Assumption(
                    "a pair is not compared",
                    "'" + without + "' has no rate",
                    "study.json",
                    pair.a() + " and " + pair.b()));
            return;
        }
        List<Integer> two = List.of(a, b);
        monitor.step(pair.a() + " and " + pair.b(), 1);
        if (two.stream().allMatch(s -> sites.get(s).flight().isEmpty())) {
            standByLevels(two); // they may have another highstand in common than their coasts do
        }
        addPair(a, b, withDensity);
    }

    private List<SiteMotion> motions() {
        List<SiteMotion> motions = new ArrayList<>();
        double within = rules.stableWithinMetresPerKyr();
        for (int s = 0; s < sites.size(); s++) {
            if (alone.get(s).isPresent()) {
                Site site = site(s);
                RateByItself rate = alone.get(s).get();
                double down = rate.cumulativeProbability(-within);
                double up = 1 - rate.cumulativeProbability(within);
                double stable = Math.max(0, 1 - up - down);
                motions.add(new SiteMotion(
                        site.name(),
                        site.coast(),
                        stands.get(s).flatMap(StandIn::level),
                        site.position().map(Position::latitudeDegrees),
                        site.position().map(Position::longitudeDegrees),
                        site.distanceAlongCoastKm(),
                        sites.get(s).areaKm2(),
                        rate.quantity(),
                        up,
                        stable,
                        down,
                        SiteMotion.word(up, stable, down)));
            }
        }
        return motions;
    }

    private void sayLeftOut(String group, List<String> names) {
        if (!names.isEmpty()) {
            said.add(new Assumption(
                    "sites whose rate has no mean are left out of pooling, tilts and the mean over areas",
                    String.join(", ", names),
                    OURS,
                    group));
        }
    }

    private void sayRough(String what, JointRates joint) {
        if (joint.effectiveFraction().isPresent() && joint.effectiveFraction().get() < ROUGH) {
            said.add(new Assumption(
                    "sites fit each other's sea level badly, and their comparison is rough",
                    String.format(
                            Locale.ROOT,
                            "%.2g of the draws are effective, fewer than %.2g",
                            joint.effectiveFraction().get(),
                            ROUGH),
                    OURS,
                    what));
        }
    }

    private void say(boolean nothing) {
        if (nothing) {
            return;
        }
        said.add(new Assumption(
                "a site is stable where its rate is within",
                String.format(Locale.ROOT, "%.3g m/kyr of 0", rules.stableWithinMetresPerKyr()),
                "study.json or its default",
                "all"));
        if (pairs.isEmpty()) {
            return;
        }
        said.add(new Assumption(
                "sites are compared",
                "inside a coast and on request; a site by its flight, else by a level of the highstand that most sites of its"
                        + " coast have in common",
                OURS,
                "all"));
        said.add(new Assumption(
                "errors shared between sites",
                "global sea level between all; local sea level inside one coast; survey and datum of each site are its own;"
                        + " flights of one coast tell each other of its sea",
                OURS,
                "all"));
        if (!groups.isEmpty()) {
            said.add(new Assumption(
                    "sites of a coast are pooled",
                    String.format(
                            Locale.ROOT,
                            "rates jointly normal; how far sites differ half-normal of scale %.3g m/kyr; their mean flat",
                            rules.siteSpreadMetresPerKyr()),
                    "study.json or its default",
                    "all"));
        }
    }
}
