package stillstand.sensitivity;

import java.util.List;

/**
 * What answers hang on. Tornados, and curves left out where there are several, are in every run; the rest, which costs more, is
 * there where it was asked for.
 *
 * @param tornado one-at-a-time ranges of the rate of each level that has one
 * @param nextMeasurements ranked for each rate, the most narrowing first
 * @param assumptionSwitches each assumption switched
 * @param samplesLeftOut each dated sample left out
 * @param curvesLeftOut each of several curves left out
 */
public record Leverage(
        List<LevelTornado> tornado,
        List<NextMeasurement> nextMeasurements,
        List<AssumptionSwitch> assumptionSwitches,
        List<SampleLeftOut> samplesLeftOut,
        List<CurveLeftOut> curvesLeftOut) {
    /** Nothing said. */
    public static final Leverage NONE = new Leverage(List.of(), List.of(), List.of(), List.of(), List.of());

    public Leverage {
        tornado = List.copyOf(tornado);
        nextMeasurements = List.copyOf(nextMeasurements);
        assumptionSwitches = List.copyOf(assumptionSwitches);
        samplesLeftOut = List.copyOf(samplesLeftOut);
        curvesLeftOut = List.copyOf(curvesLeftOut);
    }
}
