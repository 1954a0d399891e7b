package stillstand.uplift;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.SplittableRandom;
import stillstand.sealevel.CurveFacts;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.HighstandClass;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.SharedErrors;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.HeightTerm;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.LogNormal;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.SplitNormal;
import stillstand.uncertainty.TruncatedNormal;
import stillstand.uncertainty.Uncertain;
import stillstand.uncertainty.Uniform;

/**
 * A level whose rate is known, with what its surveyor would know of it: a small world of its own, which shares no arithmetic
 * with the engine. The sea stands at {@code e} when the level forms at age {@code t}; the land carries what has
 * formed up by {@code X}; errors make of it what is measured.
 *
 * <p>Exact coverage is expected where the truths are drawn from what the answer supposes. So true ages are flat and measured
 * ones are the true ones plus an error (worlds are kept by what is <em>measured</em>, never by what is true, since truths of
 * all ages may have given a measured one), other inputs are drawn from their stated distribution, and the uplift is either
 * {@code X = U t} with {@code U} from a prior (the answer {@code rateWithPrior}) or flat in {@code X} (the answer
 * {@code rate}).
 *
 * @param rateMetresPerKyr the truth
 * @param height what is known of the height of the sea that made the level
 * @param lowering what is known of the lowering of its surface, m/kyr
 * @param explanations what is known of its age and of the sea then
 */
