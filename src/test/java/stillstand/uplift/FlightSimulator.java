package stillstand.uplift;

import java.util.ArrayList;
import java.util.Collections;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Random;
import java.util.Set;
import java.util.SplittableRandom;
import java.util.stream.IntStream;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Uncertain;

/**
 * Leaves flights of terraces behind, as the generative model tells it: highstands come and go, the coast moves, a shoreline
 * survives where no younger sea reached it, survivors are recorded by chance, and levels that are no shoreline lie between them.
 * Written from the text of the statistical model alone, by a hand that had not seen the filter: it knows no cells, messages,
 * or sums over pairings.
 *
 * @param rows the highstands as they truly are, young to old; their sigmas are of their own parts only
 * @param shared what the numbers common to all rows and levels are drawn from
 * @param survey where one looked, and how well one measured
 * @param untrue what the flights do that no model says
 */
record FlightSimulator(List<FlightRow> rows, SharedPriors shared, Survey survey, Untrue untrue) {
    /** Stands in {@link Flight#rows()} for a level that is no shoreline. */
    static final int STRAY = -1;

    private static final double STRAY_AGE_MAXIMUM_KA = 1000;
    private static final int FEWEST_LEVELS = 3;

    FlightSimulator {
        rows = List.copyOf(rows);
    }

    /**
     * @param todaysSeaIsFloor whether a shoreline must stand above today's sea
     * @param levelSigmaMetres of every measured height
     * @param dateSigmaShare of the age, for every date
     * @param dates how many levels are dated, drawn at random; all where there are fewer
     * @param wrongDateProbability that a date says nothing of its level but is uniform to 1000 ka
     */
    record Survey(
            double fromMetres,
            double toMetres,
            boolean todaysSeaIsFloor,
            double levelSigmaMetres,
            double dateSigmaShare,
            int dates,
            double wrongDateProbability) {}

    /**
     * @param twoShorelines probability that a highstand that survives leaves a second shoreline 3 to 10 m below its own
     * @param dateTooOld probability that a date is 20 to 100 ka too old
     */
    record Untrue(double twoShorelines, double dateTooOld) {
        static final Untrue NOTHING = new Untrue(0, 0);
    }

    /** How the coast moved: one rate since the change, another before it. Rates in m/kyr. */
    record Truth(double recentRate, double changeKa, double olderRate) {
        static Truth constant(double rate) {
            return new Truth(rate, Double.POSITIVE_INFINITY, rate);
        }

        double upliftMetresSince(double ageKa) {
            return ageKa <= changeKa ? recentRate * ageKa : recentRate * changeKa + olderRate * (ageKa - changeKa);
        }
    }

    /**
     * @param levels what the surveyor brings home, lowest first as they truly lie
     * @param rows by level, the number of the row it records, or {@link #STRAY}
     */
    record Flight(Truth truth, List<FlightLevel> levels, List<Integer> rows) {
        boolean hasShoreline() {
            return rows.stream().anyMatch(row -> row != STRAY);
        }
    }

    /** How the rate is drawn; the prior that the engine is told must say the same. */
    interface TruthDrawn {
        Truth from(SplittableRandom dice);
    }

    /** Every factor of the rate equally likely. */
    static TruthDrawn logUniform(double fromRate, double toRate) {
        return dice -> Truth.constant(logUniform(dice, fromRate, toRate));
    }

    static double logUniform(SplittableRandom dice, double from, double to) {
        return from * Math.exp(dice.nextDouble() * Math.log(to / from));
    }

    /** Cauchy about 0, redrawn outside -10 to 15 m/kyr. */
    static TruthDrawn cauchy(double scale) {
        return dice -> {
            while (true) {
                double rate = scale * Math.tan(Math.PI * (dice.nextDouble() - 0.5));
                if (rate >= -10 && rate <= 15) {
                    return Truth.constant(rate);
                }
            }
        };
    }

    /** A shoreline or stray level as it truly lies. */
    private record Shore(double heightMetres, double measuredMetres, double ageKa, int row) {}

    /**
     * A flight of three or more levels, one a shoreline: others are thrown away together with their rate, so that a rate drawn
     * from the prior stays one of those the data leave possible.
     */
    Flight flight(TruthDrawn truths, SplittableRandom dice) {
        while (true) {
            Flight flight = anyFlight(truths.from(dice), dice);
            if (flight.levels.size() >= FEWEST_LEVELS && flight.hasShoreline()) {
                return flight;
            }
        }
    }

