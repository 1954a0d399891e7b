package stillstand.sensitivity;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.uncertainty.Normal;
import stillstand.uplift.FlightLevel;
import stillstand.uplift.FlightModel;
import stillstand.uplift.FlightRow;
import stillstand.uplift.SharedPriors;

/** Invented flights over an invented table of round numbers, for tests only: no science in them. */
final class InventedFlights {
    /** Standard deviation of the survey of every height, m; the rest of {@link #HEIGHT_SIGMA} is indicative meaning. */
    static final double SURVEY_SIGMA = 2;

    static final double HEIGHT_SIGMA = 2.5;

    private InventedFlights() {}

    /** Rows under the default model. */
    static List<FlightRow> rows() {
        List<FlightRow> rows = new ArrayList<>();
        rows.add(new FlightRow("A", 6, 1, 1, 1, 0, 4, 1, false, false, false));
        rows.add(row("B", 50, -55, 8, true));
        rows.add(row("C", 80, -20, 6, true));
        rows.add(row("D", 100, -18, 6, true));
        rows.add(row("E", 125, 6, 2.5, false));
        rows.add(row("F", 200, -12, 6, false));
        rows.add(row("G", 215, -8, 6, false));
        rows.add(row("H", 240, -6, 6, false));
        rows.add(row("I", 330, 3, 5, false));
        rows.add(row("J", 405, 8, 5, false));
        return rows;
    }

    private static FlightRow row(String stage, double ageKa, double levelMetres, double sigma, boolean interstadial) {
        return new FlightRow(stage, ageKa, 3, levelMetres, sigma, 0, 6, 1, true, interstadial, true);
    }

    static FlightModel model(double surveyedTo, double... heightsMetres) {
        List<FlightLevel> levels = new ArrayList<>();
        for (double heightMetres : heightsMetres) {
            levels.add(FlightLevel.undated("T" + (levels.size() + 1), new Normal(heightMetres, HEIGHT_SIGMA)));
        }
        return new FlightModel(levels, rows(), 2, surveyedTo, 1000, 0.05, true, false);
    }

    /** The same flight with a date on one level. */
    static FlightModel dated(FlightModel model, int level, double ageKa, double sigmaKa) {
        List<FlightLevel> levels = new ArrayList<>(model.levels());
        FlightLevel old = levels.get(level);
        List<stillstand.uncertainty.Uncertain> dates = new ArrayList<>(old.datesKa());
        dates.add(new Normal(ageKa, sigmaKa));
        levels.set(level, new FlightLevel(old.name(), old.shorelineMetres(), dates, 1, Optional.empty(), true));
        return model.withLevels(levels);
    }

    /** The same flight with another height of one level. */
    static FlightModel moved(FlightModel model, int level, double heightMetres, double sigmaMetres) {
        List<FlightLevel> levels = new ArrayList<>(model.levels());
        FlightLevel old = levels.get(level);
        levels.set(
                level,
                new FlightLevel(
                        old.name(), new Normal(heightMetres, sigmaMetres), old.datesKa(), 1, Optional.empty(), true));
        return model.withLevels(levels);
    }

    static SharedPriors shared(FlightModel model) {
        return SharedPriors.defaults(3, model.levels().size());
    }

    static List<Double> surveys(FlightModel model) {
        return model.levels().stream().map(level -> SURVEY_SIGMA).toList();
    }
}
