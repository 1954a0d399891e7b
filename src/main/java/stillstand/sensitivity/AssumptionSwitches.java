package stillstand.sensitivity;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.shoreline.IndicativeRule;
import stillstand.shoreline.Level;
import stillstand.uplift.CauchyPrior;
import stillstand.uplift.LogUniformPrior;
import stillstand.uplift.MatchingRules;
import stillstand.uplift.Rate;
import stillstand.uplift.RatePrior;
import stillstand.uplift.SharedPriors;

/**
 * The assumptions of a site switched one by one: what an indicative range means, the prior, how shorelines are recorded, the
 * correlation time of a curve's errors, where its zero lies, and whatever other accounts of sea level the study could have chosen.
 * Only what an assumption touches is worked out again.
 */
final class AssumptionSwitches {
    private static final RatePrior USUAL_PRIOR = new CauchyPrior(0, 0.5, -10, 15);
    private static final RatePrior OTHER_PRIOR = new LogUniformPrior(0.01, 15);
    private static final SharedPriors.Recording USUAL_RECORDING = new SharedPriors.Recording.BetaPrior(4, 2.5);
    private static final SharedPriors.Recording OTHER_RECORDING = new SharedPriors.Recording.BetaPrior(1, 1);
    private static final List<Double> NO_DECAY = List.of(Double.POSITIVE_INFINITY);
    private static final double ZERO_WITHIN_METRES = 0.005;

    private final Supposition base;
    private final QuickAnswers answers;
    private final boolean hasFlight;
    private final Optional<ShortRate> flight;
    private final List<AssumptionSwitch> found = new ArrayList<>();

    AssumptionSwitches(Supposition base, QuickAnswers answers) {
        this.base = base;
        this.answers = answers;
        hasFlight = QuickAnswers.hasFlight(base);
        flight = hasFlight ? flight(base) : Optional.empty();
    }

    private Optional<ShortRate> flight(Supposition supposed) {
        return answers.flight(supposed).map(Rate::of).map(ShortRate::of);
    }

    List<AssumptionSwitch> all(List<OtherSeaLevel> others) {
        indicativeRange();
        prior();
        recording();
        base.basis().curve().ifPresent(this::curve);
        for (OtherSeaLevel other : others) {
            Supposition switched = base.with(other.basis());
            levels(other.assumption(), other.was(), other.wouldBe(), switched);
            flight(other.assumption(), other.was(), other.wouldBe(), switched);
        }
        return List.copyOf(found);
    }

    private void indicativeRange() {
        if (base.site().levels().stream().noneMatch(level -> level.meaning().rangeMetres() > 0)) {
            return;
        }
        IndicativeRule rule = base.indicativeRange();
        IndicativeRule other = rule == IndicativeRule.UNIFORM ? IndicativeRule.QUADRATURE : IndicativeRule.UNIFORM;
        String what = "an indicative range means";
        levels(what, rule.id(), other.id(), base.with(other));
        flight(what, rule.id(), other.id(), base.with(other));
    }

    /** The prior rules the flight, and of a level the rate under the prior. */
    private void prior() {
        boolean usual = base.prior().equals(USUAL_PRIOR);
        boolean below = base.site().levels().stream()
                .anyMatch(level -> level.elevationMetres().mean() <= 0);
        if (usual && below) {
            return; // a prior of uplift alone says nothing of a coast with levels below the sea
        }
        RatePrior other = usual ? OTHER_PRIOR : USUAL_PRIOR;
        Supposition switched = base.with(other);
        String what = "prior of the rate, m/kyr";
        for (Level level : base.site().levels()) {
            answers.level(base, level)
                    .flatMap(now -> now.rateWithPrior())
                    .ifPresent(now -> add(
                            level.name(),
                            what,
                            base.prior().describe(),
                            other.describe(),
                            ShortRate.of(now),
                            answers.level(switched, level)
                                    .flatMap(then -> then.rateWithPrior())
                                    .map(ShortRate::of)));
        }
        flight(what, base.prior().describe(), other.describe(), switched);
    }

    private void recording() {
        MatchingRules rules = base.matching();
        SharedPriors.Recording other = rules.recording().equals(USUAL_RECORDING) ? OTHER_RECORDING : USUAL_RECORDING;
        flight(
                "recording probability of a surviving shoreline",
                text(rules.recording()),
                text(other),
                base.with(rules.with(other)));
        boolean complete = base.basis().highstands().complete();
        boolean falls = !rules.decaysKa(complete).equals(NO_DECAY);
        List<Double> decays = falls ? NO_DECAY : SharedPriors.DEFAULT_DECAYS_KA;
        flight(
                "recording falls with age",
                falls ? "yes" : "no",
                falls ? "no" : "yes, by an e-folding time that is summed over",
                base.with(rules.withDecays(decays)));
    }

    private static String text(SharedPriors.Recording recording) {
        if (recording instanceof SharedPriors.Recording.BetaPrior beta) {
            return String.format(Locale.ROOT, "beta %.3g %.3g", beta.a(), beta.b());
        }
        return String.format(Locale.ROOT, "%.3g", recording.quantile(0.5));
    }

    private void curve(SeaLevelCurve curve) {
        double timeKa = curve.facts().correlationTimeKa();
        Supposition slower = base.withCorrelationTime(curve, 2 * timeKa);
        for (Level level : base.site().levels()) {
            answers.coralsTogether(base, level)
                    .ifPresent(now -> add(
                            level.name(),
                            "correlation time of the errors of the curve (rate of the corals together)",
                            kiloyears(timeKa),
                            kiloyears(2 * timeKa),
                            ShortRate.of(now),
                            answers.coralsTogether(slower, level).map(ShortRate::of)));
        }
        double today = curve.levelMetresAt(curve.fromKa());
        if (curve.fromKa() <= 1 && Math.abs(today) > ZERO_WITHIN_METRES) {
            Supposition moved = base.rezeroed(curve);
            String was = String.format(Locale.ROOT, "%+.1f m, as published", today);
            levels("curve " + curve.id() + " reads today", was, "0 m", moved);
            flight("curve " + curve.id() + " reads today", was, "0 m", moved);
        }
    }

    private static String kiloyears(double timeKa) {
        return String.format(Locale.ROOT, "%.3g ka", timeKa);
    }

    /** The propagated rates of levels; those that the switch leaves alone to the last bit get no line. */
    private void levels(String what, String was, String wouldBe, Supposition switched) {
        for (Level level : base.site().levels()) {
            Optional<ShortRate> now = answers.level(base, level).map(own -> ShortRate.of(own.rate()));
            Optional<ShortRate> then = answers.level(switched, level).map(own -> ShortRate.of(own.rate()));
            if (now.isPresent() && !now.equals(then)) {
                add(level.name(), what, was, wouldBe, now.get(), then);
            }
        }
    }

    private void flight(String what, String was, String wouldBe, Supposition switched) {
        if (hasFlight && flight.isPresent()) {
            Optional<ShortRate> then = flight(switched);
            if (!flight.equals(then)) {
                add(NextMeasurement.FLIGHT, what, was, wouldBe, flight.get(), then);
            }
        }
    }

    private void add(String rateOf, String what, String was, String wouldBe, ShortRate now, Optional<ShortRate> then) {
        found.add(new AssumptionSwitch(base.site().name(), rateOf, what, was, wouldBe, now, then));
    }
}