    /** One flight, however many levels it has. */
    Flight anyFlight(Truth truth, SplittableRandom dice) {
        SharedNumbers numbers = drawShared(dice);
        List<Shore> shores = recorded(truth, numbers, dice);
        for (double e = dice.nextExponential(); e < numbers.expectedStrays(); e += dice.nextExponential()) {
            double heightMetres = uniform(dice, survey.fromMetres, survey.toMetres);
            shores.add(new Shore(heightMetres, heightMetres, uniform(dice, 0, STRAY_AGE_MAXIMUM_KA), STRAY));
        }
        shores.sort(Comparator.comparingDouble(Shore::heightMetres));
        Set<Integer> dated = chooseDated(shores.size(), dice);
        List<FlightLevel> levels = new ArrayList<>();
        for (int i = 0; i < shores.size(); i++) {
            Shore shore = shores.get(i);
            List<Uncertain> dates = dated.contains(i) ? List.of(date(shore, dice)) : List.of();
            levels.add(FlightLevel.dated(
                    "level " + (i + 1), new Normal(shore.measuredMetres, survey.levelSigmaMetres), dates));
        }
        return new Flight(
                truth, List.copyOf(levels), shores.stream().map(Shore::row).toList());
    }

    private SharedNumbers drawShared(SplittableRandom dice) {
        return new SharedNumbers(
                shared.offsetSigmaMetres() * dice.nextGaussian(),
                shared.interstadialSigmaMetres() * dice.nextGaussian(),
                shared.ageShiftSigmaKa() * dice.nextGaussian(),
                shared.recording().quantile(dice.nextDouble()),
                shared.decaysKa().get(dice.nextInt(shared.decaysKa().size())),
                shared.strays().quantile(dice.nextDouble()));
    }

    /** Rows in table order, each against the highest sea so far. */
    private List<Shore> recorded(Truth truth, SharedNumbers numbers, SplittableRandom dice) {
        List<Shore> shores = new ArrayList<>();
        double highestMetres = survey.todaysSeaIsFloor ? 0 : Double.NEGATIVE_INFINITY;
        for (int j = 0; j < rows.size(); j++) {
            FlightRow row = rows.get(j);
            if (dice.nextDouble() >= row.existence()) {
                continue;
            }
            double ageKa = row.ageKa()
                    + (row.takesCurveAge() ? numbers.ageShiftKa() : 0)
                    + row.ageSigmaKa() * dice.nextGaussian();
            double seaMetres = row.levelMetres()
                    + (row.takesOffset() ? numbers.offsetMetres() : 0)
                    + (row.takesInterstadial() ? numbers.interstadialMetres() : 0)
                    + row.levelSigmaMetres() * dice.nextGaussian();
            double heightMetres = seaMetres + truth.upliftMetresSince(ageKa);
            double probability = numbers.recordingProbability() * Math.exp(-row.ageKa() / numbers.recordingDecayKa());
            if (heightMetres > highestMetres) {
                double secondMetres = heightMetres - uniform(dice, 3, 10);
                if (dice.nextDouble() < untrue.twoShorelines && secondMetres > highestMetres) {
                    record(shores, secondMetres, ageKa, j, probability, dice);
                }
                record(shores, heightMetres, ageKa, j, probability, dice);
                highestMetres = heightMetres;
            }
        }
        return shores;
    }

    private void record(
            List<Shore> shores, double heightMetres, double ageKa, int row, double probability, SplittableRandom dice) {
        boolean inside = heightMetres > survey.fromMetres && heightMetres < survey.toMetres;
        if (inside && dice.nextDouble() < probability) {
            double measuredMetres = heightMetres + survey.levelSigmaMetres * dice.nextGaussian();
            shores.add(new Shore(heightMetres, measuredMetres, ageKa, row));
        }
    }

    private Set<Integer> chooseDated(int levels, SplittableRandom dice) {
        List<Integer> all = new ArrayList<>(IntStream.range(0, levels).boxed().toList());
        Collections.shuffle(all, new Random(dice.nextLong()));
        return new HashSet<>(all.subList(0, Math.min(survey.dates, levels)));
    }

    /** A coral grew at any time of its highstand; its date misses by a share of its age, which the laboratory reads off the date. */
    private Uncertain date(Shore shore, SplittableRandom dice) {
        double durationKa = shore.row == STRAY ? 0 : rows.get(shore.row).durationKa();
        double grewKa = shore.ageKa + durationKa * (dice.nextDouble() - 0.5);
        double measuredKa = grewKa * (1 + survey.dateSigmaShare * dice.nextGaussian());
        if (dice.nextDouble() < untrue.dateTooOld) {
            measuredKa += uniform(dice, 20, 100);
        }
        if (shore.row == STRAY || dice.nextDouble() < survey.wrongDateProbability) {
            measuredKa = uniform(dice, 0, STRAY_AGE_MAXIMUM_KA);
        }
        return new Normal(measuredKa, survey.dateSigmaShare * Math.abs(measuredKa));
    }

    private static double uniform(SplittableRandom dice, double from, double to) {
        return from + (to - from) * dice.nextDouble();
    }
}
