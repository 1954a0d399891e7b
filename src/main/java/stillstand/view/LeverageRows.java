package stillstand.view;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Function;
import java.util.stream.DoubleStream;
import java.util.stream.Stream;
import stillstand.report.CurveChoiceReport;
import stillstand.report.FlightReport;
import stillstand.report.LeverageReport;
import stillstand.report.Wording;
import stillstand.sensitivity.AssumptionSwitch;
import stillstand.sensitivity.CurveLeftOut;
import stillstand.sensitivity.LevelTornado;
import stillstand.sensitivity.Leverage;
import stillstand.sensitivity.NextMeasurement;
import stillstand.sensitivity.SampleLeftOut;
import stillstand.sensitivity.ShortRate;
import stillstand.study.StudyResult;
import stillstand.uncertainty.Digits;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightResult;
import stillstand.view.LeverageModel.Part;
import stillstand.view.LeveragePicture.CurveRow;
import stillstand.view.LeveragePicture.InputRow;
import stillstand.view.LeveragePicture.LeftOutRow;
import stillstand.view.LeveragePicture.Words;

/** Sorts out what a result says of one site, or of one rate there. */
final class LeverageRows {
    private final StudyResult result;
    private final String site;
    private final String rateOf;
    private final Optional<FlightResult> flight;

    /**
     * For one site.
     *
     * @param rateOf the flight, a level, or {@link LeverageModel#EVERY}
     */
    LeverageRows(StudyResult result, String site, String rateOf) {
        this.result = result;
        this.site = site;
        this.rateOf = rateOf;
        flight = result.flight(site);
    }

    /**
     * All that is shown.
     *
     * @param asks whether the study asks every run what to measure next
     * @param wasAsked whether the last run was
     * @param stale whether the study has changed since
     */
    LeveragePicture picture(boolean asks, boolean wasAsked, boolean stale) {
        Leverage leverage = result.leverage();
        List<CurveRow> curves = here(
                result.curveChoice().stream()
                        .sorted(Comparator.comparing(choice -> choice.level().isPresent())) // the flight first
                        .map(choice -> new CurveRow(
                                LeverageReport.name(choice.level().orElse(NextMeasurement.FLIGHT)), choice))
                        .toList(),
                row -> row.choice().site(),
                CurveRow::rateOf);
        List<LevelTornado> tornados = here(leverage.tornado(), LevelTornado::site, LevelTornado::level);
        List<FlightResult.Halving> halving = isShown(NextMeasurement.FLIGHT)
                ? flight.map(FlightResult::halving).orElse(List.of()).stream()
                        .sorted(Comparator.comparingDouble(FlightResult.Halving::width95ChangePercent))
                        .toList()
                : List.of();
        return new LeveragePicture(
                words(),
                curves,
                around(
                        0.06,
                        curves.stream()
                                .map(row -> row.choice().rate().shortest95())
                                .flatMapToDouble(of -> DoubleStream.of(of.low(), of.high()))),
                halving,
                around(
                        0.06,
                        DoubleStream.concat(
                                DoubleStream.of(0),
                                halving.stream().mapToDouble(FlightResult.Halving::width95ChangePercent))),
                tornados.stream().flatMap(LeverageRows::inputs).toList(),
                around(
                        0.04,
                        tornados.stream()
                                .flatMap(of -> of.bars().stream()
                                        .flatMap(bar -> Stream.of(
                                                bar.rateAtLow95() - of.rate(), bar.rateAtHigh95() - of.rate())))
                                .mapToDouble(change -> change)),
                here(leverage.nextMeasurements(), NextMeasurement::site, NextMeasurement::rateOf),
                here(leverage.assumptionSwitches(), AssumptionSwitch::site, AssumptionSwitch::rateOf).stream()
                        .sorted(Comparator.comparingDouble(of -> -LeverageReport.move(of.rate(), of.rateWouldBe())))
                        .toList(),
                leftOut(leverage),
                asks,
                wasAsked,
                stale);
    }

    private <T> List<T> here(List<T> all, Function<T, String> siteOf, Function<T, String> rate) {
        return all.stream()
                .filter(each -> siteOf.apply(each).equals(site) && isShown(rate.apply(each)))
                .toList();
    }

    /** Whether the rate of a level, or of the flight under either of its names, is looked at. */
    private boolean isShown(String rate) {
        return rateOf.equals(LeverageModel.EVERY) || rateOf.equals(rate) || rateOf.equals(LeverageReport.name(rate));
    }

