package stillstand.view;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.stream.Collectors;
import stillstand.report.FlightReport;
import stillstand.report.Wording;
import stillstand.shoreline.StageChoice;
import stillstand.study.StudyResult;
import stillstand.uplift.FlightPreview;
import stillstand.uplift.FlightResult;
import stillstand.uplift.FlightResult.LeftOut;
import stillstand.uplift.FlightResult.Pairing;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.LevelAnswer.Budget;
import stillstand.uplift.LevelAnswer.SampleAnswer;
import stillstand.uplift.LevelAnswer.Share;

/** What a panel beside the Stair says of one level, in the words of the report. */
final class LevelFacts {
    private final Optional<StudyResult> result;
    private final String site;
    private final StairPicture.Mark level;
    private final StageChoice choice;
    private final Optional<FlightPreview> preview;
    private final List<Fact> facts = new ArrayList<>();

    LevelFacts(
            Optional<StudyResult> result,
            String site,
            StairPicture.Mark level,
            StageChoice choice,
            Optional<FlightPreview> preview) {
        this.result = result;
        this.site = site;
        this.level = level;
        this.choice = choice;
        this.preview = preview;
    }

    List<Fact> facts() {
        add(
                "Sea then, on today's land",
                metres(level.metres()) + ", 95 % " + metres(level.interval95().low()) + " to "
                        + metres(level.interval95().high()));
        if (level.takesPart()) {
            add("You say", words(choice));
        }
        preview.ifPresent(this::preview);
        answer().ifPresent(this::rate);
        flight().ifPresent(this::ofFlight);
        answer().ifPresent(this::evidence);
        return List.copyOf(facts);
    }

    /** {@code 5a or 5c}, {@code not 5e}. */
    static String words(StageChoice choice) {
        String only = String.join(" or ", choice.only());
        String never = choice.never().isEmpty() ? "" : "not " + String.join(", not ", choice.never());
        return only.isEmpty() && never.isEmpty()
                ? "any highstand"
                : only + (only.isEmpty() || never.isEmpty() ? "" : ", ") + never;
    }

    private Optional<LevelAnswer> answer() {
        return result.stream()
                .flatMap(found -> found.levels().stream())
                .filter(each -> each.site().equals(site) && each.level().equals(level.name()))
                .findFirst();
    }

    private Optional<FlightResult> flight() {
        return result.flatMap(found -> found.flight(site));
    }

    private void preview(FlightPreview found) {
        String pairs = pairs(found.pairingsOf(level.name()));
        add("Preview: records", pairs.isEmpty() ? "no highstand" : pairs);
    }

    private void rate(LevelAnswer answer) {
        answer.bound().ifPresent(bound -> answer.rate().ifPresent(rate -> add("Moves", Wording.bound(bound, rate))));
        answer.rate()
                .ifPresentOrElse(
                        rate -> add("Rate of its own", Wording.rate(rate) + " m/kyr, 95 % " + Wording.interval95(rate)),
                        () -> result.flatMap(found -> found.whyWaiting(site, level.name()))
                                .ifPresent(why -> add("Waits", why)));
        answer.rateWithPrior().ifPresent(rate -> add("Under the prior", Wording.rate(rate) + " m/kyr"));
        answer.firstOrder().ifPresent(rate -> add("First order", Wording.firstOrder(rate) + " m/kyr"));
    }

    private void ofFlight(FlightResult flight) {
        String pairs = pairs(flight.pairingsOf(level.name()));
        if (!pairs.isEmpty()) {
            add("Records", pairs);
        }
        flight.probabilityUnmatched(level.name())
                .filter(probability -> probability >= 0.005)
                .ifPresent(probability -> add("No shoreline at all", percent(probability)));
        flight.predictedAges().stream()
                .filter(age -> age.level().equals(level.name()))
                .findFirst()
                .ifPresent(age -> add("Age by the flight", Wording.quantity(age.age()) + " ka"));
        flight.leaveOneOut().stream()
                .filter(out -> out.level().equals(level.name()))
                .findFirst()
                .ifPresent(out -> add("Without it", leftOut(out, flight)));
        flight.mostProbable().matches().stream()
                .filter(match -> match.level().equals(level.name()))
                .findFirst()
                .ifPresent(match -> add(
                        "In the likeliest single correlation", match.highstand().orElse("no shoreline")));
    }

    private static String leftOut(LeftOut out, FlightResult flight) {
        return "the flight would give " + Wording.rate(out.rate()) + " in place of " + Wording.rate(flight.rate())
                + " m/kyr";
    }

    private void evidence(LevelAnswer answer) {
        answer.age().ifPresent(age -> add("Age", Wording.quantity(age) + " ka"));
        if (flight().isEmpty() && !answer.stages().isEmpty()) {
            add("Highstand", Wording.stages(answer.stages()));
        }
        answer.samples().forEach(this::sample);
        answer.agreement()
                .ifPresent(agreement -> add(
                        "Its dates agree",
                        String.format(
                                Locale.ROOT,
                                "MSWD %.2f, by chance with probability %.2g",
                                agreement.mswd(),
                                agreement.p())));
        answer.budget().ifPresent(budget -> add("Its spread comes from", budget(budget)));
    }

    private void sample(SampleAnswer sample) {
        String age = sample.age().map(found -> Wording.quantity(found) + " ka").orElse("no age");
        String rate = sample.rate()
                .map(found -> "; at its own age " + Wording.rate(found) + " m/kyr")
                .orElse("");
        String why = sample.whyNoRate().map(reason -> "; " + reason).orElse("");
        add("Sample " + sample.sample(), age + rate + why);
    }

    /** Inputs by their total share, the largest first. */
    static String budget(Budget budget) {
        Map<String, Share> shares = new TreeMap<>();
        budget.elevation().ifPresent(share -> shares.put("elevation", share));
        budget.palaeodepth().ifPresent(share -> shares.put("palaeo-depth", share));
        budget.age().ifPresent(share -> shares.put("age", share));
        budget.seaLevel().ifPresent(share -> shares.put("sea level", share));
        budget.surfaceLowering().ifPresent(share -> shares.put("surface lowering", share));
        return shares.entrySet().stream()
                .sorted((a, b) ->
                        Double.compare(b.getValue().totalShare(), a.getValue().totalShare()))
                .map(entry -> entry.getKey() + " " + percent(entry.getValue().totalShare()))
                .collect(Collectors.joining(", "));
    }

    /** What a flight says as a whole, a sentence each, in the words of the terminal. */
    static List<String> ofFlight(Optional<FlightResult> flight) {
        List<String> sentences = new ArrayList<>();
        flight.map(FlightReport::new).ifPresent(report -> {
            sentences.addAll(report.opening());
            sentences.addAll(report.closing());
        });
        return List.copyOf(sentences);
    }

    private static String pairs(List<Pairing> pairings) {
        return pairings.stream()
                .filter(pair -> pair.probability() >= 0.005)
                .map(pair -> pair.highstand() + " " + percent(pair.probability()))
                .collect(Collectors.joining(", "));
    }

    private static String percent(double probability) {
        return probability > 0.995 && probability < 1
                ? ">99 %"
                : String.format(Locale.ROOT, "%.0f %%", 100 * probability);
    }

    private static String metres(double metres) {
        return Wording.number(String.format(Locale.ROOT, "%.1f m", metres));
    }

    private void add(String label, String text) {
        facts.add(new Fact(label, text));
    }
}
