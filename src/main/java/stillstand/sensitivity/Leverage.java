package stillstand.sensitivity;

import java.util.List;

/**
 * What answers hang on, beyond what every run says of itself.
 *
 * @param nextMeasurements ranked for each rate, the most narrowing first
 * @param assumptionSwitches each assumption switched
 * @param samplesLeftOut each dated sample left out
 */
public record Leverage(
        List<NextMeasurement> nextMeasurements,
        List<AssumptionSwitch> assumptionSwitches,
        List<SampleLeftOut> samplesLeftOut) {
    public Leverage {
        nextMeasurements = List.copyOf(nextMeasurements);
        assumptionSwitches = List.copyOf(assumptionSwitches);
        samplesLeftOut = List.copyOf(samplesLeftOut);
    }
}
