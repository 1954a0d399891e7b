package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import stillstand.uncertainty.Normal;

/** Invented flights of round numbers; {@code paired.py} writes the same ones in numpy. */
final class FlightCases {
    private FlightCases() {}

    /** Levels of a coast that rises by 0.3 m/kyr, every other one dated, against rows 40 ka apart. */
    static FlightModel flight(int levels, int rows) {
        List<FlightRow> highstands = new ArrayList<>();
        for (int j = 0; j < rows; j++) {
            double levelMetres = j % 3 == 0 ? 0 : j % 3 == 1 ? -20 : -8;
            highstands.add(FlightRow.plain("H" + j, 80 + 40 * j, 2 + 0.4 * j, levelMetres, 4 + 0.2 * j));
        }
        double topMetres = 0.3 * (80 + 40 * rows);
        List<FlightLevel> seen = new ArrayList<>();
        for (int i = 0; i < levels; i++) {
            double heightMetres = topMetres * (i + 0.7) / levels;
            Normal shoreline = new Normal(heightMetres, 2);
            double ageKa = heightMetres / 0.3;
            seen.add(
                    i % 2 == 0
                            ? FlightLevel.undated("L" + i, shoreline)
                            : FlightLevel.dated("L" + i, shoreline, List.of(new Normal(ageKa, 0.03 * ageKa))));
        }
        return FlightModel.complete(seen, highstands, 2, topMetres);
    }

    static SharedNumbers shared() {
        return SharedNumbers.plain(0.7, 0.8);
    }

    /** Evidences of rates from 0.05 to 1 m/kyr, evenly spaced. */
    static double[] evidences(ShorelineFilter filter, int from, int to, int rates) {
        FilterWorkspace workspace = filter.workspace(false);
        double[] logs = new double[to - from];
        for (int k = from; k < to; k++) {
            double rate = 0.05 + 0.95 * k / (rates - 1);
            logs[k - from] = filter.logEvidence(new UpliftHistory.ConstantRate(rate), shared(), workspace);
        }
        return logs;
    }
}
