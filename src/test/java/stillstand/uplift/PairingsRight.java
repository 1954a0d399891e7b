package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.stream.IntStream;
import stillstand.uncertainty.StandardNormal;
import stillstand.uplift.FlightSimulator.Flight;

/**
 * How often the most probable pairing of a level (or none, where it is most probably a stray) is right, among levels whose
 * stated probability lies in one bin.
 *
 * @param from the bin's lower end
 * @param to its upper end
 * @param levels how many levels lie in it
 * @param stated sum of their stated probabilities
 * @param right how many are right
 * @param spread standard error of {@code right - stated}, from differences between flights: levels of one flight are right or
 *     wrong together
 */
record PairingsRight(double from, double to, int levels, double stated, int right, double spread) {
    private static final double[] ENDS = {0, 0.5, 0.8, 0.95, 1};

    /** The most probable pairing of one level. */
    record Most(double probability, boolean isRight) {}

    /** The most probable pairings of one flight, level by level. */
    static List<Most> most(Flight flight, PairingTable pairings) {
        List<Most> most = new ArrayList<>();
        for (int i = 0; i < pairings.levels(); i++) {
            int best = FlightSimulator.STRAY;
            double probability = pairings.stray(i);
            for (int j = 0; j < pairings.rows(); j++) {
                if (pairings.probability(i, j) > probability) {
                    best = j;
                    probability = pairings.probability(i, j);
                }
            }
            most.add(new Most(probability, flight.rows().get(i) == best));
        }
        return most;
    }

    /** The bins over many flights. */
    static List<PairingsRight> bins(List<List<Most>> flights) {
        return IntStream.range(0, ENDS.length - 1)
                .mapToObj(bin -> bin(flights, ENDS[bin], ENDS[bin + 1]))
                .toList();
    }

    private static PairingsRight bin(List<List<Most>> flights, double from, double to) {
        int levels = 0;
        double stated = 0;
        int right = 0;
        double square = 0;
        for (List<Most> flight : flights) {
            double statedHere = 0;
            int rightHere = 0;
            for (Most most : flight) {
                if (most.probability >= from && (most.probability < to || to == 1)) {
                    levels++;
                    statedHere += most.probability;
                    rightHere += most.isRight ? 1 : 0;
                }
            }
            stated += statedHere;
            right += rightHere;
            square += (rightHere - statedHere) * (rightHere - statedHere);
        }
        return new PairingsRight(from, to, levels, stated, right, Math.sqrt(square));
    }

    /** False by chance with probability 1e-4. */
    void assertFair() {
        double limit = StandardNormal.quantile(1 - RanksOfTruth.FALSE_ALARM / 2) * spread;
        assertTrue(levels > 0 && Math.abs(right - stated) < limit, this::toString);
    }

    @Override
    public String toString() {
        return String.format(
                Locale.ROOT,
                "%.2f to %.2f: %d levels, stated %.3f, right %.3f, standard error %.3f",
                from,
                to,
                levels,
                stated / levels,
                (double) right / levels,
                spread / levels);
    }
}