record SimulatedLevel(
        double rateMetresPerKyr, List<HeightTerm> height, Uncertain lowering, List<? extends SeaAtLevel> explanations) {

    /** Far beyond all changes of height that can bring a level into {@link #LOWEST_METRES} to {@link #HIGHEST_METRES}. */
    private static final double LEAST_CHANGE_METRES = -500;

    private static final double MOST_CHANGE_METRES = 3000;

    private static final double LOWEST_METRES = -50;
    private static final double HIGHEST_METRES = 200;

    /** How the land moves. */
    private interface Motion {
        /** Rate of the land, whose surface is lowered meanwhile. */
        double rateMetresPerKyr(double ageKa, double loweringMetresPerKyr);

        /** Whether a level seen at this height belongs to the world. */
        boolean keeps(double elevationMetres);
    }

    /** What kind of level. */
    enum World {
        /** A coral that grew at any time, tens to hundreds of ka ago, read on a curve that swings. */
        CORAL_ON_CURVE {
            @Override
            SimulatedLevel simulate(SplittableRandom dice, Rates rates) {
                double ageSigmaKa = between(dice, 0.5, 2.5);
                return coral(dice, rates, new Setting(SwingingSea.STRONG, 40, 240, 0, ageSigmaKa, 2.5, 3));
            }
        },
        /** A coral a few ka old whose age is hardly known: where a prior flat in the rate or in the height differ most. */
        YOUNG_CORAL {
            @Override
            SimulatedLevel simulate(SplittableRandom dice, Rates rates) {
                double ageSigmaKa = between(dice, 0.4, 1.2);
                return coral(dice, rates, new Setting(SwingingSea.WEAK, 0.5, 4, 0.01, ageSigmaKa, 0, 0.1));
            }
        },
        /** A terrace tied to a highstand that shares errors with others, with all terms that a landform's height can have. */
        TERRACE_OF_HIGHSTAND {
            @Override
            SimulatedLevel simulate(SplittableRandom dice, Rates rates) {
                return terrace(dice, rates);
            }
        },
        /** A terrace whose dates, of which some are wrong, say which of four highstands made it. */
        DATED_TERRACE {
            @Override
            SimulatedLevel simulate(SplittableRandom dice, Rates rates) {
                return datedTerrace(dice, rates);
            }
        };

        abstract SimulatedLevel simulate(SplittableRandom dice, Rates rates);
    }

    /** From what the true rates come. */
    enum Rates {
        /** The default prior: Cauchy about 0, scale 0.5, cut at -10 and 15 m/kyr. */
        CAUCHY {
            @Override
            Motion motion(SplittableRandom dice) {
                double from = Math.atan(-10 / 0.5);
                double to = Math.atan(15 / 0.5);
                return steady(0.5 * Math.tan(between(dice, from, to)));
            }
        },
        /** Normal, mean 0.4, standard deviation 0.3 m/kyr. */
        NORMAL {
            @Override
            Motion motion(SplittableRandom dice) {
                return steady(0.4 + 0.3 * dice.nextGaussian());
            }
        },
        /**
         * Every change of height since the level formed (uplift less lowering) is equally likely, whatever the age; levels are
         * kept where they are seen in a range of heights.
         */
        FLAT_IN_HEIGHT {
            @Override
            Motion motion(SplittableRandom dice) {
                double changeMetres = between(dice, LEAST_CHANGE_METRES, MOST_CHANGE_METRES);
                return new Motion() {
                    @Override
                    public double rateMetresPerKyr(double ageKa, double loweringMetresPerKyr) {
                        return changeMetres / ageKa + loweringMetresPerKyr;
                    }

                    @Override
                    public boolean keeps(double elevationMetres) {
                        return elevationMetres > LOWEST_METRES && elevationMetres < HIGHEST_METRES;
                    }
                };
            }
        };

        abstract Motion motion(SplittableRandom dice);

        private static Motion steady(double rate) {
            return new Motion() {
                @Override
                public double rateMetresPerKyr(double ageKa, double loweringMetresPerKyr) {
                    return rate;
                }

                @Override
                public boolean keeps(double elevationMetres) {
                    return true;
                }
            };
        }
    }

    /** How a coral is known; its measured age runs from {@code fromKa} to {@code toKa}, its true one from {@code youngestKa} on. */
    private record Setting(
            SwingingSea sea,
            double fromKa,
            double toKa,
            double youngestKa,
            double ageSigmaKa,
            double curveAgeSigmaKa,
            double sharedSigmaMetres) {}

    private static SimulatedLevel coral(SplittableRandom dice, Rates rates, Setting setting) {
        SwingingSea sea = setting.sea;
        double ageSigmaKa = setting.ageSigmaKa;
        double surveySigmaMetres = sea.scale * between(dice, 0.1, 4);
        double datumSigmaMetres = sea.scale * between(dice, 0.1, 1);
        double depthMedianMetres = sea.scale * between(dice, 2, 12);
        double depthSigmaLog = between(dice, 0.5, 1.2);
        while (true) {
            double trueKa = between(
                    dice, Math.max(setting.youngestKa, setting.fromKa - 9 * ageSigmaKa), setting.toKa + 9 * ageSigmaKa);
            double measuredKa = trueKa + ageSigmaKa * dice.nextGaussian();
            double readKa = trueKa + setting.curveAgeSigmaKa * dice.nextGaussian();
            double u = dice.nextGaussian();
            double seaMetres = sea.levelMetres(readKa)
                    + u * (u < 0 ? sea.sigmaLowMetres(readKa) : sea.sigmaHighMetres(readKa))
                    + setting.sharedSigmaMetres * dice.nextGaussian();
            double depthMetres = depthMedianMetres * Math.exp(depthSigmaLog * dice.nextGaussian());
            Motion motion = rates.motion(dice);
            double rate = motion.rateMetresPerKyr(trueKa, 0);
            double elevationMetres = seaMetres
                    - depthMetres
                    + rate * trueKa
                    + datumSigmaMetres * dice.nextGaussian()
                    + surveySigmaMetres * dice.nextGaussian();
            if (measuredKa > setting.fromKa && measuredKa < setting.toKa && motion.keeps(elevationMetres)) {
                Uncertain ageKa = setting.youngestKa > 0
                        ? new TruncatedNormal(measuredKa, ageSigmaKa, setting.youngestKa, Double.POSITIVE_INFINITY)
                        : new Normal(measuredKa, ageSigmaKa);
                return new SimulatedLevel(
                        rate,
                        List.of(
                                new HeightTerm(
                                        HeightTerm.Source.SURVEY, 1, new Normal(elevationMetres, surveySigmaMetres)),
                                new HeightTerm(HeightTerm.Source.DATUM, -1, new Normal(0, datumSigmaMetres)),
                                new HeightTerm(
                                        HeightTerm.Source.PALAEODEPTH,
                                        1,
                                        new LogNormal(0, depthMedianMetres, depthSigmaLog))),
                        new Exact(0),
                        List.of(new SeaAtLevel.OnCurve(
                                sea.curve, ageKa, setting.curveAgeSigmaKa, setting.sharedSigmaMetres, 1)));
            }
        }
    }

    private static SimulatedLevel terrace(SplittableRandom dice, Rates rates) {
        SharedErrors shared = new SharedErrors(3, 6, 3);
        boolean interstadial = dice.nextInt(2) == 0;
        HighstandClass kind = interstadial ? HighstandClass.INTERSTADIAL : HighstandClass.INTERGLACIAL;
        double ageKa = between(dice, 60, 330);
        double ageSigmaKa = between(dice, 0.5, 4);
        SplitNormal level = new SplitNormal(between(dice, -30, 8), between(dice, 1, 8), between(dice, 1, 8));
        Highstand row = new Highstand(
                "sim", kind, ageKa, ageSigmaKa, level, 8, 1, true, interstadial, true, between(dice, 0.5, 5), "test");
        SeaAtLevel pinned =
                new SeaAtLevel.AtHighstand(row, shared, 1, new Normal(ageKa, row.marginalAgeSigmaKa(shared)));
        Terrain terrain = Terrain.of(dice);
        while (true) {
            Stand stand = Stand.of(dice, row, shared);
            Motion motion = rates.motion(dice);
            Terrain.Seen seen = terrain.see(dice, stand, motion);
            if (motion.keeps(seen.elevationMetres)) {
                return new SimulatedLevel(
                        seen.rateMetresPerKyr,
                        terrain.height(seen.elevationMetres),
                        terrain.loweringMetresPerKyr,
                        List.of(pinned));
            }
        }
    }

    private static SimulatedLevel datedTerrace(SplittableRandom dice, Rates rates) {
        DateRules rules = new DateRules(0.05, 1000);
        Terrain terrain = Terrain.of(dice);
        double[] sigmasKa = new double[dice.nextInt(1, 4)];
        Arrays.setAll(sigmasKa, k -> between(dice, 1, 8));
        while (true) {
            Highstand row = FourStages.any(dice);
            Stand stand = Stand.of(dice, row, FourStages.TABLE.sharedErrors());
            List<DatedSample> dates = new ArrayList<>();
            for (double sigmaKa : sigmasKa) {
                boolean wrong = sigmasKa.length > 1 && dice.nextDouble() < rules.wrongProbability();
                // the normal kernel by which method and engine stand for growth at any time of the duration
                double grownKa = stand.ageKa + row.durationKa() / Math.sqrt(12) * dice.nextGaussian();
                double measuredKa =
                        wrong ? between(dice, 0, rules.oldestKa()) : grownKa + sigmaKa * dice.nextGaussian();
                dates.add(DatedLevels.date("s" + dates.size(), new Normal(measuredKa, sigmaKa)));
            }
            Motion motion = rates.motion(dice);
            Terrain.Seen seen = terrain.see(dice, stand, motion);
            if (motion.keeps(seen.elevationMetres)) {
                SeaLevelBasis basis = new SeaLevelBasis("sim", Optional.empty(), FourStages.TABLE);
                List<SeaAtLevel> explanations = LevelExplanations.of(
                                DatedLevels.terrace(dates), basis, rules, "sim / level")
                        .explanations();
                return new SimulatedLevel(
                        seen.rateMetresPerKyr,
                        terrain.height(seen.elevationMetres),
                        terrain.loweringMetresPerKyr,
                        explanations);
            }
        }
    }

    private static double between(SplittableRandom dice, double from, double to) {
        return from + (to - from) * dice.nextDouble();
    }

    /** A highstand as it really was. */
    private record Stand(double ageKa, double seaMetres) {
        static Stand of(SplittableRandom dice, Highstand row, SharedErrors shared) {
            double half = shared.curveAgeSigmaKa() / Math.sqrt(2);
            double ageKa = row.ageKa()
                    + row.ageSigmaKa() * dice.nextGaussian()
                    + (row.takesCurveAgeError() ? half * dice.nextGaussian() + half * dice.nextGaussian() : 0);
            SplitNormal level = (SplitNormal) row.level();
            double u = dice.nextGaussian();
            double seaMetres = level.centre()
                    + u * (u < 0 ? level.sigmaLow() : level.sigmaHigh())
                    + (row.takesOffset() ? shared.offsetSigmaMetres() * dice.nextGaussian() : 0)
                    + (row.takesInterstadialFactor() ? shared.interstadialSigmaMetres() * dice.nextGaussian() : 0)
                    + row.localOffsetSigmaMetres() * dice.nextGaussian();
            return new Stand(ageKa, seaMetres);
        }
    }

    /** A landform with all that stands between its height and that of the sea, and how well each is known. */
    private record Terrain(
            double surveySigmaMetres,
            double datumSigmaMetres,
            double coverUpToMetres,
            double referenceMetres,
            double referenceSigmaMetres,
            double rangeMetres,
            double stepMetres,
            TruncatedNormal loweringMetresPerKyr) {
        record Seen(double rateMetresPerKyr, double elevationMetres) {}

        static Terrain of(SplittableRandom dice) {
            return new Terrain(
                    between(dice, 0.2, 3),
                    between(dice, 0.01, 0.5),
                    between(dice, 0.1, 3),
                    between(dice, -2, 4),
                    between(dice, 0.01, 1),
                    between(dice, 0.1, 4),
                    between(dice, 0.1, 3),
                    new TruncatedNormal(0.02, 0.02, 0, Double.POSITIVE_INFINITY));
        }

        Seen see(SplittableRandom dice, Stand stand, Motion motion) {
            double lowering = -1;
            while (lowering < 0) {
                lowering = loweringMetresPerKyr.centre() + loweringMetresPerKyr.sigma() * dice.nextGaussian();
            }
            double rate = motion.rateMetresPerKyr(stand.ageKa, lowering);
            double elevationMetres = stand.seaMetres
                    + (rate - lowering) * stand.ageKa
                    + datumSigmaMetres * dice.nextGaussian()
                    + between(dice, 0, coverUpToMetres)
                    + referenceMetres
                    + referenceSigmaMetres * dice.nextGaussian()
                    - between(dice, -rangeMetres / 2, rangeMetres / 2)
                    - between(dice, 0, stepMetres)
                    + surveySigmaMetres * dice.nextGaussian();
            return new Seen(rate, elevationMetres);
        }

        List<HeightTerm> height(double elevationMetres) {
            return List.of(
                    new HeightTerm(HeightTerm.Source.SURVEY, 1, new Normal(elevationMetres, surveySigmaMetres)),
                    new HeightTerm(HeightTerm.Source.DATUM, -1, new Normal(0, datumSigmaMetres)),
                    new HeightTerm(HeightTerm.Source.COVER, -1, new Uniform(0, coverUpToMetres)),
                    new HeightTerm(
                            HeightTerm.Source.REFERENCE_WATER_LEVEL,
                            -1,
                            new Normal(referenceMetres, referenceSigmaMetres)),
                    new HeightTerm(
                            HeightTerm.Source.INDICATIVE_RANGE, 1, new Uniform(-rangeMetres / 2, rangeMetres / 2)),
                    new HeightTerm(HeightTerm.Source.COSEISMIC_STEP, 1, new Uniform(0, stepMetres)));
        }
    }

    /** An invented sea that rises and falls by up to 6 m in 1 ka, or a part of it, with a band that is not symmetrical. */
    private static final class SwingingSea {
        private static final double STEP_KA = 0.1;
        private static final double TO_KA = 320;
        private static final double SIGMAS_TO_95 = 1.96;
        static final SwingingSea STRONG = new SwingingSea(1);
        static final SwingingSea WEAK = new SwingingSea(0.05);

        private final double scale;
        private final SeaLevelCurve curve;

        private SwingingSea(double scale) {
            this.scale = scale;
            int rows = (int) Math.round(TO_KA / STEP_KA) + 1;
            double[] agesKa = new double[rows];
            double[] levels = new double[rows];
            double[] lows = new double[rows];
            double[] highs = new double[rows];
            for (int i = 0; i < rows; i++) {
                agesKa[i] = i * STEP_KA;
                levels[i] = levelMetres(agesKa[i]);
                lows[i] = levels[i] - SIGMAS_TO_95 * sigmaLowMetres(agesKa[i]);
                highs[i] = levels[i] + SIGMAS_TO_95 * sigmaHighMetres(agesKa[i]);
            }
            CurveFacts facts = new CurveFacts("test", "today", "test", "95 %", false, 5, 1.5, 0, List.of());
            curve = SeaLevelCurve.withBounds95("swinging", facts, agesKa, levels, lows, highs);
        }

        double levelMetres(double ageKa) {
            double slow = Math.cos(2 * Math.PI * (ageKa - 5) / 100);
            double quick = Math.cos(2 * Math.PI * ageKa / 23);
            return scale * (-55 + 45 * slow + 12 * quick);
        }

        double sigmaLowMetres(double ageKa) {
            return scale * (2 + Math.sin(ageKa / 9));
        }

        double sigmaHighMetres(double ageKa) {
            return scale * (3 + 1.5 * Math.cos(ageKa / 11));
        }
    }

    /** Highstands near enough to each other that dates seldom settle which. */
    private static final class FourStages {
        static final HighstandTable TABLE = new HighstandTable(
                "four",
                true,
                List.of(
                        row("a", HighstandClass.INTERSTADIAL, 82, 2, new SplitNormal(-18, 3, 6), 6, 0.7),
                        row("b", HighstandClass.INTERSTADIAL, 101, 3, new SplitNormal(-22, 5, 3), 8, 0.6),
                        row("c", HighstandClass.INTERGLACIAL, 123, 1, new SplitNormal(5, 2, 4), 10, 1),
                        row("d", HighstandClass.INTERGLACIAL, 135, 4, new SplitNormal(-8, 6, 6), 4, 0.3)),
                new SharedErrors(3, 6, 3),
                List.of());

        private FourStages() {}

        /** One of them, as often as it exists. */
        static Highstand any(SplittableRandom dice) {
            while (true) {
                Highstand row = TABLE.rows().get(dice.nextInt(TABLE.rows().size()));
                if (dice.nextDouble() < row.existsProbability()) {
                    return row;
                }
            }
        }

        private static Highstand row(
                String stage,
                HighstandClass kind,
                double ageKa,
                double ageSigmaKa,
                SplitNormal level,
                double durationKa,
                double existsProbability) {
            boolean interstadial = kind == HighstandClass.INTERSTADIAL;
            return new Highstand(
                    stage,
                    kind,
                    ageKa,
                    ageSigmaKa,
                    level,
                    durationKa,
                    existsProbability,
                    true,
                    interstadial,
                    interstadial,
                    kind.localOffsetSigmaMetres(),
                    "test");
        }
    }
}
