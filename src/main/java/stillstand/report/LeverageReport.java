package stillstand.report;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import stillstand.sensitivity.AssumptionSwitch;
import stillstand.sensitivity.CurveLeftOut;
import stillstand.sensitivity.Leverage;
import stillstand.sensitivity.NextMeasurement;
import stillstand.sensitivity.SampleLeftOut;
import stillstand.sensitivity.ShortRate;
import stillstand.uncertainty.Digits;

/**
 * What the answers of one site hang on, in sentences: what to measure next, what other assumptions would
 * do, and what each sample and curve does.
 */
public final class LeverageReport {
    private static final int SHOWN = 4;
    /** A change is worth a word where it is so many errors of its calculation. */
    private static final double ERRORS = 2;
    /** A move of the median by less than this part of half the 95 % interval is no news. */
    private static final double NEWS = 0.1;

    private final String site;
    private final Leverage leverage;

    /** What a result says of one site. */
    public LeverageReport(String site, Leverage leverage) {
        this.site = site;
        this.leverage = leverage;
    }

    /** All sentences; none where they were not asked for. */
    public List<String> lines() {
        return Stream.of(next(), switches(), leftOut()).flatMap(List::stream).toList();
    }

    /** Which measurements would narrow which rate. */
    public List<String> next() {
        List<String> lines = new ArrayList<>();
        next(lines);
        return lines;
    }

    /** Which other assumptions would move which rate. */
    public List<String> switches() {
        List<String> lines = new ArrayList<>();
        switches(lines);
        return lines;
    }

    /** What rates would be without a sample or a curve. */
    public List<String> leftOut() {
        List<String> lines = new ArrayList<>();
        samples(lines);
        curves(lines);
        return lines;
    }

    private void next(List<String> lines) {
        List<NextMeasurement> own = leverage.nextMeasurements().stream()
                .filter(each -> each.site().equals(site))
                .toList();
        if (own.isEmpty()) {
            return;
        }
        Map<String, List<NextMeasurement>> byRate = new LinkedHashMap<>();
        own.forEach(each ->
                byRate.computeIfAbsent(each.rateOf(), name -> new ArrayList<>()).add(each));
        lines.add(
                "What to measure next: mean change of the width of the 95 % interval (what it costs is for you to say).");
        byRate.forEach((rateOf, ranked) -> {
            String best = ranked.stream()
                    .sorted(Comparator.comparingDouble(NextMeasurement::width95ChangePercent))
                    .filter(LeverageReport::tells)
                    .limit(SHOWN)
                    .map(LeverageReport::measurement)
                    .collect(Collectors.joining("; "));
            lines.add("  " + (rateOf.equals(NextMeasurement.FLIGHT) ? "Flight" : rateOf) + ": "
                    + (best.isEmpty() ? "none of " + ranked.size() + " would narrow it by more than can be told" : best)
                    + ".");
        });
        surest(own).ifPresent(lines::add);
    }

    /** Whether a measurement would narrow the interval by more than the error of its calculation lets one tell. */
    public static boolean tells(NextMeasurement each) {
        return each.width95ChangePercent() < -ERRORS * each.width95ChangePercentError()
                && each.effectiveDraws() >= NextMeasurement.FEW_DRAWS
                && each.width95ChangePercent() < -1;
    }

    /** {@code a date of T4 to 3 ka}. */
    public static String named(NextMeasurement each) {
        String thing = each.sample().orElse(each.level());
        String sigma = " to " + Wording.number(Digits.text(each.sigma(), each.sigma(), 1)) + " " + each.unit();
        return switch (each.measurement()) {
            case "date" -> "a date of " + thing + sigma;
            case "survey" -> "a survey of " + thing + sigma;
            case "taxon" -> "the taxon of " + thing;
            default -> "the indicative meaning of " + thing + sigma;
        };
    }

    private static String measurement(NextMeasurement each) {
        return named(each) + " " + change(each);
    }

    /** {@code −38.5 ± 0.4 %}: the mean change of the width of the 95 % interval, and one standard error of its calculation. */
    public static String change(NextMeasurement each) {
        int decimals = each.width95ChangePercentError() < 0.95 ? 1 : 0;
        return Wording.number(Digits.text(each.width95ChangePercent(), decimals)) + " ± "
                + Digits.text(each.width95ChangePercentError(), decimals) + " %";
    }

    private static Optional<String> surest(List<NextMeasurement> own) {
        return own.stream()
                .filter(each -> each.rateOf().equals(NextMeasurement.FLIGHT))
                .filter(each -> each.pairing()
                        .filter(gain -> gain.expectedCertainty() - gain.certainty() > 0.01
                                && gain.expectedCertainty() - gain.certainty() > ERRORS * gain.error())
                        .isPresent())
                .max(Comparator.comparingDouble(each -> each.pairing()
                        .map(gain -> gain.expectedCertainty() - gain.certainty())
                        .orElse(0.0)))
                .map(each -> "  Pairings: " + named(each)
                        + " would raise their mean certainty from "
                        + each.pairing()
                                .map(gain -> String.format(
                                        Locale.ROOT, "%.2f to %.2f", gain.certainty(), gain.expectedCertainty()))
                                .orElse("")
                        + ".");
    }

