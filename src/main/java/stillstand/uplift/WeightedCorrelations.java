package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * Pairings and ages counted from weighted draws of whole correlations. What became of a highstand that no level records is taken from
 * an answer before the draws were weighed, in its proportions.
 */
final class WeightedCorrelations {
    private static final double NEGLIGIBLE = 1e-6;

    private final FlightModel model;
    private final double[] pair;
    private final double[] age;
    private final double[] ageSquare;

    WeightedCorrelations(FlightModel model, List<FlightDraw> draws, double[] weights) {
        this.model = model;
        int rows = model.rows().size();
        pair = new double[model.levels().size() * rows];
        age = new double[pair.length];
        ageSquare = new double[pair.length];
        double total = 0;
        for (double weight : weights) {
            total += weight;
        }
        for (int k = 0; k < weights.length; k++) {
            for (int i = 0; i < model.levels().size() && weights[k] > 0; i++) {
                Optional<FlightDraw.Match> match = draws.get(k).matches().get(i);
                if (match.isPresent()) {
                    int at = i * rows + match.get().row();
                    double ageKa = match.get().ageKa();
                    pair[at] += weights[k] / total;
                    age[at] += weights[k] / total * ageKa;
                    ageSquare[at] += weights[k] / total * ageKa * ageKa;
                }
            }
        }
    }

    /** @param before what became of highstands, by label and age; a generic older row that is not in it stood outside */
    PairingTable table(List<FlightResult.Fate> before) {
        int rows = model.rows().size();
        double[][] other = new double[4][rows];
        for (int j = 0; j < rows; j++) {
            double recorded = 0;
            for (int i = 0; i < model.levels().size(); i++) {
                recorded += pair[i * rows + j];
            }
            FlightRow row = model.rows().get(j);
            Optional<FlightResult.Fate> fate = before.stream()
                    .filter(each -> each.highstand().equals(row.stage()) && each.ageKa() == row.ageKa())
                    .findFirst();
            double scale = fate.map(each -> each.unseen() + each.reoccupied() + each.outside() + each.absent())
                    .orElse(0.0);
            double left = Math.max(0, 1 - recorded);
            boolean known = scale > 0;
            other[0][j] = known ? left * fate.orElseThrow().unseen() / scale : 0;
            other[1][j] = known ? left * fate.orElseThrow().reoccupied() / scale : 0;
            other[2][j] = known ? left * fate.orElseThrow().outside() / scale : left;
            other[3][j] = known ? left * fate.orElseThrow().absent() / scale : 0;
        }
        return new PairingTable(model.levels().size(), rows, pair, other[0], other[1], other[2], other[3]);
    }

    /** Age of each level given that it is a shoreline. */
    List<Optional<LevelAge>> ages() {
        int rows = model.rows().size();
        List<Optional<LevelAge>> ages = new ArrayList<>();
        for (int i = 0; i < model.levels().size(); i++) {
            List<LevelAge.Part> parts = new ArrayList<>();
            for (int j = 0; j < rows; j++) {
                int at = i * rows + j;
                if (pair[at] > NEGLIGIBLE) {
                    double mean = age[at] / pair[at];
                    double variance = Math.max(0, ageSquare[at] / pair[at] - mean * mean);
                    parts.add(new LevelAge.Part(j, pair[at], mean, Math.sqrt(variance)));
                }
            }
            ages.add(parts.isEmpty() ? Optional.empty() : Optional.of(new LevelAge(parts)));
        }
        return ages;
    }
}
