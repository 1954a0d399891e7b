package stillstand.uplift;

import java.util.List;
import java.util.SplittableRandom;
import java.util.function.UnaryOperator;
import java.util.stream.Stream;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.DrawStreams;
import stillstand.uplift.FlightSimulator.Flight;
import stillstand.uplift.FlightSimulator.Survey;
import stillstand.uplift.FlightSimulator.TruthDrawn;
import stillstand.uplift.FlightSimulator.Untrue;

/**
 * Worlds for the default model of a flight: the one it supposes, and others in which one thing is not as it supposes. Whatever
 * is not named is drawn from the model: shared errors, recording, strays (gamma, mean 0.7), wrong dates. One level is dated;
 * heights from 2 to 150 m were surveyed.
 */
enum UntrueWorld {
    NOTHING("nothing"),
    ABOVE_THE_TABLE("the table ends at stage 11 (405 ka), the flight does not") {
        @Override
        List<FlightRow> told() {
            return super.told().subList(0, RoundHighstands.UNTIL_STAGE_11);
        }

        @Override
        FlightModel withoutRemedy(FlightModel model) {
            return model.withRows(told());
        }
    },
    INTERSTADIALS_HIGHER("all interstadials stood 10 m above the curve") {
        @Override
        UnaryOperator<FlightRow> truly() {
            return row -> row.takesInterstadial()
                    ? new FlightRow(
                            row.stage(),
                            row.ageKa(),
                            row.ageSigmaKa(),
                            row.levelMetres() + 10,
                            row.levelSigmaMetres(),
                            0,
                            row.durationKa(),
                            row.existence(),
                            true,
                            false,
                            row.takesCurveAge())
                    : row;
        }

        @Override
        SharedPriors withoutRemedy(SharedPriors p) {
            return new SharedPriors(
                    p.offsetSigmaMetres(), 0, p.ageShiftSigmaKa(), p.recording(), p.decaysKa(), p.strays());
        }
    },
    TWO_SHORELINES("40 % of highstands leave a second shoreline, 3 to 10 m lower") {
        @Override
        Untrue untrue() {
            return new Untrue(0.4, 0);
        }

        @Override
        SharedPriors withoutRemedy(SharedPriors p) {
            return new SharedPriors(
                    p.offsetSigmaMetres(),
                    p.interstadialSigmaMetres(),
                    p.ageShiftSigmaKa(),
                    p.recording(),
                    p.decaysKa(),
                    new SharedPriors.Strays.Known(0.05));
        }
    },
    RECORDING_DECAYS("recording falls as exp(-age / 350 ka)") {
        @Override
        SharedPriors truly(SharedPriors p) {
            return withDecays(p, List.of(350.0));
        }

        @Override
        SharedPriors withoutRemedy(SharedPriors p) {
            return withDecays(p, List.of(Double.POSITIVE_INFINITY));
        }
    },
    DATES_TOO_OLD("one date in four is 20 to 100 ka too old") {
        @Override
        Untrue untrue() {
            return new Untrue(0, 0.25);
        }

        @Override
        double wrongDateProbability() {
            return 0;
        }

        @Override
        FlightModel withoutRemedy(FlightModel m) {
            return model(m.levels(), m.rows(), 0);
        }
    };

    private static final double FROM_METRES = 2;
    private static final double TO_METRES = 150;
    private static final double LEVEL_SIGMA_METRES = 2;
    private static final double WRONG_DATE_PROBABILITY = 0.05;
    private static final double STRAYS = 0.7;
    private static final FlightMonteCarlo.Effort EFFORT = new FlightMonteCarlo.Effort(4, 256, 50, 100);

    private final String title;

    UntrueWorld(String title) {
        this.title = title;
    }

    /** What is untrue, in words. */
    String title() {
        return title;
    }

    /** The table that the engine is told, before generic older rows. */
    List<FlightRow> told() {
        return RoundHighstands.fromCurve();
    }

    UnaryOperator<FlightRow> truly() {
        return UnaryOperator.identity();
    }

    SharedPriors truly(SharedPriors priors) {
        return priors;
    }

    Untrue untrue() {
        return Untrue.NOTHING;
    }

    double wrongDateProbability() {
        return WRONG_DATE_PROBABILITY;
    }

    FlightModel withoutRemedy(FlightModel model) {
        return model;
    }

    SharedPriors withoutRemedy(SharedPriors priors) {
        return priors;
    }

    private static SharedPriors withDecays(SharedPriors p, List<Double> decaysKa) {
        return new SharedPriors(
                p.offsetSigmaMetres(),
                p.interstadialSigmaMetres(),
                p.ageShiftSigmaKa(),
                p.recording(),
                decaysKa,
                p.strays());
    }

    /** The answer of the default model, and the one that lacks the remedy of this world alone. */
    record Answered(double trueRate, RatePosterior shipped, RatePosterior lacking, double effectiveDraws) {}

    /** Flights of this world and what is said of them. */
    List<Answered> flights(TruthDrawn truths, int count, long seed) {
        SplittableRandom seeds = new SplittableRandom(seed);
        List<SplittableRandom> dice = Stream.generate(seeds::split).limit(count).toList();
        FlightSimulator simulator = simulator();
        return dice.parallelStream()
                .map(each -> answered(simulator.flight(truths, each), each.nextLong()))
                .toList();
    }

    private FlightSimulator simulator() {
        SharedPriors defaults = RoundHighstands.defaults(1);
        SharedPriors drawn = new SharedPriors(
                defaults.offsetSigmaMetres(),
                defaults.interstadialSigmaMetres(),
                defaults.ageShiftSigmaKa(),
                defaults.recording(),
                defaults.decaysKa(),
                new SharedPriors.Strays.GammaPrior(STRAYS));
        return new FlightSimulator(
                OlderRows.after(RoundHighstands.fromCurve()).stream()
                        .map(truly())
                        .toList(),
                truly(drawn),
                new Survey(FROM_METRES, TO_METRES, true, LEVEL_SIGMA_METRES, 0.02, 1, wrongDateProbability()),
                untrue());
    }

    private Answered answered(Flight flight, long seed) {
        FlightModel model = model(flight.levels(), OlderRows.after(told()), WRONG_DATE_PROBABILITY);
        SharedPriors priors = RoundHighstands.defaults(flight.levels().size());
        SampledFlightAnswer shipped = answer(model, priors, seed);
        RatePosterior lacking = this == NOTHING
                ? shipped.answer().rate()
                : answer(withoutRemedy(model), withoutRemedy(priors), seed)
                        .answer()
                        .rate();
        return new Answered(flight.truth().recentRate(), shipped.answer().rate(), lacking, shipped.effectiveDraws());
    }

    private static FlightModel model(List<FlightLevel> levels, List<FlightRow> rows, double wrongDateProbability) {
        return new FlightModel(levels, rows, FROM_METRES, TO_METRES, 1000, wrongDateProbability, true, false);
    }

    private static SampledFlightAnswer answer(FlightModel model, SharedPriors priors, long seed) {
        return FlightMonteCarlo.answer(
                model, CauchyPrior.DEFAULT, priors, EFFORT, new DrawStreams(seed), "flight", RunMonitor.SILENT);
    }
}
