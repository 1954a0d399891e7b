package stillstand.uplift;

import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.Set;
import stillstand.dating.CombinedAge;
import stillstand.dating.DateLikelihood;
import stillstand.ledger.Assumption;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.SharedErrors;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.FormsAt;
import stillstand.shoreline.Level;
import stillstand.uncertainty.Uncertain;

/**
 * What may explain one level by itself: a highstand it is tied to, the highstands its dates allow, weighed by how likely each is
 * ({@code existence x fit of the dates}), or its own dated age on a curve. Where nothing does, a reason.
 *
 * @param explanations with probabilities that sum to 1; empty where the level has to wait
 * @param whyNone the reason, as a sentence; "" where there are explanations
 * @param assumptions what the explanations rest on
 */
public record LevelExplanations(List<SeaAtLevel> explanations, String whyNone, List<Assumption> assumptions) {
    private static final String OURS = "Stillstand's default";
    /** Highstands less likely than this are left out, which is said. */
    private static final double LEAST_PROBABILITY = 1e-4;

    public LevelExplanations {
        explanations = List.copyOf(explanations);
        assumptions = List.copyOf(assumptions);
    }

    /**
     * What may explain a level.
     *
     * @param where "site / level", for the ledger
     */
    public static LevelExplanations of(Level level, SeaLevelBasis basis, DateRules rules, String where) {
        return switch (level.formsAt()) {
            case HIGHSTAND -> atHighstand(level, basis, rules, where);
            case ANY -> atItsAge(level, basis, rules, where);
            case DROWNING -> atHighstand(level, basis.ofDrownedReefs(), rules, where);
            case MARINE_LIMITING -> none("it formed somewhere below the sea, which bounds a rate on one side only");
            case TERRESTRIAL_LIMITING ->
                none("it formed somewhere above the sea, which bounds a rate on one side only");
            case EVENT -> none(LevelAnswers.ONE_EARTHQUAKE);
        };
    }

    /**
     * What may explain a level under several accounts of sea level: what each says, by its weight. An account that says nothing of
     * the level is left out, which is said.
     */
    static LevelExplanations of(Level level, SeaLevelEnsemble ensemble, DateRules rules, String where) {
        if (ensemble.size() == 1) {
            return of(level, ensemble.bases().get(0), rules, where);
        }
        List<LevelExplanations> each = ensemble.bases().stream()
                .map(basis -> of(level, basis, rules, where))
                .toList();
        double speaking = 0;
        for (int k = 0; k < each.size(); k++) {
            speaking += each.get(k).explanations().isEmpty()
                    ? 0
                    : ensemble.weights().get(k);
        }
        List<SeaAtLevel> explanations = new ArrayList<>();
        Set<Assumption> said = new LinkedHashSet<>();
        for (int k = 0; k < each.size(); k++) {
            LevelExplanations one = each.get(k);
            double weight = ensemble.weights().get(k) / speaking;
            one.explanations()
                    .forEach(sea -> add(sea.withProbability(Math.min(1, weight * sea.probability())), explanations));
            said.addAll(one.assumptions());
            if (one.explanations().isEmpty() && speaking > 0) {
                said.add(new Assumption(
                        "curve " + ensemble.bases().get(k).id() + " says nothing of a level",
                        one.whyNone(),
                        OURS,
                        where));
            }
        }
        return new LevelExplanations(
                explanations, speaking > 0 ? "" : each.get(0).whyNone(), List.copyOf(said));
    }

    /** Adds an explanation, to its equal where one stands: independent highstands are the same under all curves. */
    private static void add(SeaAtLevel sea, List<SeaAtLevel> explanations) {
        for (int i = 0; i < explanations.size(); i++) {
            SeaAtLevel other = explanations.get(i);
            if (other.withProbability(1).equals(sea.withProbability(1))) {
                explanations.set(i, sea.withProbability(Math.min(1, other.probability() + sea.probability())));
                return;
            }
        }
        explanations.add(sea);
    }

    private static LevelExplanations none(String reason) {
        return new LevelExplanations(List.of(), reason, List.of());
    }

    private static LevelExplanations atHighstand(Level level, SeaLevelBasis basis, DateRules rules, String where) {
        List<Highstand> allowed = basis.highstands().rows().stream()
                .filter(row -> level.highstand().allows(row.stage()))
                .toList();
        if (allowed.isEmpty()) {
            return none("'" + basis.id() + "' has no highstand that it is allowed to record");
        }
        boolean pinned = level.highstand().pinned().isPresent();
        if (!pinned && datesOf(level, DatedSample.Role.LEVEL).isEmpty()) {
            return none(
                    level.highstand().only().isEmpty()
                            ? (level.formsAt() == FormsAt.DROWNING
                                    ? "no date: which lowstand drowned it is a question of the whole flight"
                                    : "no date and no highstand given: which highstand made it is a question of the whole"
                                            + " flight")
                            : "tied to several highstands ("
                                    + String.join(", ", level.highstand().only())
                                    + ") and no date to choose between them");
        }
        List<Assumption> assumptions = new ArrayList<>();
        double wrong = wrongProbability(level, rules, where, assumptions);
        SharedErrors shared = basis.highstands().sharedErrors();
        List<Double> weights = new ArrayList<>();
        List<DatedStage> dated = new ArrayList<>();
        double sum = 0;
        for (Highstand row : allowed) {
            DatedStage stage = DatedStage.of(
                    row.ageKa(), row.marginalAgeSigmaKa(shared), likelihoods(level, row.durationKa(), wrong, rules));
            dated.add(stage);
            weights.add(row.existsProbability() * stage.likelihood());
            sum += weights.get(weights.size() - 1);
        }
        if (!(sum > 0)) {
            return none("its dates fit none of the highstands it is allowed to record");
        }
        return weighed(allowed, dated, weights, sum, shared, where, assumptions);
    }

