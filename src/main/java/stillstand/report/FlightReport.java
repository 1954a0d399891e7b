package stillstand.report;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import stillstand.uncertainty.Digits;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightResult;
import stillstand.uplift.FlightResult.Fate;
import stillstand.uplift.FlightResult.HandFit;
import stillstand.uplift.FlightResult.LeftOut;
import stillstand.uplift.FlightResult.Pairing;

/** What the flight of a site reads like: the rate or rates, the pairings, what is missing, what would change the mind. */
public final class FlightReport {
    private static final int NAME_WIDTH = 16;
    private static final double LEAST_SHOWN = 0.01;
    private static final double ALL_STRAY_TOLD = 0.05;
    private static final double RATHER_NONE = 0.5;
    private static final double NEARLY_SURE = 0.995;
    /** A highstand that may have left a terrace in the surveyed range with less than this is not missed. */
    private static final double MISSED = 0.1;

    private static final int FATES_SHOWN = 8;
    private static final int LEVELS_SHOWN = 3;

    private final FlightResult flight;

    /** The words for one flight. */
    public FlightReport(FlightResult flight) {
        this.flight = flight;
    }

    /** Sentences before the table of pairings. */
    public List<String> opening() {
        List<String> lines = new ArrayList<>();
        flight.bound()
                .ifPresent(
                        bound -> lines.add("The flight as a whole moves " + Wording.bound(bound, flight.rate()) + "."));
        lines.add("Flight of " + Wording.counted(flight.unmatched().size(), "level") + ": "
                + Wording.rate(flight.rate()) + " m/kyr" + (flight.history().isPresent() ? " today" : "") + ", 95 % "
                + Wording.interval95(flight.rate()) + ".");
        flight.history().ifPresent(history -> lines.addAll(new HistoryReport(flight, history).lines()));
        if (flight.regions95().size() > 1) {
            lines.add(flight.regions95().size() + " correlations remain possible: "
                    + IntStream.range(0, flight.regions95().size())
                            .mapToObj(i -> region(flight.regions95().get(i)) + " with probability "
                                    + probability(flight.weights95().get(i)))
                            .collect(Collectors.joining("; "))
                    + ".");
        }
        if (flight.probabilityAllStray() > ALL_STRAY_TOLD) {
            lines.add("With probability " + probability(flight.probabilityAllStray())
                    + " no level is a shoreline at all; the rate supposes that at least one is.");
        }
        return lines;
    }

    private String region(Interval region) {
        double sigma = flight.rate().sd().orElse(flight.rate().interval68().width() / 2);
        return Wording.number(Digits.text(region.low(), sigma, 2)) + " to "
                + Wording.number(Digits.text(region.high(), sigma, 2));
    }

    /** Levels against the highstands that they may record. */
    PlainTable pairings() {
        PlainTable table = new PlainTable(List.of("Level", "No shoreline", "Age (ka)", "Records"), 4);
        for (FlightResult.Unmatched level : flight.unmatched()) {
            table.row(List.of(
                    Wording.cut(level.level(), NAME_WIDTH),
                    level.probability() >= LEAST_SHOWN ? percent(level.probability()) : "",
                    flight.predictedAges().stream()
                            .filter(age -> age.level().equals(level.level()))
                            .map(age -> Wording.quantity(age.age()))
                            .findFirst()
                            .orElse(""),
                    flight.pairingsOf(level.level()).stream()
                            .filter(pair -> pair.probability() >= LEAST_SHOWN)
                            .map(FlightReport::pairing)
                            .collect(Collectors.joining(", "))));
        }
        return table;
    }

    private static String pairing(Pairing pair) {
        return pair.probability() >= NEARLY_SURE
                ? pair.highstand()
                : pair.highstand() + " " + percent(pair.probability());
    }

    private static String percent(double probability) {
        return Math.round(100 * probability) + " %";
    }

