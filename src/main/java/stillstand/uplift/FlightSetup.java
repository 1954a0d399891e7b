package stillstand.uplift;

import java.util.ArrayList;
import java.util.Collections;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.Set;
import java.util.function.Function;
import java.util.function.ToDoubleFunction;
import stillstand.dating.CombinedAge;
import stillstand.ledger.Assumption;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.SharedErrors;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.FormerSeaLevel;
import stillstand.shoreline.FormsAt;
import stillstand.shoreline.HeightTerm;
import stillstand.shoreline.HeightTerm.Source;
import stillstand.shoreline.IndicativeRule;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.shoreline.StageChoice;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.StandardNormal;
import stillstand.uncertainty.Tabulated;
import stillstand.uncertainty.Uncertain;

/**
 * The flight of a site as the engine takes it: in a mirror where its levels are reefs that drowned ({@link FlightMirror}); which levels take part and in which order, what their heights and dates say, the
 * rows of the highstand table, and the priors of what they share. A complete table is taken as it stands; every other gets the
 * default model.
 *
 * @param model levels, rows and fixed rules
 * @param shared priors of the shared numbers
 * @param complete whether the table is taken as it stands
 * @param mirrored whether heights, rows and rates are those of a mirror: for reefs that drowned
 * @param assumptions what was supposed on the way
 */