    private static LevelExplanations weighed(
            List<Highstand> allowed,
            List<DatedStage> dated,
            List<Double> weights,
            double sum,
            SharedErrors shared,
            String where,
            List<Assumption> assumptions) {
        double kept = 0;
        for (double weight : weights) {
            kept += weight / sum >= LEAST_PROBABILITY ? weight : 0;
        }
        List<SeaAtLevel> explanations = new ArrayList<>();
        for (int i = 0; i < allowed.size(); i++) {
            if (weights.get(i) / sum >= LEAST_PROBABILITY) {
                Highstand row = allowed.get(i);
                explanations.add(new SeaAtLevel.AtHighstand(
                        row,
                        shared,
                        Math.min(1, weights.get(i) / kept),
                        dated.get(i).ageKa()));
            }
        }
        if (allowed.size() > 1) {
            assumptions.add(new Assumption(
                    "highstands are weighed by existence times fit of the dates",
                    String.format(
                            Locale.ROOT,
                            "%d of %d kept; the others hold a probability of %.2g together",
                            explanations.size(),
                            allowed.size(),
                            1 - kept / sum),
                    OURS,
                    where));
        }
        return new LevelExplanations(explanations, "", assumptions);
    }

    private static LevelExplanations atItsAge(Level level, SeaLevelBasis basis, DateRules rules, String where) {
        List<DatedSample> dating = datesOf(level, DatedSample.Role.LEVEL);
        if (dating.isEmpty()) {
            return none("it formed at its own age and has no date");
        }
        if (basis.curve().isEmpty()) {
            return none("it formed at its own age and the study reads no curve");
        }
        List<Assumption> assumptions = new ArrayList<>();
        double wrong = wrongProbability(level, rules, where, assumptions);
        List<DateLikelihood> likelihoods = likelihoods(level, 0, wrong, rules);
        Uncertain ageKa = likelihoods.size() == 1
                ? likelihoods.get(0).ageKa()
                : CombinedAge.of(likelihoods)
                        .map(Uncertain.class::cast)
                        .orElse(likelihoods.get(0).ageKa());
        SeaLevelCurve curve = basis.curve().get();
        Optional<String> whyNot = CurveReading.whyNot(curve, ageKa);
        if (whyNot.isPresent()) {
            return none(whyNot.get());
        }
        return new LevelExplanations(List.of(onCurve(curve, ageKa, basis)), "", assumptions);
    }

    /** A curve read at an age, with its own age error and the offset that all its readings share. */
    public static SeaAtLevel.OnCurve onCurve(SeaLevelCurve curve, Uncertain ageKa, SeaLevelBasis basis) {
        return new SeaAtLevel.OnCurve(
                curve, DatedStage.positive(ageKa), curve.facts().curveAgeSigmaKa(), offsetSigmaMetres(basis), 1);
    }

    /** The offset that all readings of a curve share; a complete table has none, but the curve beside it has. */
    static double offsetSigmaMetres(SeaLevelBasis basis) {
        return basis.highstands().complete()
                ? SharedErrors.DEFAULT_OFFSET_SIGMA_METRES
                : basis.highstands().sharedErrors().offsetSigmaMetres();
    }

    private static double wrongProbability(Level level, DateRules rules, String where, List<Assumption> assumptions) {
        if (datesOf(level, DatedSample.Role.LEVEL).size() != 1 || level.formsAt() == FormsAt.EVENT) {
            return rules.wrongProbability();
        }
        assumptions.add(new Assumption(
                "the only date of a level is taken to be right",
                "probability of a wrong date 0",
                OURS + ": nothing else could hold the level by itself",
                where));
        return 0;
    }

    /** Dates of the level that count, with the given role. */
    static List<DatedSample> datesOf(Level level, DatedSample.Role role) {
        return level.samples().stream()
                .filter(sample -> sample.used() && sample.ageKa().isPresent() && sample.dates() == role)
                .toList();
    }

    /** The dates of a level by themselves, whatever stand of the sea they may belong to. */
    static List<DateLikelihood> ownDates(Level level, DateRules rules) {
        boolean alone = datesOf(level, DatedSample.Role.LEVEL).size() == 1;
        return likelihoods(level, 0, alone ? 0 : rules.wrongProbability(), rules);
    }

    private static List<DateLikelihood> likelihoods(
            Level level, double durationKa, double wrongProbability, DateRules rules) {
        List<DateLikelihood> likelihoods = new ArrayList<>();
        for (DatedSample.Role role : DatedSample.Role.values()) {
            for (DatedSample sample : datesOf(level, role)) {
                double wrong = role == DatedSample.Role.LEVEL ? wrongProbability : rules.wrongProbability();
                sample.ageKa()
                        .ifPresent(ageKa -> likelihoods.add(
                                new DateLikelihood(ageKa, bearing(role), durationKa, wrong, rules.oldestKa())));
            }
        }
        return likelihoods;
    }

    private static DateLikelihood.Bearing bearing(DatedSample.Role role) {
        return switch (role) {
            case LEVEL -> DateLikelihood.Bearing.LEVEL;
            case MINIMUM -> DateLikelihood.Bearing.MINIMUM;
            case MAXIMUM -> DateLikelihood.Bearing.MAXIMUM;
        };
    }
}