    private List<Words> words() {
        LeverageReport report = new LeverageReport(site, result.leverage());
        Map<Part, Stream<String>> words = new EnumMap<>(Part.class);
        words.put(
                Part.CURVES,
                Stream.concat(
                        CurveChoiceReport.ofSite(site, result.curveChoice()).stream(),
                        CurveChoiceReport.ofAll(result.curveEvidence()).stream()));
        words.put(Part.INPUTS, flight.map(FlightReport::new).flatMap(FlightReport::halving).stream());
        words.put(Part.NEXT, report.next().stream());
        words.put(Part.ASSUMPTIONS, report.switches().stream());
        words.put(
                Part.LEFT_OUT,
                Stream.concat(
                        flight.map(FlightReport::new).flatMap(FlightReport::hinges).stream(),
                        report.leftOut().stream()));
        List<Words> all = new ArrayList<>();
        words.forEach((part, lines) ->
                all.add(new Words(part, lines.map(String::strip).toList())));
        return all.stream().filter(of -> !of.sentences().isEmpty()).toList();
    }

    private static Stream<InputRow> inputs(LevelTornado of) {
        String name = of.level() + of.stage().map(stage -> " at " + stage).orElse(", at its own age");
        double longest =
                of.bars().stream().mapToDouble(LevelTornado.Bar::span95).max().orElse(0);
        double sigma = longest / 4;
        List<InputRow> rows = new ArrayList<>();
        for (LevelTornado.Bar bar : of.bars()) {
            rows.add(new InputRow(
                    name,
                    rows.isEmpty() ? number(of.rate(), sigma) : "",
                    of.rate(),
                    bar.input(),
                    range(bar),
                    Optional.of(bar),
                    number(bar.rateAtLow95(), sigma) + " to " + number(bar.rateAtHigh95(), sigma)));
        }
        for (LevelTornado.OtherStage other : of.otherStages()) {
            rows.add(new InputRow(
                    name,
                    "",
                    of.rate(),
                    "were it " + other.stage(),
                    "probability " + CurveChoiceReport.weight(other.probability()),
                    Optional.empty(),
                    number(other.rate(), sigma)));
        }
        return rows.stream();
    }

    private static String range(LevelTornado.Bar bar) {
        Interval values = bar.input95();
        double sigma = values.width() / 4;
        return number(values.low(), sigma) + " to " + number(values.high(), sigma) + " "
                + (bar.unit().equals("sigma") ? "σ" : bar.unit());
    }

    private static String number(double value, double sigma) {
        return Wording.number(Digits.text(value, sigma, 2));
    }

    private List<LeftOutRow> leftOut(Leverage leverage) {
        List<LeftOutRow> rows = new ArrayList<>();
        String flights = NextMeasurement.FLIGHT;
        flight.ifPresent(of -> of.leaveOneOut()
                .forEach(out -> rows.add(new LeftOutRow(
                        "level",
                        out.level(),
                        flights,
                        ShortRate.of(of.rate()),
                        Optional.of(out.rate()).map(ShortRate::of),
                        "log predictive density " + Wording.number(Digits.text(out.logPredictive(), 1))))));
        for (SampleLeftOut out : leverage.samplesLeftOut()) {
            if (out.site().equals(site)) {
                String name = out.sample() + " of " + out.level();
                out.levelRate()
                        .ifPresent(rate -> rows.add(
                                new LeftOutRow("sample", name, out.level(), rate, out.levelRateWithout(), "")));
                out.flightRate()
                        .ifPresent(rate ->
                                rows.add(new LeftOutRow("sample", name, flights, rate, out.flightRateWithout(), "")));
            }
        }
        for (CurveLeftOut out : leverage.curvesLeftOut()) {
            if (out.site().equals(site)) {
                rows.add(new LeftOutRow(
                        "curve",
                        out.curve(),
                        out.rateOf(),
                        out.rate(),
                        Optional.of(out.rateWithout()),
                        "weight " + CurveChoiceReport.weight(out.weight())));
            }
        }
        return rows.stream()
                .filter(row -> isShown(row.rateOf()))
                .sorted(Comparator.comparingDouble(row -> -row.move()))
                .toList();
    }

    /** The range of some numbers with a part of it to spare on both sides. */
    private static Interval around(double part, DoubleStream values) {
        double[] all = values.sorted().toArray();
        if (all.length == 0) {
            return new Interval(-1, 1);
        }
        double spare = Math.max(part * (all[all.length - 1] - all[0]), 1e-4);
        return new Interval(all[0] - spare, all[all.length - 1] + spare);
    }
}