    /** Sentences after it. */
    public List<String> closing() {
        List<String> lines = new ArrayList<>();
        missing(lines);
        hinges().ifPresent(lines::add);
        strays(lines);
        halving().ifPresent(lines::add);
        flight.slidingFits().stream().findFirst().ifPresent(fit -> lines.add(sliding(fit)));
        return lines;
    }

    /** By how much halving each kind of error would narrow the rate; empty where nobody worked it out. */
    public Optional<String> halving() {
        return flight.halving().isEmpty()
                ? Optional.empty()
                : Optional.of("Halving one kind of error would change the width of the 95 % interval by: "
                        + flight.halving().stream()
                                .sorted(Comparator.comparingDouble(FlightResult.Halving::width95ChangePercent))
                                .map(half -> half.error() + " "
                                        + Wording.number(Digits.text(half.width95ChangePercent(), 0))
                                        + " %")
                                .collect(Collectors.joining(", "))
                        + ".");
    }

    private void missing(List<String> lines) {
        List<Fate> missed = flight.missing().stream()
                .filter(fate ->
                        fate.recorded() < RATHER_NONE && fate.recorded() + fate.unseen() + fate.reoccupied() > MISSED)
                .toList();
        if (missed.isEmpty()) {
            return;
        }
        lines.add("Stands of the sea without a level (recorded / unseen / re-occupied / outside the survey / absent):");
        missed.stream()
                .limit(FATES_SHOWN)
                .forEach(fate -> lines.add("  "
                        + (fate.highstand() + " at "
                                + Wording.number(String.format(
                                        Locale.ROOT, "%.0f ± %.0f m", fate.heightMetres(), fate.heightSigmaMetres())))
                        + ": "
                        + List.of(fate.recorded(), fate.unseen(), fate.reoccupied(), fate.outside(), fate.absent())
                                .stream()
                                .map(FlightReport::probability)
                                .collect(Collectors.joining(" / "))));
        if (missed.size() > FATES_SHOWN) {
            lines.add("  and " + (missed.size() - FATES_SHOWN) + " more in results.json");
        }
    }

    /** The levels whose removal moves the rate the most. */
    public Optional<String> hinges() {
        double median = flight.rate().median();
        String moved = flight.leaveOneOut().stream()
                .sorted(Comparator.comparingDouble(
                        (LeftOut out) -> -Math.abs(out.rate().median() - median)))
                .limit(LEVELS_SHOWN)
                .map(out -> "without " + out.level() + " it would be " + Wording.rate(out.rate()))
                .collect(Collectors.joining("; "));
        return moved.isEmpty() ? Optional.empty() : Optional.of("The rate hangs most on: " + moved + ".");
    }

    private void strays(List<String> lines) {
        String strays = flight.unmatched().stream()
                .filter(level -> level.probability() > RATHER_NONE)
                .map(FlightResult.Unmatched::level)
                .collect(Collectors.joining(", "));
        if (!strays.isEmpty()) {
            lines.add("Rather no shoreline of any highstand: " + strays + ".");
        }
    }

    private String sliding(HandFit fit) {
        double sigma = flight.rate().sd().orElse(flight.rate().interval68().width() / 2);
        return "Sliding the rate by hand would have given " + Wording.number(Digits.text(fit.rate(), sigma, 1))
                + " (heights missed by " + String.format(Locale.ROOT, "%.1f", fit.rmsMetres()) + " m"
                + fit.rSquared()
                        .map(r -> String.format(Locale.ROOT, ", R squared %.3f", r))
                        .orElse("")
                + "); a rate at least as far off has probability " + probability(fit.probabilityAsFar()) + ".";
    }

    /** {@code 0.86}; never 0 or 1 where it is neither. */
    static String probability(double probability) {
        if (probability < 0.005) {
            return probability > 0 ? "<0.01" : "0";
        }
        if (probability >= NEARLY_SURE) {
            return probability < 1 ? ">0.99" : "1";
        }
        return String.format(Locale.ROOT, "%.2f", probability);
    }
}