public record FlightSetup(
        FlightModel model, SharedPriors shared, boolean complete, boolean mirrored, List<Assumption> assumptions) {
    private static final String OURS = "Stillstand's default";
    /** A date without a spread gets this one, ka: nothing is dated better. */
    private static final double LEAST_DATE_SIGMA_KA = 0.01;

    private static final double BOUND_STEP_KA = 1;

    public FlightSetup {
        assumptions = List.copyOf(assumptions);
    }

    /** Whether a level takes part in the matching of its site. */
    public static boolean takesPart(FormsAt formsAt) {
        return formsAt == FormsAt.HIGHSTAND || formsAt == FormsAt.DROWNING;
    }

    /** Whether matching has to say which highstand made a level. */
    public static boolean isToBeMatched(FormsAt formsAt, StageChoice highstand) {
        return takesPart(formsAt) && highstand.pinned().isEmpty();
    }

    /** Whether the levels of a site are reefs that drowned on a sinking coast. */
    public static boolean isDrowned(Site site) {
        return site.levels().stream().anyMatch(level -> level.formsAt() == FormsAt.DROWNING);
    }

    /** Whether the site has a level to be matched. */
    public static boolean isNeeded(Site site) {
        return site.levels().stream().anyMatch(level -> isToBeMatched(level.formsAt(), level.highstand()));
    }

    /** Why a flight that is needed cannot be matched; empty where it can. */
    public static Optional<String> whyNot(Site site, SeaLevelBasis basis) {
        if (site.surveyedMetres().isEmpty()) {
            return Optional.of("no surveyed range is given");
        }
        Interval surveyed = site.surveyedMetres().get();
        if (isDrowned(site)) {
            return !basis.highstands().complete() && !(surveyed.low() < 0)
                    ? Optional.of("the surveyed range lies wholly above today's sea, where no reef has drowned")
                    : Optional.empty();
        }
        if (!basis.highstands().complete() && !(surveyed.high() > 0)) {
            return Optional.of("the surveyed range lies wholly below today's sea, where shorelines are not matched");
        }
        return Optional.empty();
    }

    /**
     * The setup of a site for which {@link #whyNot} says nothing.
     *
     * @param rule what an indicative range means
     */
    public static FlightSetup of(Site site, SeaLevelBasis basis, MatchingRules rules, IndicativeRule rule) {
        return new Builder(site, basis, rules, rule).setup();
    }

    /**
     * Levels in geomorphic order, lowest first: by {@code order} where given, the others by height.
     *
     * @param order place of a level, if it has one
     * @param heightMetres its height
     */
    public static <T> List<T> inOrder(
            List<T> levels, Function<T, Optional<Integer>> order, ToDoubleFunction<T> heightMetres) {
        List<T> sorted = new ArrayList<>(levels.stream()
                .filter(level -> order.apply(level).isPresent())
                .sorted(Comparator.comparingInt(level -> order.apply(level).orElseThrow()))
                .toList());
        int at = 0; // heights ascend, so the place of the next is not below that of the last
        for (T level : levels.stream()
                .filter(each -> order.apply(each).isEmpty())
                .sorted(Comparator.comparingDouble(heightMetres))
                .toList()) {
            while (at < sorted.size()
                    && heightMetres.applyAsDouble(sorted.get(at)) <= heightMetres.applyAsDouble(level)) {
                at++;
            }
            sorted.add(at, level);
        }
        return sorted;
    }

    private static final class Builder {
        private final Site site;
        private final SeaLevelBasis basis;
        private final MatchingRules rules;
        private final IndicativeRule rule;
        private final boolean complete;
        private final boolean mirrored;
        private final double datumSigmaMetres;
        private final List<Assumption> said = new ArrayList<>();

        Builder(Site site, SeaLevelBasis basis, MatchingRules rules, IndicativeRule rule) {
            this.site = site;
            mirrored = isDrowned(site);
            this.basis = mirrored ? basis.ofDrownedReefs() : basis;
            this.rules = rules;
            this.rule = rule;
            complete = basis.highstands().complete();
            datumSigmaMetres = site.datumOffsetMetres().standardDeviation();
        }

        FlightSetup setup() {
            Interval asked = site.surveyedMetres().orElseThrow();
            Interval surveyed = mirrored ? new Interval(-asked.high(), -asked.low()) : asked;
            List<FlightLevel> levels = new ArrayList<>();
            List<LimitingPoint> limiting = new ArrayList<>();
            List<Level> lowestFirst = new ArrayList<>(inOrder(
                    site.levels(),
                    Level::order,
                    level -> level.elevationMetres().mean()));
            if (mirrored) {
                Collections.reverse(lowestFirst);
            }
            for (Level level : lowestFirst) {
                switch (level.formsAt()) {
                    case HIGHSTAND, DROWNING -> levels.add(level(level));
                    case MARINE_LIMITING ->
                        limiting(level, LimitingPoint.Side.BELOW_SEA).ifPresent(limiting::add);
                    case TERRESTRIAL_LIMITING ->
                        limiting(level, LimitingPoint.Side.ABOVE_SEA).ifPresent(limiting::add);
                    default ->
                        say(
                                "takes no part in the flight",
                                "forms at: " + level.formsAt().id(),
                                level);
                }
            }
            FlightModel model = new FlightModel(
                    levels,
                    basis.highstands().rows().stream().map(this::row).toList(),
                    surveyed.low(),
                    surveyed.high(),
                    rules.strayAgeMaximumKa(),
                    rules.wrongDateProbability(complete),
                    !complete,
                    complete,
                    limiting);
            SharedPriors shared = shared(levels.size());
            if (mirrored) {
                said.addAll(this.basis.highstands().assumptions());
            }
            sayRules(asked, shared, model);
            return new FlightSetup(model, shared, complete, mirrored, said);
        }

        private SharedPriors shared(int levels) {
            SharedErrors errors = basis.highstands().sharedErrors();
            return new SharedPriors(
                    Math.hypot(errors.offsetSigmaMetres(), datumSigmaMetres),
                    errors.interstadialSigmaMetres(),
                    errors.sharedAgeSigmaKa(),
                    rules.recording(),
                    rules.decaysKa(complete),
                    rules.strays(levels));
        }

        private FlightRow row(Highstand stand) {
            SharedErrors errors = basis.highstands().sharedErrors();
            FlightRow row = new FlightRow(
                    stand.stage(),
                    stand.ageKa(),
                    stand.ownAgeSigmaKa(errors),
                    stand.level().mean(),
                    stand.ownLevelSigmaMetres(),
                    0,
                    stand.durationKa(),
                    stand.existsProbability(),
                    stand.takesOffset(),
                    stand.takesInterstadialFactor(),
                    stand.takesCurveAgeError());
            // an error of the datum moves all levels of the site alike: it rides on the common offset, which stage 1
            // lacks
            FlightRow own = stand.takesOffset() ? row : row.withAddedLevelSigma(datumSigmaMetres);
            return mirrored ? own.mirrored() : own;
        }

        private FlightLevel level(Level level) {
            StageChoice choice = level.highstand();
            Set<Integer> allowed = new HashSet<>();
            List<Highstand> rows = basis.highstands().rows();
            for (int j = 0; j < rows.size(); j++) {
                if (choice.allows(rows.get(j).stage())) {
                    allowed.add(j);
                }
            }
            boolean held = !choice.only().isEmpty() && !level.doubtful();
            return new FlightLevel(
                    level.name(),
                    height(level),
                    dates(level),
                    level.doubtful() ? MatchingRules.DOUBTFUL : 1,
                    allowed.size() == rows.size() ? Optional.empty() : Optional.of(allowed),
                    !held);
        }

        /** Present height of the shoreline, without the spread of the datum, which is shared. */
        private Uncertain height(Level level) {
            int sign = mirrored ? -1 : 1;
            List<HeightTerm> terms = new ArrayList<>();
            for (HeightTerm term : FormerSeaLevel.ofLandform(site, level, rule)) {
                terms.add(
                        term.source() == Source.DATUM
                                ? new HeightTerm(
                                        Source.DATUM,
                                        sign * term.sign(),
                                        new Exact(term.metres().mean()))
                                : new HeightTerm(term.source(), sign * term.sign(), term.metres()));
            }
            double lowering = level.loweringMetresPerKyr().mean();
            Optional<Tabulated> ageKa = CombinedAge.of(LevelExplanations.ownDates(level, dateRules()));
            if (lowering > 0 && ageKa.isPresent()) {
                double metres = lowering * ageKa.get().mean();
                double sigma = Math.hypot(
                        level.loweringMetresPerKyr().standardDeviation()
                                * ageKa.get().mean(),
                        lowering * ageKa.get().standardDeviation());
                terms.add(
                        new HeightTerm(Source.SURVEY, sign, sigma > 0 ? new Normal(metres, sigma) : new Exact(metres)));
                say("surface lowering in the flight", metres(metres) + " at the level's own dates", level);
            } else if (lowering > 0) {
                say("surface lowering is left out of the flight", "the level has no date to reckon it by", level);
            }
            Uncertain sum = HeightSum.of(terms);
            return sum instanceof Exact exact ? new Normal(exact.mean(), 0.01) : sum;
        }

        private DateRules dateRules() {
            return new DateRules(rules.wrongDateProbability(complete), rules.strayAgeMaximumKa());
        }

        private List<Uncertain> dates(Level level) {
            List<Uncertain> dates = new ArrayList<>();
            for (DatedSample sample : LevelExplanations.datesOf(level, DatedSample.Role.LEVEL)) {
                Uncertain ageKa = sample.ageKa().orElseThrow();
                dates.add(ageKa.isExact() ? new Normal(ageKa.mean(), LEAST_DATE_SIGMA_KA) : ageKa);
            }
            for (DatedSample sample : LevelExplanations.datesOf(level, DatedSample.Role.MINIMUM)) {
                dates.add(oneSided(sample.ageKa().orElseThrow(), 1));
            }
            for (DatedSample sample : LevelExplanations.datesOf(level, DatedSample.Role.MAXIMUM)) {
                dates.add(oneSided(sample.ageKa().orElseThrow(), -1));
            }
            return dates;
        }

        /** A bound of the age as a density over all ages a stray may have: what its probability is at each. */
        private Uncertain oneSided(Uncertain boundKa, int sign) {
            double sigma = Math.max(boundKa.standardDeviation(), LEAST_DATE_SIGMA_KA);
            List<Tabulated.Point> points = new ArrayList<>();
            for (double ageKa = 0; ageKa <= rules.strayAgeMaximumKa(); ageKa += BOUND_STEP_KA) {
                points.add(new Tabulated.Point(
                        ageKa, StandardNormal.cumulativeProbability(sign * (ageKa - boundKa.mean()) / sigma)));
            }
            return Tabulated.of(points);
        }

        private Optional<LimitingPoint> limiting(Level level, LimitingPoint.Side side) {
            Optional<Tabulated> ageKa = CombinedAge.of(LevelExplanations.ownDates(level, dateRules()));
            Optional<SeaLevelCurve> curve = basis.curve();
            if (ageKa.isEmpty() || curve.isEmpty()) {
                say("bounds no rate", ageKa.isEmpty() ? "it has no date" : "the study reads no curve", level);
                return Optional.empty();
            }
            double age = ageKa.get().mean();
            if (!curve.get().covers(age)) {
                say("bounds no rate", "curve " + curve.get().id() + " does not reach its age", level);
                return Optional.empty();
            }
            double curveAge = curve.get().facts().curveAgeSigmaKa();
            double before = Math.max(curve.get().fromKa(), age - BOUND_STEP_KA);
            double after = Math.min(curve.get().toKa(), age + BOUND_STEP_KA);
            double slope = (curve.get().levelMetresAt(after) - curve.get().levelMetresAt(before)) / (after - before);
            Uncertain height = height(level);
            LimitingPoint point = new LimitingPoint(
                    level.name(),
                    side,
                    mirrored ? -height.mean() : height.mean(),
                    height.standardDeviation(),
                    age,
                    Math.hypot(ageKa.get().standardDeviation(), curveAge),
                    curve.get().levelMetresAt(age),
                    curve.get().readAt(age).standardDeviation(),
                    slope,
                    true);
            return Optional.of(mirrored ? point.mirrored() : point);
        }

        private void sayRules(Interval surveyed, SharedPriors shared, FlightModel model) {
            say(
                    mirrored
                            ? "drowned reefs are matched to lowstands, in a mirror"
                            : "a flight is matched to highstands",
                    complete ? "of a table taken as it stands" : "by the default model");
            say(
                    "heights in which a terrace would have been seen",
                    text(surveyed.low()) + " to " + text(surveyed.high()) + " m above mean sea level");
            say("recording probability of a surviving shoreline", recording(shared.recording()));
            say(
                    "recording falls with age",
                    shared.decaysKa().equals(List.of(Double.POSITIVE_INFINITY))
                            ? "not at all"
                            : "e-folding times in ka, equally likely: "
                                    + String.join(
                                            ", ",
                                            shared.decaysKa().stream()
                                                    .map(FlightSetup::text)
                                                    .toList()));
            say("expected number of strays", strays(shared.strays()));
            say(
                    "dates of a flight",
                    String.format(
                            Locale.ROOT,
                            "each wrong with probability %.3g; wrong dates and strays from 0 to %.0f ka",
                            model.wrongDateProbability(),
                            model.strayAgeMaximumKa()));
            if (!complete) {
                say(
                        "the answer supposes that at least one level is a shoreline",
                        mirrored
                                ? "and that reefs stand below today's sea"
                                : "and that shorelines stand above today's sea");
            }
            if (datumSigmaMetres > 0) {
                say("error of the datum", metres(datumSigmaMetres) + " (1 sigma), shared by all levels of the flight");
            }
        }

        private void say(String what, String value) {
            said.add(new Assumption(what, value, "study.json or its default", site.name()));
        }

        private void say(String what, String value, Level level) {
            said.add(new Assumption(what, value, OURS, site.name() + " / " + level.name()));
        }
    }

    private static String recording(SharedPriors.Recording recording) {
        if (recording instanceof SharedPriors.Recording.BetaPrior beta) {
            return "Beta(" + text(beta.a()) + ", " + text(beta.b()) + ")";
        }
        return text(recording.quantile(0.5));
    }

    private static String strays(SharedPriors.Strays strays) {
        if (strays instanceof SharedPriors.Strays.GammaPrior gamma) {
            return String.format(Locale.ROOT, "gamma of shape 2 and mean %.3g", gamma.mean());
        }
        return text(strays.quantile(0.5));
    }

    private static String metres(double value) {
        return String.format(Locale.ROOT, "%.2f m", value);
    }

    private static String text(double value) {
        return value == Double.POSITIVE_INFINITY ? "infinite" : Priors.text(value);
    }
}
