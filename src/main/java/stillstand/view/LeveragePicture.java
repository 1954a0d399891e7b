package stillstand.view;

import java.util.List;
import java.util.Optional;
import stillstand.report.CurveChoiceReport;
import stillstand.report.LeverageReport;
import stillstand.sensitivity.AssumptionSwitch;
import stillstand.sensitivity.CurveChoice;
import stillstand.sensitivity.LevelTornado;
import stillstand.sensitivity.NextMeasurement;
import stillstand.sensitivity.ShortRate;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightResult;
import stillstand.view.LeverageModel.Part;

/**
 * Everything shown of one site.
 *
 * @param words the sentences of the terminal
 * @param halving what halving one kind of error would do to the flight
 * @param inputAxis change of the rate, m/kyr, that all bars share
 * @param rateAxis of the curves, m/kyr
 * @param asks whether the study asks every run what to measure next
 * @param wasAsked whether the last run was
 * @param stale whether all this is older than the study
 */
public record LeveragePicture(
        List<Words> words,
        List<CurveRow> curves,
        Interval rateAxis,
        List<FlightResult.Halving> halving,
        Interval halvingAxis,
        List<InputRow> inputs,
        Interval inputAxis,
        List<NextMeasurement> next,
        List<AssumptionSwitch> assumptions,
        List<LeftOutRow> leftOut,
        boolean asks,
        boolean wasAsked,
        boolean stale) {
    static final LeveragePicture NOTHING = empty(false);
    static final LeveragePicture ASKED = empty(true);

    private static LeveragePicture empty(boolean asks) {
        return new LeveragePicture(
                List.of(),
                List.of(),
                new Interval(-1, 1),
                List.of(),
                new Interval(-1, 1),
                List.of(),
                new Interval(-1, 1),
                List.of(),
                List.of(),
                List.of(),
                asks,
                false,
                false);
    }

    public LeveragePicture {
        words = List.copyOf(words);
        curves = List.copyOf(curves);
        halving = List.copyOf(halving);
        inputs = List.copyOf(inputs);
        next = List.copyOf(next);
        assumptions = List.copyOf(assumptions);
        leftOut = List.copyOf(leftOut);
    }

    /** What the terminal says to one question. */
    public record Words(Part part, List<String> sentences) {
        public Words {
            sentences = List.copyOf(sentences);
        }
    }

    /** What one curve, or a mixture of all, makes of one rate. */
    public record CurveRow(String rateOf, CurveChoice choice) {
        /** Its name; that of a mixture in words. */
        public String curve() {
            return CurveChoiceReport.name(choice.curve());
        }

        /** Its share; blank for a mixture. */
        public String weight() {
            return choice.mixesCurves() ? "" : CurveChoiceReport.weight(choice.weight());
        }

        /** Which highstands it makes of the levels. */
        public String records() {
            List<String> records = choice.matches().stream()
                    .map(match -> choice.level().isPresent()
                            ? match.highstand().orElse("")
                            : match.level() + " " + match.highstand().orElse("none"))
                    .toList();
            return String.join(", ", records);
        }
    }

    /**
     * What one input does to one rate by itself.
     *
     * @param rateOf the level and the highstand it is taken at
     * @param rate with every input at its median, in words; blank after the first row of a level
     * @param atMedians the same
     * @param input what it is
     * @param range of the input, in its unit
     * @param bar how far the rate moves; absent where the row is of another highstand
     * @param does the move in words
     */
    public record InputRow(
            String rateOf,
            String rate,
            double atMedians,
            String input,
            String range,
            Optional<LevelTornado.Bar> bar,
            String does) {}

    /** What is without one level, sample or curve. */
    public record LeftOutRow(
            String what, String name, String rateOf, ShortRate rate, Optional<ShortRate> without, String also) {
        /** How far the rate moves, in half widths of its 95 % interval. */
        public double move() {
            return LeverageReport.move(rate, without);
        }
    }
}
