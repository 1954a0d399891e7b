package stillstand.report;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.stream.Collectors;
import stillstand.uplift.FlightResult;
import stillstand.uplift.FlightResult.ModelEvidence;
import stillstand.uplift.FlightResult.Segment;
import stillstand.uplift.RateHistory;
import stillstand.uplift.RateHistory.Change;

/** What a rate that may change reads like: the rate through time, when it changed, and what speaks for that. */
final class HistoryReport {
    /** Decimal logarithms of Bayes factors below the first are barely worth mentioning, above the second strong. */
    private static final double MENTIONED = 0.5;

    private static final double STRONG = 1;

    private final FlightResult flight;
    private final RateHistory history;

    HistoryReport(FlightResult flight, RateHistory history) {
        this.flight = flight;
        this.history = history;
    }

    List<String> lines() {
        List<String> lines = new ArrayList<>();
        lines.add("The rate through time (" + flight.model() + "), m/kyr: "
                + flight.segments().stream().map(HistoryReport::segment).collect(Collectors.joining("; ")) + ".");
        history.changes().forEach(change -> lines.add(change(change)));
        history.changes().stream()
                .filter(change -> !change.datesCanTell())
                .findFirst()
                .ifPresent(change -> lines.add(cannotTell(change)));
        lines.add("Evidence against a constant rate, as the decimal logarithm of the Bayes factor: "
                + flight.modelChoice().stream()
                        .filter(model -> !model.model().equals(FlightResult.CONSTANT))
                        .map(this::evidence)
                        .collect(Collectors.joining("; "))
                + ". It depends on the prior ranges, which the ledger holds.");
        return lines;
    }

    private static String segment(Segment segment) {
        return Math.round(segment.fromKa())
                + segment.toKa().map(to -> " to " + Math.round(to) + " ka ").orElse(" ka and before ")
                + Wording.rate(segment.rate()) + " (" + Wording.interval95(segment.rate()) + ")";
    }

    private static String change(Change change) {
        boolean known = change.age().interval95().width() == 0;
        String when = known
                ? "The change at " + Math.round(change.age().median()) + " ka"
                : "A change (" + change.model() + ") at " + Wording.quantity(change.age()) + " ka, 95 % "
                        + Math.round(change.age().interval95().low()) + " to "
                        + Math.round(change.age().interval95().high()) + " ka";
        return when + ": with probability " + FlightReport.probability(change.probabilityFasterBefore())
                + " the rate was higher before it than since.";
    }

    private static String cannotTell(Change change) {
        String side = change.datedYounger() ? "older" : change.datedOlder() ? "younger" : "younger or older";
        return "No dated level is " + side + " than the change at "
                + Math.round(change.age().median())
                + " ka: then a change of rate and another pairing of levels and highstands are the same"
                + " thing, and the evidence cannot tell them apart.";
    }

    private String evidence(ModelEvidence model) {
        double factor = model.log10BayesFactor();
        String strength = Math.abs(factor) < MENTIONED
                ? "barely worth mentioning"
                : (Math.abs(factor) > STRONG ? "strong" : "some") + (factor < 0 ? ", for the constant rate" : "");
        String weight = flight.modelChoice().size() > 2
                ? model.weight()
                        .map(share -> ", weight " + FlightReport.probability(share))
                        .orElse("")
                : "";
        return model.model() + " " + Wording.number(String.format(Locale.ROOT, "%+.1f", factor)) + " (" + strength
                + weight + ")";
    }
}
