package stillstand.view;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import stillstand.report.Wording;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightResult;
import stillstand.uplift.FlightResult.Match;
import stillstand.uplift.FlightResult.Pairing;
import stillstand.view.StairModel.Lens;

/** The ways to look at the correlations of one flight: all together, each range of rates that remains possible, the likeliest. */
final class StairLenses {
    private StairLenses() {}

    /**
     * The lenses of a flight.
     *
     * @param isStudys whether the study is still the one that was run, so that a preview can tell which pairings go with a
     *     range of rates
     */
    static List<Lens> of(StairPicture picture, Optional<FlightResult> flight, boolean isStudys) {
        List<Lens> lenses = new ArrayList<>(List.of(Lens.ANSWER));
        if (flight.isPresent()) {
            List<Interval> regions = flight.get().regions95();
            for (int i = 0; i < regions.size() && regions.size() > 1; i++) {
                Interval region = regions.get(i);
                lenses.add(new Lens(
                        String.format(
                                Locale.ROOT,
                                "Possible correlation %d of %d: %s to %s m/kyr, probability %.2f%s",
                                i + 1,
                                regions.size(),
                                Wording.number(String.format(Locale.ROOT, "%.2f", region.low())),
                                Wording.number(String.format(Locale.ROOT, "%.2f", region.high())),
                                flight.get().weights95().get(i),
                                isStudys ? " (lines by preview)" : " (run again to see its lines)"),
                        Optional.of(List.of()),
                        Optional.of((region.low() + region.high()) / 2),
                        isStudys ? Optional.of(region) : Optional.empty()));
            }
            lenses.add(mostProbable(picture, flight.get().mostProbable()));
        }
        return lenses;
    }

    private static Lens mostProbable(StairPicture picture, FlightResult.Correlation single) {
        List<Pairing> pairs = single.matches().stream()
                .flatMap(match -> pairing(match).stream())
                .toList();
        return new Lens(
                String.format(
                        Locale.ROOT,
                        "Most probable single correlation (%.0f %% of draws): not the answer",
                        100 * single.share()),
                Optional.of(picture.links(pairs)),
                Optional.empty(),
                Optional.empty());
    }

    private static Optional<Pairing> pairing(Match match) {
        return match.highstand().map(stage -> new Pairing(match.level(), stage, 1));
    }
}