    private void switches(List<String> lines) {
        List<AssumptionSwitch> own = leverage.assumptionSwitches().stream()
                .filter(each -> each.site().equals(site))
                .sorted(Comparator.comparingDouble(each -> -move(each.rate(), each.rateWouldBe())))
                .toList();
        Map<String, List<AssumptionSwitch>> telling = new LinkedHashMap<>();
        own.stream()
                .filter(each -> move(each.rate(), each.rateWouldBe()) >= NEWS)
                .forEach(each -> telling.computeIfAbsent(
                                each.assumption() + ", " + each.wouldBe() + " in place of " + each.was(),
                                title -> new ArrayList<>())
                        .add(each));
        telling.forEach((title, rates) -> lines.add("If otherwise: " + title + ": "
                + rates.stream()
                        .limit(SHOWN)
                        .map(each -> name(each.rateOf()) + would(each.rateWouldBe(), each.rate()))
                        .collect(Collectors.joining("; "))
                + (rates.size() > SHOWN ? "; and " + (rates.size() - SHOWN) + " more" : "") + "."));
        long quiet = own.stream()
                .filter(each -> move(each.rate(), each.rateWouldBe()) < NEWS)
                .count();
        if (quiet > 0) {
            lines.add(Wording.counted((int) quiet, "other rate")
                    + " under a switched assumption would move by less than a"
                    + " twentieth of the 95 % interval (assumption-switches.csv).");
        }
    }

    /** The flight, or the level. */
    public static String name(String rateOf) {
        return rateOf.equals(NextMeasurement.FLIGHT) ? "the flight" : rateOf;
    }

    private void samples(List<String> lines) {
        for (SampleLeftOut out : leverage.samplesLeftOut()) {
            if (!out.site().equals(site)) {
                continue;
            }
            List<String> moved = new ArrayList<>();
            out.levelRate()
                    .filter(rate -> move(rate, out.levelRateWithout()) >= NEWS)
                    .ifPresent(rate -> moved.add(out.level() + would(out.levelRateWithout(), rate)));
            out.flightRate()
                    .filter(rate -> move(rate, out.flightRateWithout()) >= NEWS)
                    .ifPresent(rate -> moved.add("the flight" + would(out.flightRateWithout(), rate)));
            if (!moved.isEmpty()) {
                lines.add("Without sample " + out.sample() + " " + String.join("; ", moved) + ".");
            }
        }
    }

    /** How far the median or an end of the 95 % interval moves, in half widths of that interval; far where the rate is lost. */
    public static double move(ShortRate rate, Optional<ShortRate> other) {
        if (other.isEmpty()) {
            return Double.MAX_VALUE;
        }
        double half = rate.interval95().width() / 2;
        double moved = Math.max(
                Math.abs(other.get().median() - rate.median()),
                Math.max(
                        Math.abs(other.get().interval95().low()
                                - rate.interval95().low()),
                        Math.abs(other.get().interval95().high()
                                - rate.interval95().high())));
        return half > 0 ? moved / half : moved > 0 ? Double.MAX_VALUE : 0;
    }

    /** For each rate the curve without which it would move the most. */
    private void curves(List<String> lines) {
        Map<String, CurveLeftOut> most = new LinkedHashMap<>();
        leverage.curvesLeftOut().stream()
                .filter(out -> out.site().equals(site) && move(out) >= NEWS)
                .forEach(out -> most.merge(out.rateOf(), out, (a, b) -> move(b) > move(a) ? b : a));
        most.forEach((rateOf, out) -> lines.add("Without curve " + out.curve() + " " + name(rateOf)
                + would(Optional.of(out.rateWithout()), out.rate()) + "."));
    }

    private static double move(CurveLeftOut out) {
        return move(out.rate(), Optional.of(out.rateWithout()));
    }

    /** {@code  would be 0.43 (0.39 to 0.47), not 0.45 (0.41 to 0.49)}, to the digits that the spread as it is leaves. */
    private static String would(Optional<ShortRate> then, ShortRate now) {
        return then.map(rate -> " would be " + rate(rate, now)).orElse(" would have no rate of its own") + ", not "
                + rate(now, now);
    }

    /** {@code 0.43 (0.39 to 0.47)}, to the digits that the spread of another leaves. */
    public static String rate(ShortRate rate, ShortRate spread) {
        double sigma = Math.max(spread.interval95().width() / 4, 1e-6);
        return Wording.number(Digits.text(rate.median(), sigma, 1)) + " ("
                + Wording.number(Digits.text(rate.interval95().low(), sigma, 1)) + " to "
                + Wording.number(Digits.text(rate.interval95().high(), sigma, 1)) + ")";
    }
}
